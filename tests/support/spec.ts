import type { ChoiceItem, LookItem, MeasureItem, SpecDocument, SpecItem } from '@/lib/specs/document';

type Over<T> = Partial<Omit<T, 'kind'>>;

const base = { group: 'fingerboard', label: 'An item', frozenFrom: 'neck', provenAt: 'neck' } as const;

export const measureItem = (over: Over<MeasureItem> = {}): MeasureItem => ({
  ...base,
  kind: 'measure',
  key: 'nut_width',
  label: 'Nut width',
  aim: { text: '1.700', unit: 'in' },
  tolerance: { plus: '0.010', minus: '0.010' },
  ...over,
});

export const choiceItem = (over: Over<ChoiceItem> = {}): ChoiceItem => ({
  ...base,
  kind: 'choice',
  group: 'finish',
  key: 'gloss',
  label: 'Sheen',
  frozenFrom: 'finish',
  provenAt: 'finish',
  value: 'gloss',
  options: ['gloss', 'satin'],
  ...over,
});

export const lookItem = (over: Over<LookItem> = {}): LookItem => ({
  ...base,
  kind: 'look',
  group: 'neck',
  key: 'headstock_logo',
  label: 'Headstock logo',
  words: 'house logo, shell',
  documentId: null,
  colour: null,
  ...over,
});

/** A spec of two items on the stages of the test shop: the nut is frozen from the neck on, the sheen from the finish. */
export const smallSpec = (...instead: SpecItem[]): SpecDocument => ({
  items: instead.length > 0 ? instead : [measureItem(), choiceItem()],
});
