/** More words than these narrow nothing down any further. */
const MAX_WORDS = 8;
const MAX_WORD_CHARS = 40;
/** In nearly every text: they narrow nothing down, and cost most to look for. */
const everywhere = new Set(
  'a an and are as at be been but by for from had has have i in is it its of on or so that the then there this to was we were will with you your'.split(
    ' ',
  ),
);
/** A shorter beginning fits too much to be of use. */
const MIN_BEGINNING = 3;

/**
 * The words of a search as typed, without anything that a query language could read as its own: letters and digits of
 * any script with their accents. Words that stand in nearly every text are left out, unless there are no others. Total.
 */
export function searchWords(typed: string): string[] {
  const words =
    typed
      .normalize('NFC')
      .slice(0, 400)
      .match(/[\p{L}\p{N}\p{M}\p{Co}]+/gu) ?? [];
  const telling = words.filter((word) => !everywhere.has(word.toLowerCase()));
  const kept = telling.length > 0 ? telling : words;
  return [...new Set(kept.map((word) => word.slice(0, MAX_WORD_CHARS)))].slice(0, MAX_WORDS);
}

/**
 * Words as a full-text query (SQLite FTS5): all of them, each as a quoted string, so that no operator is left in it.
 * `begun`: the last may be the beginning of a word. Null when there is nothing to look for.
 */
export function matchQuery(words: readonly string[], last: 'whole' | 'begun' = 'whole'): string | null {
  const end = words.at(-1);
  if (end === undefined || (last === 'begun' && [...end].length < MIN_BEGINNING)) return null;
  return words.map((word) => `"${word}"`).join(' ') + (last === 'begun' ? '*' : '');
}
