export const phraseFields = ['owner', 'instrument', 'order', 'stage', 'window'] as const;
export type PhraseField = (typeof phraseFields)[number];

/** What the fields of a phrase stand for on one build; null where there is nothing to say. */
export type PhraseValues = Record<PhraseField, string | null>;

const isField = (name: string): name is PhraseField => phraseFields.some((field) => field === name);

/**
 * A saved phrase with its fields filled in. A field without a value, and any other word in braces, stays as it stands,
 * so that the writer sees what is left to say; `missing` names those.
 */
export function fillPhrase(words: string, values: PhraseValues): { text: string; missing: string[] } {
  const missing = new Set<string>();
  const text = words.replace(/\{([^{}\n]{1,40})\}/g, (whole, name: string) => {
    const value = isField(name) ? values[name] : null;
    if (value === null) missing.add(whole);
    return value ?? whole;
  });
  return { text, missing: [...missing] };
}
