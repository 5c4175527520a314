import { Temporal } from 'temporal-polyfill';

export type DigestCadence = 'at_once' | 'daily' | 'weekly' | 'none';

/** When a reader wants mail: the hour is 0 to 23 on the clock of `zone`; the weekday runs from 1, Monday, to 7, Sunday. */
export interface DigestPlan {
  cadence: DigestCadence;
  zone: string;
  hourLocal: number;
  weekday: number;
}

const AREA_AND_PLACE = /^(?!Etc\/|SystemV\/)[A-Z][A-Za-z]+(?:\/[A-Za-z][A-Za-z0-9_+-]*){1,2}$/;

/**
 * Whether `name` is a zone of the IANA database that follows a place's clock. Abbreviations (EST, CET) and fixed offsets
 * (+02:00, Etc/GMT+5) are refused: they know nothing of summer time. UTC itself is accepted.
 */
export function isZone(name: string): boolean {
  const known = knownZones.get(name);
  if (known !== undefined) return known;
  const sound = looksUp(name);
  if (knownZones.size < MOST_ZONES) knownZones.set(name, sound);
  return sound;
}

/** Looked up once each: a digest run asks for every reader. Bounded, for a name can be anything. */
const knownZones = new Map<string, boolean>();
const MOST_ZONES = 1000;

function looksUp(name: string): boolean {
  if (name === 'UTC' || name === 'Etc/UTC') return true;
  if (!AREA_AND_PLACE.test(name)) return false;
  try {
    return Temporal.Instant.fromEpochMilliseconds(0).toZonedDateTimeISO(name).timeZoneId === name;
  } catch {
    return false;
  }
}

/** The zone itself, or UTC where the database of this machine has no such place any more. */
export const soundZone = (name: string) => (isZone(name) ? name : 'UTC');

function isWholeWithin(value: number, lowest: number, highest: number): boolean {
  return Number.isInteger(value) && value >= lowest && value <= highest;
}

function requirePlan({ zone, hourLocal, weekday }: DigestPlan): void {
  if (!isZone(zone)) throw new RangeError(`not a time zone of a place: ${JSON.stringify(zone)}`);
  if (!isWholeWithin(hourLocal, 0, 23)) throw new RangeError(`an hour is 0 to 23, not ${hourLocal}`);
  if (!isWholeWithin(weekday, 1, 7)) throw new RangeError(`a weekday is 1 to 7, not ${weekday}`);
}

/**
 * Local wall time to epoch milliseconds. A time that a clock change skips moves forward by the length of the gap; of a
 * time that comes twice the first is meant (RFC 5545, 3.3.5; "compatible" in Temporal).
 */
export function wallTimeToMs(wallTime: Temporal.PlainDateTime | string, zone: string): number {
  const time = Temporal.PlainDateTime.from(wallTime);
  return time.toZonedDateTime(zone, { disambiguation: 'compatible' }).epochMilliseconds;
}

/**
 * The first moment strictly after `afterMs` at which this plan sends mail, in epoch milliseconds; null when it never does.
 * `at_once` is due in the very next millisecond.
 * @throws RangeError for an unknown zone, an hour outside 0 to 23, a weekday outside 1 to 7 or a moment that is not whole
 */
export function nextDigestAt(plan: DigestPlan, afterMs: number): number | null {
  requirePlan(plan);
  if (!Number.isSafeInteger(afterMs)) throw new RangeError(`not whole milliseconds: ${afterMs}`);
  if (plan.cadence === 'none') return null;
  if (plan.cadence === 'at_once') return afterMs + 1;

  const today = Temporal.Instant.fromEpochMilliseconds(afterMs).toZonedDateTimeISO(plan.zone).toPlainDate();
  // Yesterday counts: an hour skipped at the end of a day can move past midnight and still lie ahead.
  for (let days = -1; days <= 9; days++) {
    const date = today.add({ days });
    if (plan.cadence === 'weekly' && date.dayOfWeek !== plan.weekday) continue;
    const atMs = wallTimeToMs(date.toPlainDateTime({ hour: plan.hourLocal }), plan.zone);
    if (atMs > afterMs) return atMs;
  }
  throw new RangeError(`no sending time within nine days in ${plan.zone}`);
}

const formats = new Map<string, Intl.DateTimeFormat>();
const MOST_FORMATS = 500;

function words(ms: number, zone: string, locale: string, parts: Intl.DateTimeFormatOptions): string {
  if (!isZone(zone)) throw new RangeError(`not a time zone of a place: ${JSON.stringify(zone)}`);
  const key = [zone, locale, ...Object.keys(parts)].join(' ');
  const format = formats.get(key) ?? new Intl.DateTimeFormat(locale, { ...parts, timeZone: zone });
  if (formats.size < MOST_FORMATS) formats.set(key, format);
  return format.format(ms);
}

/** The reader's date in words: "29 September". @throws RangeError for an unknown zone or locale */
export function localDateWords(ms: number, zone: string, locale = 'en-GB'): string {
  return words(ms, zone, locale, { day: 'numeric', month: 'long' });
}

/** The reader's date and clock in words: "29 September at 17:00". @throws RangeError for an unknown zone or locale */
export function localDateTimeWords(ms: number, zone: string, locale = 'en-GB'): string {
  return words(ms, zone, locale, { day: 'numeric', month: 'long', hour: '2-digit', minute: '2-digit' });
}

/** A day of a calendar, yyyy-mm-dd, in the reader's words. It is nobody's instant, so no zone moves it. */
export function calendarDayWords(day: string, locale = 'en-GB'): string {
  return localDateWords(Date.parse(`${day}T12:00:00Z`), 'UTC', locale);
}
