import { findCalendarProblem, type WorkingCalendar } from './calendar-check';
import { dateOfDay, dayNumber, weekdayOfDay } from './days';

/** Stretches of one day's work in minutes after midnight, in order and apart. */
export type WorkSpan = { fromMin: number; toMin: number };

/**
 * The working days of a calendar, counted once: the n-th working day and the number of working days up to a date are
 * then a look into an array.
 */
export type CalendarIndex = {
  /** Day number of each working day, in order. */
  workingDays: Int32Array;
  /** By day number minus `FIRST_DAY`: how many working days there are up to and including that day. */
  countUpTo: Int32Array;
  spansByWeekday: WorkSpan[][];
  /** By day number: when work ends on a half day, or 0 for a day without work. */
  endsAtMinByDay: Map<number, number>;
  /** Dates of working days that were asked for, by their place among the working days. */
  dates: string[];
};

export const FIRST_DAY = dayNumber('1990-01-01');
export const LAST_DAY = dayNumber('2099-12-31');

function mergeSpans(spans: WorkSpan[]): WorkSpan[] {
  const merged: WorkSpan[] = [];
  for (const span of spans.sort((one, other) => one.fromMin - other.fromMin)) {
    const last = merged.at(-1);
    if (last && span.fromMin <= last.toMin) last.toMin = Math.max(last.toMin, span.toMin);
    else merged.push({ ...span });
  }
  return merged;
}

function spansByWeekday({ hours }: WorkingCalendar): WorkSpan[][] {
  return Array.from({ length: 8 }, (_, weekday) =>
    mergeSpans(
      hours
        .filter((row) => row.weekday === weekday)
        .map(({ opensAtMin, closesAtMin }) => ({ fromMin: opensAtMin, toMin: closesAtMin })),
    ),
  );
}

/** Of closures that overlap the one that leaves less work counts. */
function endsByDay({ closures }: WorkingCalendar): Map<number, number> {
  const ends = new Map<number, number>();
  for (const { startsOn, endsOn, closesAtMin } of closures) {
    const lastDay = dayNumber(endsOn);
    for (let day = dayNumber(startsOn); day <= lastDay; day++) {
      ends.set(day, Math.min(ends.get(day) ?? Infinity, closesAtMin ?? 0));
    }
  }
  return ends;
}

function buildIndex(calendar: WorkingCalendar): CalendarIndex {
  const problem = findCalendarProblem(calendar);
  if (problem !== null) throw new RangeError(problem);
  const spans = spansByWeekday(calendar);
  const ends = endsByDay(calendar);
  const opensAtMin = spans.map((ofDay) => ofDay[0]?.fromMin ?? Infinity);
  const countUpTo = new Int32Array(LAST_DAY - FIRST_DAY + 1);
  const workingDays = new Int32Array(countUpTo.length);
  let count = 0;
  // The weekday is carried along: this loop is most of what a calendar costs.
  let weekday = weekdayOfDay(FIRST_DAY);
  for (let day = FIRST_DAY; day <= LAST_DAY; day++) {
    if ((opensAtMin[weekday] ?? Infinity) < (ends.get(day) ?? 1440)) workingDays[count++] = day;
    countUpTo[day - FIRST_DAY] = count;
    weekday = weekday === 7 ? 1 : weekday + 1;
  }
  return {
    workingDays: workingDays.subarray(0, count),
    countUpTo,
    spansByWeekday: spans,
    endsAtMinByDay: ends,
    dates: [],
  };
}

const indexes = new WeakMap<WorkingCalendar, CalendarIndex>();

/** The index of a calendar, made once for each calendar object. @throws RangeError with a sentence when it is unusable */
export function indexOf(calendar: WorkingCalendar): CalendarIndex {
  const known = indexes.get(calendar);
  if (known) return known;
  const index = buildIndex(calendar);
  indexes.set(calendar, index);
  return index;
}

/** How many working days there are up to and including a day number. @throws RangeError outside 1990 to 2099 */
export function workingDaysUpTo(index: CalendarIndex, day: number): number {
  const count = index.countUpTo[day - FIRST_DAY];
  if (count === undefined) throw new RangeError(`The calendar runs from 1990 to 2099; ${dateOfDay(day)} is outside.`);
  return count;
}

/** The day number of the n-th working day, counted from 1. @throws RangeError outside 1990 to 2099 */
export function nthWorkingDay(index: CalendarIndex, n: number): number {
  const day = index.workingDays[n - 1];
  if (day === undefined) throw new RangeError('The calendar runs from 1990 to 2099; that working day is outside.');
  return day;
}

/** The date of the n-th working day, counted from 1. @throws RangeError outside 1990 to 2099 */
export function nthWorkingDate(index: CalendarIndex, n: number): string {
  return (index.dates[n] ??= dateOfDay(nthWorkingDay(index, n)));
}
