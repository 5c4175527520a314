import { clockWords, dayWords } from '@/lib/date-words';

const MINUTE_MS = 60_000;
const DAY_MIN = 1440;
const WEEK_MS = 7 * DAY_MIN * MINUTE_MS;

const weekdays = new Map<string, Intl.DateTimeFormat>();

function weekdayWord(ms: number, zone: string): string {
  const format = weekdays.get(zone) ?? new Intl.DateTimeFormat('en-GB', { weekday: 'long', timeZone: zone });
  weekdays.set(zone, format);
  return format.format(ms);
}

/** "Monday 13:12" within a week of now, "9 November, 13:12" further off. */
export function whenWords(ms: number, zone: string, nowMs: number): string {
  const isNear = Math.abs(ms - nowMs) < WEEK_MS - DAY_MIN * MINUTE_MS;
  return isNear
    ? `${weekdayWord(ms, zone)} ${clockWords(ms, zone)}`
    : `${dayWords(ms, zone, nowMs)}, ${clockWords(ms, zone)}`;
}

/** A length of time in its largest unit: "20 min", "3 h", "2 days". */
export function shortSpan(minutes: number): string {
  const whole = Math.max(1, Math.floor(minutes));
  if (whole < 60) return `${whole} min`;
  if (whole < DAY_MIN) return `${Math.floor(whole / 60)} h`;
  const days = Math.floor(whole / DAY_MIN);
  return `${days} day${days === 1 ? '' : 's'}`;
}

/** "3 h late" or "in 2 h" by the clock on the wall, and when it is or was due. */
export function dueWords(dueAt: number, zone: string, nowMs: number): { short: string; long: string; isLate: boolean } {
  const isLate = nowMs > dueAt;
  const span = shortSpan(Math.abs(nowMs - dueAt) / MINUTE_MS);
  const when = whenWords(dueAt, zone, nowMs);
  return isLate
    ? { short: `${span} late`, long: `answer was due ${when}`, isLate }
    : { short: `Due in ${span}`, long: `answer due ${when}`, isLate };
}

/** Minutes of work, as an answer's time is told: "a minute", "50 min", "2 h 10 min". */
export function workSpanWords(minutes: number): string {
  const whole = Math.round(minutes);
  if (whole <= 1) return 'a minute';
  if (whole < 60) return `${whole} min`;
  const rest = whole % 60;
  return rest === 0 ? `${whole / 60} h` : `${Math.floor(whole / 60)} h ${rest} min`;
}
