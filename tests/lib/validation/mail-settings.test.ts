import { describe, expect, test } from 'vitest';
import { mailForm, zoneForm } from '@/lib/validation/mail-settings';

const good = { zone: 'Europe/Lisbon', cadence: 'weekly', hourLocal: '8', weekday: '5' };

describe('the mail form', () => {
  test('takes the words of a form and gives figures', () => {
    expect(mailForm.parse(good)).toEqual({ zone: 'Europe/Lisbon', cadence: 'weekly', hourLocal: 8, weekday: 5 });
  });

  test.each([
    ['hourLocal', ''],
    ['hourLocal', '24'],
    ['hourLocal', '-1'],
    ['hourLocal', '8.5'],
    ['hourLocal', '1e1'],
    ['hourLocal', ' 8'],
    ['hourLocal', '０８'],
    ['weekday', '0'],
    ['weekday', '8'],
    ['weekday', ''],
    ['cadence', 'hourly'],
    ['cadence', ''],
    ['zone', 'EST'],
    ['zone', '+02:00'],
    ['zone', 'Europe/Nowhere'],
    ['zone', 'europe/lisbon'],
    ['zone', ''],
    ['zone', 'Europe/'.padEnd(4000, 'a')],
  ])('refuses %s %j with a sentence at that field', (field, value) => {
    const { error } = mailForm.safeParse({ ...good, [field]: value });
    expect(error?.issues[0]?.path).toEqual([field]);
    expect(error?.issues[0]?.message).toMatch(/^[A-Z].*\.$/);
  });

  test.each(['zone', 'cadence', 'hourLocal', 'weekday'])('refuses a form without %s', (field) => {
    const { error } = mailForm.safeParse({ ...good, [field]: undefined });
    expect(error?.issues.map(({ path }) => path)).toContainEqual([field]);
    expect(error?.issues[0]?.message).toMatch(/^Choose .*\.$/);
  });
});

test('the zone form takes a place and refuses an offset', () => {
  expect(zoneForm.safeParse({ zone: 'Pacific/Auckland' }).success).toBe(true);
  expect(zoneForm.safeParse({ zone: 'Etc/GMT+5' }).success).toBe(false);
});
