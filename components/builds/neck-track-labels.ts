import { neckSpacing } from '@/lib/craft/frets';
import { nowNote, type NeckDateLabels, type NeckStage } from './neck-track-stage';

export type NeckLabel = {
  role: 'start' | 'lastFinished' | 'now' | 'end';
  name: string;
  note: string;
  /** Share of the neck's length where the text begins (`start`) or ends (`end`). */
  at: number;
  anchor: 'start' | 'end';
};

/** The least widths, 44rem and 72rem, at which the two label layouts are shown; below the first the neck is a slim strip. */
export const NECK_WIDTHS_PX = { narrow: 704, wide: 1152 } as const;

/** Room between a text and the tick that marks now. */
const TICK_GAP_PX = 10;

/** Generous means of Archivo at 13 px, so that no text is wider than its extent. */
const NAME_CHARACTER_PX = 7.2;
const NOTE_CHARACTER_PX = 6.5;
const MIN_GAP_PX = 10;

/** How far a label's text is moved from its place, to the right, to keep clear of the tick. */
export function labelShiftPx({ role, anchor }: NeckLabel): number {
  if (role === 'now') return anchor === 'start' ? TICK_GAP_PX : -TICK_GAP_PX;
  return role === 'lastFinished' && anchor === 'end' ? -TICK_GAP_PX : 0;
}

/** Where a label's text begins and ends, in px, on a neck of the given width. */
export function labelExtent(label: NeckLabel, neckWidthPx: number): { fromPx: number; toPx: number } {
  const widthPx = Math.max(label.name.length * NAME_CHARACTER_PX, label.note.length * NOTE_CHARACTER_PX);
  const atPx = label.at * neckWidthPx + labelShiftPx(label);
  return label.anchor === 'start' ? { fromPx: atPx, toPx: atPx + widthPx } : { fromPx: atPx - widthPx, toPx: atPx };
}

/**
 * Labels under the neck that never collide: now first, then start, end and last finished, each where there is room for it and left out
 * where there is none. Free of collisions at the given width, and so at any greater one, as text keeps its size while gaps grow.
 */
export function layoutLabels(stages: NeckStage[], dates: NeckDateLabels, neckWidthPx: number): NeckLabel[] {
  const places = labelPlaces(stages, dates);
  const fitting = (candidates: NeckLabel[], placed: NeckLabel[]) =>
    candidates.filter((label) => fits(label, placed, neckWidthPx));
  const starts = fitting(places.now, []).map((now) => [now]);
  const layouts = (starts.length > 0 ? starts : [[]]).map((start) =>
    [places.start, places.end, places.lastFinished].reduce<NeckLabel[]>(
      (placed, candidates) => [...placed, ...fitting(candidates, placed).slice(0, 1)],
      start,
    ),
  );
  const worth = (layout: NeckLabel[]) => layout.length + (layout.some(({ role }) => role === 'end') ? 0.5 : 0);
  const [best = []] = layouts.sort((a, b) => worth(b) - worth(a));
  return best;
}

/** Every place each label may take, the one it likes best first. */
function labelPlaces(stages: NeckStage[], dates: NeckDateLabels): Record<NeckLabel['role'], NeckLabel[]> {
  const boundaries = neckSpacing(stages.length);
  const last = stages.length - 1;
  const now = stages.findIndex(({ state }) => state === 'now');
  const lastFinished = stages.findLastIndex(({ state }) => state === 'done');
  const place = (
    role: NeckLabel['role'],
    index: number,
    note: string,
    anchor: NeckLabel['anchor'],
    boundary: number,
  ) => {
    const name = stages[index]?.name;
    return name === undefined ? [] : [{ role, name, note, anchor, at: boundaries[boundary] ?? 0 }];
  };
  const first = stages[0];
  const nowStage = stages[now];
  const finished = stages[lastFinished];
  return {
    now: nowStage
      ? [
          ...place('now', now, nowNote(nowStage, dates), 'start', now),
          ...place('now', now, nowNote(nowStage, dates), 'end', now),
        ]
      : [],
    start: first && now !== 0 ? place('start', 0, first.startedOn ?? first.finishedOn ?? '', 'start', 0) : [],
    end: last > 0 && now !== last ? place('end', last, endNote(stages[last], dates), 'end', last + 1) : [],
    lastFinished:
      finished && lastFinished > 0 && lastFinished < last
        ? [
            ...place(
              'lastFinished',
              lastFinished,
              finished.startedOn ?? finished.finishedOn ?? '',
              'start',
              lastFinished,
            ),
            ...place(
              'lastFinished',
              lastFinished,
              finished.startedOn ?? finished.finishedOn ?? '',
              'end',
              lastFinished + 1,
            ),
          ]
        : [],
  };
}

function endNote(stage: NeckStage | undefined, dates: NeckDateLabels): string {
  return (stage?.state === 'done' ? stage.finishedOn : dates.end) ?? '';
}

function fits(label: NeckLabel, placed: NeckLabel[], neckWidthPx: number): boolean {
  const { fromPx, toPx } = labelExtent(label, neckWidthPx);
  if (fromPx < 0 || toPx > neckWidthPx) return false;
  return placed.every((other) => {
    const taken = labelExtent(other, neckWidthPx);
    return toPx + MIN_GAP_PX <= taken.fromPx || fromPx >= taken.toPx + MIN_GAP_PX;
  });
}
