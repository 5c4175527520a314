import { addDays, isDate } from '@/lib/schedule/days';

const DAYS_AHEAD = 365;

/** The days a sign-off can be asked for by, as yyyy-mm-dd. */
export const dueRange = (today: string) => ({ first: today, last: addDays(today, DAYS_AHEAD) });

/** What is wrong with a day to sign by, as a sentence, or null. `today` is the shop's own day. */
export function dueDayProblem(dueOn: string, today: string): string | null {
  if (!isDate(dueOn)) return 'Choose the day it should be signed by.';
  const { first, last } = dueRange(today);
  if (dueOn < first) return 'That day is over. Choose today or a later one.';
  if (dueOn > last) return 'That day is more than a year away. Choose one within the year.';
  return null;
}
