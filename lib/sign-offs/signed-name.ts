const plain = (name: string) =>
  name
    .normalize('NFKC')
    .replace(/[\u2018\u2019\u02bc]/g, "'")
    .replace(/[\u2010-\u2015]/g, '-')
    .replace(/\s+/g, ' ')
    .trim()
    .toLowerCase();

/** Whether two names are the same but for capitals, spaces, and the kind of apostrophe or hyphen a phone puts in. */
export const sameName = (a: string, b: string) => plain(a) === plain(b);

/** What is wrong with a name typed to sign, as a sentence, or null. */
export function signedNameProblem(typed: string, accountName: string): string | null {
  if (plain(typed) === '') return 'Type your name to sign.';
  if (!sameName(typed, accountName)) return `Type your name as it stands on your account: ${accountName}.`;
  return null;
}
