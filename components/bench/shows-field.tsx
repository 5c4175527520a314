'use client';

import { useId, type Dispatch } from 'react';
import type { DraftEvent } from './draft-state';
import { FoldRow } from './fold-row';
import { Checkbox } from '@/components/ui/checkbox';
import { FieldError } from '@/components/ui/field';
import type { BenchItem } from '@/lib/readings/plan';

type ShowsFieldProps = {
  /** Those of the chosen stage. */
  items: BenchItem[];
  proves: string[];
  /** Items that are measured in the same entry, and are shown by that. */
  measured: ReadonlySet<string>;
  error?: string;
  isLocked: boolean;
  dispatch: Dispatch<DraftEvent>;
};

/** Which items of the spec the entry shows as they were built. */
export function ShowsField({ items, proves, measured, error, isLocked, dispatch }: ShowsFieldProps) {
  const id = useId();
  if (items.length === 0) return null;
  const isShown = ({ key }: BenchItem) => measured.has(key) || proves.includes(key);
  const shownCount = items.filter(isShown).length;
  return (
    <FoldRow
      label="Shows that"
      said={shownCount === 0 ? 'nothing ticked' : `${shownCount} of ${items.length}`}
      isCalled={error !== undefined}
    >
      <fieldset
        disabled={isLocked}
        aria-describedby={error ? `${id}-error` : undefined}
        className="disabled:opacity-60"
      >
        <legend className="text-soft">What of the spec can be seen, or was measured, in this entry?</legend>
        {items.map((item) => (
          <Checkbox
            key={item.key}
            className="[&>label]:min-h-12"
            label={measured.has(item.key) ? `${item.label} (measured)` : item.label}
            checked={isShown(item)}
            disabled={measured.has(item.key)}
            onChange={({ target }) => dispatch({ type: 'proof-marked', itemKey: item.key, isShown: target.checked })}
          />
        ))}
      </fieldset>
      <div role="alert" tabIndex={-1} className="outline-none empty:hidden">
        <FieldError id={id} error={error} />
      </div>
    </FoldRow>
  );
}
