import { describe, expect, test } from 'vitest';
import type { LookItem, MeasureItem, SpecItem } from '@/lib/specs/document';
import { openLines, proofLines, WITHOUT_PROOF, type ProofGround, type TakenReading } from '@/lib/specs/proof';
import type { ReadingValue } from '@/lib/readings/reading';

const base = { group: 'neck', label: 'An item', frozenFrom: null, provenAt: null } as const;
const scale: MeasureItem = {
  ...base,
  key: 'scale',
  kind: 'measure',
  aim: { text: '27', unit: 'in' },
  tolerance: { plus: '0.005', minus: '0.005' },
};
const nut: MeasureItem = { ...base, key: 'nut', kind: 'measure', aim: { text: '1 3/4', unit: 'in' }, tolerance: null };
const wood: SpecItem = { ...base, key: 'wood', kind: 'material', materialKey: null, words: 'Ebony' };
const plain: LookItem = {
  ...base,
  key: 'logo',
  kind: 'look',
  words: 'Mother of pearl',
  documentId: null,
  colour: null,
};
const colour = { l: 40, a: -20, b: -10, illuminant: 'D65', limitDeltaE: 2 } as const;
const edge: LookItem = { ...plain, key: 'edge', words: 'As sample 2', colour };
const drawn: LookItem = { ...plain, key: 'drawn', words: 'As drawing 3', documentId: 'drawing-3' };

const entry = (entryId: string, datedAt: number) => ({
  entryId,
  datedAt,
  stageName: 'Neck',
  authorName: 'Bo',
  photoId: null,
  isForOwner: true,
});
const reading = (itemKey: string, datedAt: number, value: ReadingValue): TakenReading => ({
  ...entry(`entry-${datedAt}`, datedAt),
  itemKey,
  value,
});
const measured = (itemKey: string, datedAt: number, text: string, unit: 'in' | 'mm' | 'deg' | '64ths' = 'in') =>
  reading(itemKey, datedAt, { kind: 'measure', name: 'Taken', measured: { text, unit } });
const read = (datedAt: number, l: number, illuminant: 'D50' | 'D65' = 'D65') =>
  reading('edge', datedAt, { kind: 'colour', l, a: -20, b: -10, illuminant });
const link = (itemKey: string) => ({ ...entry('entry-9', 9), itemKey });

const nothing: ProofGround = {
  readings: [],
  links: [],
  concessions: [],
  openSignOffs: [],
  documents: [],
  materials: {},
};
function lineOf(item: SpecItem, ground: Partial<ProofGround> = {}) {
  const [line] = proofLines({ items: [item] }, { ...nothing, ...ground });
  if (!line) throw new Error('an item without a line');
  return line;
}

test.each([
  ['4', '64ths', '4/64 in'],
  ['25 1/2', 'in', '25 1/2 in'],
  ['5/16', 'in', '5/16 in'],
  ['648.0', 'mm', '648.0 mm'],
  ['25.5', 'in', '25.5 in'],
] as const)('%s %s is signed and measured in the form it was typed in: %s', (text, unit, words) => {
  const item = { ...scale, aim: { text, unit }, tolerance: { plus: '1/64', minus: '1/64' } };
  expect(lineOf(item, { readings: [measured('scale', 1, text, unit)] })).toMatchObject({
    signed: words,
    measured: words,
  });
});

describe('a measure with a tolerance', () => {
  test('is open until it is measured, and a linked entry alone does not prove it', () => {
    expect(lineOf(scale)).toMatchObject({ state: 'open', signed: '27 in', measured: null, withinWords: '± 0.005 in' });
    expect(lineOf(scale, { links: [link('scale')] }).state).toBe('open');
  });

  test('is proven by a reading within it, the edge included, and in another unit too', () => {
    expect(lineOf(scale, { readings: [measured('scale', 1, '27.005')] })).toMatchObject({
      state: 'proven',
      measured: '27.005 in',
      withinWords: 'within ± 0.005 in',
      proofs: [{ entryId: 'entry-1' }],
    });
    expect(lineOf(scale, { readings: [measured('scale', 1, '685.8', 'mm')] }).state).toBe('proven');
  });

  test('goes by its latest reading, for better and for worse', () => {
    const off = measured('scale', 1, '27.02');
    const good = measured('scale', 2, '27.001');
    expect(lineOf(scale, { readings: [off] }).state).toBe('out_of_tolerance');
    expect(lineOf(scale, { readings: [off, good] }).state).toBe('proven');
    expect(lineOf(scale, { readings: [good, measured('scale', 3, '26.99')] }).state).toBe('out_of_tolerance');
  });

  test('stays open, with a sentence, when the reading cannot be compared', () => {
    const line = lineOf(scale, { readings: [measured('scale', 1, '27', 'deg')] });
    expect(line.state).toBe('open');
    expect(line.withinWords).toContain('cannot be compared');
  });

  test('is not proven by a reading of another item', () => {
    expect(lineOf(scale, { readings: [measured('nut', 1, '27')] }).state).toBe('open');
  });
});

