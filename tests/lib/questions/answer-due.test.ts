import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { answerDueAt, isEarly, reminderOf, type Clock } from '@/lib/questions/answer-due';
import { medianWorkingMinutes, weekStartOf } from '@/lib/questions/answer-times';
import { workingMinutesBetween } from '@/lib/schedule/working-minutes';
import { readReference } from '../../support/reference';
import { federalClosures, hours, weekdaysIn } from '../schedule/shop-calendars';

const at = (text = '') => Date.parse(text);
const iso = (ms: number) => new Date(ms).toISOString().replace('.000Z', 'Z');
const MINUTE_MS = 60_000;

// 09d: working minutes recomputed minute by minute with Python zoneinfo, tzdata 2026f. Read backwards: an answer due
// after that many working minutes is due when the row ends, or at the last moment of work before it.
describe('an answer is due after its working hours', () => {
  const rows = readReference('09d_business_minutes').filter((row) => Number(row.expected_business_minutes) > 0);

  test('the table has its 7 rows with work in them', () => expect(rows).toHaveLength(7));

  test.each(rows)('$zone from $start_utc, holidays closed: $federal_holidays_closed', (row) => {
    const calendar = weekdaysIn(row.zone ?? '', row.federal_holidays_closed === 'yes' ? federalClosures : []);
    const minutes = Number(row.expected_business_minutes);
    const dueAt = answerDueAt(calendar, at(row.start_utc), minutes / 60);
    expect(dueAt).toBeLessThanOrEqual(at(row.end_utc));
    expect(workingMinutesBetween(calendar, at(row.start_utc), dueAt)).toBe(minutes);
    expect(workingMinutesBetween(calendar, dueAt, at(row.end_utc))).toBe(0);
  });

  // 09c: 02:30 on 8 March 2026 does not exist in New York and reads as 03:30 EDT; 01:30 on 1 November comes twice.
  const [gap, overlap] = readReference('09c_gap_and_overlap');

  test('a shop that opens in the hour that does not exist begins to count when it is there', () => {
    const calendar = { zone: gap?.zone ?? '', hours: hours([7], 150, 450), closures: [] };
    expect(iso(answerDueAt(calendar, at('2026-03-07T12:00:00Z'), 1))).toBe('2026-03-08T08:30:00Z');
    expect(iso(answerDueAt(calendar, at('2026-03-07T12:00:00Z'), 0))).toBe(gap?.expected_utc);
  });

  test('a shop that opens in the hour that comes twice counts both', () => {
    const calendar = { zone: overlap?.zone ?? '', hours: hours([7], 90, 450), closures: [] };
    expect(iso(answerDueAt(calendar, at('2026-10-31T12:00:00Z'), 0))).toBe(overlap?.expected_utc);
    expect(iso(answerDueAt(calendar, at('2026-10-31T12:00:00Z'), 1))).toBe('2026-11-01T06:30:00Z');
  });

  test('never in the past, and never sooner for a question that came later', () => {
    const calendar = weekdaysIn('America/New_York', federalClosures);
    const year = fc.integer({ min: at('2026-01-01T00:00:00Z'), max: at('2026-12-20T00:00:00Z') });
    fc.assert(
      fc.property(year, fc.integer({ min: 0, max: 3_000_000 }), fc.integer({ min: 1, max: 40 }), (ms, later, due) => {
        const first = answerDueAt(calendar, ms, due);
        expect(first).toBeGreaterThanOrEqual(ms + due * 60 * MINUTE_MS);
        expect(answerDueAt(calendar, ms + later, due)).toBeGreaterThanOrEqual(first);
      }),
      { numRuns: 200 },
    );
  });
});

describe('what is said of a running clock', () => {
  const calendar = weekdaysIn('America/New_York');
  // Monday 7 December 2026, 09:30 in New York: half an hour of work after the weekend.
  const dueAt = at('2026-12-07T14:30:00Z');
  const fresh: Clock = { dueAt, remindedBeforeAt: null, remindedDueAt: null, overdueToldAt: null };
  const said = (when: string, over: Partial<Clock> = {}) => reminderOf(calendar, { ...fresh, ...over }, at(when));

  test.each([
    { when: '2026-12-04T21:29:00Z', expected: null, then: 'more than an hour of work before: nothing' },
    { when: '2026-12-04T21:30:00Z', expected: 'before', then: 'half an hour before Friday’s end: the holder' },
    { when: '2026-12-05T12:00:00Z', expected: 'before', then: 'on the weekend between: the holder, if not yet' },
    { when: '2026-12-07T14:30:00Z', expected: 'due', then: 'at its minute: the holder again' },
    { when: '2026-12-07T14:59:00Z', expected: 'due', then: 'shortly after: the holder, if not yet' },
    { when: '2026-12-07T15:00:00Z', expected: 'overdue', then: 'half an hour of work after: the rep' },
    { when: '2026-12-09T15:00:00Z', expected: 'overdue', then: 'days after a restart: only the rep' },
  ])('$then', ({ when, expected }) => expect(said(when)).toBe(expected));

  test('each is said once', () => {
    const all = { remindedBeforeAt: 1, remindedDueAt: 1, overdueToldAt: 1 };
    for (const when of ['2026-12-05T12:00:00Z', '2026-12-07T14:30:00Z', '2026-12-08T15:00:00Z'])
      expect(said(when, all)).toBeNull();
  });

  test('an early clock has nothing to say, nor has any that is due later', () => {
    expect(isEarly(calendar, dueAt, at('2026-12-04T21:29:00Z'))).toBe(true);
    expect(isEarly(calendar, dueAt, at('2026-12-04T21:30:00Z'))).toBe(false);
    expect(isEarly(calendar, dueAt, dueAt + 1)).toBe(false);
  });
});

describe('how long answers took', () => {
  const calendar = weekdaysIn('America/New_York');
  const answer = (askedAt: string, answeredAt: string) => ({ askedAt: at(askedAt), answeredAt: at(answeredAt) });

  test('counts work only, and takes the middle', () => {
    const overWeekend = answer('2026-12-04T21:30:00Z', '2026-12-07T14:30:00Z');
    const quick = answer('2026-12-07T15:00:00Z', '2026-12-07T15:20:00Z');
    const slow = answer('2026-12-07T15:00:00Z', '2026-12-07T20:00:00Z');
    expect(medianWorkingMinutes(calendar, [slow, overWeekend, quick])).toBe(60);
    expect(medianWorkingMinutes(calendar, [overWeekend, quick])).toBe(40);
    expect(medianWorkingMinutes(calendar, [])).toBeNull();
  });

  test('the week begins on Monday at midnight, also in the week in which the clock changes', () => {
    expect(iso(weekStartOf(calendar, at('2026-12-06T23:00:00Z')))).toBe('2026-11-30T05:00:00Z');
    expect(iso(weekStartOf(calendar, at('2026-11-01T23:00:00Z')))).toBe('2026-10-26T04:00:00Z');
    expect(iso(weekStartOf(calendar, at('2026-11-30T05:00:00Z')))).toBe('2026-11-30T05:00:00Z');
  });
});
