import { describe, expect, test } from 'vitest';
import { quantileType1, quantileType7, usualDays, usualWords } from '@/lib/schedule/quantiles';
import { readReference } from '../../support/reference';

const numbers = (text = '') => text.split(' ').map(Number);

// 08e: R 4.2.2 prints all of them; some are in an r-help attachment of January 2012; numpy agrees.
describe.each([
  ['1', quantileType1],
  ['7', quantileType7],
] as const)('quantile of type %s', (type, quantile) => {
  const rows = readReference('08e_quantiles').filter(({ hyndman_fan_type }) => hyndman_fan_type === type);

  test('the table has its 11 rows', () => expect(rows).toHaveLength(11));

  test.each(rows)('$p of $data is $expected', ({ data, p, expected, tolerance }) => {
    const found = quantile(numbers(data), Number(p));
    expect(Math.abs(found - Number(expected))).toBeLessThanOrEqual(Number(tolerance));
  });

  test('is the smallest and the largest at the ends, and refuses what is not a share or no values', () => {
    expect([quantile([3, 1, 2], 0), quantile([3, 1, 2], 1)]).toEqual([1, 3]);
    expect(() => quantile([1], 1.1)).toThrow(RangeError);
    expect(() => quantile([1], NaN)).toThrow(RangeError);
    expect(() => quantile([], 0.5)).toThrow(RangeError);
    expect(() => quantile([1, NaN], 0.5)).toThrow(RangeError);
  });
});

test('type 1 is not fooled by a product that comes out a hair too large', () => {
  const ten = [1, 2, 3, 4, 5, 6, 7, 8, 9, 10];
  expect([0.1, 0.3, 0.6, 0.7, 0.9].map((p) => quantileType1(ten, p))).toEqual([1, 3, 6, 7, 9]);
});

describe('what is usual', () => {
  test('runs from the 25th to the 75th percentile in whole days', () => {
    const usual = usualDays([8, 12, 9, 11, 10, 30, 7]);
    expect(usual).toEqual({ lowDays: 9, highDays: 12 });
    expect(usualWords(usual)).toBe('usual 9 to 12 days');
  });

  test('is one number when both ends fall together, and not known with three builds', () => {
    expect(usualWords(usualDays([1, 1, 1, 1]))).toBe('usual 1 day');
    expect(usualWords(usualDays([5, 5, 5]))).toBe('usual not known yet');
  });
});
