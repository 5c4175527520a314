import type { Measure } from '../craft/measure';

export const specGroups = [
  'body',
  'neck',
  'fingerboard',
  'finish',
  'electronics',
  'hardware',
  'strings',
  'case',
] as const;
export type SpecGroup = (typeof specGroups)[number];

/** How far a measure may be off, above and below its aim, in the aim's unit, as typed. */
export type Tolerance = { plus: string; minus: string };

/** A measured colour; the white point is part of it. `limitDeltaE` is the largest CIEDE2000 difference allowed. */
export type AimedColour = { l: number; a: number; b: number; illuminant: 'D50' | 'D65'; limitDeltaE: number };

type ItemBase = {
  /** The same in every version: it is what proof, readings and change requests point to. */
  key: string;
  group: SpecGroup;
  label: string;
  /** From the start of this stage on the item can no longer change; null: never frozen. */
  frozenFrom: string | null;
  /** The stage whose entries are expected to prove it. */
  provenAt: string | null;
};

export type MeasureItem = ItemBase & { kind: 'measure'; aim: Measure; tolerance: Tolerance | null };
export type MaterialItem = ItemBase & { kind: 'material'; materialKey: string | null; words: string };
export type ChoiceItem = ItemBase & { kind: 'choice'; value: string; options: string[] };
export type LookItem = ItemBase & {
  kind: 'look';
  words: string;
  documentId: string | null;
  colour: AimedColour | null;
};
export type SpecItem = MeasureItem | MaterialItem | ChoiceItem | LookItem;

/** One version's content. Its order is the order in which it is shown. */
export type SpecDocument = { items: SpecItem[] };
