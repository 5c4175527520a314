type Shown = { state: 'signed' | 'sent' | 'draft'; number: number | null };

/** `version 4, signed`, or `draft`: which spec something was made from. */
export function shownName({ state, number }: Shown): string {
  if (number === null) return 'draft';
  return state === 'signed' ? `version ${number}, signed` : `version ${number}, not signed yet`;
}
