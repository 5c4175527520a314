import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { betaShare } from '@/lib/schedule/beta';
import { normalShare } from '@/lib/schedule/normal';
import { meanOf, varianceOf } from '@/lib/schedule/pmf';
import { pertMean, pertPmf, pertVariance } from '@/lib/schedule/three-point';
import { readReference } from '../../support/reference';

const estimateOf = (row: Record<string, string>) => ({
  optimisticDays: Number(row.optimistic),
  likelyDays: Number(row.most_likely),
  pessimisticDays: Number(row.pessimistic),
});
const activities = readReference('08_pert_activities');

// 08: Anderson, Sweeney, Williams ch. 9, Tables 9.4-9.5; Taylor's seven activities; a fourteen-activity exercise.
describe('three-point estimates', () => {
  test('the table has its 31 rows', () => expect(activities).toHaveLength(31));

  test.each(activities)('$example, $activity: $optimistic, $most_likely, $pessimistic', (row) => {
    const estimate = estimateOf(row);
    expect(Math.abs(pertMean(estimate) - Number(row.expected_mean))).toBeLessThanOrEqual(Number(row.tolerance_mean));
    const isSd = row.expected_variance === '';
    const spread = isSd ? Math.sqrt(pertVariance(estimate)) : pertVariance(estimate);
    const expected = Number(isSd ? row.expected_sd : row.expected_variance);
    expect(Math.abs(spread - expected)).toBeLessThanOrEqual(Number(row.tolerance_spread));
  });

  test.each(activities)(
    'as whole days $example, $activity keeps its mean, and its spread but for the rounding',
    (row) => {
      const estimate = estimateOf(row);
      const pmf = pertPmf(estimate);
      expect(meanOf(pmf)).toBeCloseTo(pertMean(estimate), 6);
      const added = varianceOf(pmf) - pertVariance(estimate);
      expect(added).toBeGreaterThan(-1e-6);
      expect(added).toBeLessThan(0.2501);
    },
  );
});

// 08b: same sources; 17 weeks, 24 days and 0.9633 were seen.
describe('a path of activities', () => {
  test.each(readReference('08b_pert_path'))('$example along $critical_path', (row) => {
    const onPath = (row.critical_path ?? '').split('-');
    const path = activities.filter(
      ({ example, activity = '' }) => example === row.example && onPath.includes(activity),
    );
    const sum = (measure: typeof pertMean) => path.reduce((total, each) => total + measure(estimateOf(each)), 0);
    const [mean, variance] = [sum(pertMean), sum(pertVariance)];
    expect(Math.abs(mean - Number(row.expected_mean))).toBeLessThanOrEqual(Number(row.tol_mean));
    expect(Math.abs(variance - Number(row.expected_variance))).toBeLessThanOrEqual(Number(row.tol_variance));
    const done = normalShare((Number(row.deadline) - mean) / Math.sqrt(variance));
    expect(Math.abs(done - Number(row.expected_P_finish_by_deadline))).toBeLessThanOrEqual(Number(row.tol_P));
  });
});

describe('an estimate out of order is refused with a sentence', () => {
  test.each([
    [5, 3, 9, /shortest time is longer/],
    [1, 9, 5, /longest time is shorter/],
    [-1, 2, 3, /from 0 to 2000/],
    [NaN, 2, 3, /from 0 to 2000/],
    [1, 2, Infinity, /from 0 to 2000/],
  ])('%d, %d, %d', (optimisticDays, likelyDays, pessimisticDays, why) => {
    expect(() => pertPmf({ optimisticDays, likelyDays, pessimisticDays })).toThrow(why);
  });

  test('one without doubt is a day for certain', () => {
    expect(Array.from(pertPmf({ optimisticDays: 2, likelyDays: 2, pessimisticDays: 2 }))).toEqual([0, 0, 1]);
  });
});

describe('the beta distribution', () => {
  const shapes = fc.double({ min: 0.4, max: 8, noNaN: true });
  const shares = fc.double({ min: 0.001, max: 0.999, noNaN: true });

  test('has its closed forms: 1 - (1 - x)^b for a = 1, x^a for b = 1, and 3 x^2 - 2 x^3', () =>
    fc.assert(
      fc.property(shapes, shares, (shape, x) => {
        expect(betaShare(x, 1, shape)).toBeCloseTo(1 - (1 - x) ** shape, 10);
        expect(betaShare(x, shape, 1)).toBeCloseTo(x ** shape, 10);
        expect(betaShare(x, 2, 2)).toBeCloseTo(3 * x * x - 2 * x ** 3, 10);
      }),
    ));

  test('is the same read from the other end', () =>
    fc.assert(
      fc.property(shapes, shapes, shares, (a, b, x) => {
        expect(betaShare(x, a, b) + betaShare(1 - x, b, a)).toBeCloseTo(1, 9);
      }),
    ));
});
