import { describe, expect, test } from 'vitest';
import { chainOf } from '@/lib/sign-offs/chain';
import { dueDayProblem } from '@/lib/sign-offs/due-day';
import { shortHash } from '@/lib/sign-offs/hash-words';
import { isReminderDue } from '@/lib/sign-offs/reminder';
import { sameName, signedNameProblem } from '@/lib/sign-offs/signed-name';
import { stateWords } from '@/lib/sign-offs/state-words';
import { requireOneSubject } from '@/lib/sign-offs/subject';
import { blockWords, waitWords } from '@/lib/sign-offs/wait-words';

const NOW_MS = Date.UTC(2026, 11, 1, 9);
const TODAY = '2026-12-01';

describe('a typed name is the name on the account', () => {
  test.each([
    ['Noor O’Hara', "noor o'hara"],
    ['Ana-Lea Roe', 'Ana‐Lea  Roe'],
    ['Tove Järvi', 'tove ja\u0308rvi'],
  ])('%s, typed %s', (account, typed) => expect(sameName(typed, account)).toBe(true));

  test.each([
    ['Tove Järvi', 'Tove Jarvi'],
    ['Tove Järvi', 'Tove'],
    ['Tove Järvi', 'Järvi Tove'],
    ['Tove', 'T\u200dove'],
  ])('but not for %s, typed %s', (account, typed) => expect(signedNameProblem(typed, account)).toContain(account));
});

describe('a reminder is due', () => {
  test.each([
    { dueOn: '2026-12-12', askedOn: '2026-12-01', today: '2026-12-09', due: false, why: 'not three days ahead' },
    { dueOn: '2026-12-12', askedOn: '2026-12-01', today: '2026-12-10', due: true, why: 'two days ahead' },
    { dueOn: '2026-12-12', askedOn: '2026-12-01', today: '2026-12-11', due: true, why: 'a day late when missed' },
    { dueOn: '2026-12-12', askedOn: '2026-12-10', today: '2026-12-10', due: false, why: 'not on the day of asking' },
    { dueOn: '2026-12-12', askedOn: '2026-12-10', today: '2026-12-11', due: false, why: 'not between' },
    { dueOn: '2026-12-12', askedOn: '2026-12-10', today: '2026-12-12', due: true, why: 'on the day, asked late' },
    { dueOn: '2026-12-12', askedOn: '2026-12-12', today: '2026-12-12', due: false, why: 'never when due at once' },
    { dueOn: '2026-12-12', askedOn: '2026-12-12', today: '2026-12-20', due: false, why: 'nor later then' },
    { dueOn: '2027-01-01', askedOn: '2026-12-01', today: '2026-12-30', due: true, why: 'over the end of a year' },
  ])('$why', ({ due, today, ...asked }) => expect(isReminderDue(asked, today)).toBe(due));
});

describe('the chain of what took whose place', () => {
  const row = (id: string, replacesId: string | null = null) => ({ id, replacesId });
  const ids = (rows: { id: string }[]) => rows.map(({ id }) => id).join('');

  test('is the same from each of its links', () => {
    const rows = [row('c', 'b'), row('a'), row('b', 'a'), row('x')];
    for (const id of ['a', 'b', 'c']) expect(ids(chainOf(rows, id))).toBe('abc');
    expect(ids(chainOf(rows, 'x'))).toBe('x');
  });

  test('ends where a link leads nowhere, or in a circle', () => {
    expect(ids(chainOf([row('b', 'gone')], 'b'))).toBe('b');
    expect(ids(chainOf([row('a', 'b'), row('b', 'a')], 'a'))).toBe('ba');
    expect(chainOf([], 'a')).toEqual([]);
  });
});

describe('who waits for whom, in words', () => {
  const waiting = { title: 'Drawing 3', dueOn: '2026-12-12', state: 'asked' as const, blocks: null, ownerName: null };
  const owner = 'Maren Oduya';

  test.each([
    [waiting, 'Waits for you: sign “Drawing 3” by 12 December'],
    [{ ...waiting, ownerName: owner }, 'Waits for Maren Oduya’s signature on “Drawing 3” by 12 December'],
    [{ ...waiting, dueOn: '2026-11-28' }, 'Waits for you: sign “Drawing 3”, due since 28 November'],
    [{ ...waiting, state: 'change_asked' as const }, 'Waits for the shop: you asked for a change to “Drawing 3”'],
    [
      { ...waiting, state: 'change_asked' as const, ownerName: owner },
      'Waits for us: Maren Oduya asked for a change to “Drawing 3”',
    ],
  ])('%#', (given, words) => expect(waitWords(given, TODAY, NOW_MS)).toBe(words));

  test('names the stage that cannot start', () => {
    expect(blockWords({ blocks: 'Hardware & set-up' })).toBe('Hardware & set-up starts when it is signed.');
    expect(blockWords({ blocks: null })).toBeNull();
  });

  test('only what still waits is late, and from the day after', () => {
    expect(stateWords({ state: 'asked', dueOn: TODAY }, TODAY).isLate).toBe(false);
    expect(stateWords({ state: 'asked', dueOn: '2026-11-30' }, TODAY)).toEqual({
      words: 'Waits, and is late',
      isLate: true,
    });
    for (const state of ['signed', 'change_asked', 'superseded', 'withdrawn'] as const)
      expect(stateWords({ state, dueOn: '2026-11-30' }, TODAY).isLate).toBe(false);
  });
});

test('a day to sign by lies between today and a year from now', () => {
  const days = ['2026-11-30', '2026-12-01', '2027-12-01', '2027-12-02'];
  expect(days.map((day) => dueDayProblem(day, TODAY) === null)).toEqual([false, true, true, false]);
});

test('a sign-off is of one thing', () => {
  const concession = { signed: '27 in', measured: '27.01 in', reason: 'The board moved' };
  for (const subject of [
    { kind: 'spec', specVersionId: 'v' },
    { kind: 'sample', documentId: 'd', itemKey: 'edge_colour' },
    { kind: 'change', changeRequestId: 'c' },
    { kind: 'concession', itemKey: 'scale_length', concession },
  ] as const)
    expect(() => requireOneSubject(subject)).not.toThrow();
  for (const subject of [
    { kind: 'spec' },
    { kind: 'spec', documentId: 'd' },
    { kind: 'drawing', documentId: 'd', specVersionId: 'v' },
    { kind: 'concession', concession },
    { kind: 'concession', itemKey: 'scale_length' },
  ] as const)
    expect(() => requireOneSubject(subject)).toThrow(RangeError);
});

test('a hash is shown by its first twelve letters, in threes of four', () => {
  expect(shortHash('9f2c41a077be'.padEnd(64, '0'))).toBe('9f2c 41a0 77be');
});
