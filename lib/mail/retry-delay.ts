/** How often one mail is tried before it waits for an admin. */
export const MAIL_ATTEMPTS = 8;

const FIRST_WAIT_MS = 60_000;
const GROWTH = 3;

/**
 * When to try a mail again, in epoch milliseconds; null once it is given up. The waits triple from about a minute, each
 * between 0.8 and 1.2 times its length so that many mails do not return at once: the eighth and last try falls 14.5 to
 * 21.9 hours after the first, within the 24 hours for which the provider remembers an idempotency key.
 * @param attempt tries made so far, from 1
 * @param random gives a number from 0 up to 1
 * @throws RangeError when attempt is not a whole number of at least 1
 */
export function nextAttemptAt(attempt: number, nowMs: number, random: () => number): number | null {
  if (!Number.isInteger(attempt) || attempt < 1) throw new RangeError(`tries are counted from 1, not ${attempt}`);
  if (attempt >= MAIL_ATTEMPTS) return null;
  const waitMs = FIRST_WAIT_MS * GROWTH ** (attempt - 1);
  return nowMs + Math.round(waitMs * (0.8 + 0.4 * random()));
}
