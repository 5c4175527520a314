import { clsx } from 'clsx';
import { useId, type ComponentProps } from 'react';
import { controlClass, controlSizes, Field, fieldAria, type FieldText } from './field';

type Size = { controlSize?: 'normal' | 'bench' };

export function TextInput({
  label,
  hint,
  error,
  isOptional,
  controlSize = 'normal',
  className,
  ...input
}: FieldText & Size & ComponentProps<'input'>) {
  const ownId = useId();
  const id = input.id ?? ownId;
  return (
    <Field id={id} label={label} hint={hint} error={error} isOptional={isOptional} className={className}>
      <input
        type="text"
        {...input}
        {...fieldAria(id, { hint, error })}
        className={clsx(controlClass, controlSizes[controlSize])}
      />
    </Field>
  );
}

/** Several lines, set as text to read. */
export function TextArea({
  label,
  hint,
  error,
  isOptional,
  controlSize = 'normal',
  className,
  ...area
}: FieldText & Size & ComponentProps<'textarea'>) {
  const ownId = useId();
  const id = area.id ?? ownId;
  return (
    <Field id={id} label={label} hint={hint} error={error} isOptional={isOptional} className={className}>
      <textarea
        rows={4}
        {...area}
        {...fieldAria(id, { hint, error })}
        className={clsx(controlClass, controlSizes[controlSize], 'font-read leading-relaxed')}
      />
    </Field>
  );
}
