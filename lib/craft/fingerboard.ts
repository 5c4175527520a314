import { fretTable, type FretTable, type ScalePlan } from './fret-table';
import { inlayMarks, type Inlay, type InlayMark } from './inlays';
import { crossing, lineThrough, type Line, type Point } from './plane';

export type FingerboardPlan = ScalePlan & {
  stringCount: number;
  /** Across the board, square to its centre line, at the middle of the nut. */
  nutWidthMm: number;
  /** The same at the middle of the last fret. */
  lastFretWidthMm: number;
  inlay: Inlay;
  /** From the board's edge to the centre of an outer string; 3.2 mm unless given. */
  edgeMm?: number;
  /** How far the board goes on behind the last fret; 8 mm unless given. */
  overhangMm?: number;
};

export type FretLine = { fret: number; treble: Point; bass: Point };
/** The middle of a string from nut to bridge; number 1 is on the treble side. */
export type StringLine = { number: number; nut: Point; bridge: Point };

/**
 * A fingerboard in mm. x runs along the centre line from the perpendicular fret (the nut on a board with one scale) to the bridge; y runs
 * across, 0 on the centre line, negative on the treble side. Frets[0] is the nut.
 */
export type Fingerboard = {
  plan: FingerboardPlan;
  table: FretTable;
  outline: Point[];
  frets: FretLine[];
  strings: StringLine[];
  inlays: InlayMark[];
  bounds: { left: number; right: number; top: number; bottom: number };
};

const DEFAULT_EDGE_MM = 3.2;
const DEFAULT_OVERHANG_MM = 8;
const MOST_STRINGS = 18;

/**
 * The geometry of a fingerboard to true scale. Frets cross the two outer strings at the places of `fretTable`, measured along the centre line, so
 * that the drawing, the sheet and the table agree. Refused with a sentence when the board cannot be made.
 */
export function fingerboard(plan: FingerboardPlan): { ok: true; board: Fingerboard } | { ok: false; message: string } {
  const read = fretTable(plan);
  if (!read.ok) return read;
  const message = boardTrouble(plan);
  if (message) return { ok: false, message };
  const sides = boardSides(plan, read.table);
  const frets = read.table.rows.flatMap((row) =>
    row.fret === 'bridge' ? [] : [fretLine(row.fret, slotLine(sides, placesOf(read.table, row)), sides)],
  );
  const outline = boardOutline(plan, frets, sides);
  const xs = outline.map(({ x }) => x);
  const ys = outline.map(({ y }) => y);
  const bounds = { left: Math.min(...xs), right: Math.max(...xs), top: Math.min(...ys), bottom: Math.max(...ys) };
  const board = { plan, table: read.table, outline, frets, strings: stringLines(plan, read.table, sides), bounds };
  return { ok: true, board: { ...board, inlays: inlayMarks(plan.inlay, frets) } };
}

/** Half the board's width as a straight function of x, and how far in the outer strings run. */
type Sides = { halfWidth: (x: number) => number; bassEdge: Line; trebleEdge: Line; edgeMm: number };

function boardSides(plan: FingerboardPlan, table: FretTable): Sides {
  const [nutX, lastX] = [middleX(table, 0), middleX(table, plan.fretCount)];
  const slope = (plan.lastFretWidthMm - plan.nutWidthMm) / 2 / (lastX - nutX);
  const halfWidth = (x: number) => plan.nutWidthMm / 2 + slope * (x - nutX);
  const edge = (side: 1 | -1) =>
    lineThrough({ x: nutX, y: side * halfWidth(nutX) }, { x: lastX, y: side * halfWidth(lastX) });
  return { halfWidth, bassEdge: edge(1), trebleEdge: edge(-1), edgeMm: plan.edgeMm ?? DEFAULT_EDGE_MM };
}

/** Where the two outer strings are crossed, along the centre line. */
type Places = { bassX: number; trebleX: number };

