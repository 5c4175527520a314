import type { Closure, WorkingCalendar } from '@/lib/schedule/calendar';
import { readReference } from '../../support/reference';

export const hours = (weekdays: number[], opensAtMin = 540, closesAtMin = 1020) =>
  weekdays.map((weekday) => ({ weekday, opensAtMin, closesAtMin }));

export const closedOn = (startsOn: string, endsOn = startsOn, closesAtMin: number | null = null): Closure => ({
  startsOn,
  endsOn,
  name: 'Shop closed',
  closesAtMin,
});

/** Monday to Friday, nine to five. */
export const weekdaysIn = (zone: string, closures: Closure[] = []): WorkingCalendar => ({
  zone,
  hours: hours([1, 2, 3, 4, 5]),
  closures,
});

/** Days on which US federal holidays are observed (08k). */
export const federalClosures: Closure[] = readReference('08k_us_federal_holidays').map((row) =>
  closedOn(row.expected_observed_date ?? ''),
);
