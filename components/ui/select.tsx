import { clsx } from 'clsx';
import { useId, type ComponentProps } from 'react';
import { controlClass, controlSizes, Field, fieldAria, type FieldText } from './field';

export type Option = { value: string; label: string; isDisabled?: boolean };

type SelectProps = FieldText & {
  options: Option[];
  /** Shown first, with an empty value. */
  prompt?: string;
  controlSize?: 'normal' | 'bench';
} & ComponentProps<'select'>;

export function Select({
  label,
  hint,
  error,
  isOptional,
  options,
  prompt,
  controlSize = 'normal',
  className,
  ...select
}: SelectProps) {
  const ownId = useId();
  const id = select.id ?? ownId;
  return (
    <Field id={id} label={label} hint={hint} error={error} isOptional={isOptional} className={className}>
      <select {...select} {...fieldAria(id, { hint, error })} className={clsx(controlClass, controlSizes[controlSize])}>
        {prompt && <option value="">{prompt}</option>}
        {options.map((option) => (
          <option key={option.value} value={option.value} disabled={option.isDisabled}>
            {option.label}
          </option>
        ))}
      </select>
    </Field>
  );
}
