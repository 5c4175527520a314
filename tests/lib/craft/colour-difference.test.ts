import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  colourVerdict,
  deltaE2000,
  deltaE76,
  doubtLab,
  labFromHex,
  MixedIlluminants,
  type LabColour,
} from '@/lib/craft/colour-difference';
import { byProvenance, cell } from '../../support/provenance';
import { readReference } from '../../support/reference';

type Row = Record<string, string>;

const lab = (row: Row, which: '1' | '2'): LabColour => ({
  l: cell(row, `L${which}`),
  a: cell(row, `a${which}`),
  b: cell(row, `b${which}`),
  illuminant: 'D65',
});

const pairs = byProvenance(readReference('12_ciede2000'));

// Source: Sharma, Wu & Dalal, Color Research and Application 30 (2005) 21-30, Table 1.
describe('CIEDE2000 as published', () => {
  test('has all 34 pairs', () => expect(pairs.outside).toHaveLength(34));

  test.each(pairs.outside)('pair $pair is $expected_deltaE00 apart, in either order', (row) => {
    for (const found of [deltaE2000(lab(row, '1'), lab(row, '2')), deltaE2000(lab(row, '2'), lab(row, '1'))]) {
      expect(Math.abs(found - cell(row, 'expected_deltaE00'))).toBeLessThanOrEqual(cell(row, 'tolerance'));
    }
  });
});

test.each(readReference('12b_cie76'))('$provenance: pair $pair', (row) => {
  const found = deltaE76(lab(row, '1'), lab(row, '2'));
  expect(Math.abs(found - cell(row, 'expected_deltaE76'))).toBeLessThanOrEqual(cell(row, 'tolerance'));
});

// Source: printed by the independent program colorjs.io.
describe.each([
  ['12c_srgb_to_lab_d65', 'D65'],
  ['12d_srgb_to_lab_d50', 'D50'],
] as const)('sRGB in L*a*b*, %s', (table, illuminant) => {
  const { outside, own } = byProvenance(readReference(table));

  test('has only rows with outside proof', () => expect(own).toEqual([]));

  test.each(outside)('$srgb_hex', (row) => {
    const found = labFromHex(row.srgb_hex ?? '', illuminant);
    expect(found.illuminant).toBe(illuminant);
    const gaps = [
      found.l - cell(row, 'expected_L'),
      found.a - cell(row, 'expected_a'),
      found.b - cell(row, 'expected_b'),
    ];
    for (const gap of gaps) expect(Math.abs(gap)).toBeLessThanOrEqual(cell(row, 'tolerance'));
  });
});

describe('a colour difference', () => {
  const channel = fc.double({ min: -100, max: 100, noNaN: true });
  const colour = fc.record({
    l: fc.double({ min: 0, max: 100, noNaN: true }),
    a: channel,
    b: channel,
    illuminant: fc.constant('D50' as const),
  });

  test('is the same in either order, never below 0, and 0 for one colour', () => {
    fc.assert(
      fc.property(colour, colour, (x, y) => {
        expect(deltaE2000(x, y)).toBeCloseTo(deltaE2000(y, x), 9);
        expect(deltaE2000(x, y)).toBeGreaterThanOrEqual(0);
        expect(deltaE2000(x, x)).toBe(0);
      }),
    );
  });

  const sample: LabColour = { l: 50, a: 2.6772, b: -79.7751, illuminant: 'D65' };

  test('is never taken across two illuminants', () => {
    expect(() => deltaE2000(sample, { ...sample, illuminant: 'D50' })).toThrow(MixedIlluminants);
    expect(() => colourVerdict(sample, { ...sample, illuminant: 'D50' }, 2)).toThrow(/same/);
  });

  test.each([{ l: -1 }, { l: 101 }, { a: Number.NaN }, { b: 400 }])('is refused for %j', (part) => {
    expect(() => deltaE2000(sample, { ...sample, ...part })).toThrow(RangeError);
    expect(doubtLab({ ...sample, ...part })).toMatchObject([{ kind: 'wrong' }]);
  });

  test('a lightness of 0.6 is asked about', () => {
    expect(doubtLab({ ...sample, l: 0.6 })).toMatchObject([{ kind: 'ask' }]);
    expect(doubtLab(sample)).toEqual([]);
  });

  test.each(['#ff0000ff', '#f00', 'red', ''])('%j is no sample', (hex) => {
    expect(() => labFromHex(hex, 'D65')).toThrow(RangeError);
  });

  test('is said with its limit, and the limit itself is within', () => {
    const other = { ...sample, a: 0, b: -82.7485 };
    const deltaE = deltaE2000(sample, other);
    expect(colourVerdict(sample, other, 2.5)).toMatchObject({ isWithin: true, words: 'ΔE 2.0, limit 2.5' });
    expect(colourVerdict(sample, other, deltaE).isWithin).toBe(true);
    expect(colourVerdict(sample, other, 1)).toMatchObject({
      isWithin: false,
      words: 'ΔE 2.0, limit 1.0, over the limit',
    });
  });

  test('just over the limit shows enough figures to see it', () => {
    expect(colourVerdict(sample, { ...sample, a: 0, b: -82.7485 }, 2).words).toContain('over the limit (2.042)');
  });

  test.each([0, -1, Number.NaN])('has no verdict against a limit of %d', (limit) => {
    expect(() => colourVerdict(sample, sample, limit)).toThrow(RangeError);
  });
});
