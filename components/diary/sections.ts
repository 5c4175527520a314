import type { DiaryEntry } from '@/db/queries/diary';

export type Section = { stage: string; entries: DiaryEntry[] };

/** Entries in the order given, cut where the stage changes: a build that went back to a stage has it twice. */
export function byStage(entries: DiaryEntry[]): Section[] {
  const sections: Section[] = [];
  for (const entry of entries) {
    const last = sections.at(-1);
    if (last?.stage === entry.stage) last.entries.push(entry);
    else sections.push({ stage: entry.stage, entries: [entry] });
  }
  return sections;
}
