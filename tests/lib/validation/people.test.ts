import { describe, expect, test } from 'vitest';
import { assignment, changedPerson, companionForm, invitation, personRef, stepInForm } from '@/lib/validation/people';

const person = {
  name: 'Tove Halloran',
  email: 'tove@people.example',
  role: 'builder',
  department: 'finish',
  orderNumber: '',
};

const fieldOf = (result: { error?: { issues: { path: PropertyKey[] }[] } }) => result.error?.issues[0]?.path[0];

describe('an invitation', () => {
  test('keeps the address in lower case and the name on one line', () => {
    const typed = { ...person, name: '  Tove\n Halloran ', email: ' Tove@People.Example ' };
    expect(invitation.parse(typed)).toMatchObject({ name: 'Tove Halloran', email: 'tove@people.example' });
  });

  test.each([
    ['name', ''],
    ['name', ' \u200b\u2060 '],
    ['name', 'x'.repeat(2000)],
    ['email', 'tove'],
    ['email', 'tove@example'],
    ['email', 'tove@people.example\nBcc: all@people.example'],
    ['email', `${'t'.repeat(300)}@people.example`],
    ['role', ''],
    ['role', 'owner'],
    ['role', 'Admin'],
    ['department', 'x'.repeat(41)],
    ['orderNumber', 'Q'.repeat(30)],
  ])('refuses %s %j at that field', (field, value) => {
    expect(fieldOf(invitation.safeParse({ ...person, [field]: value }))).toBe(field);
  });
});

describe('a list of order numbers', () => {
  const wish = { userId: 'tove', orderNumbers: 'Q-2417' };

  test('is read with spaces, commas and new lines between, each number once', () => {
    const typed = ' Q-2417, Q-2418;Q-2419\n\nQ-2417 ';
    expect(assignment.parse({ ...wish, orderNumbers: typed }).orderNumbers).toEqual(['Q-2417', 'Q-2418', 'Q-2419']);
  });

  test.each(['', ' , ; \n', Array.from({ length: 101 }, (_, index) => `Q-${index}`).join(' ')])(
    'is refused when it is empty or longer than a hundred (%#)',
    (orderNumbers) => {
      expect(fieldOf(assignment.safeParse({ ...wish, orderNumbers }))).toBe('orderNumbers');
    },
  );

  test('clears nobody for a hold unless the box was ticked', () => {
    expect(assignment.parse(wish).cleared).toBe(false);
    expect(assignment.parse({ ...wish, cleared: 'on' }).cleared).toBe(true);
    expect(assignment.safeParse({ ...wish, cleared: 'true' }).success).toBe(false);
  });
});

describe('stepping in', () => {
  test.each(['', 'because', '\u200b'.repeat(50)])('asks for a reason that says something, not %j', (reason) => {
    expect(fieldOf(stepInForm.safeParse({ orderNumber: 'Q-2417', reason }))).toBe('reason');
  });

  test('keeps at most 300 characters of the reason', () => {
    expect(stepInForm.parse({ orderNumber: 'Q-2417', reason: 'why '.repeat(200) }).reason.length).toBeLessThanOrEqual(
      300,
    );
  });
});

test('a person is named by one id of a sensible length', () => {
  expect(personRef.safeParse({ userId: '' }).success).toBe(false);
  expect(personRef.safeParse({ userId: 'x'.repeat(41) }).success).toBe(false);
  expect(changedPerson.safeParse({ userId: 'a', role: 'king', department: '' }).success).toBe(false);
});

test('a companion needs a name, an address and a build', () => {
  const companion = { orderNumber: 'Q-2417', name: 'Ines', email: 'ines@people.example' };
  expect(companionForm.safeParse(companion).success).toBe(true);
  for (const field of Object.keys(companion))
    expect(fieldOf(companionForm.safeParse({ ...companion, [field]: '' }))).toBe(field);
});
