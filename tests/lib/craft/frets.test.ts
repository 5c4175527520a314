import { describe, expect, test } from 'vitest';
import { fretPosition, neckSpacing } from '@/lib/craft/frets';
import { readReference } from '../../support/reference';

const MM_PER_INCH = 25.4;

describe('fret positions', () => {
  // Source: noah.org wiki, fret positioning (rows marked seen); fret 4 is computed, the page misprints it.
  test.each(readReference('03_fret_fractions'))(
    'fret $fret lies at $expected_fraction_of_scale_from_nut of the scale',
    (row) => {
      const error = Math.abs(fretPosition(1, Number(row.fret)) - Number(row.expected_fraction_of_scale_from_nut));
      expect(error).toBeLessThanOrEqual(Number(row.tolerance));
    },
  );

  // Sources: the fret tables of stuphi.co.uk (25 in) and those named row by row; rows marked computed are our own arithmetic.
  test.each(readReference('03b_fret_positions'))('$scale_length, fret $fret, $measure in $unit is $expected', (row) => {
    const scale = row.unit === 'mm' ? Number(row.scale_length_mm) : Number(row.scale_length_mm) / MM_PER_INCH;
    const fromNut = fretPosition(scale, Number(row.fret));
    const measured = row.measure === 'fret_to_bridge' ? scale - fromNut : fromNut;
    expect(Math.abs(measured - Number(row.expected))).toBeLessThanOrEqual(Number(row.tolerance));
  });

  test.each([
    [0, 1],
    [-25.5, 1],
    [Number.NaN, 1],
    [Number.POSITIVE_INFINITY, 1],
    [25.5, -1],
    [25.5, 1.5],
  ])('scale %d with fret %d is refused', (scaleLength, fret) => {
    expect(() => fretPosition(scaleLength, fret)).toThrow(RangeError);
  });
});

describe('stages on a neck', () => {
  test.each([1, 2, 9, 12, 24])('%d stages fill the neck from nut to end', (stageCount) => {
    const boundaries = neckSpacing(stageCount);
    expect(boundaries).toHaveLength(stageCount + 1);
    expect(boundaries[0]).toBe(0);
    expect(boundaries[stageCount]).toBe(1);
  });

  test.each([2, 12, 24])('with %d stages every gap is 2^(-1/12) of the one before', (stageCount) => {
    const boundaries = neckSpacing(stageCount);
    const gaps = boundaries.slice(1).map((end, i) => end - (boundaries[i] ?? Number.NaN));
    gaps.slice(1).forEach((gap, i) => expect(gap / (gaps[i] ?? Number.NaN)).toBeCloseTo(2 ** (-1 / 12), 10));
  });

  test.each([0, -3, 2.5, Number.NaN])('%d stages are refused', (stageCount) => {
    expect(() => neckSpacing(stageCount)).toThrow(RangeError);
  });
});
