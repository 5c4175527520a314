import { describe, expect, test } from 'vitest';
import { dueWords, shortSpan, workSpanWords } from '@/lib/questions/due-words';
import { fillPhrase } from '@/lib/questions/phrases';
import { canReopen, startsClock } from '@/lib/questions/thread-rules';

const DAY_MS = 86_400_000;

describe('the clock of a question', () => {
  test.each([
    { side: 'client', state: 'answered', dueAt: null, starts: true },
    { side: 'client', state: 'closed', dueAt: null, starts: true },
    { side: 'client', state: 'waiting', dueAt: 5, starts: false },
    { side: 'client', state: 'waiting', dueAt: null, starts: true },
    { side: 'shop', state: 'answered', dueAt: null, starts: false },
    { side: 'shop', state: 'waiting', dueAt: 5, starts: false },
  ] as const)('a $side letter on a question that is $state starts it: $starts', ({ side, state, dueAt, starts }) => {
    expect(startsClock(side, { state, dueAt })).toBe(starts);
  });

  test('a closed question goes on within 30 days and not after', () => {
    expect(canReopen(0, 30 * DAY_MS - 1)).toBe(true);
    expect(canReopen(0, 30 * DAY_MS)).toBe(false);
    expect(canReopen(null, 0)).toBe(false);
  });
});

describe('words about when', () => {
  // Monday 30 November 2026, 16:30 UTC.
  const now = Date.UTC(2026, 10, 30, 16, 30);

  test.each([
    { dueAt: Date.UTC(2026, 10, 30, 13, 12), short: '3 h late', long: 'answer was due Monday 13:12' },
    { dueAt: Date.UTC(2026, 10, 30, 18, 40), short: 'Due in 2 h', long: 'answer due Monday 18:40' },
    { dueAt: Date.UTC(2026, 11, 2, 16, 30), short: 'Due in 2 days', long: 'answer due Wednesday 16:30' },
    { dueAt: Date.UTC(2026, 10, 9, 9, 5), short: '21 days late', long: 'answer was due 9 November, 09:05' },
    { dueAt: now, short: 'Due in 1 min', long: 'answer due Monday 16:30' },
  ])('$short, $long', ({ dueAt, short, long }) => {
    expect(dueWords(dueAt, 'UTC', now)).toMatchObject({ short, long });
  });

  test('spans are told in their largest unit, work in hours and minutes', () => {
    expect([0.2, 59.9, 60, 1439, 1440, 2880].map(shortSpan)).toEqual([
      '1 min',
      '59 min',
      '1 h',
      '23 h',
      '1 day',
      '2 days',
    ]);
    expect([0, 50, 120, 130.4].map(workSpanWords)).toEqual(['a minute', '50 min', '2 h', '2 h 10 min']);
  });
});

describe('a saved phrase', () => {
  const values = { owner: 'Maren', instrument: 'Nightjar six', order: 'Q-2417', stage: 'Frets', window: null };

  test('is filled in; what nobody knows stays as it is, and is named', () => {
    expect(fillPhrase('{owner}, {instrument} ({order}) is in {stage}.', values)).toEqual({
      text: 'Maren, Nightjar six (Q-2417) is in Frets.',
      missing: [],
    });
    expect(fillPhrase('Ready {window} {window}, {nothing}', values)).toEqual({
      text: 'Ready {window} {window}, {nothing}',
      missing: ['{window}', '{nothing}'],
    });
  });

  test('a value with braces or the name of a field is put in as it is, once', () => {
    expect(fillPhrase('{owner}', { ...values, owner: '{order}' }).text).toBe('{order}');
    expect(fillPhrase('{constructor}{__proto__}', values).missing).toEqual(['{constructor}', '{__proto__}']);
  });
});
