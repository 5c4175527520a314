import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { wallTimeToMs } from '@/lib/schedule/digest-times';
import { addWorkingMinutes, workingMinutesBetween } from '@/lib/schedule/working-minutes';
import { readReference } from '../../support/reference';
import { closedOn, federalClosures, hours, weekdaysIn } from './shop-calendars';

const at = (text = '') => Date.parse(text);
const iso = (ms: number) => new Date(ms).toISOString().replace('.000Z', 'Z');

// 09d: recomputed minute by minute with Python zoneinfo, tzdata 2026f.
describe('working minutes over clock changes and holidays', () => {
  const rows = readReference('09d_business_minutes');

  test('the table has its 8 rows', () => expect(rows).toHaveLength(8));

  test.each(rows)('$zone, $start_utc to $end_utc, holidays closed: $federal_holidays_closed', (row) => {
    const closures = row.federal_holidays_closed === 'yes' ? federalClosures : [];
    const calendar = weekdaysIn(row.zone ?? '', closures);
    const minutes = workingMinutesBetween(calendar, at(row.start_utc), at(row.end_utc));
    expect(minutes).toBe(Number(row.expected_business_minutes));
    expect(workingMinutesBetween(calendar, at(row.end_utc), at(row.start_utc)) + minutes).toBe(0);
  });
});

// 09c: Python zoneinfo fold, and the Temporal polyfill.
describe('a local time that does not exist or comes twice', () => {
  const rows = readReference('09c_gap_and_overlap').filter(({ fold }) => fold !== 'second');

  test('the table has 3 first readings', () => expect(rows).toHaveLength(3));

  test.each(rows)('$local_time in $zone is $expected_utc', ({ zone = '', local_time = '', expected_utc }) => {
    expect(iso(wallTimeToMs(local_time, zone))).toBe(expected_utc);
  });

  test('a shift that opens at 02:30 opens at 03:30 on the Sunday that has no 02:30', () => {
    const calendar = { zone: 'America/New_York', hours: hours([7], 150, 360), closures: [] };
    expect(iso(addWorkingMinutes(calendar, at('2026-03-07T00:00:00Z'), 0))).toBe('2026-03-08T07:30:00Z');
    expect(workingMinutesBetween(calendar, at('2026-03-08T05:00:00Z'), at('2026-03-09T00:00:00Z'))).toBe(150);
  });

  test('a night shift lasts as long as it really does', () => {
    const calendar = { zone: 'America/New_York', hours: hours([7], 0, 480), closures: [] };
    const day = (date: string) => workingMinutesBetween(calendar, at(`${date}T04:00:00Z`), at(`${date}T23:00:00Z`));
    expect([day('2026-03-08'), day('2026-11-01'), day('2026-11-08')]).toEqual([7 * 60, 9 * 60, 7 * 60 + 60]);
  });
});

describe('adding working minutes', () => {
  const calendar = weekdaysIn('America/Chicago', [closedOn('2026-12-24', '2026-12-24', 720), closedOn('2026-12-25')]);

  test('stops at noon on a half day and goes on after the holiday and the weekend', () => {
    const from = at('2026-12-24T17:00:00Z');
    expect(iso(addWorkingMinutes(calendar, from, 60))).toBe('2026-12-24T18:00:00Z');
    expect(iso(addWorkingMinutes(calendar, from, 61))).toBe('2026-12-28T15:01:00Z');
  });

  test('begins at the next opening when the shop is closed', () => {
    expect(iso(addWorkingMinutes(calendar, at('2026-12-26T12:00:00Z'), 0))).toBe('2026-12-28T15:00:00Z');
  });

  test('knows a break at noon and shifts that overlap', () => {
    const broken = {
      ...calendar,
      hours: [
        { weekday: 1, opensAtMin: 780, closesAtMin: 1020 },
        { weekday: 1, opensAtMin: 480, closesAtMin: 720 },
        { weekday: 1, opensAtMin: 600, closesAtMin: 730 },
      ],
    };
    expect(workingMinutesBetween(broken, at('2026-10-05T06:00:00Z'), at('2026-10-06T05:00:00Z'))).toBe(250 + 240);
  });

  test('refuses minutes below none', () => {
    expect(() => addWorkingMinutes(calendar, 0, -1)).toThrow(RangeError);
    expect(() => addWorkingMinutes(calendar, 0, NaN)).toThrow(RangeError);
  });

  test('is undone by counting them, wherever it starts', () =>
    fc.assert(
      fc.property(
        fc.integer({ min: at('2026-01-01T00:00:00Z') / 1000, max: at('2027-12-31T00:00:00Z') / 1000 }),
        fc.integer({ min: 1, max: 20_000 }),
        (fromSeconds, minutes) => {
          const fromMs = fromSeconds * 1000;
          const endMs = addWorkingMinutes(calendar, fromMs, minutes);
          expect(workingMinutesBetween(calendar, fromMs, endMs)).toBeCloseTo(minutes, 6);
        },
      ),
      { numRuns: 100 },
    ));
});
