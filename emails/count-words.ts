const SMALL = 'no one two three four five six seven eight nine ten eleven twelve'.split(' ');

/** A count as a sentence has it: in words up to twelve, in figures above. */
export function countWords(count: number): string {
  return SMALL[count] ?? String(count);
}

/** "two new pages", "one new page": the count before its noun. */
export function counted(count: number, noun: string): string {
  return `${countWords(count)} ${noun}${count === 1 ? '' : 's'}`;
}

/** The words with their first letter large, to begin a sentence. */
export function asSentence(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}
