import { isSame } from './canonical';
import type { SpecDocument, SpecItem } from './document';

export type Merge = {
  /** What this editor wrote, with everything that only the other changed taken over. */
  merged: SpecDocument;
  /** Items that only the other changed. */
  takenKeys: string[];
  /** Items that both changed, each in its own way: mine stands until somebody chooses. */
  clashes: { key: string; mine: SpecItem | null; theirs: SpecItem | null }[];
};

/** Puts two edits of one draft together. `base` is what this editor started from, `theirs` what was saved meanwhile. */
export function mergeSpecs(base: SpecDocument, mine: SpecDocument, theirs: SpecDocument): Merge {
  const [was, now, other] = [base, mine, theirs].map(({ items }) => new Map(items.map((item) => [item.key, item])));
  const takenKeys: string[] = [];
  const clashes: Merge['clashes'] = [];
  for (const key of new Set([...mine.items, ...theirs.items, ...base.items].map((item) => item.key))) {
    const [a, b, c] = [was?.get(key), now?.get(key), other?.get(key)];
    if (isSame(a, c) || isSame(b, c)) continue;
    if (isSame(a, b)) takenKeys.push(key);
    else clashes.push({ key, mine: b ?? null, theirs: c ?? null });
  }
  return { merged: takeOver(mine, theirs, new Set(takenKeys)), takenKeys, clashes };
}

function takeOver(mine: SpecDocument, theirs: SpecDocument, taken: ReadonlySet<string>): SpecDocument {
  const other = new Map(theirs.items.map((item) => [item.key, item]));
  const kept = mine.items.flatMap((item) => (taken.has(item.key) ? (other.get(item.key) ?? []) : [item]));
  const known = new Set(mine.items.map(({ key }) => key));
  return { items: [...kept, ...theirs.items.filter(({ key }) => taken.has(key) && !known.has(key))] };
}