/** With one scale x is measured from the nut, with two from the perpendicular fret. */
function placesOf({ isMultiscale }: FretTable, { bass, treble }: FretTable['rows'][number]): Places {
  return isMultiscale
    ? { bassX: bass.fromPerpendicularMm, trebleX: treble.fromPerpendicularMm }
    : { bassX: bass.fromNutMm, trebleX: treble.fromNutMm };
}

function middleX(table: FretTable, fret: number): number {
  const row = table.rows[fret];
  if (!row) throw new RangeError(`There is no fret ${fret} on this board.`);
  const { bassX, trebleX } = placesOf(table, row);
  return (bassX + trebleX) / 2;
}

function slotLine({ halfWidth, edgeMm }: Sides, { bassX, trebleX }: Places): Line {
  return lineThrough({ x: trebleX, y: edgeMm - halfWidth(trebleX) }, { x: bassX, y: halfWidth(bassX) - edgeMm });
}

function fretLine(fret: number, slot: Line, { bassEdge, trebleEdge }: Sides): FretLine {
  return { fret, treble: crossing(slot, trebleEdge), bass: crossing(slot, bassEdge) };
}

/** Nut, down the bass edge, across behind the last fret and parallel to it, back up the treble edge. */
function boardOutline(plan: FingerboardPlan, frets: FretLine[], { bassEdge, trebleEdge }: Sides): Point[] {
  const [nut, last] = [frets[0], frets.at(-1)];
  if (!nut || !last) return [];
  const overhangMm = plan.overhangMm ?? DEFAULT_OVERHANG_MM;
  const moved = (point: Point) => ({ x: point.x + overhangMm, y: point.y });
  const end = lineThrough(moved(last.treble), moved(last.bass));
  return [nut.treble, nut.bass, crossing(end, bassEdge), crossing(end, trebleEdge)];
}

function stringLines({ stringCount }: FingerboardPlan, table: FretTable, sides: Sides): StringLine[] {
  const [nutRow, bridgeRow] = [table.rows[0], table.rows.at(-1)];
  if (!nutRow || !bridgeRow) return [];
  return Array.from({ length: stringCount }, (_, i) => {
    const side = stringCount === 1 ? 0 : (2 * i) / (stringCount - 1) - 1;
    const at = (x: number) => ({ x, y: side * (sides.halfWidth(x) - sides.edgeMm) });
    const run = lineThrough(at(0), at(1));
    const [nut, bridge] = [nutRow, bridgeRow].map((row) => crossing(run, slotLine(sides, placesOf(table, row))));
    return { number: i + 1, nut: nut ?? at(0), bridge: bridge ?? at(1) };
  });
}

function boardTrouble({
  stringCount,
  nutWidthMm,
  lastFretWidthMm,
  edgeMm,
  overhangMm,
}: FingerboardPlan): string | null {
  if (!Number.isInteger(stringCount) || stringCount < 1 || stringCount > MOST_STRINGS) {
    return `Give the number of strings as a whole number from 1 to ${MOST_STRINGS}.`;
  }
  if (!(nutWidthMm >= 10 && nutWidthMm <= 150)) return 'A nut is 10 to 150 mm wide. Look at the number and its unit.';
  if (!(lastFretWidthMm >= nutWidthMm && lastFretWidthMm <= 200)) {
    return 'The board is at least as wide at the last fret as at the nut, and at most 200 mm. Look at both widths.';
  }
  const inset = edgeMm ?? DEFAULT_EDGE_MM;
  if (!(inset >= 0 && inset * 2 < nutWidthMm))
    return 'The outer strings must lie on the board. Give a smaller distance to the edge.';
  const overhang = overhangMm ?? DEFAULT_OVERHANG_MM;
  return overhang >= 0 && overhang <= 60
    ? null
    : 'The board ends 0 to 60 mm behind the last fret. Look at the number and its unit.';
}
