import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { judgeReading } from '@/lib/readings/judge';
import { benchItemOf, planReadings, type BenchBuild } from '@/lib/readings/plan';
import { readTyped, standOf } from '@/lib/readings/read-typed';
import { isBlankTyped, nothingTyped, type TypedReadings } from '@/lib/readings/typed';
import { readingsField } from '@/lib/validation/readings';
import { starterTemplates } from '@/lib/specs/templates';
import { kindsOfWork, type Work } from '@/lib/work';

const sample = { l: 42, a: -28, b: -14, illuminant: 'D65', limitDeltaE: 2 } as const;
const [six] = starterTemplates;

function buildOf(over: Partial<BenchBuild> = {}): BenchBuild {
  const items = (six?.document.items ?? []).map(benchItemOf);
  const coloured = items.map((item) => (item.key === 'finish_colour' ? { ...item, colour: sample } : item));
  return { items: coloured, scaleLengthIn: 25.5, coats: [], lastCoatAtMs: null, ...over };
}

const build = buildOf();
const plan = (key: string, work: Work) => planReadings({ key, work }, build);
const type = (over: Partial<TypedReadings>): TypedReadings => ({ ...nothingTyped, ...over });
const labels = (key: string, work: Work) => plan(key, work).lines.map(({ label }) => label);

describe('a stage asks for the readings of its kind of work', () => {
  test('wood: the room; finish: coat and colour; sanding and buffing: papers; set-up: its sheet', () => {
    const asked = kindsOfWork.map((work) => {
      const { hasWoodRoom, hasCoat, hasPapers, colours } = plan('elsewhere', work);
      return [
        work,
        [hasWoodRoom && 'room', hasCoat && 'coat', colours && 'colour', hasPapers && 'papers'].filter(Boolean),
      ];
    });
    expect(Object.fromEntries(asked)).toEqual({
      wood: ['room'],
      machining: [],
      neck: [],
      body: ['papers'],
      finish: ['coat', 'colour'],
      buffing: ['papers'],
      setup: [],
      inspection: [],
    });
    expect(labels('elsewhere', 'setup')).toContain('Intonation, string 6');
  });

  test('and for the measures of the spec that are proven there', () => {
    expect(labels('machining', 'machining')).toEqual([
      'Body width at the lower bout',
      'Body thickness',
      'Scale length',
    ]);
    expect(labels('sand-buff', 'buffing')).toEqual(['Film when cured']);
    expect(labels('lumber', 'wood')).toEqual([]);
  });

  test('a line of the set-up sheet that the spec has too stands there once, with the aim of the spec', () => {
    const lines = plan('hardware-setup', 'setup').lines;
    const relief = lines.filter(({ label }) => /relief/i.test(label));
    expect(relief).toMatchObject([{ itemKey: 'relief', aim: { text: '0.008' }, how: expect.stringContaining('7th') }]);
    expect(new Set(lines.map(({ key }) => key)).size).toBe(lines.length);
  });

  test('a bass has the sheet of a bass, with the strings its spec counts', () => {
    const bass = starterTemplates.find(({ name }) => name === 'Bass');
    const items = (bass?.document.items ?? []).map(benchItemOf);
    const { lines } = planReadings(
      { key: 'elsewhere', work: 'setup' },
      { items, scaleLengthIn: 34, coats: [], lastCoatAtMs: null },
    );
    expect(lines.filter(({ label }) => label.startsWith('Nut slot'))).toHaveLength(4);
  });
});

