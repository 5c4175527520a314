import fc from 'fast-check';
import { expect, test } from 'vitest';
import { MAIL_ATTEMPTS, nextAttemptAt } from '@/lib/mail/retry-delay';

const HOUR_MS = 3_600_000;

function triesAt(random: () => number): number[] {
  const tries = [0];
  for (;;) {
    const next = nextAttemptAt(tries.length, tries.at(-1) ?? 0, random);
    if (next === null) return tries;
    tries.push(next);
  }
}

test('a mail is tried eight times, the last within the 24 hours a key is remembered', () => {
  for (const random of [() => 0, () => 0.5, () => 0.999999]) {
    const tries = triesAt(random);
    expect(tries).toHaveLength(8);
    expect(tries.at(-1)).toBeGreaterThan(12 * HOUR_MS);
    expect(tries.at(-1)).toBeLessThan(23 * HOUR_MS);
  }
});

test('each wait is longer than the one before, whatever chance says', () => {
  const chances = fc.array(fc.double({ min: 0, max: 1, maxExcluded: true, noNaN: true }), {
    minLength: 7,
    maxLength: 7,
  });
  fc.assert(
    fc.property(chances, (chosen) => {
      const left = [...chosen];
      const tries = triesAt(() => left.shift() ?? 0);
      const waits = tries.slice(1).map((time, i) => time - (tries[i] ?? 0));
      expect(waits).toEqual([...waits].sort((a, b) => a - b));
      expect(new Set(waits).size).toBe(waits.length);
    }),
  );
});

test('mails that failed together do not come back together', () => {
  expect(nextAttemptAt(1, 0, () => 0.1)).not.toBe(nextAttemptAt(1, 0, () => 0.9));
});

test('after the last try there is no next one', () => {
  expect(nextAttemptAt(MAIL_ATTEMPTS, 0, () => 0)).toBeNull();
  expect(nextAttemptAt(MAIL_ATTEMPTS + 5, 0, () => 0)).toBeNull();
});

test.each([0, -1, 1.5, NaN])('a count of %d tries is refused', (attempt) => {
  expect(() => nextAttemptAt(attempt, 0, () => 0)).toThrow(RangeError);
});
