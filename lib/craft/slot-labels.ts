import type { Fingerboard } from './fingerboard';
import { slotWords, type FretUnit } from './fret-words';
import { markedFrets } from './inlays';

/** The part of the plane that a drawing of the board shows, in mm: the board, its nut on the left, ends of the strings on the right. */
export type DrawingFrame = { left: number; top: number; width: number; height: number };

export type SlotLabel = {
  fret: number;
  words: string;
  /** Middle of the label as a share of the drawing's width, 0 to 1. */
  across: number;
};

const NUT_ROOM_MM = 5;
const STRING_ROOM_MM = 14;
const EDGE_ROOM_MM = 1;

/** Widest digit of the label's type and the least air between two labels, in px at 12.5 px type. */
const CHARACTER_PX = 7.2;
const GAP_PX = 12;

export function drawingFrame({ bounds }: Fingerboard): DrawingFrame {
  const left = bounds.left - NUT_ROOM_MM;
  const top = bounds.top - EDGE_ROOM_MM;
  return {
    left,
    top,
    width: bounds.right + STRING_ROOM_MM - left,
    height: bounds.bottom + EDGE_ROOM_MM - top,
  };
}

/**
 * Which slots carry their position in a drawing `widthPx` wide, so that no two labels touch: the 12th and the last first, then the frets with
 * markers, then the first, then as many others as fit. Positions from the nut on the string of that side.
 */
export function slotLabels(board: Fingerboard, side: 'bass' | 'treble', unit: FretUnit, widthPx: number): SlotLabel[] {
  const frame = drawingFrame(board);
  const placed: (SlotLabel & { fromPx: number; toPx: number })[] = [];
  for (const fret of byImportance(board.plan.fretCount)) {
    const line = board.frets[fret];
    const row = board.table.rows[fret];
    if (!line || !row) continue;
    const words = slotWords(row[side].fromNutMm, unit);
    const halfPx = (words.length * CHARACTER_PX) / 2;
    const wantedPx = ((line[side].x - frame.left) / frame.width) * widthPx;
    const middlePx = Math.min(widthPx - halfPx, Math.max(halfPx, wantedPx));
    const label = { fret, words, across: middlePx / widthPx, fromPx: middlePx - halfPx, toPx: middlePx + halfPx };
    if (placed.every((other) => label.fromPx >= other.toPx + GAP_PX || label.toPx + GAP_PX <= other.fromPx)) {
      placed.push(label);
    }
  }
  return placed.map(({ fret, words, across }) => ({ fret, words, across })).sort((a, b) => a.fret - b.fret);
}

function byImportance(fretCount: number): number[] {
  const frets = Array.from({ length: fretCount }, (_, i) => i + 1);
  const marked = markedFrets(fretCount).map(({ fret }) => fret);
  return [...new Set([Math.min(12, fretCount), fretCount, ...marked, 1, ...frets])];
}
