import { describe, expect, test } from 'vitest';
import { choicesForm, mailForm } from '@/lib/validation/mail-settings';

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

describe('quiet hours', () => {
  test.each([
    { from: '22', to: '7', gives: { quietFromHour: 22, quietToHour: 7 } },
    { from: '', to: '', gives: { quietFromHour: null, quietToHour: null } },
  ])('from $from to $to are taken', ({ from, to, gives }) => {
    expect(mailForm.parse({ ...good, quietFromHour: from, quietToHour: to })).toMatchObject(gives);
  });

  test.each([
    ['22', ''],
    ['', '7'],
    ['7', '7'],
    ['24', '7'],
    ['x', '7'],
  ])('from %j to %j are refused with a sentence', (quietFromHour, quietToHour) => {
    const { error } = mailForm.safeParse({ ...good, quietFromHour, quietToHour });
    expect(error?.issues[0]?.message).toMatch(/^Choose .*\.$/);
  });
});

describe('the choices', () => {
  test('are kinds with one of three ways, as many as were sent', () => {
    expect(choicesForm.parse({ letter: 'digest', question: 'never' })).toEqual([
      { kind: 'question', choice: 'never' },
      { kind: 'letter', choice: 'digest' },
    ]);
  });

  test.each([{ letter: 'sometimes' }, { telegram: 'never' }])('%j is refused', (form) => {
    expect(choicesForm.safeParse(form).success).toBe(false);
  });
});
