import { clsx } from 'clsx';
import { useId, type ChangeEventHandler } from 'react';
import { FieldError } from './field';

type SegmentedProps = {
  legend: string;
  name: string;
  options: { value: string; label: string }[];
  /** Picked at first, for a form that keeps its own values. */
  defaultValue?: string;
  /** Picked now, for a form that is told; needs `onChange`. */
  value?: string;
  onChange?: ChangeEventHandler<HTMLInputElement>;
  isLegendHidden?: boolean;
  size?: 'normal' | 'bench';
  error?: string;
  className?: string;
};

/** A few choices side by side, one picked: radio buttons to the keyboard and to a screen reader. */
export function Segmented({
  legend,
  name,
  options,
  defaultValue,
  value,
  onChange,
  isLegendHidden = false,
  size = 'normal',
  error,
  className,
}: SegmentedProps) {
  const id = useId();
  const checked = (option: string) =>
    value === undefined ? { defaultChecked: option === defaultValue } : { checked: option === value, onChange };
  return (
    <fieldset className={className} aria-describedby={error ? `${id}-error` : undefined}>
      <legend className={isLegendHidden ? 'sr-only' : 'mb-1.5 font-semibold'}>{legend}</legend>
      <div className="flex gap-1 rounded-md bg-line p-1">
        {options.map((option) => (
          <label
            key={option.value}
            className={clsx(
              'flex flex-1 items-center justify-center rounded px-4 text-center font-semibold',
              'has-checked:bg-sheet has-checked:text-ink',
              'has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-finish-deep',
              size === 'bench' ? 'min-h-12 text-lg' : 'min-h-9',
            )}
          >
            <input type="radio" name={name} value={option.value} {...checked(option.value)} className="sr-only" />
            {option.label}
          </label>
        ))}
      </div>
      <FieldError id={id} error={error} />
    </fieldset>
  );
}
