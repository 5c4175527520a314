import { shortDay } from '@/lib/date-words';

type StageTimes = {
  key?: string;
  name: string;
  usualDays: number;
  startedAt: number | null;
  finishedAt: number | null;
};
type NeckStage = {
  name: string;
  startedOn?: string;
  finishedOn?: string;
  state: 'done' | 'now' | 'ahead';
  waits?: string;
};

const DAY_MS = 86_400_000;

const WAITS = 'waits for a signature';

/** A build's stages as its neck shows them, dates in the reader's zone; `blockedKeys` wait for the owner to sign. */
export function neckStages(stages: StageTimes[], zone: string, blockedKeys: readonly string[] = []): NeckStage[] {
  return stages.map(({ key, name, startedAt, finishedAt }) => ({
    name,
    startedOn: startedAt === null ? undefined : shortDay(startedAt, zone),
    finishedOn: finishedAt === null ? undefined : shortDay(finishedAt, zone),
    state: finishedAt !== null ? 'done' : startedAt !== null ? 'now' : 'ahead',
    waits: startedAt === null && key !== undefined && blockedKeys.includes(key) ? WAITS : undefined,
  }));
}

/** How much of the stage of now is filled: days spent over the days it usually takes, never quite full. */
export function nowShare(stages: StageTimes[], nowMs: number): number {
  const now = stages.find(({ startedAt, finishedAt }) => startedAt !== null && finishedAt === null);
  if (!now || now.startedAt === null) return 0;
  const share = (nowMs - now.startedAt) / DAY_MS / Math.max(1, now.usualDays);
  return Math.min(0.92, Math.max(0.06, share));
}
