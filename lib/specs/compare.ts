/** What can be compared: a version by its number, or the draft. */
export type Side = number | 'draft';

type Asked = Record<string, string | string[] | undefined>;

export const sideName = (side: Side) => (side === 'draft' ? 'the draft' : `version ${side}`);

/**
 * The two sides an address asks for, or else the last two there are, the draft being the last. Null where there are no two.
 * `numbers` are the versions that were sent, newest first.
 */
export function chosenSides(asked: Asked, numbers: number[], hasDraft: boolean): { from: Side; to: Side } | null {
  const [latest, before] = numbers;
  if (latest === undefined) return null;
  const to = sideFrom(asked.to, numbers, hasDraft) ?? (before === undefined && hasDraft ? 'draft' : latest);
  const from =
    sideFrom(asked.from, numbers, hasDraft) ?? (to === 'draft' ? latest : (numbers.find((n) => n < to) ?? latest));
  return from === to && numbers.length === 1 && !hasDraft ? null : { from, to };
}

function sideFrom(text: string | string[] | undefined, numbers: number[], hasDraft: boolean): Side | null {
  if (text === 'draft') return hasDraft ? 'draft' : null;
  if (typeof text !== 'string' || !/^\d{1,4}$/.test(text)) return null;
  return numbers.includes(Number(text)) ? Number(text) : null;
}
