import type { Unit } from '../craft/measure';
import type { AimedColour, SpecGroup, SpecItem } from './document';

/** Stages by key: from where it can no longer change, and whose entries are expected to prove it. */
type When = [frozenFrom: string | null, provenAt: string | null];
/** An item before it is told which group it stands in. */
export type Unplaced = SpecItem extends infer I ? (I extends SpecItem ? Omit<I, 'group'> : never) : never;

const base = (key: string, label: string, [frozenFrom, provenAt]: When) => ({ key, label, frozenFrom, provenAt });

/** `tolerance` as typed: one side for both, or `+0.010 -0.005`. */
export function measure(
  key: string,
  label: string,
  [text, unit, tolerance]: [text: string, unit: Unit, tolerance?: string],
  when: When,
): Unplaced {
  const allowed = tolerance === undefined ? null : { plus: tolerance, minus: tolerance };
  return { ...base(key, label, when), kind: 'measure', aim: { text, unit }, tolerance: allowed };
}

export function material(
  key: string,
  label: string,
  [materialKey, words]: [materialKey: string | null, words: string],
  when: When,
): Unplaced {
  return { ...base(key, label, when), kind: 'material', materialKey, words };
}

/** The first option is the one picked; a single one leaves the field open to any words. */
export function choice(key: string, label: string, options: [string, ...string[]], when: When): Unplaced {
  return {
    ...base(key, label, when),
    kind: 'choice',
    value: options[0],
    options: options.length > 1 ? options : [],
  };
}

export function look(
  key: string,
  label: string,
  words: string,
  when: When,
  colour: AimedColour | null = null,
): Unplaced {
  return { ...base(key, label, when), kind: 'look', words, documentId: null, colour };
}

export const inGroup = (group: SpecGroup, items: Unplaced[]): SpecItem[] => items.map((item) => ({ ...item, group }));

/** The same items with some said otherwise, some left out, and some put in behind one of them. */
export function varied(
  items: SpecItem[],
  {
    instead = [],
    without = [],
    after = {},
  }: { instead?: Unplaced[]; without?: string[]; after?: Record<string, Unplaced[]> },
): SpecItem[] {
  const replaced = new Map(instead.map((item) => [item.key, item]));
  return items
    .filter(({ key }) => !without.includes(key))
    .flatMap((item) => {
      const { group } = item;
      const said = replaced.get(item.key);
      const added = (after[item.key] ?? []).map((other) => ({ ...other, group }));
      return [said ? { ...said, group } : item, ...added];
    });
}
