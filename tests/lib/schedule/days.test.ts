import { describe, expect, test } from 'vitest';
import { addDays, dayNumber, daysBetween, isDate, isoWeekOf, mondayOf } from '@/lib/schedule/days';
import { readReference } from '../../support/reference';

// 08l: ISO 8601 week dates; Python isocalendar prints the library rows and agrees with the remembered ones.
describe('the ISO week', () => {
  const rows = readReference('08l_iso_weeks');

  test('the table has its 23 rows', () => expect(rows).toHaveLength(23));

  test.each(rows)('of $date is $expected_iso_week_date', ({ date = '', expected_iso_week_date }) => {
    const { year, week, weekday } = isoWeekOf(date);
    expect(`${year}-W${String(week).padStart(2, '0')}-${weekday}`).toBe(expected_iso_week_date);
  });

  test('begins on its Monday, over a year end too', () => {
    expect(mondayOf('2027-01-03')).toBe('2026-12-28');
    expect(mondayOf('2026-12-28')).toBe('2026-12-28');
  });
});

describe('a date', () => {
  test.each(['2026-02-30', '2026-13-01', '2026-2-3', '1 March', '', '2026-03-08T02:30'])('is not %j', (text) => {
    expect(isDate(text)).toBe(false);
    expect(() => dayNumber(text)).toThrow(/Not a date/);
  });

  test('keeps leap days and year ends', () => {
    expect(addDays('2028-02-28', 1)).toBe('2028-02-29');
    expect(daysBetween('2026-12-31', '2027-01-01')).toBe(1);
    expect(daysBetween('2027-01-01', '2026-12-31')).toBe(-1);
  });
});
