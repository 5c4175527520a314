import { describe, expect, test } from 'vitest';
import { BadInput } from '@/lib/errors';
import { holdForm, holdRange, holdUntilMs } from '@/lib/validation/hold';

/** 1 December 2026, 09:00 UTC. */
const NOW_MS = Date.UTC(2026, 11, 1, 9);

describe('the hold form', () => {
  test.each([
    '',
    '2026-12',
    '1 December',
    '2026-02-30',
    '2026-13-01',
    '2026-00-10',
    '+002026-12-24',
    '2026-12-24T10:00',
  ])('refuses %j as a day', (until) => {
    const { error } = holdForm.safeParse({ orderNumber: 'Q-2417', until });
    expect(error?.issues[0]?.path).toEqual(['until']);
  });

  test('refuses a form without an order number', () => {
    expect(holdForm.safeParse({ orderNumber: ' ', until: '2026-12-24' }).success).toBe(false);
  });
});

describe('the end of a hold', () => {
  test('is the first moment of the day on the clock of the rep', () => {
    // New York keeps UTC-5 in winter, Auckland UTC+13 in summer (tests/reference/09_dst_transitions_2026_2027.csv).
    expect(holdUntilMs('2026-12-24', 'America/New_York', NOW_MS)).toBe(Date.UTC(2026, 11, 24, 5));
    expect(holdUntilMs('2026-12-24', 'Pacific/Auckland', NOW_MS)).toBe(Date.UTC(2026, 11, 23, 11));
  });

  test.each([
    ['the day itself, which has begun', '2026-12-01', 'Europe/Lisbon'],
    ['a day that is over', '2020-01-01', 'Europe/Lisbon'],
    ['a day that has begun there and not here', '2026-12-01', 'Pacific/Auckland'],
    ['a day more than three years ahead', '2029-12-02', 'Europe/Lisbon'],
    ['the year 9999', '9999-12-31', 'Europe/Lisbon'],
  ])('is refused for %s', (_what, day, zone) => {
    expect(() => holdUntilMs(day, zone, NOW_MS)).toThrow(BadInput);
  });

  test.each(['Europe/Lisbon', 'Pacific/Auckland', 'America/Los_Angeles', 'UTC'])(
    'is taken for the first and the last day that the field offers in %s',
    (zone) => {
      const { first, last } = holdRange(zone, NOW_MS);
      expect(holdUntilMs(first, zone, NOW_MS)).toBeGreaterThan(NOW_MS);
      expect(holdUntilMs(last, zone, NOW_MS)).toBeGreaterThan(NOW_MS);
    },
  );
});
