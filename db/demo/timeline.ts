import { outlookOf, type DemoStage } from './shop-floor';

export const DAY_MS = 86_400_000;

export type TimedStage = DemoStage & { startedAt: number | null; finishedAt: number | null };

/** Takes a number from 0 up to 1. */
export type Random = () => number;

/** Most stages take about as long as usual; some take much longer, as work does. */
function skewedDays(usualDays: number, random: Random): number {
  const factor = 0.72 - 0.28 * Math.log(1 - random());
  return Math.max(1, Math.round(usualDays * Math.min(2.4, factor)));
}

/** One build's way through its stages, ending in the stage at `position` with `daysIn` days spent there by `nowMs`. */
export function walkStages(
  stages: readonly DemoStage[],
  position: number,
  daysIn: number,
  nowMs: number,
  random: Random,
): TimedStage[] {
  const durations = stages.map((step) => Math.max(outlookOf(step).minimumWaitDays, skewedDays(step.usualDays, random)));
  let at = nowMs - daysIn * DAY_MS - durations.slice(0, position).reduce((sum, days) => sum + days, 0) * DAY_MS;
  return stages.map((step, index) => {
    if (index > position) return { ...step, startedAt: null, finishedAt: null };
    const startedAt = at;
    at += (durations[index] ?? 1) * DAY_MS;
    return { ...step, startedAt, finishedAt: index === position ? null : at };
  });
}

/** A build that was delivered on `deliveredAt`. */
export function walkDelivered(stages: readonly DemoStage[], deliveredAt: number, random: Random): TimedStage[] {
  const walked = walkStages(stages, stages.length - 1, 1 + Math.floor(random() * 3), deliveredAt, random);
  return walked.map((step, index) => (index === stages.length - 1 ? { ...step, finishedAt: deliveredAt } : step));
}

/**
 * A build that went on one rack with another until both were glued, and from there at its own pace: the times of the
 * first `together` stages are the other's.
 */
export function travelWith(other: readonly TimedStage[], own: readonly TimedStage[], together: number): TimedStage[] {
  const [left, joined] = [other[together - 1]?.finishedAt, own[together]?.startedAt];
  if (left == null || joined == null) return [...own];
  const later = (ms: number | null) => (ms === null ? null : ms - joined + left);
  return own.map((step, index) => {
    const shared = other[index];
    if (index < together && shared) return { ...step, startedAt: shared.startedAt, finishedAt: shared.finishedAt };
    return { ...step, startedAt: later(step.startedAt), finishedAt: later(step.finishedAt) };
  });
}
