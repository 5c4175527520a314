import type { Adjustment } from './adjustment';
import { addDays, dayNumber, daysBetween } from './days';
import { quantileType1 } from './quantiles';
import type { CurvePoint } from './ready-window';
import { coverageOf, pinballLoss, type Coverage } from './scores';

/** A window that was given, beside the day the build was ready. */
export type JudgedWindow = {
  readonly buildId: string;
  readonly stageKey: string;
  /** YYYY-MM-DD, as all dates here. */
  readonly givenOn: string;
  readonly earliestOn: string;
  readonly likelyOn: string;
  readonly latestOn: string;
  readonly rawEarliestOn: string;
  readonly rawLatestOn: string;
  readonly yardstickDays: number;
  /** Null when the curve was not kept. */
  readonly curve: readonly CurvePoint[] | null;
  readonly readyOn: string;
  /** Calendar days after it was given on which the build waited for its owner; the window did not promise those. */
  readonly waitedDays: number;
};

export type Calibration = {
  /** Windows that held, of all and by the stage in which they were given; null without any. */
  all: Coverage | null;
  byStage: { stageKey: string; coverage: Coverage }[];
  /** Mean pinball loss of the 10, 50 and 90 % dates in calendar days; null without windows. */
  pinballDays: number | null;
  /** Mean CRPS of the kept curves in calendar days; null where none was kept. */
  crpsDays: number | null;
};

const truthOf = ({ readyOn, waitedDays }: JudgedWindow) => (waitedDays === 0 ? readyOn : addDays(readyOn, -waitedDays));

/** A build gives a window every day of a stage; the first of each speaks for the stage. */
export function firstOfEachStage(windows: readonly JudgedWindow[]): JudgedWindow[] {
  const first = new Map<string, JudgedWindow>();
  for (const window of windows) {
    const key = `${window.buildId} ${window.stageKey}`;
    const known = first.get(key);
    if (!known || window.givenOn < known.givenOn) first.set(key, window);
  }
  return [...first.values()];
}

function didHold(window: JudgedWindow): boolean {
  const truth = truthOf(window);
  return window.earliestOn <= truth && truth <= window.latestOn;
}

function shareHeld(windows: readonly JudgedWindow[]): Coverage | null {
  return windows.length === 0 ? null : coverageOf(windows.filter(didHold).length, windows.length);
}

const meanOf = (values: number[]) =>
  values.length === 0 ? null : values.reduce((sum, value) => sum + value, 0) / values.length;

function pinballOf(window: JudgedWindow): number {
  const truth = dayNumber(truthOf(window));
  const loss = (date: string, level: number) => pinballLoss(truth, dayNumber(date), level);
  return (loss(window.earliestOn, 0.1) + loss(window.likelyOn, 0.5) + loss(window.latestOn, 0.9)) / 3;
}

/**
 * CRPS of a curve of steps, in calendar days: over each day the squared distance of the curve from the truth, which is 0
 * before the day and 1 from then on.
 */
export function crpsOfCurve(curve: readonly CurvePoint[], truth: string): number {
  const points = curve.map(({ on, probability }) => ({ day: dayNumber(on), probability }));
  const truthDay = dayNumber(truth);
  const from = Math.min(truthDay, points[0]?.day ?? truthDay);
  const until = Math.max(truthDay, points.at(-1)?.day ?? truthDay);
  let score = 0;
  let next = 0;
  let probability = 0;
  for (let day = from; day < until; day++) {
    for (; (points[next]?.day ?? Infinity) <= day; next++) probability = points[next]?.probability ?? probability;
    score += (probability - (day >= truthDay ? 1 : 0)) ** 2;
  }
  return score;
}

/** How the windows of one route did. */
export function judge(windows: readonly JudgedWindow[]): Calibration {
  const stages = [...new Set(windows.map(({ stageKey }) => stageKey))];
  return {
    all: shareHeld(windows),
    byStage: stages.flatMap((stageKey) => {
      const coverage = shareHeld(windows.filter((window) => window.stageKey === stageKey));
      return coverage === null ? [] : [{ stageKey, coverage }];
    }),
    pinballDays: meanOf(windows.map(pinballOf)),
    crpsDays: meanOf(windows.flatMap((window) => (window.curve ? [crpsOfCurve(window.curve, truthOf(window))] : []))),
  };
}

