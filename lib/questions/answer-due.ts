import type { WorkingCalendar } from '@/lib/schedule/calendar';
import { addWorkingMinutes, workingMinutesBetween } from '@/lib/schedule/working-minutes';

/** The holder is reminded so much working time before the answer is due, and the rep told so much after. */
export const REMIND_BEFORE_MIN = 60;
export const TELL_AFTER_MIN = 30;

/**
 * When the answer to a letter is due (epoch milliseconds): so many working hours after it was written.
 * @throws RangeError for a bad calendar or hours below zero
 */
export const answerDueAt = (calendar: WorkingCalendar, letterAtMs: number, dueHours: number): number =>
  addWorkingMinutes(calendar, letterAtMs, dueHours * 60);

export type Clock = {
  dueAt: number;
  remindedBeforeAt: number | null;
  remindedDueAt: number | null;
  overdueToldAt: number | null;
};

export type Reminder = 'before' | 'due' | 'overdue';

/**
 * What is to be said now of a running clock, the latest first; null when there is nothing, or it was said. A reminder
 * whose time went by unseen, as over a restart, is not made up for by one that is no longer true.
 */
export function reminderOf(calendar: WorkingCalendar, clock: Clock, nowMs: number): Reminder | null {
  const leftMin = workingMinutesBetween(calendar, nowMs, clock.dueAt);
  if (nowMs >= clock.dueAt && leftMin <= -TELL_AFTER_MIN) return clock.overdueToldAt === null ? 'overdue' : null;
  if (nowMs >= clock.dueAt) return clock.remindedDueAt === null ? 'due' : null;
  return leftMin <= REMIND_BEFORE_MIN && clock.remindedBeforeAt === null ? 'before' : null;
}

/** Whether a clock that is looked at in the order of its due time can have nothing to say yet, nor any after it. */
export const isEarly = (calendar: WorkingCalendar, dueAt: number, nowMs: number): boolean =>
  dueAt > nowMs && workingMinutesBetween(calendar, nowMs, dueAt) > REMIND_BEFORE_MIN;
