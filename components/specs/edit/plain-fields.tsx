import { clsx } from 'clsx';
import { useId, type ReactNode } from 'react';
import { controlClass, fieldAria, FieldError } from '@/components/ui/field';
import type { Option } from '@/components/ui/select';

type PlainProps = {
  /** Read out; on the screen the row's own heading says it. */
  label: string;
  value: string;
  say: (value: string) => void;
  sentence?: string;
  className?: string;
};

const sizeClass = 'min-h-11 py-2';

/** One line of text in a row that has its heading already. */
export function PlainInput({
  label,
  value,
  say,
  sentence,
  className,
  placeholder,
  list,
}: PlainProps & { placeholder?: string; list?: string }) {
  const id = useId();
  return (
    <span className={clsx('grid min-w-0 grid-cols-[minmax(0,1fr)] content-start gap-1', className)}>
      <input
        type="text"
        {...fieldAria(id, { error: sentence })}
        aria-label={label}
        value={value}
        placeholder={placeholder}
        list={list}
        autoComplete="off"
        onChange={(event) => say(event.target.value)}
        className={clsx(controlClass, sizeClass)}
      />
      <FieldError id={id} error={sentence} />
    </span>
  );
}

export function PlainSelect({
  label,
  value,
  say,
  sentence,
  className,
  options,
  prompt,
}: PlainProps & { options: Option[]; prompt?: string }) {
  const id = useId();
  return (
    <span className={clsx('grid min-w-0 grid-cols-[minmax(0,1fr)] content-start gap-1', className)}>
      <select
        {...fieldAria(id, { error: sentence })}
        aria-label={label}
        value={value}
        onChange={(event) => say(event.target.value)}
        className={clsx(controlClass, sizeClass)}
      >
        {prompt !== undefined && <option value="">{prompt}</option>}
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </select>
      <FieldError id={id} error={sentence} />
    </span>
  );
}

/** A labelled field of an item's details. */
export function Labelled({ label, children }: { label: string; children: ReactNode }) {
  return (
    <span className="grid min-w-0 grid-cols-[minmax(0,1fr)] gap-1">
      <span aria-hidden="true" className="text-sm text-soft">
        {label}
      </span>
      {children}
    </span>
  );
}
