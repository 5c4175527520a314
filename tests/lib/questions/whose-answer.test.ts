import { expect, test } from 'vitest';
import { whoseAnswerWords } from '@/lib/questions/whose-answer';

const NOW_MS = Date.UTC(2026, 11, 1, 9);
const HOUR_MS = 3_600_000;
const asked = {
  subject: 'Neck shape',
  askerName: 'Ida Brandt',
  holderName: 'Bo Lindgren',
  isReaders: false,
  dueAt: NOW_MS + 25 * HOUR_MS,
};

test.each([
  { over: {}, words: 'Ida Brandt waits for Bo Lindgren’s answer on “Neck shape”, due Wednesday 10:00' },
  { over: { isReaders: true }, words: 'Ida Brandt waits for your answer on “Neck shape”, due Wednesday 10:00' },
  {
    over: { dueAt: NOW_MS - HOUR_MS },
    words: 'Ida Brandt waits for Bo Lindgren’s answer on “Neck shape”, due since Tuesday 08:00',
  },
  {
    over: { holderName: null, dueAt: null },
    words: 'Ida Brandt waits for an answer on “Neck shape”; nobody on the build can give it',
  },
])('reads "$words"', ({ over, words }) => {
  expect(whoseAnswerWords({ ...asked, ...over }, 'UTC', NOW_MS)).toBe(words);
});
