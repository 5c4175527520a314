import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fretTable, type FretTable, type ScalePlan } from '@/lib/craft/fret-table';
import { fretName, ruleOf18Words, scaleWords, slotErrorWords, slotWords } from '@/lib/craft/fret-words';
import { readReference } from '../../support/reference';

const single: ScalePlan = { bassScaleMm: 647.7, trebleScaleMm: 647.7, perpendicularFret: 0, fretCount: 24 };

function tableOf(plan: ScalePlan): FretTable {
  const read = fretTable(plan);
  if (!read.ok) throw new Error(read.message);
  return read.table;
}

function rowOf(plan: ScalePlan, fret: number | 'bridge') {
  return tableOf(plan).rows.find((row) => row.fret === fret);
}

describe('the table of slots', () => {
  // Sources: the published fret tables named row by row (seen); rows marked computed are our own arithmetic.
  test.each(readReference('03b_fret_positions').filter(({ measure }) => measure === 'nut_to_fret'))(
    'lists $scale_length, fret $fret at $expected $unit ($provenance)',
    (row) => {
      const scaleMm = Number(row.scale_length_mm);
      const plan = { ...single, bassScaleMm: scaleMm, trebleScaleMm: scaleMm };
      const place = rowOf(plan, Number(row.fret))?.treble;
      const found = row.unit === 'mm' ? place?.fromNutMm : place?.fromNutIn;
      expect(Math.abs((found ?? Number.NaN) - Number(row.expected))).toBeLessThanOrEqual(Number(row.tolerance));
    },
  );

  test.each(readReference('03d_multiscale').filter(({ fret }) => fret !== 'bridge'))(
    'lists $bass_scale_in/$treble_scale_in in, fret $fret with a skew of $expected_skew_in in (computed)',
    (row) => {
      const plan = {
        bassScaleMm: Number(row.bass_scale_in) * 25.4,
        trebleScaleMm: Number(row.treble_scale_in) * 25.4,
        perpendicularFret: Number(row.perpendicular_fret),
        fretCount: 24,
      };
      const skewIn = rowOf(plan, row.fret === 'nut' ? 0 : Number(row.fret))?.skewIn ?? Number.NaN;
      expect(Math.abs(skewIn - Number(row.expected_skew_in))).toBeLessThanOrEqual(2 * Number(row.tolerance_in));
    },
  );

  test('the perpendicular fret is square for any two scales', () => {
    const scaleMm = fc.double({ min: 300, max: 1100, noNaN: true });
    fc.assert(
      fc.property(
        scaleMm,
        scaleMm,
        fc.integer({ min: 0, max: 24 }),
        (bassScaleMm, trebleScaleMm, perpendicularFret) => {
          expect(
            rowOf({ bassScaleMm, trebleScaleMm, perpendicularFret, fretCount: 24 }, perpendicularFret)?.skewMm,
          ).toBe(0);
        },
      ),
    );
  });

  test('each slot lies nearer the bridge than the one before, on both strings', () => {
    const { rows } = tableOf({ bassScaleMm: 685.8, trebleScaleMm: 647.7, perpendicularFret: 7, fretCount: 24 });
    for (const side of ['bass', 'treble'] as const) {
      const places = rows.map((row) => row[side].fromNutMm);
      expect(places).toEqual(places.toSorted((a, b) => a - b));
      expect(new Set(places).size).toBe(26);
    }
  });

  test('a bass scale shorter than the treble scale is legal, and asked about', () => {
    expect(tableOf({ ...single, bassScaleMm: 640 }).doubt).toMatch(/other way round/);
    expect(tableOf(single).doubt).toBeNull();
  });

  test.each([
    [{ perpendicularFret: 25 }, /on the board: a whole number from 0, the nut, to 24/],
    [{ perpendicularFret: -1 }, /on the board/],
    [{ perpendicularFret: 7.5 }, /on the board/],
    [{ perpendicularFret: Number.NaN }, /on the board/],
    [{ bassScaleMm: 0 }, /between 300 and 1100 mm/],
    [{ trebleScaleMm: 25.5 }, /Look at the number and its unit/],
    [{ trebleScaleMm: Number.NaN }, /between 300 and 1100 mm/],
    [{ fretCount: 0 }, /number of frets/],
    [{ fretCount: 22.5 }, /number of frets/],
  ])('%o is refused with what to do', (change, sentence) => {
    const read = fretTable({ ...single, ...change });
    expect(read.ok ? 'made' : read.message).toMatch(sentence);
  });
});

describe('the table in words', () => {
  test('slots are read to a thousandth of an inch or a hundredth of a mm', () => {
    expect([
      slotWords(323.85, 'in'),
      slotWords(323.85, 'mm'),
      slotWords(-0.0001, 'mm'),
      slotWords(-25.4, 'in'),
    ]).toEqual(['12.750', '323.85', '0.00', '−1.000']);
    expect([fretName(0), fretName(12), fretName('bridge')]).toEqual(['Nut', '12', 'Bridge']);
  });

  test('two scales are named with the fret that is square', () => {
    const fan = tableOf({ bassScaleMm: 685.8, trebleScaleMm: 647.7, perpendicularFret: 7, fretCount: 24 });
    expect(scaleWords(fan, 'in')).toBe('27 in on the bass side, 25.5 in on the treble side, square at fret 7');
    expect(scaleWords(tableOf(single), 'mm')).toBe('647.7 mm');
  });
});

describe('what stands below the table', () => {
  // By hand for 647.7 mm: 1200 log2(r / (r - 0.1)), r = 647.7 x 2^(-n/12), is 0.28 cents at fret 1 and 1.07 at fret 24.
  test('says what a slot that is off does at the first fret and the last', () => {
    expect(slotErrorWords(tableOf(single))).toBe(
      'A slot cut 0.1 mm (0.004 in) too near the bridge sounds 0.3 cents sharp at fret 1 and 1.1 at fret 24.',
    );
  });

  // 1 - (17/18)^12 = 0.49635 of the scale instead of half of it; 12 x (1200 log2(18/17) - 100) = -12.5 cents.
  test('says how a board cut by the rule of 18 differs at the 12th fret', () => {
    const words = ruleOf18Words(tableOf(single));
    expect(words).toContain('12.5 cents flat');
    expect(words).toContain('17.817');
    expect(Number(/lies ([\d.]+) mm/.exec(words)?.[1])).toBeCloseTo(647.7 * (0.5 - (1 - (17 / 18) ** 12)), 2);
  });
});
