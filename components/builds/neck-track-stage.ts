export type NeckStage = {
  name: string;
  /** In words and in the reader's own zone: "3 Jun". */
  startedOn?: string;
  finishedOn?: string;
  state: 'done' | 'now' | 'ahead';
  /** Shown beside the stage of now: "coat 4 of 9". */
  noteShort?: string;
  /** What a stage ahead waits for: "waits for a signature". */
  waits?: string;
};

export type NeckDateLabels = {
  /** When the stage of now began; from its `startedOn` when left out. */
  now?: string;
  /** When the last stage is due: "about 24 Oct". */
  end?: string;
};

/** Position markers by stage number, where a neck has them: one at 3, 5, 7, 9 and so on, two at the last. */
export function markerCount(stageNumber: number, stageCount: number): 0 | 1 | 2 {
  if (stageNumber === stageCount) return 2;
  return [3, 5, 7, 9, 15, 17, 19, 21].includes(stageNumber) ? 1 : 0;
}

export function nowNote(stage: NeckStage, dates: NeckDateLabels): string {
  const since = dates.now ?? (stage.startedOn && `since ${stage.startedOn}`);
  return [since, stage.noteShort].filter(Boolean).join(' · ');
}

/** The date beside a stage's name in the upright list: when it began, or is due. */
export function stageDate(stage: NeckStage, isLast: boolean, dates: NeckDateLabels): string {
  if (stage.state === 'now') return dates.now ?? (stage.startedOn ? `since ${stage.startedOn}` : '');
  if (stage.state === 'done') return stage.startedOn ?? stage.finishedOn ?? '';
  return stage.waits ?? (isLast ? (dates.end ?? '') : '');
}

/** How a stage stands, in words. */
export function stageState(stage: NeckStage, isLast: boolean, dates: NeckDateLabels): string {
  if (stage.state === 'now') return ['now', nowNote(stage, dates)].filter(Boolean).join(', ');
  if (stage.state === 'done') {
    const days = [stage.startedOn, stage.finishedOn].filter(Boolean).join(' to ');
    return days ? `finished, ${days}` : 'finished';
  }
  return ['ahead', stage.waits, isLast && dates.end].filter(Boolean).join(', ');
}

/** Where a build stands, in one sentence for a strip that shows no names. */
export function neckSummary(stages: NeckStage[]): string {
  const now = stages.findIndex((stage) => stage.state === 'now');
  const stage = stages[now];
  if (stage) return `Stage ${now + 1} of ${stages.length}, ${stage.name}`;
  const doneCount = stages.filter(({ state }) => state === 'done').length;
  if (doneCount === stages.length) return `All ${stages.length} stages finished`;
  return doneCount === 0 ? 'Not begun' : `${doneCount} of ${stages.length} stages finished`;
}
