import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  boardFeet,
  bundleSizes,
  doubtBoard,
  lotBoardFeet,
  readThicknessIn,
  surfaceMeasureSqFt,
  talliedBoardFeet,
} from '@/lib/craft/lumber';
import { byProvenance, cell } from '../../support/provenance';
import { readReference } from '../../support/reference';

const tallies = byProvenance(readReference('02d_board_feet_tally'));
const exacts = byProvenance(readReference('02e_board_feet_exact'));
const roundings = readReference('02f_tally_rounding');

function expectTally(row: Record<string, string>) {
  const thicknessIn = cell(row, 'thickness_in_nominal');
  const widthIn = cell(row, 'width_in');
  const lengthFt = cell(row, 'length_ft_whole');
  expect(surfaceMeasureSqFt(widthIn, lengthFt)).toBe(cell(row, 'expected_surface_measure_sqft'));
  expect(talliedBoardFeet({ thicknessIn, widthIn, lengthFt })).toBe(cell(row, 'expected_board_feet'));
}

function expectExact(row: Record<string, string>) {
  const found = boardFeet(cell(row, 'thickness_in_nominal'), cell(row, 'width_in'), cell(row, 'length_in'));
  expect(Math.abs(found - cell(row, 'expected_board_feet'))).toBeLessThanOrEqual(cell(row, 'tolerance'));
}

// Source: NHLA measuring rules as given by the American Hardwood Export Council, a lumber supplier and buying guides.
describe('board feet as published', () => {
  test('the tables have the outside rows they should', () => {
    expect([tallies.outside.length, exacts.outside.length]).toEqual([6, 4]);
  });
  test.each(tallies.outside)(
    '$thickness_in_nominal x $width_in in x $length_ft_whole ft tally $expected_board_feet',
    expectTally,
  );
  test.each(exacts.outside)('$thickness_in_nominal x $width_in x $length_in in hold $expected_board_feet', expectExact);
});

describe('board feet, rows without outside proof', () => {
  test.each(tallies.own)('$provenance: $id', expectTally);
  test.each(exacts.own)('$provenance: $id', expectExact);
});

describe('a bundle', () => {
  const plain = roundings.filter((row) => !(row.width_in ?? '').includes('such board'));

  // First row: the American Hardwood Export Council's bundle example; the others follow its rule.
  test.each(plain)('$provenance: $width_in in x $length_ft ft', (row) => {
    const [sizes] = bundleSizes([{ widthIn: cell(row, 'width_in'), lengthFt: cell(row, 'length_ft') }]);
    expect(sizes?.widthIn).toBe(cell(row, 'expected_width_tallied_in'));
    expect(sizes?.lengthFt).toBe(cell(row, 'expected_length_tallied_ft'));
  });

  test('counts exact halves up and down in turn', () => {
    const halves = Array.from({ length: 4 }, () => ({ widthIn: 5.5, lengthFt: 8 }));
    const expected = roundings.filter((row) => (row.width_in ?? '').includes('such board'));
    const widths = bundleSizes(halves).map(({ widthIn }) => widthIn);
    expect(widths.slice(0, 2)).toEqual(expected.map((row) => cell(row, 'expected_width_tallied_in')));
    expect(widths.slice(2)).toEqual(widths.slice(0, 2));
  });

  test('does not let a whole width between two halves change their turn', () => {
    const boards = [5.5, 7, 5.5].map((widthIn) => ({ widthIn, lengthFt: 8 }));
    expect(bundleSizes(boards).map(({ widthIn }) => widthIn)).toEqual([6, 7, 5]);
  });
});

describe('board feet', () => {
  const size = fc.double({ min: 1, max: 40, noNaN: true });

  test('grow with each size alike', () => {
    fc.assert(
      fc.property(size, size, size, fc.integer({ min: 2, max: 9 }), (t, w, l, times) => {
        const whole = boardFeet(t, w, l) * times;
        for (const scaled of [boardFeet(t * times, w, l), boardFeet(t, w * times, l), boardFeet(t, w, l * times)]) {
          expect(scaled / whole).toBeCloseTo(1, 9);
        }
      }),
    );
  });

  test('count stock under 1 in as 1 in', () => expect(boardFeet(0.5, 12, 12)).toBe(1));

  test('of a lot keep the exact and the tallied count apart', () => {
    const board = { thicknessIn: 2, widthIn: 6.25, lengthFt: 8 };
    const lot = lotBoardFeet([board, board]);
    expect(lot.exactBoardFeet).toBeCloseTo(16.667, 3);
    expect(lot.talliedBoardFeet).toBe(16);
  });

  test.each([0, -1, Number.NaN, Number.POSITIVE_INFINITY])('are not computed for a size of %d', (bad) => {
    expect(() => boardFeet(1, bad, 12)).toThrow(RangeError);
    expect(() => surfaceMeasureSqFt(6, bad)).toThrow(RangeError);
  });
});

describe('the sizes of a board as typed', () => {
  test.each([
    ['4/4', 1],
    ['5/4', 1.25],
    ['8/4', 2],
    ['1 1/4', 1.25],
    ['1.25', 1.25],
    ['.75', 0.75],
  ])('a thickness of %s is %d in', (text, thicknessIn) => expect(readThicknessIn(text)).toBe(thicknessIn));

  test.each(['', 'thick', '4/0', '0', '-1', '1/2/3'])('%j is no thickness', (text) => {
    expect(readThicknessIn(text)).toBeNull();
  });

  const board = { thicknessIn: 1, widthIn: 8, lengthFt: 10 };

  test('a usual board needs no word', () => expect(doubtBoard(board)).toEqual({}));

  test('a thickness of 4 asks whether 4/4 is meant', () => {
    const { thicknessIn } = doubtBoard({ ...board, thicknessIn: 4 });
    expect(thicknessIn).toMatchObject({ kind: 'ask', sentence: expect.stringContaining('4/4') });
  });

  test('a length of 96 ft asks whether inches are meant', () => {
    const { lengthFt } = doubtBoard({ ...board, lengthFt: 96 });
    expect(lengthFt).toMatchObject({ kind: 'ask', sentence: expect.stringContaining('write 8 ft') });
  });

  test.each(['thicknessIn', 'widthIn', 'lengthFt'] as const)('a %s of 0, below, or no number is refused', (field) => {
    for (const bad of [0, -2, Number.NaN, Number.POSITIVE_INFINITY]) {
      expect(doubtBoard({ ...board, [field]: bad })[field]?.kind).toBe('wrong');
    }
  });
});
