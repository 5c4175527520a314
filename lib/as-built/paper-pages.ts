import type { AsBuiltRow, AsBuiltSheet } from './sheet';

type Group = AsBuiltSheet['groups'][number];

/** Points of height that a page has for rows, and what is taken up on it; a little too much rather than too little. */
const PAGE_PT = 740;
const HEAD_PT = 56;
const THUMB_PT = 63;
const LINE_PT = 11.5;
const ROW_EDGE_PT = 11;
/** Letters that fit on one line of each column. */
const LINE_LETTERS = [23, 18, 21, 20];

/**
 * Groups cut to pages. The renderer lays out everything that follows once more for every page it fills, so a long flow costs the
 * square of its pages; a page that was estimated too full still flows on to the next.
 * @param firstPt height that the first page has left below its heading
 * @param hasPicture whether a row carries its picture
 */
export function cutToPages(groups: Group[], firstPt: number, hasPicture: (row: AsBuiltRow) => boolean): Group[][] {
  const pages: Group[][] = [[]];
  let leftPt = firstPt;
  for (const { rows, ...group } of groups) {
    let here: AsBuiltRow[] | null = null;
    for (const row of rows) {
      const heightPt = rowHeight(row, hasPicture(row));
      if (leftPt < heightPt + (here ? 0 : HEAD_PT)) {
        pages.push([]);
        leftPt = PAGE_PT;
        here = null;
      }
      if (!here) {
        here = [];
        leftPt -= HEAD_PT;
        pages.at(-1)?.push({ ...group, rows: here });
      }
      here.push(row);
      leftPt -= heightPt;
    }
  }
  return pages;
}

function rowHeight(row: AsBuiltRow, hasPicture: boolean): number {
  const columns = [
    [row.label],
    [row.signed, row.allowed, row.drawing?.name ?? null],
    [row.measured, row.within, row.stateWords],
    [row.proof, 'photo'],
  ];
  const lines = columns.map((texts, column) =>
    texts.reduce((sum, text) => sum + linesOf(text, LINE_LETTERS[column] ?? 18), 0),
  );
  return Math.max(hasPicture ? THUMB_PT : 0, Math.max(...lines) * LINE_PT + ROW_EDGE_PT);
}

const linesOf = (text: string | null, letters: number) =>
  text === null ? 0 : Math.max(1, Math.ceil(text.length / letters));
