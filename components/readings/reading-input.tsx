import { clsx } from 'clsx';
import { useId, type ComponentProps } from 'react';
import { controlClass, controlSizes, FieldError, type FieldText } from '@/components/ui/field';
import type { Doubt } from '@/lib/craft/doubt';

type ReadingInputProps = Pick<FieldText, 'label' | 'hint' | 'isOptional'> & {
  value: string;
  onType: (text: string) => void;
  /** The unit a plain number is taken in, behind the field. */
  unit?: string;
  doubt?: Doubt;
  /** Said when the field is empty and the others need it. */
  missing?: string;
} & Pick<ComponentProps<'input'>, 'inputMode' | 'maxLength' | 'autoComplete'>;

/** One figure as it is typed at the bench; what is odd about it is said below it at once. */
export function ReadingInput({
  label,
  hint,
  isOptional,
  value,
  onType,
  unit,
  doubt,
  missing,
  ...input
}: ReadingInputProps) {
  const id = useId();
  const error = doubt?.kind === 'wrong' ? doubt.sentence : missing;
  const question = doubt?.kind === 'ask' ? doubt.sentence : undefined;
  const described = [hint && `${id}-hint`, error && `${id}-error`, question && `${id}-ask`].filter(Boolean).join(' ');
  return (
    <div className="grid content-start gap-1.5">
      <label htmlFor={id} className="font-semibold">
        {label}
        {isOptional && <span className="font-normal text-soft"> (if you like)</span>}
      </label>
      {hint && (
        <p id={`${id}-hint`} className="text-sm text-soft">
          {hint}
        </p>
      )}
      <div className="flex items-center gap-2.5">
        <input
          type="text"
          inputMode="decimal"
          autoComplete="off"
          maxLength={40}
          {...input}
          id={id}
          value={value}
          aria-invalid={error ? true : undefined}
          aria-describedby={described === '' ? undefined : described}
          onChange={({ target }) => onType(target.value)}
          className={clsx(controlClass, controlSizes.bench, 'min-w-0')}
        />
        {unit && <span className="shrink-0 text-lg text-soft">{unit}</span>}
      </div>
      <div aria-live="polite" className="empty:hidden">
        <FieldError id={id} error={error} />
        {question && (
          <p id={`${id}-ask`} className="text-sm font-semibold text-brass-deep">
            {question}
          </p>
        )}
      </div>
    </div>
  );
}
