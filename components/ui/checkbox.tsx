import { clsx } from 'clsx';
import { useId, type ComponentProps } from 'react';
import { fieldAria, FieldError, type FieldText } from './field';

export function Checkbox({
  label,
  hint,
  error,
  className,
  ...input
}: Omit<FieldText, 'isOptional'> & ComponentProps<'input'>) {
  const ownId = useId();
  const id = input.id ?? ownId;
  return (
    <div className={clsx('grid gap-1', className)}>
      <label htmlFor={id} className="flex min-h-11 items-center gap-3">
        <input
          {...input}
          type="checkbox"
          {...fieldAria(id, { hint, error })}
          className="size-5 shrink-0 accent-finish-deep"
        />
        <span>{label}</span>
      </label>
      {hint && (
        <p id={`${id}-hint`} className="pl-8 text-sm text-soft">
          {hint}
        </p>
      )}
      <FieldError id={id} error={error} />
    </div>
  );
}
