import { Temporal } from 'temporal-polyfill';
import { dayOf, type WorkingCalendar } from './calendar';
import { indexOf, nthWorkingDay, workingDaysUpTo } from './calendar-index';
import { dateOfDay, dayNumber, weekdayOfDay } from './days';
import { wallTimeToMs } from './digest-times';

type Stretch = { fromMs: number; toMs: number };

const MINUTE_MS = 60_000;
const stretchesByCalendar = new WeakMap<WorkingCalendar, Map<number, Stretch[]>>();

/** Through the local clock, so that a night shift over a clock change is as long as it really was. */
function momentAt(day: number, minute: number, zone: string): number {
  const midnight = Temporal.PlainDate.from(dateOfDay(day)).toPlainDateTime();
  return wallTimeToMs(midnight.add({ minutes: minute }), zone);
}

function makeStretches(calendar: WorkingCalendar, day: number): Stretch[] {
  const { spansByWeekday, endsAtMinByDay } = indexOf(calendar);
  const endsAtMin = endsAtMinByDay.get(day) ?? 1440;
  return (spansByWeekday[weekdayOfDay(day)] ?? [])
    .filter(({ fromMin }) => fromMin < endsAtMin)
    .map(({ fromMin, toMin }) => ({
      fromMs: momentAt(day, fromMin, calendar.zone),
      toMs: momentAt(day, Math.min(toMin, endsAtMin), calendar.zone),
    }));
}

function stretchesOf(calendar: WorkingCalendar, day: number): Stretch[] {
  const ofCalendar = stretchesByCalendar.get(calendar) ?? new Map<number, Stretch[]>();
  stretchesByCalendar.set(calendar, ofCalendar);
  const known = ofCalendar.get(day) ?? makeStretches(calendar, day);
  ofCalendar.set(day, known);
  return known;
}

/** All stretches of work that end after a moment, in order, from the working day of that moment on. */
function* stretchesAfter(calendar: WorkingCalendar, fromMs: number): Generator<Stretch> {
  const index = indexOf(calendar);
  const firstDay = dayNumber(dayOf(fromMs, calendar.zone));
  for (let n = workingDaysUpTo(index, firstDay - 1) + 1; ; n++) {
    for (const stretch of stretchesOf(calendar, nthWorkingDay(index, n))) if (stretch.toMs > fromMs) yield stretch;
  }
}

function sumBetween(calendar: WorkingCalendar, fromMs: number, toMs: number): number {
  let sumMs = 0;
  for (const stretch of stretchesAfter(calendar, fromMs)) {
    if (stretch.fromMs >= toMs) break;
    sumMs += Math.min(stretch.toMs, toMs) - Math.max(stretch.fromMs, fromMs);
  }
  return sumMs / MINUTE_MS;
}

/**
 * Minutes of work between two moments (epoch milliseconds), with a fraction where they are not on the minute; negative
 * when `toMs` comes first.
 * @throws RangeError for a bad calendar or a moment outside 1990 to 2099
 */
export function workingMinutesBetween(calendar: WorkingCalendar, fromMs: number, toMs: number): number {
  return toMs >= fromMs ? sumBetween(calendar, fromMs, toMs) : -sumBetween(calendar, toMs, fromMs);
}

/**
 * The moment (epoch milliseconds) at which so many minutes of work have passed since `fromMs`; work that ends with the
 * day ends at its last minute. With 0 the moment itself, or the next opening when the shop is closed then.
 * @throws RangeError for a bad calendar, negative minutes, or a result outside 1990 to 2099
 */
export function addWorkingMinutes(calendar: WorkingCalendar, fromMs: number, minutes: number): number {
  if (!(minutes >= 0)) throw new RangeError(`Not a number of minutes: ${minutes}.`);
  let leftMs = minutes * MINUTE_MS;
  for (const stretch of stretchesAfter(calendar, fromMs)) {
    const startMs = Math.max(stretch.fromMs, fromMs);
    if (leftMs <= stretch.toMs - startMs) return startMs + leftMs;
    leftMs -= stretch.toMs - startMs;
  }
  throw new RangeError('The calendar runs from 1990 to 2099; that moment is outside.');
}
