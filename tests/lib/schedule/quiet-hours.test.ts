import { describe, expect, test } from 'vitest';
import { soundZone } from '@/lib/schedule/digest-times';
import { quietUntil } from '@/lib/schedule/quiet-hours';
import { readReference } from '../../support/reference';

const at = (iso: string) => Date.parse(iso);
const iso = (ms: number | null) => ms && new Date(ms).toISOString();
const night = { fromHour: 22, toHour: 7 };

describe('quiet hours over midnight', () => {
  test.each([
    { now: '2026-12-01T21:59:59Z', until: null },
    { now: '2026-12-01T22:00:00Z', until: '2026-12-02T07:00:00.000Z' },
    { now: '2026-12-02T00:00:00Z', until: '2026-12-02T07:00:00.000Z' },
    { now: '2026-12-02T06:59:59Z', until: '2026-12-02T07:00:00.000Z' },
    { now: '2026-12-02T07:00:00Z', until: null },
  ])('at $now hold until $until', ({ now, until }) => {
    expect(iso(quietUntil({ ...night, zone: 'UTC' }, at(now)))).toBe(until);
  });
});

test('within one day they end the same day, and none are none', () => {
  const noon = { fromHour: 12, toHour: 14, zone: 'UTC' };
  expect(iso(quietUntil(noon, at('2026-12-01T13:00:00Z')))).toBe('2026-12-01T14:00:00.000Z');
  expect(quietUntil(noon, at('2026-12-01T15:00:00Z'))).toBeNull();
  expect(quietUntil({ fromHour: null, toHour: null, zone: 'UTC' }, at('2026-12-01T13:00:00Z'))).toBeNull();
  expect(quietUntil({ fromHour: 8, toHour: 8, zone: 'UTC' }, at('2026-12-01T08:00:00Z'))).toBeNull();
});

// tests/reference/09c_gap_and_overlap.csv: zoneinfo's folds and the Temporal polyfill agree on these instants.
describe('the night of a clock change in New York', () => {
  const [gap, first] = readReference('09c_gap_and_overlap');

  test('an end that the clock skips moves on by the gap', () => {
    // 02:00 does not exist on 8 March 2026; with 02:30, which the table has, it moves on by the hour.
    expect(gap).toMatchObject({ local_time: '2026-03-08T02:30', expected_utc: '2026-03-08T07:30:00Z' });
    const until = quietUntil({ fromHour: 22, toHour: 2, zone: 'America/New_York' }, at('2026-03-08T05:00:00Z'));
    expect(until).toBe(at(gap?.expected_utc ?? '') - 30 * 60_000);
  });

  test('an end that comes twice is the first of the two', () => {
    expect(first).toMatchObject({ local_time: '2026-11-01T01:30', fold: 'first' });
    const until = quietUntil({ fromHour: 22, toHour: 1, zone: 'America/New_York' }, at('2026-11-01T04:00:00Z'));
    expect(until).toBe(at(first?.expected_utc ?? '') - 30 * 60_000);
  });

  test('lasts as long as the clocks make it', () => {
    const lengthHours = (nowIso: string) => {
      const hours = { ...night, zone: 'America/New_York' };
      const end = quietUntil(hours, at(nowIso)) ?? 0;
      let start = end - 1;
      while (quietUntil(hours, start - 1) !== null) start -= 60_000;
      return Math.round((end - start) / 3_600_000);
    };
    expect(lengthHours('2026-03-08T05:00:00Z')).toBe(8);
    expect(lengthHours('2026-11-01T05:00:00Z')).toBe(10);
  });
});

test('a zone that no longer exists counts as UTC and does not throw', () => {
  expect(soundZone('Europe/Atlantis')).toBe('UTC');
  expect(iso(quietUntil({ ...night, zone: 'Europe/Atlantis' }, at('2026-12-01T23:00:00Z')))).toBe(
    '2026-12-02T07:00:00.000Z',
  );
});
