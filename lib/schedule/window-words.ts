import { dayNumber } from './days';
import type { ReadyWindow } from './ready-window';

/** What of a window is put in words; a kept one has this much too. */
export type SaidWindow =
  | { kind: 'window'; earliestOn: string; latestOn: string }
  | { kind: 'waiting'; onWhat: string; earliestOn: string; latestOn: string }
  | { kind: 'unsayable'; why: string };

const dayAndMonth = { day: 'numeric', month: 'long', timeZone: 'UTC' } as const;
const formats = new Map<string, { short: Intl.DateTimeFormat; long: Intl.DateTimeFormat }>();

function formatsOf(locale: string) {
  const known = formats.get(locale);
  if (known) return known;
  const made = {
    short: new Intl.DateTimeFormat(locale, dayAndMonth),
    long: new Intl.DateTimeFormat(locale, { ...dayAndMonth, year: 'numeric' }),
  };
  formats.set(locale, made);
  return made;
}

/** "20 October", with the year when it is not that of `today`. @throws RangeError for a bad date or locale */
export function dateWords(date: string, today: string, locale = 'en-GB'): string {
  const { short, long } = formatsOf(locale);
  const format = date.slice(0, 4) === today.slice(0, 4) ? short : long;
  return format.format(dayNumber(date) * 86_400_000);
}

function rangeWords(earliestOn: string, latestOn: string, today: string, locale: string): string {
  if (earliestOn === latestOn) return `on ${dateWords(latestOn, today, locale)}, 8 in 10`;
  const isOneYear = earliestOn.slice(0, 4) === latestOn.slice(0, 4);
  // The year once is enough: "between 4 January and 2 February 2027".
  const from = isOneYear ? dateWords(earliestOn, earliestOn, locale) : dateWords(earliestOn, today, locale);
  return `between ${from} and ${dateWords(latestOn, today, locale)}, 8 in 10`;
}

/**
 * "between 20 October and 6 November, 8 in 10"; while an answer is awaited "between … if the finish sample is signed off
 * today"; otherwise the sentence that says why there is no date.
 */
export function windowWords(window: SaidWindow | ReadyWindow, today: string, locale = 'en-GB'): string {
  if (window.kind === 'unsayable') return window.why;
  const words = rangeWords(window.earliestOn, window.latestOn, today, locale);
  return window.kind === 'window'
    ? words
    : `${words}, if ${window.onWhat} is signed off today; the clock stands still until then`;
}
