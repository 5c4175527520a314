import { clsx } from 'clsx';
import type { ReactNode } from 'react';

export type FieldText = {
  label: string;
  hint?: ReactNode;
  /** What is wrong and what to do, as a sentence. */
  error?: string;
  isOptional?: boolean;
};

/** Ties a control to the hint and the error that `Field` shows for it. */
export function fieldAria(id: string, { hint, error }: Pick<FieldText, 'hint' | 'error'>) {
  const described = [hint && `${id}-hint`, error && `${id}-error`].filter(Boolean).join(' ');
  return {
    id,
    'aria-describedby': described === '' ? undefined : described,
    'aria-invalid': error ? true : undefined,
  } as const;
}

export const controlClass =
  'w-full rounded-[5px] border-[1.5px] border-edge bg-sheet px-3 text-base text-ink aria-invalid:border-late disabled:opacity-55';

export const controlSizes = { normal: 'min-h-11 py-2', bench: 'min-h-13 py-3 text-lg' };

/** A label, its control, and the words below it. The control inside takes `fieldAria(id, ...)`. */
export function Field({
  id,
  label,
  hint,
  error,
  isOptional = false,
  className,
  children,
}: FieldText & { id: string; className?: string; children: ReactNode }) {
  return (
    <div className={clsx('grid gap-1.5', className)}>
      <label htmlFor={id} className="font-semibold">
        {label}
        {isOptional && <span className="font-normal text-soft"> (if you like)</span>}
      </label>
      {hint && (
        <p id={`${id}-hint`} className="text-sm text-soft">
          {hint}
        </p>
      )}
      {children}
      <FieldError id={id} error={error} />
    </div>
  );
}

export function FieldError({ id, error }: { id: string; error?: string }) {
  if (!error) return null;
  return (
    <p id={`${id}-error`} className="text-sm font-semibold text-late">
      {error}
    </p>
  );
}
