import { adjustRange, yardstickDays, type Adjustment, type DateRange } from './adjustment';
import type { WorkingCalendar } from './calendar-check';
import { eightInTen, quantileOf, varianceOf } from './pmf';
import {
  dateAt,
  daysSpent,
  endNextStage,
  endStageNow,
  startToday,
  type Ending,
  type StageAhead,
  type StageNow,
} from './walk';

export type ReadyInput = {
  /** The shop's date, YYYY-MM-DD. */
  readonly today: string;
  readonly calendar: WorkingCalendar;
  /** Null between two stages: the next of `ahead` may start today. */
  readonly now: StageNow | null;
  readonly ahead: readonly StageAhead[];
  /** What the owner must sign off before it goes on ("the finish sample"); null when nothing waits. */
  readonly waitingOn: string | null;
  /** From calibration.ts; null leaves the window as the distributions have it. */
  readonly adjustment: Adjustment | null;
};

/** Probability of being ready on or before a date. */
export type CurvePoint = { on: string; probability: number };

export type WindowDates = DateRange & {
  /** At most 41 dates from 1 to 99 %, in order; of the distributions alone, without the adjustment. */
  curve: CurvePoint[];
  /** The window without its adjustment, kept so that the next adjustment can be measured. */
  raw: { earliestOn: string; latestOn: string; yardstickDays: number };
};

/** A window of eight in ten, or why there is none. While the owner's answer is awaited it runs from an answer today. */
export type ReadyWindow =
  | ({ kind: 'window' } & WindowDates)
  | ({ kind: 'waiting'; onWhat: string } & WindowDates)
  | { kind: 'unsayable'; why: string };

const CURVE_POINTS = 40;

function curveOf(calendar: WorkingCalendar, ending: Ending): CurvePoint[] {
  const from = quantileOf(ending.pmf, 0.01);
  const until = quantileOf(ending.pmf, 0.99);
  const step = Math.ceil((until - from + 1) / CURVE_POINTS);
  const curve: CurvePoint[] = [];
  let probability = 0;
  for (let i = 0; i <= until; i++) {
    probability += ending.pmf[i] ?? 0;
    if (i === until || (i >= from && (i - from) % step === 0)) {
      curve.push({ on: dateAt(calendar, ending, i), probability: Math.min(1, probability) });
    }
  }
  return curve;
}

const inSentence = (name: string) => name.charAt(0).toLowerCase() + name.slice(1);

function whyUnsayable({ calendar, today, now, ahead }: ReadyInput): string {
  const unknown = [...(now ? [now] : []), ...ahead].find(({ durations }) => durations === null);
  if (unknown) {
    return `Too few builds have been through ${inSentence(unknown.name)} to say when this one will be ready.`;
  }
  const days = now ? daysSpent(calendar, now, today) : 0;
  const longest = now?.durations?.longestDays ?? 0;
  const than = now?.durations?.basis === 'history' ? 'the longest before took' : 'the longest that was expected is';
  const time = `It has been in ${inSentence(now?.name ?? '')} for ${days} working days; ${than} ${longest}.`;
  return `${time} No date can be given until it moves on.`;
}

/** When the last stage ends; null when nothing can be said. */
function walkToEnd({ calendar, today, now, ahead }: ReadyInput): Ending | null {
  let ending = now === null ? startToday(calendar, today) : endStageNow(calendar, now, today);
  for (const stage of ahead) ending = ending && endNextStage(calendar, ending, stage);
  return ending;
}

/** Standard deviation of the stages left in working days, the current one as if it had just begun. */
function sdOf({ now, ahead }: ReadyInput): number {
  const stages = now ? [now, ...ahead] : ahead;
  return Math.sqrt(stages.reduce((sum, { durations }) => sum + (durations ? varianceOf(durations.pmf) : 0), 0));
}

function datesOf(input: ReadyInput, ending: Ending): WindowDates {
  const { calendar, adjustment } = input;
  const sdDays = sdOf(input);
  const { first, last } = eightInTen(ending.pmf, sdDays);
  const at = (i: number) => dateAt(calendar, ending, i);
  const range = { earliestOn: at(first), likelyOn: at(quantileOf(ending.pmf, 0.5)), latestOn: at(last) };
  const yardstick = yardstickDays(calendar, sdDays);
  const soonest = dateAt(calendar, startToday(calendar, input.today), 0);
  return {
    ...(adjustment === null ? range : adjustRange(calendar, range, adjustment, yardstick, soonest)),
    curve: curveOf(calendar, ending),
    raw: { earliestOn: range.earliestOn, latestOn: range.latestOn, yardstickDays: yardstick },
  };
}

/**
 * The dates between which a build will be ready, 8 in 10: the exact sum of what is left of its stage, given the days it
 * has spent there, and of the stages after it, on the shop's calendar. Never a date before today.
 * @throws RangeError for a calendar that cannot be used, a bad date, or a build with no stage left
 */
export function readyWindow(input: ReadyInput): ReadyWindow {
  if (input.now === null && input.ahead.length === 0) throw new RangeError('This build has no stage left.');
  const ending = walkToEnd(input);
  if (ending === null) return { kind: 'unsayable', why: whyUnsayable(input) };
  const dates = datesOf(input, ending);
  return input.waitingOn === null
    ? { kind: 'window', ...dates }
    : { kind: 'waiting', onWhat: input.waitingOn, ...dates };
}
