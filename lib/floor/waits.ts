import { dayOf } from '../schedule/calendar';
import { addDays, daysBetween } from '../schedule/days';
import type { Wait } from '../schedule/history';

/** A stage of a build as it was written down; instants are UTC milliseconds. */
export type FloorStage = {
  key: string;
  name: string;
  department: string;
  position: number;
  startedAt: number | null;
  finishedAt: number | null;
};

/** A sign-off that a stage waits for: from when it was asked until it was answered, null while it is open. */
export type BlockingSignOff = { blocksStageKey: string | null; kind: string; fromMs: number; toMs: number | null };

/** A time after which a build was taken back: the stages it had been in by then. */
export type BackMove = { movedAt: number; toPosition: number; before: FloorStage[] };

const words: Record<string, string> = {
  spec: 'the spec',
  drawing: 'a drawing',
  sample: 'a sample',
  change: 'a change',
  concession: 'a departure from the spec',
};

/** What the owner must sign, without its title: a companion reads it too. */
export const signOffWords = (kind: string) => words[kind] ?? 'something';

/** The stage before the one with this key, in which a build stands while that one cannot start. */
function stageBefore(stages: readonly FloorStage[], key: string): FloorStage | undefined {
  const index = stages.findIndex((stage) => stage.key === key);
  return index < 0 ? undefined : stages[Math.max(0, index - 1)];
}

/**
 * The days on which a build waited for its owner: from the day after it was asked, or after it had come to the stage
 * before the blocked one, whichever is later. Asked and answered on one day is no day.
 */
export function waitsOf(
  stages: readonly FloorStage[],
  signOffs: readonly BlockingSignOff[],
  zone: string,
  nowMs: number,
): Wait[] {
  return signOffs.flatMap(({ blocksStageKey, fromMs, toMs }) => {
    if (blocksStageKey === null) return [];
    const before = stageBefore(stages, blocksStageKey);
    if (before?.startedAt == null) return [];
    const fromOn = addDays(dayOf(Math.max(fromMs, before.startedAt), zone), 1);
    const toOn = dayOf(toMs ?? nowMs, zone);
    return fromOn <= toOn ? [{ fromOn, toOn }] : [];
  });
}

/** The days a build spent further on before it was taken back: its stage of now did not run then. */
export function awayOf(moves: readonly BackMove[], position: number, zone: string): Wait[] {
  return moves.flatMap(({ movedAt, before }) => {
    const later = before.filter((stage) => stage.position > position && stage.startedAt !== null);
    const [first] = later.sort((one, other) => (one.startedAt ?? 0) - (other.startedAt ?? 0));
    if (first?.startedAt == null) return [];
    const fromOn = addDays(dayOf(first.startedAt, zone), 1);
    const toOn = dayOf(movedAt, zone);
    return fromOn <= toOn ? [{ fromOn, toOn }] : [];
  });
}

/** Calendar days after `day` on which it waited; waits that overlap count once. */
export function waitedDaysAfter(waits: readonly Wait[], day: string): number {
  let waited = 0;
  let countedTo = day;
  for (const { fromOn, toOn } of [...waits].sort((one, other) => (one.fromOn < other.fromOn ? -1 : 1))) {
    const before = addDays(fromOn, -1);
    const from = before > countedTo ? before : countedTo;
    if (toOn <= from) continue;
    waited += daysBetween(from, toOn);
    countedTo = toOn;
  }
  return waited;
}
