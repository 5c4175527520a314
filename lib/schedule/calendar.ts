import { Temporal } from 'temporal-polyfill';
import type { WorkingCalendar } from './calendar-check';
import { indexOf, nthWorkingDate, workingDaysUpTo } from './calendar-index';
import { dayNumber } from './days';
import { isZone } from './digest-times';

export { findCalendarProblem, type Closure, type WorkingCalendar, type WorkingHours } from './calendar-check';

/** The date it is at a moment in a zone, YYYY-MM-DD. @throws RangeError for an abbreviation or anything else not a zone */
export function dayOf(ms: number, zone: string): string {
  if (!isZone(zone)) throw new RangeError(`not a time zone of a place: ${JSON.stringify(zone)}`);
  return Temporal.Instant.fromEpochMilliseconds(ms).toZonedDateTimeISO(zone).toPlainDate().toString();
}

/** Whether there is work on this date; half a day is a working day. @throws RangeError for a bad calendar or date */
export function isWorkingDay(calendar: WorkingCalendar, date: string): boolean {
  const index = indexOf(calendar);
  const day = dayNumber(date);
  return workingDaysUpTo(index, day) > workingDaysUpTo(index, day - 1);
}

/**
 * The n-th working day after a date (before it, when n is negative). With 0 the date itself, or, when it is closed, the
 * first working day after it.
 * @throws RangeError for a bad calendar or date, an n that is not whole, or a result outside 1990 to 2099
 */
export function addWorkingDays(calendar: WorkingCalendar, date: string, n: number): string {
  if (!Number.isInteger(n)) throw new RangeError(`Not a whole number of days: ${n}.`);
  const index = indexOf(calendar);
  const day = dayNumber(date);
  if (n > 0) return nthWorkingDate(index, workingDaysUpTo(index, day) + n);
  return nthWorkingDate(index, workingDaysUpTo(index, day - 1) + 1 + n);
}

/**
 * Working days from one date to another, the first excluded and the last included; negative when `to` comes first.
 * @throws RangeError for a bad calendar or date
 */
export function countWorkingDays(calendar: WorkingCalendar, from: string, to: string): number {
  const index = indexOf(calendar);
  return workingDaysUpTo(index, dayNumber(to)) - workingDaysUpTo(index, dayNumber(from));
}
