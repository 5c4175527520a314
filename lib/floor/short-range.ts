import { dayNumber } from '../schedule/days';

const DAY_MS = 86_400_000;
const formats = {
  day: new Intl.DateTimeFormat('en-GB', { day: 'numeric', timeZone: 'UTC' }),
  dayAndMonth: new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', timeZone: 'UTC' }),
};

/** "12 to 30 Nov", "28 Sep to 4 Oct", or one day: "3 Nov". @throws RangeError for a bad date */
export function shortRange(fromOn: string, toOn: string): string {
  const to = formats.dayAndMonth.format(dayNumber(toOn) * DAY_MS);
  if (fromOn === toOn) return to;
  const isOneMonth = fromOn.slice(0, 7) === toOn.slice(0, 7);
  return `${formats[isOneMonth ? 'day' : 'dayAndMonth'].format(dayNumber(fromOn) * DAY_MS)} to ${to}`;
}

/** "3 Nov" */
export const shortDate = (on: string) => shortRange(on, on);
