import { useMemo } from 'react';
import type { Sentences } from './item-value';
import type { FormState } from '@/lib/form-state';
import { checkTogether } from '@/lib/specs/check-together';
import type { SpecDocument } from '@/lib/specs/document';
import { knownItems } from '@/lib/specs/known-items';
import { usualSet } from '@/lib/specs/tunings';

type ByKey = ReadonlyMap<string, Sentences>;

/** `items.<key>.<field>` by key, so that a row gets its own and the same object each time. */
function byKey(fields: Readonly<Record<string, string>>): ByKey {
  const found = new Map<string, Record<string, string>>();
  for (const [path, sentence] of Object.entries(fields)) {
    const [, key, field] = /^items\.([^.]+)\.(.+)$/.exec(path) ?? [];
    if (key && field) found.set(key, { ...found.get(key), [field]: sentence });
  }
  return found;
}

/**
 * What other fields and the last answer of the server say about an item. The server's words go once the item is typed
 * over; `sent` is what it was asked about.
 */
export function useSaid(document: SpecDocument, state: FormState, sent: SpecDocument | null) {
  const together = useMemo(() => byKey(checkTogether(document)), [document]);
  const refused = useMemo(() => byKey(state.state === 'refused' ? state.fields : {}), [state]);
  const asked = useMemo(() => new Map(sent?.items.map((item) => [item.key, item])), [sent]);
  const suggestions = useMemo(() => suggestionsFor(document, together), [document, together]);
  return (item: SpecDocument['items'][number]) => ({
    said: together.get(item.key) ?? (asked.get(item.key) === item ? refused.get(item.key) : undefined),
    suggestion: suggestions[item.key],
  });
}

/** The usual tuning and gauges for the number of strings, where the ones typed do not fit it. */
function suggestionsFor({ items }: SpecDocument, together: ByKey): Record<string, string | undefined> {
  const strings = items.find(({ key }) => key === knownItems.stringCount);
  const usual = strings?.kind === 'measure' ? usualSet(Number(strings.aim.text)) : null;
  return {
    [knownItems.tuning]: together.has(knownItems.tuning) ? usual?.tuning : undefined,
    [knownItems.gauges]: together.has(knownItems.gauges) ? usual?.gauges : undefined,
  };
}
