import { describe, expect, test } from 'vitest';
import {
  GAP_DIVISOR,
  fretPosition,
  multiscalePosition,
  neckSpacing,
  ruleOf18ErrorCents,
  ruleOf18Position,
  slotErrorCents,
} from '@/lib/craft/frets';
import { readReference } from '../../support/reference';

const MM_PER_INCH = 25.4;

describe('fret positions', () => {
  // Source: noah.org wiki, fret positioning (rows marked seen); fret 4 is computed, the page misprints it.
  test.each(readReference('03_fret_fractions'))(
    'fret $fret lies at $expected_fraction_of_scale_from_nut of the scale ($provenance)',
    (row) => {
      const error = Math.abs(fretPosition(1, Number(row.fret)) - Number(row.expected_fraction_of_scale_from_nut));
      expect(error).toBeLessThanOrEqual(Number(row.tolerance));
    },
  );

  // Sources: the fret tables of stuphi.co.uk (25 in) and those named row by row; rows marked computed are our own arithmetic.
  test.each(readReference('03b_fret_positions'))(
    '$scale_length, fret $fret, $measure in $unit is $expected ($provenance)',
    (row) => {
      const scale = row.unit === 'mm' ? Number(row.scale_length_mm) : Number(row.scale_length_mm) / MM_PER_INCH;
      const fromNut = fretPosition(scale, Number(row.fret));
      const measured = row.measure === 'fret_to_bridge' ? scale - fromNut : fromNut;
      expect(Math.abs(measured - Number(row.expected))).toBeLessThanOrEqual(Number(row.tolerance));
    },
  );

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

/** The sound row by row: `rule of 18, fret 12, fraction of scale`. */
function ruleOf18(quantity: string): number {
  if (quantity.startsWith('constant')) return GAP_DIVISOR;
  if (quantity.startsWith('semitone')) return 100 + ruleOf18ErrorCents(1);
  const fret = Number(/fret (\d+)/.exec(quantity)?.[1]);
  return quantity.endsWith('fraction of scale') ? ruleOf18Position(1, fret) : ruleOf18ErrorCents(fret);
}

describe('two scales, the rule of 18, slots cut off their place', () => {
  // The constant 17.817 is printed in a book on building guitars; the other rows are our own arithmetic.
  test.each(readReference('03c_rule_of_18'))('$quantity is $expected $unit (computed)', (row) => {
    expect(Math.abs(ruleOf18(row.quantity ?? '') - Number(row.expected))).toBeLessThanOrEqual(Number(row.tolerance));
  });

  test.each(readReference('03d_multiscale'))(
    '$bass_scale_in/$treble_scale_in in, square at $perpendicular_fret: fret $fret at $expected_x_bass_in and $expected_x_treble_in (computed)',
    (row) => {
      const fret = row.fret === 'bridge' ? 'bridge' : row.fret === 'nut' ? 0 : Number(row.fret);
      const x = (scale: string | undefined) => multiscalePosition(Number(scale), fret, Number(row.perpendicular_fret));
      const [bass, treble] = [x(row.bass_scale_in), x(row.treble_scale_in)];
      const tolerance = Number(row.tolerance_in);
      expect(Math.abs(bass - Number(row.expected_x_bass_in))).toBeLessThanOrEqual(tolerance);
      expect(Math.abs(treble - Number(row.expected_x_treble_in))).toBeLessThanOrEqual(tolerance);
      expect(Math.abs(bass - treble - Number(row.expected_skew_in))).toBeLessThanOrEqual(2 * tolerance);
    },
  );

  test.each(readReference('03e_slot_error_cents'))(
    'a slot $slot_error_in in off at fret $fret of $scale_length_in in sounds $expected_pitch_error_cents cents off (computed)',
    (row) => {
      const cents = slotErrorCents(Number(row.scale_length_in), Number(row.fret), Number(row.slot_error_in));
      expect(Math.abs(cents - Number(row.expected_pitch_error_cents))).toBeLessThanOrEqual(Number(row.tolerance_cents));
    },
  );

  test('a slot at the bridge or past it is refused', () => {
    expect(() => slotErrorCents(25.5, 12, 12.8)).toThrow(RangeError);
    expect(() => slotErrorCents(25.5, 12, Number.NaN)).toThrow(RangeError);
  });
});
