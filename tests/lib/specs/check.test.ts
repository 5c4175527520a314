import { describe, expect, test } from 'vitest';
import { starterMaterials } from '@/lib/craft/materials';
import { checkDocument, MOST_ITEMS } from '@/lib/specs/check';
import type { SpecItem } from '@/lib/specs/document';
import { starterTemplates } from '@/lib/specs/templates';
import { choiceItem, lookItem, measureItem } from '../../support/spec';

const around = {
  stageKeys: new Set(['neck', 'finish']),
  materialKeys: new Set(['ebony']),
  drawingIds: new Set(['d1']),
};
const check = (...items: SpecItem[]) => checkDocument({ items }, around);

const scale = (text: string, unit: 'in' | 'mm' = 'in') =>
  measureItem({ key: 'scale_length', aim: { text, unit }, tolerance: null });
const drawn = (documentId: string | null) => lookItem({ documentId });
const count = (key: string, text: string) => measureItem({ key, aim: { text, unit: 'count' }, tolerance: null });
const words = (key: string, value: string) => choiceItem({ key, value, options: [] });

describe('a measure', () => {
  test.each([
    ['zero', '0', /cannot be meant/],
    ['negative', '-25.5', /cannot be meant/],
    ['not a number', 'about 25', /is not a number/],
    ['absurd', '255', /cannot be meant/],
    ['nothing', '', /Write a number/],
    ['a fraction over nothing', '1/0', /0 below its line/],
  ])('that is %s gets a sentence at its own field', (_name, text, sentence) => {
    const sentences = check(scale(text));
    expect(Object.keys(sentences)).toEqual(['items.scale_length.aim']);
    expect(sentences['items.scale_length.aim']).toMatch(sentence);
  });

  test('in the wrong unit is told which was probably meant', () => {
    expect(check(scale('25.5', 'mm'))['items.scale_length.aim']).toContain('If 25.5 in was meant');
  });

  test.each(['1/64', '3 1/2', '0.010', '25.5', '25 1/2 in'])('is taken as typed: %s', (text) => {
    expect(check(measureItem({ key: 'any', aim: { text, unit: 'in' }, tolerance: null }))).toEqual({});
  });

  test('with a tolerance wider than its value is refused at the tolerance', () => {
    const wide = measureItem({ tolerance: { plus: '2', minus: '2' } });
    expect(check(wide)['items.nut_width.tolerance']).toMatch(/wider than the value itself/);
  });

  test('of 0 cents stands, a length of 0 does not', () => {
    const aim = { text: '0', unit: 'cents' } as const;
    expect(check(measureItem({ key: 'intonation', aim, tolerance: { plus: '3', minus: '3' } }))).toEqual({});
    expect(check(measureItem({ aim: { text: '0', unit: 'in' } }))).toHaveProperty(['items.nut_width.aim']);
  });
});

describe('fields that depend on each other', () => {
  test('more strings than notes is said at the tuning', () => {
    const sentences = check(count('string_count', '7'), words('tuning', 'E2 A2 D3 G3 B3 E4'));
    expect(sentences).toEqual({
      'items.tuning.value': 'There are 7 strings and only 6 notes. Give each string its note.',
    });
  });

  test('more gauges than strings is said at the gauges', () => {
    const sentences = check(count('string_count', '4'), words('gauges', '45 65 85 105 130'));
    expect(sentences['items.gauges.value']).toMatch(/5 gauges for 4 strings/);
  });

  test.each([
    ['H2 A2', /is not a note/],
    ['E A', /needs its octave/],
  ])('an unknown note is said at the tuning: %s', (tuning, sentence) => {
    expect(check(words('tuning', tuning))['items.tuning.value']).toMatch(sentence);
  });

  test('a perpendicular fret outside the board is said at that fret', () => {
    const bass = measureItem({ key: 'bass_scale_length', aim: { text: '27', unit: 'in' }, tolerance: null });
    const board = [scale('25.5'), bass, count('fret_count', '24')];
    expect(check(...board, count('perpendicular_fret', '8'))).toEqual({});
    expect(check(...board, count('perpendicular_fret', '25'))['items.perpendicular_fret.aim']).toMatch(/on the board/);
    expect(check(...board)['items.bass_scale_length.aim']).toMatch(/need a perpendicular fret/);
  });

  test('a band of tensions upside down is said at its upper end', () => {
    const lb = (key: string, text: string) => measureItem({ key, aim: { text, unit: 'lb' }, tolerance: null });
    expect(check(lb('tension_low', '20'), lb('tension_high', '16'))).toHaveProperty(['items.tension_high.aim']);
  });
});

describe('an item', () => {
  test('may name only stages of the route and materials of the shop', () => {
    expect(check(measureItem({ frozenFrom: 'varnishing' }))['items.nut_width.frozenFrom']).toMatch(/not on this build/);
    const wood = (materialKey: string | null, words: string): SpecItem => ({
      key: 'board',
      group: 'fingerboard',
      label: 'Fingerboard wood',
      frozenFrom: 'neck',
      provenAt: null,
      kind: 'material',
      materialKey,
      words,
    });
    expect(check(wood('ebony', ''))).toEqual({});
    expect(check(wood('unobtainium', ''))).toHaveProperty(['items.board.materialKey']);
    expect(check(wood(null, ' '))).toHaveProperty(['items.board.words']);
  });

  test('of a choice takes one of its options, or any words where it has none', () => {
    expect(check(choiceItem({ value: 'sparkling' }))).toHaveProperty(['items.gloss.value']);
    expect(check(choiceItem({ value: 'sparkling', options: [] }))).toEqual({});
    expect(check(choiceItem({ value: '  ', options: [] }))).toHaveProperty(['items.gloss.value']);
  });

  test('has a key of its own', () => {
    expect(check(choiceItem(), choiceItem({ value: 'satin' }))).toHaveProperty(['items.gloss.label']);
  });
});

test('a spec has at least one item and at most so many', () => {
  const many = (n: number) => Array.from({ length: n }, (_, i) => choiceItem({ key: `item_${i}` }));
  expect(check()).toHaveProperty('form');
  expect(check(...many(MOST_ITEMS))).toEqual({});
  expect(check(...many(MOST_ITEMS + 1))).toHaveProperty('form');
});

const houseStages = 'lumber wood-room blanks machining neck-board frets body-joint pre-paint colour-clear sand-buff';
const house = {
  stageKeys: new Set([...houseStages.split(' '), 'hardware-setup', 'final-check']),
  materialKeys: new Set(starterMaterials.map(({ key }) => key)),
  drawingIds: new Set<string>(),
};

test.each(starterTemplates)('the template $name can be sent as it stands, with 45 to 60 items', ({ document }) => {
  expect(checkDocument(document, house)).toEqual({});
  expect(document.items.length).toBeGreaterThanOrEqual(45);
  expect(document.items.length).toBeLessThanOrEqual(60);
});

test('a look points to a drawing that was sent up for its build, or to none', () => {
  expect(check(drawn('d1'))).toEqual({});
  expect(check(drawn(null))).toEqual({});
  expect(check(drawn('of another build'))['items.headstock_logo.drawing']).toMatch(/Choose one from the list, or none/);
});
