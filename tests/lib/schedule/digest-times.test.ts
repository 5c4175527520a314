import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  isZone,
  localDateTimeWords,
  localDateWords,
  nextDigestAt,
  wallTimeToMs,
  type DigestPlan,
} from '@/lib/schedule/digest-times';
import { readReference } from '../../support/reference';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
const daily = (zone: string, hourLocal: number): DigestPlan => ({ cadence: 'daily', zone, hourLocal, weekday: 1 });
const iso = (ms: number | null) => (ms === null ? null : new Date(ms).toISOString().replace('.000Z', 'Z'));
const at = (text = '') => Date.parse(text);

// 09b: Python zoneinfo on tzdata 2026f, the same in luxon.
describe('a daily digest at eight', () => {
  const rows = readReference('09b_digest_8am_local');

  test('the table has its 99 rows', () => expect(rows).toHaveLength(99));

  test.each(rows)('$zone on $local_date goes out at $expected_utc', ({ zone = '', expected_utc }) => {
    expect(iso(nextDigestAt(daily(zone, 8), at(expected_utc) - 1))).toBe(expected_utc);
    expect(iso(nextDigestAt(daily(zone, 8), at(expected_utc) - 11 * HOUR_MS))).toBe(expected_utc);
    expect(nextDigestAt(daily(zone, 8), at(expected_utc))).toBeGreaterThan(at(expected_utc) + 22 * HOUR_MS);
  });

  test.each(rows)(
    'a weekly one in $zone finds the weekday of $local_date',
    ({ zone = '', local_date, expected_utc }) => {
      const weekday = ((new Date(at(local_date)).getUTCDay() + 6) % 7) + 1;
      const plan: DigestPlan = { cadence: 'weekly', zone, hourLocal: 8, weekday };
      expect(iso(nextDigestAt(plan, at(expected_utc) - 5 * DAY_MS))).toBe(expected_utc);
    },
  );
});

// 09c: zoneinfo's fold and the Temporal polyfill's disambiguation.
describe('a local time that a clock change skips or repeats', () => {
  const rows = readReference('09c_gap_and_overlap');

  test.each(rows.filter((row) => row.fold !== 'second'))('$local_time in $zone is $expected_utc', (row) => {
    expect(iso(wallTimeToMs(row.local_time ?? '', row.zone ?? ''))).toBe(row.expected_utc);
  });

  test.each(rows.filter((row) => row.fold === 'second'))(
    'of the two $local_time in $zone the first is taken',
    (row) => {
      expect(wallTimeToMs(row.local_time ?? '', row.zone ?? '')).toBe(at(row.expected_utc) - HOUR_MS);
    },
  );
});

// 09: IANA tzdata 2025b and 2026f.
describe('a digest set to the hour of a clock change', () => {
  const rows = readReference('09_dst_transitions_2026_2027');
  const hourOf = (localTime = '') => Number(localTime.slice(11, 13));

  test.each(rows.filter((row) => row.kind === 'gap'))('in $zone moves over the gap of $transition_utc', (row) => {
    const plan = daily(row.zone ?? '', hourOf(row.local_before));
    expect(iso(nextDigestAt(plan, at(row.transition_utc) - HOUR_MS))).toBe(row.transition_utc);
  });

  test.each(rows.filter((row) => row.kind === 'overlap'))('in $zone goes out once on $local_before', (row) => {
    const plan = daily(row.zone ?? '', hourOf(row.local_after));
    const firstMs = at(row.transition_utc) - HOUR_MS;
    expect(nextDigestAt(plan, firstMs - HOUR_MS)).toBe(firstMs);
    expect(nextDigestAt(plan, firstMs)).toBe(firstMs + 25 * HOUR_MS);
  });
});

