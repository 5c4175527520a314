import { describe, expect, test } from 'vitest';
import { listHolidayCountries, listHolidayRegions, listHolidays } from '@/lib/schedule/holidays';
import { readReference } from '../../support/reference';

// 08k: 5 U.S.C. 6103(a), (b) and Executive Order 11582.
describe('US federal holidays as observed', () => {
  const rows = readReference('08k_us_federal_holidays');
  const inYear = (year: number) =>
    rows.map(({ expected_observed_date = '' }) => expected_observed_date).filter((on) => on.startsWith(`${year}-`));

  test('the table has its 55 rows', () => expect(rows).toHaveLength(55));

  // Of 2028 the table cannot know what is observed on its last day: that belongs to the holidays of 2029.
  test.each([2024, 2025, 2026, 2027, 2028])('every one of %i is listed, and on weekdays no other', async (year) => {
    const listed = (await listHolidays('US', null, year)).map(({ on }) => on);
    const isWeekday = (on: string) => ![0, 6].includes(new Date(`${on}T12:00:00Z`).getUTCDay());
    expect(listed.filter(isWeekday)).toEqual([...new Set(inYear(year))].sort());
  });

  test('New Year of 2028 is observed in 2027, and so is in the list of 2027', async () => {
    expect((await listHolidays('US', null, 2027)).at(-1)?.on).toBe('2027-12-31');
  });

  test('Veterans Day of 2028, a Saturday, is observed on the Friday', async () => {
    expect(await listHolidays('US', null, 2028)).toContainEqual({
      on: '2028-11-10',
      name: 'Veterans Day (substitute day)',
    });
  });
});

describe('holidays of other places', () => {
  test('a region has its own', async () => {
    const names = async (region: string | null) => (await listHolidays('DE', region, 2026)).map(({ on }) => on);
    expect(await names('BY')).toContain('2026-06-04');
    expect(await names(null)).not.toContain('2026-06-04');
  });

  test('days that people only keep are left out', async () => {
    const days = (await listHolidays('US', null, 2026)).map(({ on }) => on);
    expect(days).not.toContain('2026-02-14');
  });

  test('one of several days that began in December goes on in January', async () => {
    const listed = await listHolidays('SZ', null, 2027);
    expect(listed.slice(0, 2).map(({ on }) => on)).toEqual(['2027-01-01', '2027-01-02']);
  });

  test('an unknown country or region is refused by name', async () => {
    await expect(listHolidays('XX', null, 2026)).rejects.toThrow(/country XX/);
    await expect(listHolidays('US', 'ZZ', 2026)).rejects.toThrow(/region ZZ/);
  });

  test('countries and regions can be listed for a form', async () => {
    expect(await listHolidayCountries()).toContainEqual({ code: 'PT', name: 'Portugal' });
    expect(await listHolidayRegions('US')).toContainEqual({ code: 'TN', name: 'Tennessee' });
    expect(await listHolidayRegions('VA')).toEqual([]);
  });
});
