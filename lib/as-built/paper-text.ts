const MOST_LETTERS = 600;

/** Letters that none of the paper's fonts has: drawn all the same they would come out as other letters. */
const untyped =
  /[^\u0020-\u024f\u0300-\u0303\u0370-\u045f\u0490\u0491\u1e00-\u1eff\u2000-\u2027\u2030-\u205e\u20ac\u2116\u2122\u2212\u2215]+/gu;

/**
 * Text as paper can carry it: composed letters, no controls, nothing that turns the direction of what follows. What has no
 * type is a question mark; sharps and flats are written as they are typed.
 */
export function paperText(text: string): string {
  const plain = text
    .normalize('NFC')
    .replace(/[\p{Cc}\p{Cf}]/gu, ' ')
    .replaceAll('♯', '#')
    .replaceAll('♭', 'b')
    .replace(untyped, '?')
    .trim();
  return plain.length <= MOST_LETTERS ? plain : `${plain.slice(0, MOST_LETTERS)}…`;
}
