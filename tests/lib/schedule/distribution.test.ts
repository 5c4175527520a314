import { describe, expect, test } from 'vitest';
import { addDays } from '@/lib/schedule/days';
import { expectedDays, stageDurations, type PastStage } from '@/lib/schedule/distribution';
import { varianceOf } from '@/lib/schedule/pmf';

const TODAY = '2026-12-01';
const ESTIMATE = { optimisticDays: 5, likelyDays: 8, pessimisticDays: 17 };

/** Builds of their own, finished so many days ago. */
const took = (days: number[], agoDays = 30): PastStage[] =>
  days.map((each) => ({
    days: each,
    startedOn: addDays(TODAY, -agoDays - each),
    finishedOn: addDays(TODAY, -agoDays),
    rack: null,
  }));

const needed = (durations: ReturnType<typeof stageDurations>) => {
  if (durations === null) throw new Error('no durations');
  return durations;
};
const share = (durations: ReturnType<typeof stageDurations>, days: number) => needed(durations).pmf[days] ?? 0;
const mean = (past: PastStage[], estimate: typeof ESTIMATE | null = null) =>
  expectedDays(needed(stageDurations(past, estimate, TODAY)));

describe('how long a stage takes', () => {
  test('with eight builds the estimate is not asked any more', () => {
    const eight = took([20, 21, 22, 20, 21, 22, 20, 21]);
    expect(mean(eight, ESTIMATE)).toBeCloseTo(mean(eight), 12);
    expect(stageDurations(eight, ESTIMATE, TODAY)?.basis).toBe('history');
  });

  test('with fewer it has its share, the smaller the more builds there are', () => {
    const means = [0, 2, 4, 7].map((count) => mean(took([20, 20, 20, 20, 20, 20, 20].slice(0, count)), ESTIMATE));
    expect(means).toEqual([...means].sort((one, other) => one - other));
    expect(means[2]).toBeCloseTo((9 + 20) / 2, 0);
    expect(stageDurations(took([20]), ESTIMATE, TODAY)).toMatchObject({ basis: 'blend', buildCount: 1 });
    expect(stageDurations([], ESTIMATE, TODAY)).toMatchObject({ basis: 'estimate', longestDays: 17 });
  });

  test('recent builds weigh more', () => {
    const slowNow = [...took([10, 10, 10, 10, 10, 10], 720), ...took([20, 20, 20, 20, 20, 20], 10)];
    const fastNow = [...took([10, 10, 10, 10, 10, 10], 10), ...took([20, 20, 20, 20, 20, 20], 720)];
    expect(mean(slowNow)).toBeGreaterThan(18.5);
    expect(mean(fastNow)).toBeLessThan(11.5);
  });

  test('a batch that moved together counts once', () => {
    const rack: PastStage[] = Array.from({ length: 9 }, () => ({
      days: 30,
      startedOn: '2026-09-01',
      finishedOn: '2026-10-13',
      rack: 'R-12',
    }));
    const others = took([10, 10, 10, 10, 10, 10, 10, 10, 10], 49);
    expect(stageDurations([...rack, ...others], null, TODAY)?.buildCount).toBe(10);
    expect(mean([...rack, ...others])).toBeCloseTo(12, 0);
    const apart = rack.map((stage, i) => ({ ...stage, rack: `R-${i}` }));
    expect(stageDurations(apart, null, TODAY)?.buildCount).toBe(9);
  });

  test('says nothing with two builds and no estimate', () => {
    expect(stageDurations([], null, TODAY)).toBeNull();
    expect(stageDurations(took([5, 6]), null, TODAY)).toBeNull();
    expect(stageDurations(took([5, 6, 7]), null, TODAY)).not.toBeNull();
  });

  test('leaves room beside what was seen, more with few builds than with many', () => {
    const room = (count: number) => {
      const days = Array.from({ length: count }, (_, i) => [8, 10, 12][i % 3] ?? 0);
      return varianceOf(needed(stageDurations(took(days), null, TODAY)).pmf);
    };
    expect(room(8)).toBeGreaterThan(1.15 * room(60));
    expect(share(stageDurations(took(Array<number>(8).fill(6)), null, TODAY), 7)).toBeGreaterThan(0.01);
  });

  test('the longest is what was seen, not the room beside it', () => {
    expect(stageDurations(took([4, 5, 6, 4, 5, 6, 4, 9]), null, TODAY)?.longestDays).toBe(9);
  });

  test('adds up to 1 and never has a negative share', () => {
    for (const durations of [
      stageDurations(took([0, 0, 1, 2, 0, 1, 3, 0]), null, TODAY),
      stageDurations(took([40]), ESTIMATE, TODAY),
      stageDurations([], { optimisticDays: 0, likelyDays: 0, pessimisticDays: 1 }, TODAY),
    ]) {
      const { pmf } = needed(durations);
      expect(pmf.reduce((sum, each) => sum + each, 0)).toBeCloseTo(1, 12);
      expect(pmf.every((each) => each >= 0)).toBe(true);
    }
  });

  test('days that are no days are refused', () => {
    expect(() => stageDurations(took([4.5]), ESTIMATE, TODAY)).toThrow(/whole days/);
    expect(() => stageDurations(took([-1]), ESTIMATE, TODAY)).toThrow(/whole days/);
    expect(() => stageDurations([], { ...ESTIMATE, likelyDays: 40 }, TODAY)).toThrow(/longest time is shorter/);
  });
});
