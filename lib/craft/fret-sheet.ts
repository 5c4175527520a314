import type { Fingerboard } from './fingerboard';

export type Paper = 'A4' | 'Letter';

/** ISO 216 A4, and US Letter of 8 1/2 by 11 in, upright. */
export const paperSizes: Record<Paper, { widthMm: number; heightMm: number }> = {
  A4: { widthMm: 210, heightMm: 297 },
  Letter: { widthMm: 215.9, heightMm: 279.4 },
};

/** Marks that lie on two pages at the same place of the board: glue the pages so that they cover each other. */
export type OverlapMark = { name: string; boardXMm: number };

export type SheetPage = {
  number: number;
  /** The stretch of the board on this page, in the board's x. */
  fromMm: number;
  toMm: number;
  marks: OverlapMark[];
};

export type FretSheet = {
  paper: Paper;
  widthMm: number;
  heightMm: number;
  /** White margin that printers leave on every side. */
  marginMm: number;
  /** Where on the page the stretch of the board begins, from the top. */
  boardTopMm: number;
  /** Where on the page the board's centre line runs, from the left. */
  boardCentreMm: number;
  /** Where on the page the rulers stand, from the left. */
  rulerLeftMm: number;
  pages: SheetPage[];
  /** Rulers to measure on the print: 100 mm, and 4 in = 101.6 mm. */
  rulerMm: number;
  rulerIn: number;
};

const MARGIN_MM = 12;
const HEADING_MM = 24;
const OVERLAP_MM = 30;
/** White before the nut and behind the board's end. */
const LEAD_MM = 6;
/** Beside the board: figures of the bass side on the left, of the treble side on the right, then the rulers. */
const FIGURES_MM = 38;
const RULERS_MM = 26;

/**
 * A board laid out at 1:1 on upright pages, nut at the top, bass side left. Each page but the last shares 30 mm with the next, with a mark in the middle of
 * it. Refused with a sentence when the board is wider than the page.
 */
export function fretSheet(
  board: Fingerboard,
  paper: Paper,
): { ok: true; sheet: FretSheet } | { ok: false; message: string } {
  const { widthMm, heightMm } = paperSizes[paper];
  const room = widthMm - 2 * MARGIN_MM - 2 * FIGURES_MM - RULERS_MM;
  if (board.bounds.bottom - board.bounds.top > room) {
    return {
      ok: false,
      message: `This board is too wide for ${paper} paper with its figures beside it. Cut it from the table instead.`,
    };
  }
  const usable = heightMm - 2 * MARGIN_MM - HEADING_MM;
  const start = board.bounds.left - LEAD_MM;
  const length = board.bounds.right + LEAD_MM - start;
  const step = usable - OVERLAP_MM;
  const pageCount = Math.max(1, Math.ceil((length - OVERLAP_MM) / step));
  const pages = Array.from({ length: pageCount }, (_, i) => sheetPage(i, pageCount, start + i * step, usable, step));
  return {
    ok: true,
    sheet: {
      paper,
      widthMm,
      heightMm,
      marginMm: MARGIN_MM,
      boardTopMm: MARGIN_MM + HEADING_MM,
      boardCentreMm: MARGIN_MM + FIGURES_MM + room / 2,
      rulerLeftMm: widthMm - MARGIN_MM - RULERS_MM + 6,
      pages,
      rulerMm: 100,
      rulerIn: 4,
    },
  };
}

function sheetPage(index: number, pageCount: number, fromMm: number, usable: number, step: number): SheetPage {
  const markAt = (seam: number, boardXMm: number) => ({ name: String.fromCharCode(65 + seam), boardXMm });
  const above = index > 0 ? [markAt(index - 1, fromMm + OVERLAP_MM / 2)] : [];
  const below = index < pageCount - 1 ? [markAt(index, fromMm + step + OVERLAP_MM / 2)] : [];
  return { number: index + 1, fromMm, toMm: fromMm + usable, marks: [...above, ...below] };
}
