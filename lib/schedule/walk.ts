import type { WorkingCalendar } from './calendar-check';
import { indexOf, nthWorkingDate, nthWorkingDay, workingDaysUpTo, type CalendarIndex } from './calendar-index';
import { dayNumber } from './days';
import type { StageDurations } from './distribution';
import { remainingAfter, type Pmf } from './pmf';

/** A stage still to be passed. */
export type StageAhead = {
  readonly key: string;
  readonly name: string;
  /** Null when nobody knows how long it takes. */
  readonly durations: StageDurations | null;
  /** Wood that must rest and finish that must cure: calendar days from its start before it can end; 0 for none. */
  readonly minimumWaitDays: number;
};

/** The stage a build is in. */
export type StageNow = StageAhead & {
  /** YYYY-MM-DD */
  readonly startedOn: string;
  /** Working days since then, up to today, on which it waited for the owner's sign-off: the clock stood still. */
  readonly stoppedDays: number;
};

/** When something ends: `pmf[i]` is the probability of the working day with number `first + i` of the calendar. */
export type Ending = { first: number; pmf: Pmf };

/** The number of the first working day on or after a date's day number. */
function firstOnOrAfter(index: CalendarIndex, day: number): number {
  return workingDaysUpTo(index, day - 1) + 1;
}

/** Nothing ends before working day `soonest`: what would have, ends then. */
function notBefore({ first, pmf }: Ending, soonest: number): Ending {
  if (soonest <= first) return { first, pmf };
  const kept = new Float64Array(Math.max(1, first + pmf.length - soonest));
  pmf.forEach((share, i) => {
    const at = Math.max(0, first + i - soonest);
    kept[at] = (kept[at] ?? 0) + share;
  });
  return { first: soonest, pmf: kept };
}

/** A build that may start its next stage today, or on the next working day. */
export function startToday(calendar: WorkingCalendar, today: string): Ending {
  return { first: firstOnOrAfter(indexOf(calendar), dayNumber(today)), pmf: Float64Array.of(1) };
}

/**
 * Working days that a build has been in its stage by the evening before `today`, without those that stood still; below 0
 * when it came in today. One that came in on a closed day came in on the next working day.
 */
export function daysSpent(calendar: WorkingCalendar, now: Pick<StageNow, 'startedOn' | 'stoppedDays'>, today: string) {
  const index = indexOf(calendar);
  const started = firstOnOrAfter(index, dayNumber(now.startedOn)) + now.stoppedDays;
  return workingDaysUpTo(index, dayNumber(today) - 1) - started;
}

/**
 * When the stage of now ends, given that it has not ended yet: today at the earliest. Null when it has lasted longer than
 * any build before and need not rest any more, or when its durations are not known.
 */
export function endStageNow(calendar: WorkingCalendar, now: StageNow, today: string): Ending | null {
  if (now.durations === null) return null;
  const index = indexOf(calendar);
  const spent = Math.max(-1, daysSpent(calendar, now, today));
  const soonest = firstOnOrAfter(index, dayNumber(today));
  const restedOn = now.minimumWaitDays > 0 ? firstOnOrAfter(index, dayNumber(now.startedOn) + now.minimumWaitDays) : 0;
  const remaining = spent < now.durations.longestDays ? remainingAfter(now.durations.pmf, spent) : null;
  if (remaining === null) return restedOn > soonest ? { first: restedOn, pmf: Float64Array.of(1) } : null;
  const first = spent < 0 ? soonest : soonest - 1;
  return notBefore({ first, pmf: remaining }, Math.max(soonest, restedOn));
}

/** Shares moved on by a duration each: the exact convolution, held back where a wait is longer than the work. */
function moveOn(index: CalendarIndex, start: Ending, durations: Pmf, waitDays: number): Ending {
  const soonest = (i: number) => firstOnOrAfter(index, nthWorkingDay(index, start.first + i) + waitDays) - start.first;
  const last = start.pmf.length - 1;
  const pmf = new Float64Array(Math.max(last + durations.length, waitDays > 0 ? soonest(last) + 1 : 0));
  const shortest = durations.findIndex((share) => share > 0);
  for (let i = 0; i <= last; i++) {
    const share = start.pmf[i] ?? 0;
    if (share === 0) continue;
    const held = waitDays > 0 ? Math.max(0, soonest(i) - i) : 0;
    for (let d = shortest; d < durations.length; d++) {
      const at = i + (d < held ? held : d);
      pmf[at] = (pmf[at] ?? 0) + share * (durations[d] ?? 0);
    }
  }
  return { first: start.first, pmf };
}

/** When a stage ends that starts when another ended; null when its durations are not known. */
export function endNextStage(calendar: WorkingCalendar, start: Ending, stage: StageAhead): Ending | null {
  if (stage.durations === null) return null;
  return moveOn(indexOf(calendar), start, stage.durations.pmf, stage.minimumWaitDays);
}

/** The date of an ending's i-th day. */
export function dateAt(calendar: WorkingCalendar, { first }: Ending, i: number): string {
  return nthWorkingDate(indexOf(calendar), first + i);
}
