import { describe, expect, test } from 'vitest';
import { pmfFromWeights } from '@/lib/schedule/pmf';
import { coverageOf, crpsOfNormal, crpsOfPmf, intervalScore, pinballLoss } from '@/lib/schedule/scores';
import { readReference } from '../../support/reference';

const numbers = (text = '') => text.split(' ').map(Number);
const near = (found: number, expected: string | undefined, tolerance: string | undefined) =>
  expect(Math.abs(found - Number(expected))).toBeLessThanOrEqual(Number(tolerance));

// 08f: the examples of sktime and Lodestar were seen, that of scikit-learn is from memory.
describe('pinball loss', () => {
  const rows = readReference('08f_pinball');

  test('the table has its 9 rows', () => expect(rows).toHaveLength(9));

  test.each(rows)('$predicted_quantile for $observed at $alpha', (row) => {
    const predicted = numbers(row.predicted_quantile);
    const losses = numbers(row.observed).map((y, i) => pinballLoss(y, predicted[i] ?? NaN, Number(row.alpha)));
    const mean = losses.reduce((sum, loss) => sum + loss, 0) / losses.length;
    near(mean, row.expected_mean_pinball_loss, row.tolerance);
  });
});

// 08g: normal rows from properscoring's README (seen); discrete rows by two formulas of Gneiting & Raftery 2007.
describe('CRPS', () => {
  const rows = readReference('08g_crps');

  test('the table has its 23 rows', () => expect(rows).toHaveLength(23));

  test.each(rows)('$forecast $pmf_json for $observed', (row) => {
    const observed = Number(row.observed);
    if (row.forecast !== 'discrete') {
      near(crpsOfNormal(0, 1, observed), row.expected_crps, row.tolerance);
      return;
    }
    const { values, weights } = JSON.parse(row.pmf_json ?? '');
    near(crpsOfPmf(pmfFromWeights(values, weights), observed), row.expected_crps, row.tolerance);
  });

  test('of a normal forecast scales with its unit', () => {
    expect(crpsOfNormal(70, 7, 77)).toBeCloseTo(7 * crpsOfNormal(0, 1, 1), 12);
  });
});

// 08h: Gneiting & Raftery 2007, Eq. (43), computed.
describe('interval score', () => {
  test.each(readReference('08h_interval_score'))('[$lower, $upper] for $observed', (row) => {
    const { lower, upper, observed, alpha_miss_probability } = row;
    const found = intervalScore(Number(lower), Number(upper), Number(observed), Number(alpha_miss_probability));
    near(found, row.expected_score, row.tolerance);
  });
});

// 08i: Wilson's score interval, computed.
describe('coverage', () => {
  test.each(readReference('08i_interval_coverage'))('$hits_inside_interval of $forecasts', (row) => {
    const { share, low, high } = coverageOf(Number(row.hits_inside_interval), Number(row.forecasts));
    near(share, row.expected_coverage, row.tolerance);
    near(low, row.expected_wilson95_low, row.tolerance);
    near(high, row.expected_wilson95_high, row.tolerance);
  });

  test.each([
    [0, 0],
    [3, 2],
    [-1, 2],
    [1, 2.5],
  ])('%d of %d is refused', (held, of) => {
    expect(() => coverageOf(held, of)).toThrow(RangeError);
  });
});
