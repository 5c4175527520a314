import type { PastByStage } from './past';
import { stageDurations, type StageDurations } from '../schedule/distribution';
import { usualDays } from '../schedule/quantiles';
import { findEstimateProblem, type ThreePoint } from '../schedule/three-point';

/** A stage of a route as the shop set it up; days are working days, waits and silences calendar days. */
export type RouteStage = {
  key: string;
  name: string;
  department: string;
  bestDays: number | null;
  likelyDays: number | null;
  worstDays: number | null;
  minimumWaitDays: number;
  silenceDays: number;
};

/** What is known of a stage on a route as of a day. */
export type StageOutlook = {
  durations: StageDurations | null;
  /** From the 25th to the 75th percentile in working days; null while too few builds have passed. */
  usual: { lowDays: number; highDays: number } | null;
  minimumWaitDays: number;
  silenceDays: number;
};

export type RouteOutlook = Map<string, StageOutlook>;

const unknownStage: StageOutlook = { durations: null, usual: null, minimumWaitDays: 0, silenceDays: 14 };

/** An estimate that is not whole, or out of order, is none. */
function estimateOf({ bestDays, likelyDays, worstDays }: RouteStage): ThreePoint | null {
  if (bestDays === null || likelyDays === null || worstDays === null) return null;
  const estimate = { optimisticDays: bestDays, likelyDays, pessimisticDays: worstDays };
  return findEstimateProblem(estimate) === null ? estimate : null;
}

/** The outlook of every stage that a route has or that its builds have passed. */
export function routeOutlook(stages: readonly RouteStage[], past: PastByStage, today: string): RouteOutlook {
  const byKey = new Map(stages.map((stage) => [stage.key, stage]));
  const keys = new Set([...byKey.keys(), ...past.keys()]);
  return new Map(
    [...keys].map((key) => {
      const stage = byKey.get(key);
      const times = past.get(key) ?? [];
      const outlook: StageOutlook = {
        durations: stageDurations(times, stage ? estimateOf(stage) : null, today),
        usual: usualDays(times.map(({ days }) => days)),
        minimumWaitDays: stage?.minimumWaitDays ?? 0,
        silenceDays: Math.max(1, stage?.silenceDays ?? unknownStage.silenceDays),
      };
      return [key, outlook];
    }),
  );
}

/**
 * What is known of a stage of a build. A build whose route was changed may have stages that its route does not know: then
 * what another route knows of that stage counts.
 */
export function stageOutlook(outlooks: ReadonlyMap<string, RouteOutlook>, routeId: string, key: string): StageOutlook {
  const own = outlooks.get(routeId)?.get(key);
  if (own) return own;
  for (const outlook of outlooks.values()) {
    const other = outlook.get(key);
    if (other) return other;
  }
  return unknownStage;
}
