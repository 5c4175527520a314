import { specGroups, type SpecGroup, type SpecItem } from './document';

const names: Record<SpecGroup, string> = {
  body: 'Body',
  neck: 'Neck',
  fingerboard: 'Fingerboard & frets',
  finish: 'Finish',
  electronics: 'Electronics',
  hardware: 'Hardware',
  strings: 'Strings & set-up',
  case: 'Case & papers',
};

export const groupName = (group: SpecGroup) => names[group];

/** The groups that have something in them, in their order, each with its items in theirs. */
export function byGroup<T extends Pick<SpecItem, 'group'>>(items: readonly T[]): { group: SpecGroup; items: T[] }[] {
  return specGroups
    .map((group) => ({ group, items: items.filter((item) => item.group === group) }))
    .filter(({ items: found }) => found.length > 0);
}
