import { waitsOf, type BackMove, type BlockingSignOff, type FloorStage } from './waits';
import { dayOf, type WorkingCalendar } from '../schedule/calendar';
import type { PastStage } from '../schedule/distribution';
import { cleanHistory, type Visit } from '../schedule/history';

/** A delivered build as it was written down. */
export type PastBuild = {
  id: string;
  routeId: string;
  rack: string | null;
  stages: FloorStage[];
  signOffs: BlockingSignOff[];
  moves: BackMove[];
};

/** Past times in each stage, by the stage's key. */
export type PastByStage = Map<string, PastStage[]>;

const dayOrNull = (ms: number | null, zone: string) => (ms === null ? null : dayOf(ms, zone));

/** Every time the build was in a stage, those included that were taken back later. */
function visitsOf({ stages, moves }: PastBuild, zone: string): Visit[] {
  const visit = (stage: FloorStage, endedAt: number | null): Visit => ({
    stageKey: stage.key,
    startedOn: dayOrNull(stage.startedAt, zone),
    finishedOn: dayOrNull(stage.finishedAt ?? endedAt, zone),
  });
  const takenBack = moves.flatMap(({ movedAt, toPosition, before }) =>
    before
      .filter(({ position, startedAt }) => position > toPosition && startedAt !== null)
      .map((stage) => visit(stage, movedAt)),
  );
  return [...stages.map((stage) => visit(stage, null)), ...takenBack];
}

/** What one route's delivered builds took, stage by stage, in working days without waits for their owners. */
export function pastByStage(
  builds: readonly PastBuild[],
  calendar: WorkingCalendar,
  today: string,
  nowMs: number,
): PastByStage {
  const past: PastByStage = new Map();
  for (const build of builds) {
    const waits = waitsOf(build.stages, build.signOffs, calendar.zone, nowMs);
    const { stages } = cleanHistory(calendar, visitsOf(build, calendar.zone), waits, today);
    for (const { stageKey, days, startedOn, finishedOn } of stages) {
      const list = past.get(stageKey) ?? [];
      list.push({ days, startedOn, finishedOn, rack: build.rack });
      past.set(stageKey, list);
    }
  }
  return past;
}
