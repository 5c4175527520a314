import type { KeptClosure, KeptGrounds } from './grounds';
import { stageOutlook, type RouteOutlook, type StageOutlook } from './outlook';
import { awayOf, signOffWords, waitsOf, type BackMove, type BlockingSignOff, type FloorStage } from './waits';
import type { Adjustment } from '../schedule/adjustment';
import { dayOf, type WorkingCalendar } from '../schedule/calendar';
import { addDays } from '../schedule/days';
import { stoppedDays } from '../schedule/history';
import { quantileOf } from '../schedule/pmf';
import { readyWindow, type ReadyWindow } from '../schedule/ready-window';
import { daysSpent, type StageAhead, type StageNow } from '../schedule/walk';

/** A build that is being made. Its stages are in the order of its route. */
export type BuildToForecast = {
  id: string;
  routeId: string;
  stages: FloorStage[];
  signOffs: BlockingSignOff[];
  /** Moves back that were not undone. */
  moves: BackMove[];
};

export type ForecastBasis = {
  calendar: WorkingCalendar;
  /** The shop's date, yyyy-mm-dd. */
  today: string;
  nowMs: number;
  routeNames: ReadonlyMap<string, string>;
  outlooks: ReadonlyMap<string, RouteOutlook>;
  adjustmentFor: (routeId: string, stageKey: string) => Adjustment | null;
};

export type GivenWindow = {
  buildId: string;
  stageKey: string;
  window: ReadyWindow;
  grounds: KeptGrounds;
  widenedBy: number;
};

/** Where a build stands: its stage of now, null between two, and the stages it has not begun. */
export function standOf<Stage extends FloorStage>(stages: readonly Stage[]): { now: Stage | null; ahead: Stage[] } {
  const now = stages.findLast(({ startedAt, finishedAt }) => startedAt !== null && finishedAt === null) ?? null;
  const reached = now?.position ?? stages.findLast(({ finishedAt }) => finishedAt !== null)?.position ?? -Infinity;
  // A stage that was passed over stays behind.
  return { now, ahead: stages.filter(({ position, startedAt }) => position > reached && startedAt === null) };
}

const aheadOf = ({ key, name }: FloorStage, { durations, minimumWaitDays }: StageOutlook): StageAhead => ({
  key,
  name,
  durations,
  minimumWaitDays,
});

/** The stage of now with the working days on which its clock stood still, up to yesterday evening. */
export function stageNowOf(build: BuildToForecast, now: FloorStage, basis: ForecastBasis): StageNow {
  const { calendar, nowMs, today, outlooks } = basis;
  const startedOn = dayOf(now.startedAt ?? nowMs, calendar.zone);
  const still = [
    ...waitsOf(build.stages, build.signOffs, calendar.zone, nowMs),
    ...awayOf(build.moves, now.position, calendar.zone),
  ];
  return {
    ...aheadOf(now, stageOutlook(outlooks, build.routeId, now.key)),
    startedOn,
    stoppedDays: stoppedDays(calendar, startedOn, still, addDays(today, -1)),
  };
}

/** The sign-off that keeps a build from its next stage, or null. */
export function waitingOnOf({ stages, signOffs }: BuildToForecast): string | null {
  const next = standOf(stages).ahead[0];
  const open = signOffs.find(({ blocksStageKey, toMs }) => toMs === null && next && blocksStageKey === next.key);
  return open ? signOffWords(open.kind) : null;
}

/** A build's window for today; null for one with no stage left. */
export function forecast(build: BuildToForecast, basis: ForecastBasis): GivenWindow | null {
  const { now, ahead } = standOf(build.stages);
  const at = now ?? ahead[0];
  if (!at) return null;
  const { calendar, today, outlooks } = basis;
  const stageNow = now && stageNowOf(build, now, basis);
  const adjustment = basis.adjustmentFor(build.routeId, at.key);
  const waitingOn = waitingOnOf(build);
  const window = readyWindow({
    today,
    calendar,
    now: stageNow,
    ahead: ahead.map((stage) => aheadOf(stage, stageOutlook(outlooks, build.routeId, stage.key))),
    waitingOn,
    adjustment,
  });
  const grounds = {
    stageName: at.name,
    stagePosition: at.position,
    routeName: basis.routeNames.get(build.routeId) ?? '',
    spentDays: stageNow ? Math.max(0, daysSpent(calendar, stageNow, today)) : 0,
    usualDays: mostUsualDays(stageOutlook(outlooks, build.routeId, at.key)),
    waitingOn,
    closures: closuresWithin(calendar, today, window.kind === 'unsayable' ? today : window.latestOn),
    isAdjusted: adjustment !== null,
  };
  return {
    buildId: build.id,
    stageKey: at.key,
    window,
    grounds,
    widenedBy: adjustment ? (adjustment.early + adjustment.late) / 2 : 1,
  };
}

function mostUsualDays({ usual, durations }: StageOutlook): number {
  if (usual) return usual.highDays;
  return durations ? quantileOf(durations.pmf, 0.75) : 0;
}

/** Days off that touch the stretch between two dates, both included. */
export function closuresWithin({ closures }: WorkingCalendar, fromOn: string, toOn: string): KeptClosure[] {
  return closures
    .filter(({ startsOn, endsOn }) => startsOn <= toOn && endsOn >= fromOn)
    .map(({ name, endsOn }) => ({ name, endsOn }));
}
