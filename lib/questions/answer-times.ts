import { Temporal } from 'temporal-polyfill';
import type { WorkingCalendar } from '@/lib/schedule/calendar';
import { workingMinutesBetween } from '@/lib/schedule/working-minutes';

/** The moment (epoch milliseconds) at which the shop's week of `nowMs` began: Monday at midnight (ISO 8601). */
export function weekStartOf({ zone }: WorkingCalendar, nowMs: number): number {
  const today = Temporal.Instant.fromEpochMilliseconds(nowMs).toZonedDateTimeISO(zone).startOfDay();
  return today.subtract({ days: today.dayOfWeek - 1 }).epochMilliseconds;
}

/** The middle of some answers' times in minutes of work, between the middle two where they are even; null for none. */
export function medianWorkingMinutes(
  calendar: WorkingCalendar,
  answers: readonly { askedAt: number; answeredAt: number }[],
): number | null {
  const minutes = answers
    .map(({ askedAt, answeredAt }) => workingMinutesBetween(calendar, askedAt, answeredAt))
    .sort((one, other) => one - other);
  const upper = minutes[Math.floor(minutes.length / 2)];
  const lower = minutes[Math.floor((minutes.length - 1) / 2)];
  return upper === undefined || lower === undefined ? null : (lower + upper) / 2;
}
