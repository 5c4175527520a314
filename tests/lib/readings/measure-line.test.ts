import { describe, expect, test } from 'vitest';
import { setupLines } from '@/lib/craft/set-up';
import { figuresOf } from '@/lib/craft/typed-form';
import { lineOfItem, lineOfSetup, readLine } from '@/lib/readings/measure-line';
import { measureItem } from '../../support/spec';

const nut = lineOfItem(measureItem());
const scale = lineOfItem(
  measureItem({ key: 'scale_length', label: 'Scale length', aim: { text: '25.5', unit: 'in' } }),
);
const body = lineOfItem(
  measureItem({ key: 'body_thickness', label: 'Body thickness', aim: { text: '1.750', unit: 'in' } }),
);
const sheet = setupLines({ instrument: 'guitar', stringCount: 6, plainCount: 3, pickups: ['neck'] });

const sheetLine = (key: string) => {
  const line = sheet.find((one) => one.key === key);
  if (!line) throw new Error(`no line ${key} on the sheet`);
  return lineOfSetup(line);
};

describe('a number that cannot be meant', () => {
  test.each([
    { what: 'a scale of 25.5 mm', line: scale, text: '25.5 mm', says: /25\.5 in was meant/ },
    { what: 'a nut of 43 in', line: nut, text: '43', says: /43 mm was meant/ },
    { what: 'a body of 1.75 mm, by its aim alone', line: body, text: '1.75 mm', says: /aim/ },
    { what: 'zero', line: nut, text: '0', says: /cannot be meant/ },
    { what: 'a negative width', line: nut, text: '-1.7', says: /cannot be meant/ },
    { what: 'words', line: nut, text: 'as drawn', says: /not a number/ },
    { what: 'kilograms', line: nut, text: '2 g', says: /in, mm, thou/ },
    { what: 'a semitone off', line: sheetLine('intonation_1'), text: '140', says: /semitone/ },
  ])('is refused at its field: $what', ({ line, text, says }) => {
    const read = readLine(text, line);
    expect(read.reading).toBeNull();
    expect(read.doubts[line.key]).toMatchObject({ kind: 'wrong', sentence: expect.stringMatching(says) });
  });
});

describe('a number out of tolerance is taken, and said', () => {
  test.each([
    { text: '1.710', standing: 'within' },
    { text: '1.7101', standing: 'outside' },
    { text: '1.690', standing: 'within' },
    { text: '43.18 mm', standing: 'within' },
    { text: '43.5mm', standing: 'outside' },
    { text: '1 45/64', standing: 'within' },
  ])('$text in of a nut of 1.700 ± 0.010 in is $standing', ({ text, standing }) => {
    const read = readLine(text, nut);
    expect(read.reading).toMatchObject({ itemKey: 'nut_width', value: { measured: { text, unit: 'in' } } });
    expect(read.shown?.standing).toBe(standing);
    const { bar } = read.shown ?? {};
    const isDrawnWithin = bar && bar.value >= (bar.low ?? 0) && bar.value <= bar.high;
    expect(isDrawnWithin).toBe(standing === 'within');
  });

  test('a line of the set-up sheet too, by its own key', () => {
    const read = readLine('0.022', sheetLine('relief'));
    expect(read.reading).toMatchObject({ itemKey: null, value: { setupLine: 'relief' } });
    expect(read.shown?.standing).toBe('outside');
    expect(readLine('-0.002', sheetLine('relief')).shown?.standing).toBe('outside');
  });
});

test.each([
  ['5', /outside ± 3 cents: move the saddle away from the neck$/],
  ['-4', /outside ± 3 cents: move the saddle towards the neck$/],
  ['2', /^within ± 3 cents$/],
])('an intonation of %s cents says which way the saddle goes where it is off', (text, words) => {
  expect(readLine(text, sheetLine('intonation_1')).shown?.words).toMatch(words);
});

test('an empty field says nothing', () => {
  expect(readLine('  ', nut)).toMatchObject({ reading: null, doubts: {}, missing: {} });
});

test.each([
  { measure: { text: '25 1/2', unit: 'in' }, words: '25 1/2 in (647.7 mm)' },
  { measure: { text: '43.2', unit: 'mm' }, words: '43.2 mm (1.7008 in)' },
  { measure: { text: '5', unit: '64ths' }, words: '5/64 in (1.984 mm)' },
  { measure: { text: '10', unit: 'deg' }, words: '10°' },
] as const)('$measure.text $measure.unit is told in both unit systems: $words', ({ measure, words }) => {
  expect(figuresOf(measure)).toBe(words);
});
