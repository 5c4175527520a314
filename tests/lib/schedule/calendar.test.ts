import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  addWorkingDays,
  countWorkingDays,
  dayOf,
  findCalendarProblem,
  isWorkingDay,
  type WorkingCalendar,
} from '@/lib/schedule/calendar';
import { addDays } from '@/lib/schedule/days';
import { readReference } from '../../support/reference';
import { closedOn, federalClosures, hours, weekdaysIn } from './shop-calendars';

const federal = weekdaysIn('America/Chicago', federalClosures);

// 08m: numpy busday_offset and busday_count agree with every row.
describe('working days over US federal holidays', () => {
  const rows = readReference('08m_working_days');
  const added = rows.filter(({ operation }) => operation === 'add');
  const counted = rows.filter(({ operation }) => operation !== 'add');

  test('the table has 13 additions and 3 counts', () => {
    expect(added).toHaveLength(13);
    expect(counted).toHaveLength(3);
  });

  test.each(added)('$start and $amount_or_end make $expected', ({ start = '', amount_or_end, expected }) => {
    expect(addWorkingDays(federal, start, Number(amount_or_end))).toBe(expected);
  });

  test.each(counted)('$start to $amount_or_end are $expected', ({ start = '', amount_or_end = '', expected }) => {
    expect(countWorkingDays(federal, start, amount_or_end)).toBe(Number(expected));
    expect(countWorkingDays(federal, amount_or_end, start)).toBe(-Number(expected));
  });
});

describe('a shop calendar', () => {
  test('counts Saturdays where the shop works them', () => {
    const saturdays: WorkingCalendar = { ...weekdaysIn('America/Chicago'), hours: hours([2, 3, 4, 5, 6]) };
    expect(isWorkingDay(saturdays, '2026-10-03')).toBe(true);
    expect(isWorkingDay(saturdays, '2026-10-05')).toBe(false);
    expect(addWorkingDays(saturdays, '2026-10-02', 2)).toBe('2026-10-06');
  });

  test('starts counting on the next working day when the start is closed', () => {
    expect(addWorkingDays(federal, '2026-07-03', 0)).toBe('2026-07-06');
    expect(addWorkingDays(federal, '2026-07-04', 1)).toBe('2026-07-06');
    expect(addWorkingDays(federal, '2026-07-04', -1)).toBe('2026-07-02');
    expect(addWorkingDays(federal, '2026-07-02', 0)).toBe('2026-07-02');
  });

  test('overlapping closures take each day once, and a half day stays a working day unless another closes it', () => {
    const closures = [
      closedOn('2026-12-21', '2026-12-27'),
      closedOn('2026-12-25', '2027-01-01'),
      closedOn('2026-12-18', '2026-12-18', 720),
      closedOn('2026-12-21', '2026-12-21', 720),
    ];
    const calendar = weekdaysIn('America/Chicago', closures);
    expect(isWorkingDay(calendar, '2026-12-18')).toBe(true);
    expect(isWorkingDay(calendar, '2026-12-21')).toBe(false);
    expect(addWorkingDays(calendar, '2026-12-18', 1)).toBe('2027-01-04');
  });

  test('a half day that ends before the shop opens is closed', () => {
    const calendar = weekdaysIn('America/Chicago', [closedOn('2026-12-24', '2026-12-24', 480)]);
    expect(isWorkingDay(calendar, '2026-12-24')).toBe(false);
  });

  test('the date of a moment is that of the place', () => {
    const ms = Date.parse('2027-01-01T03:00:00Z');
    expect(dayOf(ms, 'America/Chicago')).toBe('2026-12-31');
    expect(dayOf(ms, 'Australia/Sydney')).toBe('2027-01-01');
    expect(() => dayOf(ms, 'CST')).toThrow(/not a time zone of a place/);
  });
});

describe('a calendar that cannot be used says why', () => {
  const good = weekdaysIn('America/Chicago');
  const cases: [string, WorkingCalendar, RegExp][] = [
    ['no hours at all', { ...good, hours: [] }, /no working hours/],
    ['an abbreviation', { ...good, zone: 'EST' }, /time zone of a place/],
    ['a fixed offset', { ...good, zone: '+02:00' }, /time zone of a place/],
    ['closing before opening', { ...good, hours: hours([1], 1020, 540) }, /open before it closes/],
    ['an eighth weekday', { ...good, hours: hours([8]) }, /A weekday is/],
    ['25 o’clock', { ...good, hours: hours([1], 540, 1500) }, /between 00:00 and 24:00/],
    ['a closure of two years', { ...good, closures: [closedOn('2026-01-01', '2027-12-31')] }, /longer than a year/],
    ['a closure backwards', { ...good, closures: [closedOn('2026-12-31', '2026-12-01')] }, /ends before it starts/],
    ['a closure on 30 February', { ...good, closures: [closedOn('2026-02-30')] }, /first and a last day/],
  ];

  test.each(cases)('%s', (_, calendar, why) => {
    expect(findCalendarProblem(calendar)).toMatch(why);
    expect(() => isWorkingDay(calendar, '2026-10-01')).toThrow(why);
  });

  test('a good one has no problem', () => expect(findCalendarProblem(good)).toBeNull());

  test('dates far outside are refused', () => {
    expect(() => addWorkingDays(good, '2026-10-01', 1e6)).toThrow(/1990 to 2099/);
    expect(() => isWorkingDay(good, '1950-01-02')).toThrow(/1990 to 2099/);
  });
});

const dates = fc.integer({ min: 0, max: 1500 }).map((days) => addDays('2025-06-01', days));
const closures = fc.tuple(dates, fc.integer({ min: 0, max: 30 })).map(([on, days]) => closedOn(on, addDays(on, days)));
const calendars = fc
  .tuple(fc.uniqueArray(fc.integer({ min: 1, max: 7 }), { minLength: 1 }), fc.array(closures, { maxLength: 4 }))
  .map(([weekdays, closed]) => ({ zone: 'Europe/Lisbon', hours: hours(weekdays), closures: closed }));
const property = { numRuns: 60 };

describe('for every calendar', () => {
  test('counting undoes adding', () =>
    fc.assert(
      fc.property(calendars, dates, fc.integer({ min: 1, max: 200 }), (calendar, date, n) => {
        const end = addWorkingDays(calendar, date, n);
        expect(countWorkingDays(calendar, date, end)).toBe(n);
        expect(isWorkingDay(calendar, end)).toBe(true);
      }),
      property,
    ));

  test('adding a closure never makes a date earlier', () =>
    fc.assert(
      fc.property(calendars, closures, dates, fc.integer({ min: 0, max: 200 }), (calendar, closure, date, n) => {
        const more = { ...calendar, closures: [...calendar.closures, closure] };
        expect(addWorkingDays(more, date, n) >= addWorkingDays(calendar, date, n)).toBe(true);
      }),
      property,
    ));

  test('the same days come out as by walking them one by one', () =>
    fc.assert(
      fc.property(calendars, dates, fc.integer({ min: 1, max: 40 }), (calendar, date, n) => {
        let walked = date;
        for (let left = n; left > 0;) {
          walked = addDays(walked, 1);
          const weekday = ((new Date(`${walked}T12:00:00Z`).getUTCDay() + 6) % 7) + 1;
          const isClosed = calendar.closures.some(({ startsOn, endsOn }) => startsOn <= walked && walked <= endsOn);
          if (!isClosed && calendar.hours.some((row) => row.weekday === weekday)) left--;
        }
        expect(addWorkingDays(calendar, date, n)).toBe(walked);
      }),
      property,
    ));
});
