import { expect, test } from 'vitest';
import { waitWords } from '@/lib/questions/wait-words';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;

test.each([
  { waitedMs: -5_000, words: 'under an hour' },
  { waitedMs: HOUR_MS - 1, words: 'under an hour' },
  { waitedMs: HOUR_MS, words: '1 hour' },
  { waitedMs: DAY_MS - 1, words: '23 hours' },
  { waitedMs: DAY_MS, words: '1 day' },
  { waitedMs: 14 * DAY_MS - 1, words: '13 days' },
  { waitedMs: 14 * DAY_MS, words: '2 weeks' },
  { waitedMs: 71 * DAY_MS, words: '10 weeks' },
])('a wait of $waitedMs ms reads "$words"', ({ waitedMs, words }) => {
  expect(waitWords(1e12, 1e12 + waitedMs)).toBe(words);
});
