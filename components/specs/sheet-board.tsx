import type { Fingerboard, FretLine } from '@/lib/craft/fingerboard';
import type { FretSheet, OverlapMark, SheetPage } from '@/lib/craft/fret-sheet';
import { slotOnSheet } from '@/lib/craft/fret-words';
import type { InlayMark } from '@/lib/craft/inlays';
import type { Point } from '@/lib/craft/plane';

type PageProps = { sheet: FretSheet; board: Fingerboard; page: SheetPage };

const FIGURES_FROM_EDGE_MM = 2.5;

/** The stretch of the board on one page, in mm, with each slot's place beside it. The inner svg cuts off what lies on other pages. */
export function SheetBoard({ sheet, board, page }: PageProps) {
  const width = sheet.rulerLeftMm - sheet.marginMm - 2;
  const height = page.toMm - page.fromMm;
  const left = sheet.marginMm - sheet.boardCentreMm;
  return (
    <svg
      x={sheet.marginMm}
      y={sheet.boardTopMm}
      width={width}
      height={height}
      viewBox={`${left} ${page.fromMm} ${width} ${height}`}
      fill="none"
      stroke="black"
      strokeWidth="0.15"
    >
      <CentreLine board={board} />
      <polygon points={board.outline.map((point) => pair(point)).join(' ')} strokeWidth="0.25" />
      {board.frets.map((line) => (
        <line key={line.fret} {...ends(line.treble, line.bass)} />
      ))}
      {board.inlays.map((mark, i) => (
        <InlayCentre key={i} mark={mark} />
      ))}
      {board.frets.map((line) => (
        <Figures key={line.fret} line={line} board={board} />
      ))}
      {page.marks.map((mark) => (
        <Seam key={mark.name} mark={mark} board={board} />
      ))}
    </svg>
  );
}

function CentreLine({ board }: { board: Fingerboard }) {
  const { left, right } = board.bounds;
  return <line {...ends({ x: left, y: 0 }, { x: right, y: 0 })} strokeWidth="0.1" strokeDasharray="4 1.5 0.6 1.5" />;
}

function InlayCentre({ mark }: { mark: InlayMark }) {
  if (mark.kind === 'block') return <polygon points={mark.corners.map((point) => pair(point)).join(' ')} />;
  const { x, y } = mark.centre;
  return (
    <>
      <circle {...centre(mark.centre)} r={mark.radiusMm} />
      <line {...ends({ x: x - 1, y }, { x: x + 1, y })} />
      <line {...ends({ x, y: y - 1 }, { x, y: y + 1 })} />
    </>
  );
}

/** On the treble side always, on the bass side where its places are others. */
function Figures({ line, board }: { line: FretLine; board: Fingerboard }) {
  const row = board.table.rows[line.fret];
  if (!row) return null;
  const edge = board.bounds.bottom + FIGURES_FROM_EDGE_MM;
  return (
    <g stroke="none" fill="black" fontSize="2.4">
      <text x={edge} y={line.treble.x + 0.8}>
        {slotOnSheet(line.fret, row.treble.fromNutMm)}
      </text>
      {board.table.isMultiscale && (
        <text x={-edge} y={line.bass.x + 0.8} textAnchor="end">
          {slotOnSheet(line.fret, row.bass.fromNutMm)}
        </text>
      )}
    </g>
  );
}

/** The letters stand just over the line and on the wood: they hide no slot and touch no figure. */
function Seam({ mark, board }: { mark: OverlapMark; board: Fingerboard }) {
  const { boardXMm, name } = mark;
  const edge = board.bounds.bottom + 1.5;
  return (
    <>
      <line {...ends({ x: boardXMm, y: -edge }, { x: boardXMm, y: edge })} strokeDasharray="2 1" />
      {[-edge / 2, edge / 2].map((y) => (
        <text
          key={y}
          x={tidy(-y)}
          y={tidy(boardXMm - 1)}
          textAnchor="middle"
          fontSize="3.6"
          fontWeight="600"
          stroke="none"
          fill="black"
        >
          {name}
        </text>
      ))}
    </>
  );
}

/** A turn of the board's plane onto the upright page: the nut at the top, the bass side on the left. */
function onPage({ x, y }: Point): Point {
  return { x: tidy(-y), y: tidy(x) };
}

function ends(from: Point, to: Point) {
  const [a, b] = [onPage(from), onPage(to)];
  return { x1: a.x, y1: a.y, x2: b.x, y2: b.y };
}

function centre(point: Point) {
  const { x, y } = onPage(point);
  return { cx: x, cy: y };
}

function pair(point: Point): string {
  const { x, y } = onPage(point);
  return `${x},${y}`;
}

function tidy(mm: number): number {
  return Number(mm.toFixed(4));
}