/** Windows are meant to hold this often. */
const AIM = 0.8;
/** Each side may miss this often. */
const MISS = 0.1;
const FEWEST = 60;
const RECENT_IN_STAGE = 100;
const RECENT_ON_ROUTE = 400;
const NARROWEST = 0.5;
const WIDEST = 3;

function rawHolds(windows: readonly JudgedWindow[]): Coverage {
  const held = windows.filter((window) => {
    const truth = truthOf(window);
    return window.rawEarliestOn <= truth && truth <= window.rawLatestOn;
  });
  return coverageOf(held.length, windows.length);
}

/** Whether the truth is clearly not 8 in 10: it lies outside the 95 % bounds. */
export function isClearlyOff({ low, high }: Coverage): boolean {
  return high < AIM || low > AIM;
}

/** The share that, with one more window to come, misses no more than it should (split conformal prediction). */
function conformal(stretches: number[]): number {
  const share = Math.min(1, (1 - MISS) * (1 + 1 / stretches.length));
  return Math.min(WIDEST, Math.max(NARROWEST, quantileType1(stretches, share)));
}

function measure(windows: readonly JudgedWindow[]): Adjustment {
  const stretch = (from: string, to: string, yardstick: number) => 1 + daysBetween(from, to) / yardstick;
  return {
    early: conformal(windows.map((each) => stretch(truthOf(each), each.rawEarliestOn, each.yardstickDays))),
    late: conformal(windows.map((each) => stretch(each.rawLatestOn, truthOf(each), each.yardstickDays))),
  };
}

/** What the windows of one route ask for; see `adjustmentFor`. */
export type MeasuredAdjustments = { byStage: ReadonlyMap<string, Adjustment>; ofRoute: Adjustment | null };

function measureWhenOff(windows: readonly JudgedWindow[]): Adjustment | null {
  return windows.length >= FEWEST && isClearlyOff(rawHolds(windows)) ? measure(windows) : null;
}

/**
 * Of the windows given lately only those of fast builds can be judged yet. Left are those given longer ago than any build
 * took from that stage.
 */
function settled(windows: readonly JudgedWindow[], today: string): JudgedWindow[] {
  const longest = new Map<string, number>();
  for (const { stageKey, givenOn, readyOn } of windows) {
    longest.set(stageKey, Math.max(longest.get(stageKey) ?? 0, daysBetween(givenOn, readyOn)));
  }
  return windows.filter(({ stageKey, givenOn }) => daysBetween(givenOn, today) > (longest.get(stageKey) ?? 0));
}

/**
 * The stretch that the recent windows of a route would have needed to hold 8 in 10, each side by itself, for each stage
 * that was clearly off and for the route as a whole. It is measured on the windows without their adjustment, so that an
 * adjustment does not undo itself. Fewer than 60 windows measure nothing.
 */
export function measureAdjustments(windows: readonly JudgedWindow[], today: string): MeasuredAdjustments {
  const recent = settled(firstOfEachStage(windows), today).sort((one, other) => (one.readyOn < other.readyOn ? 1 : -1));
  const byStage = new Map<string, Adjustment>();
  for (const stageKey of new Set(recent.map((window) => window.stageKey))) {
    const ofStage = recent.filter((window) => window.stageKey === stageKey);
    const measured = measureWhenOff(ofStage.slice(0, RECENT_IN_STAGE));
    if (measured !== null) byStage.set(stageKey, measured);
  }
  return { byStage, ofRoute: measureWhenOff(recent.slice(0, RECENT_ON_ROUTE)) };
}

/** That of the stage where it has one of its own, else the route's; null when windows are given as they come. */
export function adjustmentFor({ byStage, ofRoute }: MeasuredAdjustments, stageKey: string): Adjustment | null {
  return byStage.get(stageKey) ?? ofRoute;
}

const inTen = ({ share }: Coverage) => `${Math.round(share * 10)} in 10`;

/** What the shop is told: "142 of 180 windows held, 8 in 10. Windows are given as they come." */
export function calibrationWords(all: Coverage | null, adjustment: Adjustment | null): string {
  if (all === null) return 'No window has been judged yet.';
  const held = `${all.held} of ${all.of} windows held, ${inTen(all)}.`;
  if (adjustment === null) return `${held} Windows are given as they come.`;
  const width = (adjustment.early + adjustment.late) / 2;
  const percent = Math.round(Math.abs(width - 1) * 100);
  if (percent === 0) return `${held} Windows are moved to where past builds were ready.`;
  return `${held} Windows are given ${percent} % ${width > 1 ? 'wider' : 'narrower'}, by how past ones held.`;
}
