import { dayWords } from '@/lib/date-words';

type StageTimes = { name: string; startedAt: number | null; finishedAt: number | null };

/** When each stage began and ended, in words, by its name. */
export function stageNotes(stages: StageTimes[], zone: string, nowMs: number): Record<string, string> {
  const notes: Record<string, string> = {};
  for (const { name, startedAt, finishedAt } of stages) {
    if (startedAt === null) continue;
    const from = dayWords(startedAt, zone, nowMs);
    notes[name] = finishedAt === null ? `started ${from}` : `${from} to ${dayWords(finishedAt, zone, nowMs)}`;
  }
  return notes;
}
