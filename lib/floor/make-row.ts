import { standOf, stageNowOf, waitingOnOf, type BuildToForecast, type ForecastBasis } from './forecast';
import { stageOutlook } from './outlook';
import type { FloorRoute, FloorRow } from './row';
import { shortRange } from './short-range';
import { countWorkingDays, dayOf } from '../schedule/calendar';
import { quietOf } from '../schedule/quiet';
import type { StageNow } from '../schedule/walk';

/** What a row is made of beside its stages. */
export type RowSource = Pick<
  FloorRow,
  'orderNumber' | 'instrument' | 'finishHex' | 'ownerName' | 'repName' | 'rack' | 'waits'
> & {
  isHeld: boolean;
  isOwn: boolean;
  orderedAt: number;
  readyAt: number | null;
  /** When something was last published to the owner. */
  lastNewsAt: number | null;
  window: { kind: string; earliestOn: string | null; latestOn: string | null } | null;
};

/** Who looks: a builder's own are those at their department, a rep's or admin's all they were put on. */
export type RowReader = { role: string; department: string | null };

function readyWords({ readyAt, window }: RowSource, isFinished: boolean): string {
  if (readyAt !== null || isFinished) return 'ready';
  if (!window?.earliestOn || !window.latestOn) return 'no date yet';
  return shortRange(window.earliestOn, window.latestOn);
}

function hasOtherStages(stages: readonly { key: string; name: string }[], route: FloorRoute | undefined): boolean {
  const own = stages.map(({ key, name }) => `${key} ${name}`).join('|');
  return own !== route?.stages.map(({ key, name }) => `${key} ${name}`).join('|');
}

/** Working days so far, counted as those of past builds: the day it began for none, today for one. */
function daysInStage({ startedOn, stoppedDays }: StageNow, { calendar, today }: ForecastBasis): number {
  return Math.max(0, countWorkingDays(calendar, startedOn, today) - stoppedDays);
}

/** The share of a stage that is filled: days spent over what is usual, never quite full. */
const filled = (days: number, usually: number) => Math.min(0.92, Math.max(0.06, days / Math.max(1, usually)));

/** One build of the floor as this reader sees it today. */
export function makeRow(
  source: RowSource,
  build: BuildToForecast,
  basis: ForecastBasis,
  routes: readonly FloorRoute[],
  reader: RowReader,
): FloorRow {
  const { calendar, today } = basis;
  const { now, ahead } = standOf(build.stages);
  const at = now ?? ahead[0];
  const outlook = stageOutlook(basis.outlooks, build.routeId, at?.key ?? '');
  const days = now ? daysInStage(stageNowOf(build, now, basis), basis) : null;
  const highDays = outlook.usual?.highDays ?? null;
  const silence = quietOf({
    lastNewsOn: dayOf(source.lastNewsAt ?? source.orderedAt, calendar.zone),
    longestSilenceDays: outlook.silenceDays,
    today,
  });
  const isFinished = at === undefined;
  const { orderNumber, instrument, finishHex, ownerName, repName, rack, isHeld, waits } = source;
  return {
    orderNumber,
    instrument,
    finishHex,
    ownerName,
    repName,
    rack,
    isHeld,
    waits,
    isStopped: waitingOnOf(build) !== null,
    routeId: build.routeId,
    ...(hasOtherStages(
      build.stages,
      routes.find(({ id }) => id === build.routeId),
    ) && {
      ownStages: build.stages.map(({ key, name }) => ({ key, name })),
    }),
    at: at ? build.stages.indexOf(at) : build.stages.length,
    share: days === null ? 0 : Number(filled(days, highDays ?? days * 2).toFixed(2)),
    department: at?.department ?? null,
    days,
    usual: outlook.usual && [outlook.usual.lowDays, outlook.usual.highDays],
    isLate: days !== null && highDays !== null && days > highDays,
    silentDays: silence.silentDays,
    // What is ready has nothing left to show.
    quiet: isFinished ? 0 : silence.level,
    ready: readyWords(source, isFinished),
    readyBy: isFinished ? today : (source.window?.latestOn ?? null),
    isMine: source.isOwn && (reader.role !== 'builder' || at?.department === reader.department),
  };
}
