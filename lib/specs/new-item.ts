import type { SpecGroup, SpecItem } from './document';
import { knownItems } from './known-items';

export const itemKinds = ['measure', 'choice', 'material', 'look'] as const satisfies readonly SpecItem['kind'][];

const LONGEST_KEY = 50;

/** A key made of an item's name that no other item has; it stays when the name changes. */
export function keyFor(label: string, taken: ReadonlySet<string>): string {
  const plain = label
    .normalize('NFD')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '_')
    .replace(/^_+|_+$/g, '')
    .slice(0, LONGEST_KEY);
  const stem = plain === '' ? 'item' : plain;
  for (let n = 1; ; n++) {
    const key = n === 1 ? stem : `${stem}_${n}`;
    if (!taken.has(key)) return key;
  }
}

/** An item with nothing in it yet. */
export function blankItem(kind: SpecItem['kind'], key: string, group: SpecGroup, label: string): SpecItem {
  const base = { key, group, label, frozenFrom: null, provenAt: null };
  if (kind === 'measure') return { ...base, kind, aim: { text: '', unit: 'in' }, tolerance: null };
  if (kind === 'choice') return { ...base, kind, value: '', options: [] };
  if (kind === 'material') return { ...base, kind, materialKey: null, words: '' };
  return { ...base, kind, words: '', documentId: null, colour: null };
}

/** The two items that make one scale into two, frozen and proven where the scale is. */
export function secondScale(scale: SpecItem): SpecItem[] {
  const { frozenFrom, provenAt, group } = scale;
  const aim = scale.kind === 'measure' ? scale.aim : { text: '', unit: 'in' as const };
  const tolerance = scale.kind === 'measure' ? scale.tolerance : null;
  const base = { group, frozenFrom, provenAt, kind: 'measure' as const };
  return [
    { ...base, key: knownItems.bassScaleLength, label: 'Scale length, bass side', aim, tolerance },
    {
      ...base,
      key: knownItems.perpendicularFret,
      label: 'Perpendicular fret',
      aim: { text: '8', unit: 'count' },
      tolerance: null,
    },
  ];
}
