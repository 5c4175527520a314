import type { DemoStage } from './shop-floor';

export const DAY_MS = 86_400_000;

export type TimedStage = DemoStage & { startedAt: number | null; finishedAt: number | null };

/** Takes a number from 0 up to 1. */
export type Random = () => number;

/** One build's way through its stages, ending in the stage at `position` with `daysIn` days spent there by `nowMs`. */
export function walkStages(
  stages: readonly DemoStage[],
  position: number,
  daysIn: number,
  nowMs: number,
  random: Random,
): TimedStage[] {
  const durations = stages.map(({ usualDays }) => Math.max(1, Math.round(usualDays * (0.7 + 0.6 * random()))));
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
