import type { WorkingCalendar } from './calendar-check';
import { indexOf, nthWorkingDate, workingDaysUpTo } from './calendar-index';
import { dayNumber } from './days';

/**
 * By how much windows are stretched from their middle because of how past ones did: 1 leaves a side as it is, 1.3 makes it
 * three tenths longer, 0.8 a fifth shorter.
 */
export type Adjustment = { readonly early: number; readonly late: number };

/** Distance from the middle of a normal distribution to its 90 % point, in standard deviations. */
const Z90 = 1.2815515655446004;

/** Calendar days for each working day of a usual week. */
function stretchOf({ hours }: WorkingCalendar): number {
  return 7 / new Set(hours.map(({ weekday }) => weekday)).size;
}

/**
 * Half the usual width of a window in calendar days: the yardstick that adjustments are measured with. `sdDays` is the
 * standard deviation of the stages left in working days, the current one as if it had just begun, so that the yardstick
 * stands still while days go by. At least half a working day.
 */
export function yardstickDays(calendar: WorkingCalendar, sdDays: number): number {
  return stretchOf(calendar) * Math.max(0.5, Z90 * sdDays);
}

/**
 * A date moved by calendar days to a working day. Forward it is counted in working days, backward in calendar days and up
 * to the next working day: so that one more closure never makes the result earlier.
 */
export function shiftDate(calendar: WorkingCalendar, date: string, days: number): string {
  const index = indexOf(calendar);
  const day = dayNumber(date);
  if (days > 0) return nthWorkingDate(index, workingDaysUpTo(index, day) + Math.round(days / stretchOf(calendar)));
  return nthWorkingDate(index, workingDaysUpTo(index, day + Math.round(days) - 1) + 1);
}

const later = (one: string, other: string) => (one > other ? one : other);
const earlier = (one: string, other: string) => (one < other ? one : other);

export type DateRange = { earliestOn: string; likelyOn: string; latestOn: string };

/** The window stretched; it never leaves its middle, and never begins before `soonestOn`. */
export function adjustRange(
  calendar: WorkingCalendar,
  { earliestOn, likelyOn, latestOn }: DateRange,
  { early, late }: Adjustment,
  yardstick: number,
  soonestOn: string,
): DateRange {
  const from = shiftDate(calendar, earliestOn, (1 - early) * yardstick);
  const until = shiftDate(calendar, latestOn, (late - 1) * yardstick);
  return {
    earliestOn: later(soonestOn, earlier(from, likelyOn)),
    likelyOn,
    latestOn: later(likelyOn, until),
  };
}