test.each([nut, wood, plain])('$kind $key without a tolerance is proven by an entry that is linked to it', (item) => {
  expect(lineOf(item).state).toBe('open');
  expect(lineOf(item, { links: [link(item.key)] })).toMatchObject({
    state: 'proven',
    proofs: [{ entryId: 'entry-9' }],
  });
});

test('an entry that is linked and carries the reading too is named once', () => {
  const taken = measured('nut', 9, '1 3/4');
  expect(lineOf(nut, { readings: [taken], links: [link('nut')] }).proofs).toHaveLength(1);
});

describe('a colour', () => {
  test('is proven while the latest reading keeps the limit', () => {
    expect(lineOf(edge, { readings: [read(1, 41)] })).toMatchObject({ state: 'proven', measured: 'ΔE 0.9' });
    expect(lineOf(edge, { readings: [read(1, 41), read(2, 50)] }).state).toBe('out_of_tolerance');
  });

  test('is not proven by an entry alone, nor by a reading under another light', () => {
    expect(lineOf(edge, { links: [link('edge')] }).state).toBe('open');
    const line = lineOf(edge, { readings: [read(1, 40, 'D50')] });
    expect(line.state).toBe('open');
    expect(line.withinWords).toContain('D50');
  });
});

describe('a look with a drawing', () => {
  const shown = { links: [link('drawn')] };
  const drawing = (isSigned: boolean) => [{ id: 'drawing-3', title: 'Drawing 3', isSigned }];

  test('waits while the drawing is unsigned, however well it is shown', () => {
    expect(lineOf(drawn, { ...shown, documents: drawing(false) })).toMatchObject({
      state: 'open',
      waitsForSignOff: 'Drawing 3',
    });
    expect(lineOf(drawn, shown).state).toBe('open');
  });

  test('is proven once it is signed and shown', () => {
    expect(lineOf(drawn, { ...shown, documents: drawing(true) })).toMatchObject({
      state: 'proven',
      waitsForSignOff: null,
    });
    expect(lineOf(drawn, { documents: drawing(true) }).state).toBe('open');
  });
});

describe('a concession', () => {
  const off = measured('scale', 1, '27.02');
  const conceded = (over: object = {}) => ({
    itemKey: 'scale',
    signed: '27 in, ± 0.005 in',
    measured: '27.02 in',
    reason: 'It plays in tune.',
    signedName: 'Mara Okafor',
    signedAt: 5,
    ...over,
  });

  test('lets pass what was measured when it was signed', () => {
    const line = lineOf(scale, { readings: [off], concessions: [conceded()] });
    expect(line).toMatchObject({ state: 'conceded', concession: { signedName: 'Mara Okafor' } });
    expect(openLines([line])).toEqual([]);
  });

  test('does not cover what was measured later, nor a spec that was signed later', () => {
    const worse = measured('scale', 2, '27.4');
    expect(lineOf(scale, { readings: [off, worse], concessions: [conceded()] }).state).toBe('out_of_tolerance');
    const tighter = { ...scale, tolerance: { plus: '0.001', minus: '0.001' } };
    expect(lineOf(tighter, { readings: [off], concessions: [conceded()] }).state).toBe('out_of_tolerance');
  });

  test('is not shown for an item that was put right since', () => {
    const right = measured('scale', 2, '27');
    expect(lineOf(scale, { readings: [off, right], concessions: [conceded()] })).toMatchObject({
      state: 'proven',
      concession: null,
    });
  });

  test('can let an item pass that has no proof', () => {
    const concessions = [conceded({ itemKey: 'wood', signed: 'Ebony', measured: WITHOUT_PROOF })];
    expect(lineOf(wood, { concessions }).state).toBe('conceded');
  });

  test('that is only asked for lets nothing pass', () => {
    const openSignOffs = [{ title: 'Scale length, as it came out', itemKey: 'scale', documentId: null }];
    const line = lineOf(scale, { readings: [off], openSignOffs });
    expect(line).toMatchObject({ state: 'out_of_tolerance', waitsForSignOff: 'Scale length, as it came out' });
    expect(openLines([line])).toHaveLength(1);
  });
});

test('lines come in the order of the version, one for each item', () => {
  const items = [edge, scale, wood, nut, plain];
  expect(proofLines({ items }, nothing).map(({ item }) => item.key)).toEqual(items.map(({ key }) => key));
});