describe('the fields of a stage', () => {
  test('what was typed for another stage stays typed and is not sent', () => {
    const typed = type({ product: 'Clear lacquer', coatNumber: '3', wetFilm: '120', volumeSolids: '25' });
    expect(readTyped(typed, plan('wood-room', 'wood')).readings).toEqual([]);
    expect(readTyped(typed, plan('colour-clear', 'finish')).readings).toHaveLength(1);
  });

  test('a coat is told with the coats before it, those without figures named', () => {
    const coat = {
      kind: 'coat',
      product: 'Clear lacquer',
      wetFilmUm: 120,
      volumeSolidsPercent: 25,
      dryFilmUm: null,
    } as const;
    const coats = [
      { ...coat, coatNumber: 1 },
      { ...coat, coatNumber: 2, wetFilmUm: null },
    ];
    const finish = planReadings({ key: 'colour-clear', work: 'finish' }, buildOf({ coats }));
    const typed = type({ product: 'Clear lacquer', coatNumber: '3', wetFilm: '120 µm', volumeSolids: '25 %' });
    const [shown] = readTyped(typed, finish).shown;
    // 120 µm wet at 25 % solids leave 30 µm, by definition of volume solids.
    expect(shown).toMatchObject({ figures: '30 µm (1.2 mil) dry' });
    expect(shown?.words).toBe('the 3 coats written down make 60 µm (2.4 mil), 1 of them without figures');
  });

  test('a colour is told by its distance from the approved sample', () => {
    const finish = plan('colour-clear', 'finish');
    const near = readTyped(type({ l: '42', a: '-28', b: '-14' }), finish);
    expect(near.shown).toMatchObject([{ figures: 'ΔE 0.0', words: 'limit 2.0', standing: 'within' }]);
    const far = readTyped(type({ l: '49', a: '-20', b: '-14' }), finish);
    expect(far.shown).toMatchObject([{ standing: 'outside' }]);
    expect(far.readings).toMatchObject([{ itemKey: 'finish_colour' }]);
    const other = readTyped(type({ l: '42', a: '-28', b: '-14', illuminant: 'D50' }), finish);
    expect(other.readings).toEqual([]);
    expect(other.doubts.illuminant?.sentence).toMatch(/D65/);
  });

  test('papers are taken in order, a number without its P is asked about, and coarse after fine is refused', () => {
    const sanding = plan('body-joint', 'body');
    const read = (papers: string) => readTyped(type({ papers }), sanding);
    expect(read('p220, P320 P400').readings).toMatchObject([{ value: { grades: ['P220', 'P320', 'P400'] } }]);
    expect(read('P400, P320').doubts.papers?.kind).toBe('wrong');
    expect(read('320').doubts.papers?.sentence).toMatch(/P320/);
    expect(read('320').readings).toEqual([]);
  });
});

test('a draft with a number out of tolerance may be posted, one with a number that cannot be meant may not', () => {
  const neck = plan('neck-board', 'neck');
  const stand = (text: string) => standOf('neck', readTyped(type({ measures: { 'item:nut_width': text } }), neck));
  expect(stand('1.75')).toMatchObject({ isRefused: false, outsideCount: 1 });
  expect(stand('43')).toMatchObject({ isRefused: true, readings: [] });
  expect(stand('')).toMatchObject({ isRefused: false, readings: [] });
});

test('the chosen units alone are no reading', () => {
  expect(isBlankTyped(type({ temperatureUnit: 'F', illuminant: 'D50', colourItem: 'finish_colour' }))).toBe(true);
  expect(isBlankTyped(type({ measures: { 'item:nut_width': '1' } }))).toBe(false);
});

const text = fc.oneof(
  fc.constantFrom(
    '',
    '0',
    '-1',
    '0.5',
    '45',
    '70 F',
    '1/64',
    '3 1/2',
    '.010',
    '25.5 mm',
    'P320',
    'NaN',
    '1e9',
    '∞',
    '9'.repeat(60),
  ),
  fc.double({ noNaN: true, min: -200, max: 200 }).map((value) => value.toFixed(2)),
  fc.string({ maxLength: 12 }),
);

const anyTyped = fc.record({
  temperature: text,
  temperatureUnit: fc.constantFrom('C' as const, 'F' as const),
  humidity: text,
  moisture: text,
  product: text,
  coatNumber: text,
  wetFilm: text,
  volumeSolids: text,
  dryFilm: text,
  l: text,
  a: text,
  b: text,
  illuminant: fc.constantFrom('D50' as const, 'D65' as const),
  colourItem: text,
  papers: text,
});

const stages = (six?.document.items ?? []).flatMap(({ provenAt }) => provenAt ?? []);

test('whatever is typed, the form does not fall over, and what it takes the door and the shop take too', () => {
  fc.assert(
    fc.property(
      anyTyped,
      text,
      fc.constantFrom(...stages),
      fc.constantFrom(...kindsOfWork),
      (fields, measured, key, work) => {
        const here = plan(key, work);
        const measures = Object.fromEntries(here.lines.map((line) => [line.key, measured]));
        const { readings } = readTyped({ ...fields, measures }, here);
        const arrived = readingsField.parse(JSON.parse(JSON.stringify(readings)));
        expect(arrived).toHaveLength(readings.length);
        for (const reading of arrived) expect(judgeReading(reading, build)).toMatchObject({ ok: true });
      },
    ),
    { numRuns: 400 },
  );
});
