/** Dates in words and in the reader's own zone; small enough for pages, with no time-zone library. */
const formats = new Map<string, Intl.DateTimeFormat>();

function format(zone: string, name: string, options: Intl.DateTimeFormatOptions): Intl.DateTimeFormat {
  const key = `${name} ${zone}`;
  const known = formats.get(key) ?? new Intl.DateTimeFormat('en-GB', { ...options, timeZone: zone });
  formats.set(key, known);
  return known;
}

/** "29 September"; with the year when it is not this one. */
export function dayWords(ms: number, zone: string, nowMs: number): string {
  const year = format(zone, 'year', { year: 'numeric' });
  const sameYear = year.format(ms) === year.format(nowMs);
  const day = format(zone, 'day', { day: 'numeric', month: 'long' }).format(ms);
  return sameYear ? day : `${day} ${year.format(ms)}`;
}

/** "3 Jun" */
export const shortDay = (ms: number, zone: string) =>
  format(zone, 'short', { day: 'numeric', month: 'short' }).format(ms);

/** "29" and "September" for the margin. */
export function marginDate(ms: number, zone: string): { day: string; month: string } {
  return {
    day: format(zone, 'dd', { day: '2-digit' }).format(ms),
    month: format(zone, 'month', { month: 'long' }).format(ms),
  };
}

/** "17:05" */
export const clockWords = (ms: number, zone: string) =>
  format(zone, 'clock', { hour: '2-digit', minute: '2-digit' }).format(ms);
