import { addWorkingDays, countWorkingDays, type WorkingCalendar } from './calendar';
import { dayNumber, dateOfDay, isDate } from './days';

/** One time that a build was in a stage, as it was written down. A stage it came back to has several. */
export type Visit = {
  readonly stageKey: string;
  /** YYYY-MM-DD; null when the stage was never begun. */
  readonly startedOn: string | null;
  readonly finishedOn: string | null;
};

/** Days on which a build waited for its owner's sign-off, both ends included. */
export type Wait = { readonly fromOn: string; readonly toOn: string };

export type StageTime = { stageKey: string; days: number; startedOn: string; finishedOn: string };

export type CleanHistory = {
  /** Stages that were passed, in the order in which they were first begun. */
  stages: StageTime[];
  /** Rows that were left out, each with a sentence. */
  leftOut: { stageKey: string; why: string }[];
};

type Span = { stageKey: string; start: number; end: number };

function findFault({ startedOn, finishedOn }: Visit, today: string): string | null {
  if (startedOn === null) return finishedOn === null ? 'It was skipped.' : 'It was finished without being begun.';
  if (!isDate(startedOn) || (finishedOn !== null && !isDate(finishedOn))) return 'One of its dates does not exist.';
  if (finishedOn === null) return 'It is not finished.';
  if (finishedOn < startedOn) return 'It was finished before it was begun.';
  return finishedOn > today ? 'It ends in the future.' : null;
}

function sortOut(
  calendar: WorkingCalendar,
  visits: readonly Visit[],
  today: string,
): { spans: Span[]; leftOut: CleanHistory['leftOut'] } {
  const spans: Span[] = [];
  const leftOut: CleanHistory['leftOut'] = [];
  for (const visit of visits) {
    const why = findFault(visit, today);
    if (why !== null) leftOut.push({ stageKey: visit.stageKey, why });
    else {
      const start = dayNumber(addWorkingDays(calendar, visit.startedOn ?? '', 0));
      spans.push({ stageKey: visit.stageKey, start, end: Math.max(start, dayNumber(visit.finishedOn ?? '')) });
    }
  }
  spans.sort((one, other) => one.start - other.start || one.end - other.end);
  return { spans, leftOut };
}

/** The stage that a day belongs to: of the visits open on it the one begun last, however the rows overlap. */
function ownerOf(spans: readonly Span[], day: number): string | null {
  return spans.findLast(({ start, end }) => start < day && day <= end)?.stageKey ?? null;
}

function workedDays(calendar: WorkingCalendar, spans: readonly Span[], waits: readonly Wait[]): Map<string, number> {
  const waited = waits.map(({ fromOn, toOn }) => ({ from: dayNumber(fromOn), to: dayNumber(toOn) }));
  const days = new Map<string, number>();
  const lastDay = Math.max(...spans.map(({ end }) => end));
  for (let day = (spans[0]?.start ?? 0) + 1; day <= lastDay; day++) {
    const stageKey = ownerOf(spans, day);
    if (stageKey === null || waited.some(({ from, to }) => from <= day && day <= to)) continue;
    if (countWorkingDays(calendar, dateOfDay(day - 1), dateOfDay(day)) > 0) {
      days.set(stageKey, (days.get(stageKey) ?? 0) + 1);
    }
  }
  return days;
}

/**
 * How many working days a build spent in each stage it passed, from rows that may be out of order, skipped, moved back or
 * wrong. Every working day counts for one stage only: of those open on it, the one begun last. The day a stage begins
 * belongs to the one before, the day it is finished to itself; so a stage begun and finished on one day took 0, and one begun
 * on a closed day began on the next working day. Days it
 * came back are added; days of waiting for the owner, and days between stages, count for none. A stage with one visit
 * that cannot be used is left out altogether: part of its time would pass for the whole.
 * @throws RangeError for a calendar that cannot be used
 */
export function cleanHistory(
  calendar: WorkingCalendar,
  visits: readonly Visit[],
  waits: readonly Wait[],
  today: string,
): CleanHistory {
  const { spans, leftOut } = sortOut(calendar, visits, today);
  const days = workedDays(calendar, spans, waits);
  const unusable = new Set(leftOut.map(({ stageKey }) => stageKey));
  const stages = new Map<string, StageTime>();
  for (const { stageKey, start, end } of spans) {
    const known = stages.get(stageKey);
    const startedOn = known?.startedOn ?? dateOfDay(start);
    const finishedOn = dateOfDay(Math.max(end, known ? dayNumber(known.finishedOn) : end));
    stages.set(stageKey, { stageKey, days: days.get(stageKey) ?? 0, startedOn, finishedOn });
  }
  return { stages: [...stages.values()].filter(({ stageKey }) => !unusable.has(stageKey)), leftOut };
}

/**
 * Working days from `startedOn` to `today` on which a build waited for its owner (the start excluded, today included):
 * the days on which the clock of its stage stood still. Waits that overlap count once.
 */
export function stoppedDays(
  calendar: WorkingCalendar,
  startedOn: string,
  waits: readonly Wait[],
  today: string,
): number {
  let stopped = 0;
  let countedTo = addWorkingDays(calendar, startedOn, 0);
  for (const { fromOn, toOn } of [...waits].sort((one, other) => (one.fromOn < other.fromOn ? -1 : 1))) {
    const before = dateOfDay(dayNumber(fromOn) - 1);
    const from = before > countedTo ? before : countedTo;
    const to = toOn < today ? toOn : today;
    if (to <= from) continue;
    stopped += countWorkingDays(calendar, from, to);
    countedTo = to;
  }
  return stopped;
}
