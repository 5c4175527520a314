/**
 * A date of the shop's calendar is written YYYY-MM-DD; reckoning uses its day number, whole days since 1970-01-01. Neither
 * knows of zones or clock changes: `dayOf` in calendar.ts is the bridge from a moment.
 */
const DAY_MS = 86_400_000;
const DATE = /^\d{4}-\d{2}-\d{2}$/;

const MONTH_DAYS = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31];
const isLeap = (year: number) => year % 4 === 0 && (year % 100 !== 0 || year % 400 === 0);

/** NaN for anything but a date. Without `Date.parse`, which reads 30 February as 2 March and is slow in a loop. */
function parseDay(date: string): number {
  if (!DATE.test(date)) return NaN;
  const [year, month, day] = [Number(date.slice(0, 4)), Number(date.slice(5, 7)), Number(date.slice(8))];
  const longest = month === 2 && isLeap(year) ? 29 : (MONTH_DAYS[month - 1] ?? 0);
  // Date.UTC takes the years 0 to 99 for 1900 to 1999.
  return year < 100 || day < 1 || day > longest ? NaN : Date.UTC(year, month - 1, day) / DAY_MS;
}

/** Whether this is a date that exists, written YYYY-MM-DD. */
export function isDate(date: string): boolean {
  return !Number.isNaN(parseDay(date));
}

/** Days since 1970-01-01. @throws RangeError for anything but a date that exists, written YYYY-MM-DD */
export function dayNumber(date: string): number {
  const day = parseDay(date);
  if (Number.isNaN(day)) throw new RangeError(`Not a date: ${JSON.stringify(date)}.`);
  return day;
}

/** The date of a day number, as YYYY-MM-DD. */
export function dateOfDay(day: number): string {
  const date = new Date(day * DAY_MS);
  const two = (value: number) => (value < 10 ? `0${value}` : `${value}`);
  return `${String(date.getUTCFullYear()).padStart(4, '0')}-${two(date.getUTCMonth() + 1)}-${two(date.getUTCDate())}`;
}

/** 1, Monday, to 7, Sunday. */
export function weekdayOfDay(day: number): number {
  return ((((day + 3) % 7) + 7) % 7) + 1;
}

/** Calendar days from one date to another; negative when `to` comes first. @throws RangeError as `dayNumber` */
export function daysBetween(from: string, to: string): number {
  return dayNumber(to) - dayNumber(from);
}

/** The date so many calendar days later. @throws RangeError as `dayNumber` */
export function addDays(date: string, days: number): string {
  return dateOfDay(dayNumber(date) + days);
}

/** The Monday of the date's week. @throws RangeError as `dayNumber` */
export function mondayOf(date: string): string {
  const day = dayNumber(date);
  return dateOfDay(day - weekdayOfDay(day) + 1);
}

/**
 * The ISO 8601 week: it runs from Monday, and belongs to the year that has its Thursday.
 * @throws RangeError as `dayNumber`
 */
export function isoWeekOf(date: string): { year: number; week: number; weekday: number } {
  const day = dayNumber(date);
  const weekday = weekdayOfDay(day);
  const thursday = day - weekday + 4;
  const year = Number(dateOfDay(thursday).slice(0, 4));
  return { year, week: Math.floor((thursday - dayNumber(`${year}-01-01`)) / 7) + 1, weekday };
}
