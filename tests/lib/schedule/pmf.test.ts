import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  blend,
  convolve,
  eightInTen,
  meanOf,
  pmfFromWeights,
  quantileOf,
  remainingAfter,
  varianceOf,
  type Pmf,
} from '@/lib/schedule/pmf';
import { readReference } from '../../support/reference';

type Stage = { values: number[]; weights: number[] };
const fromJson = (text = ''): Pmf[] => {
  const stages: Stage[] = JSON.parse(text);
  return stages.map(({ values, weights }) => pmfFromWeights(values, weights));
};
const sumOf = (stages: Pmf[]) => stages.reduce(convolve, pmfFromWeights([0], [1]));
const die = pmfFromWeights([1, 2, 3, 4, 5, 6], [1, 1, 1, 1, 1, 1]);

// 08c: the known counts of 2, 3 and 4 dice, equal to full enumeration.
describe('the sum of dice', () => {
  const rows = readReference('08c_convolution_dice');

  test('the table has its 48 rows', () => expect(rows).toHaveLength(48));

  test.each(rows)('$sum_of: $total_days comes up $expected_count in $denominator', (row) => {
    const dice = sumOf(Array.from({ length: Number(row.sum_of?.charAt(0)) }, () => die));
    const found = dice[Number(row.total_days)] ?? NaN;
    expect(Math.abs(found - Number(row.expected_probability))).toBeLessThanOrEqual(Number(row.tolerance));
    expect(found * Number(row.denominator)).toBeCloseTo(Number(row.expected_count), 9);
  });
});

// 08d: exact fractions.
describe('stages one after the other', () => {
  const rows = readReference('08d_convolution_summary');
  const measures: Record<string, (sum: Pmf, argument: number) => number> = {
    mean: (sum) => meanOf(sum),
    variance: (sum) => varianceOf(sum),
    quantile: (sum, p) => quantileOf(sum, p),
    pmf: (sum, days) => sum[days] ?? 0,
  };

  test('the table has its 33 rows', () => expect(rows).toHaveLength(33));

  test.each(rows)('$quantity $argument is $expected for $stages_json', (row) => {
    const found = measures[row.quantity ?? '']?.(sumOf(fromJson(row.stages_json)), Number(row.argument)) ?? NaN;
    expect(Math.abs(found - Number(row.expected))).toBeLessThanOrEqual(Number(row.tolerance) + 1e-9);
  });
});

/** Geometric durations to where nothing is left of them. */
function geometric(p: number): Pmf {
  const days = Array.from({ length: 400 }, (_, i) => i + 1);
  return pmfFromWeights(
    days,
    days.map((day) => p * (1 - p) ** (day - 1)),
  );
}

// 08j: exact fractions; the geometric rows are memoryless.
describe('days still to go', () => {
  const rows = readReference('08j_conditional_remaining');
  const read = (text = ''): Pmf => {
    const { geometric_p, values, weights } = JSON.parse(text);
    return geometric_p === undefined ? pmfFromWeights(values, weights) : geometric(Number(geometric_p));
  };

  test('the table has its 17 rows', () => expect(rows).toHaveLength(17));

  test.each(rows)('$duration_distribution after $elapsed_days_unfinished: $expected_mean_remaining', (row) => {
    const remaining = remainingAfter(read(row.pmf_json), Number(row.elapsed_days_unfinished));
    if (row.expected_mean_remaining === 'undefined') {
      expect(remaining).toBeNull();
      return;
    }
    expect(meanOf(remaining ?? new Float64Array())).toBeCloseTo(Number(row.expected_mean_remaining), 7);
    expect(quantileOf(remaining ?? new Float64Array(), 0.5)).toBe(Number(row.expected_median_remaining));
  });

  test('a stage not begun keeps its day of no work', () => {
    const remaining = remainingAfter(pmfFromWeights([0, 2], [1, 3]), -1);
    expect(Array.from(remaining ?? [])).toEqual([0.25, 0, 0.75]);
  });
});

const stages = fc.array(fc.tuple(fc.integer({ min: 0, max: 12 }), fc.integer({ min: 1, max: 9 })), {
  minLength: 1,
  maxLength: 5,
});

/** Every way in which the stages can turn out, one by one. */
function enumerate(all: [number, number][][]): Map<number, number> {
  return all.reduce(
    (sums, stage) => {
      const total = stage.reduce((sum, [, weight]) => sum + weight, 0);
      const next = new Map<number, number>();
      for (const [sum, share] of sums) {
        for (const [days, weight] of stage) {
          next.set(sum + days, (next.get(sum + days) ?? 0) + (share * weight) / total);
        }
      }
      return next;
    },
    new Map([[0, 1]]),
  );
}

test('convolution equals enumeration, for every set of stages', () =>
  fc.assert(
    fc.property(fc.array(stages, { minLength: 1, maxLength: 4 }), (all) => {
      const sum = sumOf(
        all.map((stage) =>
          pmfFromWeights(
            stage.map(([days]) => days),
            stage.map(([, weight]) => weight),
          ),
        ),
      );
      const counted = enumerate(all);
      sum.forEach((share, days) => expect(share).toBeCloseTo(counted.get(days) ?? 0, 12));
      expect(sum.reduce((total, share) => total + share, 0)).toBeCloseTo(1, 12);
    }),
  ));

describe('a window of eight in ten', () => {
  test('holds as near to eight in ten as whole days allow', () => {
    expect(eightInTen(pmfFromWeights([1, 2, 3], [3, 5, 2]), 0.7)).toEqual({ first: 1, last: 2 });
    expect(eightInTen(pmfFromWeights([4], [1]), 0)).toEqual({ first: 4, last: 4 });
    expect(eightInTen(sumOf([die, die]), Math.sqrt(35 / 6))).toEqual({ first: 4, last: 10 });
  });

  test('never holds less than six in ten, and always the median', () =>
    fc.assert(
      fc.property(stages, (stage) => {
        const pmf = pmfFromWeights(
          stage.map(([days]) => days),
          stage.map(([, weight]) => weight),
        );
        const { first, last } = eightInTen(pmf, Math.sqrt(varianceOf(pmf)));
        const held = pmf.slice(first, last + 1).reduce((sum, share) => sum + share, 0);
        expect(held).toBeGreaterThanOrEqual(0.6 - 1e-9);
        const median = quantileOf(pmf, 0.5);
        expect(first <= median && median <= last).toBe(true);
      }),
    ));
});

describe('bad weights are refused', () => {
  test.each([
    ['weights that sum to 0', [1, 2], [0, 0]],
    ['a negative weight', [1, 2], [2, -1]],
    ['a missing weight', [1, 2], [1]],
    ['half a day', [1.5], [1]],
    ['a day before none', [-1], [1]],
    ['no days at all', [], []],
  ])('%s', (_, values, weights) => {
    expect(() => pmfFromWeights(values, weights)).toThrow(RangeError);
  });

  test('a blend keeps the whole', () => {
    const mixed = blend(die, pmfFromWeights([9], [1]), 0.25);
    expect(mixed[9]).toBeCloseTo(0.75, 12);
    expect(mixed.reduce((sum, share) => sum + share, 0)).toBeCloseTo(1, 12);
  });
});