describe('any plan', () => {
  const zones = fc.constantFrom(...Intl.supportedValuesOf('timeZone').filter(isZone));
  const moments = fc.integer({ min: Date.UTC(2005, 0, 1), max: Date.UTC(2060, 0, 1) });
  const hours = fc.integer({ min: 0, max: 23 });
  const weekdays = fc.integer({ min: 1, max: 7 });

  test('sends strictly later, a daily one within 49 hours and a weekly one within eight days', () => {
    fc.assert(
      fc.property(zones, hours, weekdays, moments, (zone, hourLocal, weekday, afterMs) => {
        const day = nextDigestAt({ cadence: 'daily', zone, hourLocal, weekday }, afterMs);
        const week = nextDigestAt({ cadence: 'weekly', zone, hourLocal, weekday }, afterMs);
        expect(day).toBeGreaterThan(afterMs);
        expect(day).toBeLessThanOrEqual(afterMs + 49 * HOUR_MS);
        expect(week).toBeGreaterThanOrEqual(day ?? Infinity);
        expect(week).toBeLessThanOrEqual(afterMs + 8 * DAY_MS);
      }),
      { numRuns: 1000 },
    );
  });

  test('sends the same digest for every moment before it', () => {
    fc.assert(
      fc.property(
        zones,
        hours,
        weekdays,
        moments,
        fc.double({ min: 0, max: 1, noNaN: true }),
        (zone, hourLocal, weekday, afterMs, share) => {
          const plan: DigestPlan = { cadence: 'weekly', zone, hourLocal, weekday };
          const next = nextDigestAt(plan, afterMs) ?? NaN;
          expect(nextDigestAt(plan, afterMs + Math.floor((next - 1 - afterMs) * share))).toBe(next);
        },
      ),
    );
  });

  test('at once is due in the next millisecond, none never', () => {
    const plan = daily('Europe/Lisbon', 8);
    expect(nextDigestAt({ ...plan, cadence: 'at_once' }, 1_000)).toBe(1_001);
    expect(nextDigestAt({ ...plan, cadence: 'none' }, 1_000)).toBeNull();
  });

  // tzdata: Samoa crossed the date line and had no 30 December 2011, a Friday.
  test('a weekday that never came moves forward by the length of the gap', () => {
    const plan: DigestPlan = { cadence: 'weekly', zone: 'Pacific/Apia', hourLocal: 8, weekday: 5 };
    expect(iso(nextDigestAt(plan, at('2011-12-29T12:00:00Z')))).toBe('2011-12-30T18:00:00Z');
    expect(iso(nextDigestAt(plan, at('2011-12-30T12:00:00Z')))).toBe('2011-12-30T18:00:00Z');
  });

  test.each([{ zone: 'PST' }, { hourLocal: 24 }, { hourLocal: 7.5 }, { weekday: 0 }, { weekday: 8 }])(
    'with %o is refused',
    (wrong) => {
      expect(() => nextDigestAt({ ...daily('Europe/Lisbon', 8), ...wrong }, 0)).toThrow(RangeError);
    },
  );

  test('a moment that is not whole milliseconds is refused', () => {
    expect(() => nextDigestAt(daily('Europe/Lisbon', 8), 0.5)).toThrow(RangeError);
    expect(() => nextDigestAt(daily('Europe/Lisbon', 8), NaN)).toThrow(RangeError);
  });
});

describe('a zone', () => {
  test.each([
    ...new Set(readReference('09b_digest_8am_local').map((row) => row.zone ?? '')),
    'Europe/Kyiv',
    'Europe/Kiev',
    'America/Argentina/Buenos_Aires',
    'America/Port-au-Prince',
    'UTC',
  ])('%s is one', (name) => expect(isZone(name)).toBe(true));

  test.each([
    'PST',
    'EST',
    'MST',
    'CET',
    'PST8PDT',
    'IST',
    'GB',
    '+01:00',
    '-0800',
    'Z',
    'Etc/GMT+5',
    'SystemV/PST8',
    '',
    'europe/lisbon',
    'Europe/Lisbon\n',
    ' Europe/Lisbon',
    'Europe/Nowhere',
    '2026-01-01T00:00Z[Europe/London]',
    '__proto__',
  ])('%j is none', (name) => expect(isZone(name)).toBe(false));
});

describe('dates in words', () => {
  const lateMs = at('2026-09-29T23:30:00Z');

  test('are the date of the reader, not of the server', () => {
    expect(localDateWords(lateMs, 'UTC')).toBe('29 September');
    expect(localDateWords(lateMs, 'Pacific/Auckland')).toBe('30 September');
    expect(localDateTimeWords(lateMs, 'Europe/Lisbon')).toBe('30 September at 00:30');
  });

  test('follow the locale asked for', () => expect(localDateWords(lateMs, 'UTC', 'en-US')).toBe('September 29'));

  test('refuse an abbreviation', () => expect(() => localDateWords(lateMs, 'PST')).toThrow(RangeError));
});
