import { dayNumber, isDate } from './days';
import { isZone } from './digest-times';

/** Working hours of one weekday, in minutes after local midnight; a weekday may have several, with a break between. */
export type WorkingHours = {
  /** 1, Monday, to 7, Sunday */
  readonly weekday: number;
  readonly opensAtMin: number;
  readonly closesAtMin: number;
};

/** Days without work, both ends included. */
export type Closure = {
  /** YYYY-MM-DD */
  readonly startsOn: string;
  readonly endsOn: string;
  readonly name: string;
  /** A half day: work ends then, in minutes after midnight; null when there is no work at all. */
  readonly closesAtMin: number | null;
};

/** When the shop works, on the clock of its own zone. */
export type WorkingCalendar = {
  readonly zone: string;
  readonly hours: readonly WorkingHours[];
  readonly closures: readonly Closure[];
};

const LONGEST_CLOSURE_DAYS = 366;

const isMinute = (value: number, lowest: number) => Number.isInteger(value) && value >= lowest && value <= 1440;

function hoursProblem({ weekday, opensAtMin, closesAtMin }: WorkingHours): string | null {
  if (!Number.isInteger(weekday) || weekday < 1 || weekday > 7) return 'A weekday is 1, Monday, to 7, Sunday.';
  if (!isMinute(opensAtMin, 0) || !isMinute(closesAtMin, 0)) return 'Hours lie between 00:00 and 24:00.';
  return opensAtMin < closesAtMin ? null : 'The shop must open before it closes.';
}

function closureProblem({ startsOn, endsOn, name, closesAtMin }: Closure): string | null {
  if (!isDate(startsOn) || !isDate(endsOn)) return `${name} needs a first and a last day.`;
  const days = dayNumber(endsOn) - dayNumber(startsOn) + 1;
  if (days < 1) return `${name} ends before it starts.`;
  if (days > LONGEST_CLOSURE_DAYS) return `${name} is longer than a year. Check its last day.`;
  if (closesAtMin !== null && !isMinute(closesAtMin, 1)) return `${name} must end work between 00:01 and 24:00.`;
  return null;
}

/** What is wrong with a calendar, as a sentence for whoever enters it; null when it can be used. */
export function findCalendarProblem({ zone, hours, closures }: WorkingCalendar): string | null {
  if (!isZone(zone))
    return `Choose the time zone of a place, such as America/Chicago; ${JSON.stringify(zone)} is not one.`;
  if (hours.length === 0) return 'The shop has no working hours. Enter at least one day of the week.';
  const problems = [...hours.map(hoursProblem), ...closures.map(closureProblem)];
  return problems.find((problem) => problem !== null) ?? null;
}
