import { ask, wrong, type Doubt } from './doubt';
import { figure } from './figure';

/** Sizes a board is sold by. Thickness is nominal: 4/4 is 1 in. */
export type Board = { thicknessIn: number; widthIn: number; lengthFt: number };

const BOARD_FOOT_CUBIC_IN = 144;
/** A whole multiple of quarters from here up is more likely a count of quarters than of inches. */
const THICK_BOARD_IN = 4;
const LONG_BOARD_FT = 20;
const WIDE_BOARD_IN = 40;
const NO_BOARD = { thicknessIn: 24, widthIn: 120, lengthFt: 1200 };

function requirePositive(sizes: Record<string, number>): void {
  for (const [name, size] of Object.entries(sizes)) {
    if (!(size > 0 && Number.isFinite(size))) throw new RangeError(`A board's ${name} is above 0; got ${size}.`);
  }
}

/** Stock under 1 in is counted as 1 in. */
const countedThicknessIn = (thicknessIn: number) => Math.max(1, thicknessIn);

/**
 * Board feet by exact volume: thickness x width x length in inches / 144, stock under 1 in counted as 1 in.
 * NHLA measuring rules as given by the American Hardwood Export Council.
 * @throws RangeError when a size is not positive
 */
export function boardFeet(thicknessIn: number, widthIn: number, lengthIn: number): number {
  requirePositive({ thicknessIn, widthIn, lengthIn });
  return (countedThicknessIn(thicknessIn) * widthIn * lengthIn) / BOARD_FOOT_CUBIC_IN;
}

/**
 * Surface measure of one board in whole square feet: width in inches x length in feet / 12, rounded. The same rules.
 * @throws RangeError when a size is not positive
 */
export function surfaceMeasureSqFt(widthIn: number, lengthFt: number): number {
  requirePositive({ widthIn, lengthFt });
  return Math.round((widthIn * lengthFt) / 12);
}

/**
 * Board feet as a tally counts them: surface measure x thickness. It differs from `boardFeet`; show the two apart.
 * @throws RangeError when a size is not positive
 */
export function talliedBoardFeet({ thicknessIn, widthIn, lengthFt }: Board): number {
  requirePositive({ thicknessIn });
  return surfaceMeasureSqFt(widthIn, lengthFt) * countedThicknessIn(thicknessIn);
}

/**
 * Widths and lengths as a bundle is tallied: width to the nearest inch, exact halves alternately up and down (the first goes
 * up), length down to the whole foot. American Hardwood Export Council, measurement page.
 * @throws RangeError when a size is not positive
 */
export function bundleSizes<T extends { widthIn: number; lengthFt: number }>(boards: T[]): T[] {
  let goesUp = true;
  return boards.map((board) => {
    requirePositive({ widthIn: board.widthIn, lengthFt: board.lengthFt });
    const isHalf = board.widthIn % 1 === 0.5;
    const widthIn = isHalf && !goesUp ? Math.floor(board.widthIn) : Math.round(board.widthIn);
    if (isHalf) goesUp = !goesUp;
    return { ...board, widthIn, lengthFt: Math.floor(board.lengthFt) };
  });
}

/** A lumber lot in both ways of counting. @throws RangeError when a size is not positive */
export function lotBoardFeet(boards: Board[]): { exactBoardFeet: number; talliedBoardFeet: number } {
  return boards.reduce(
    (lot, board) => ({
      exactBoardFeet: lot.exactBoardFeet + boardFeet(board.thicknessIn, board.widthIn, board.lengthFt * 12),
      talliedBoardFeet: lot.talliedBoardFeet + talliedBoardFeet(board),
    }),
    { exactBoardFeet: 0, talliedBoardFeet: 0 },
  );
}

/** Nominal thickness in inches from what a lumber yard writes: "4/4", "8/4", "1 1/4", "1.25"; null when it is none of these. */
export function readThicknessIn(text: string): number | null {
  const parts = /^(?:(\d+)\s+)?(\d+)\s*\/\s*(\d+)$/.exec(text.trim());
  const thicknessIn = parts
    ? Number(parts[1] ?? 0) + Number(parts[2]) / Number(parts[3])
    : Number(/^\d*\.?\d+$/.test(text.trim()) ? text : NaN);
  return thicknessIn > 0 && Number.isFinite(thicknessIn) ? thicknessIn : null;
}

/** What is odd about the sizes of one board, a field at a time. */
export function doubtBoard({ thicknessIn, widthIn, lengthFt }: Board): Partial<Record<keyof Board, Doubt>> {
  return Object.fromEntries(
    Object.entries({
      thicknessIn: doubtThickness(thicknessIn),
      widthIn: doubtWidth(widthIn),
      lengthFt: doubtLength(lengthFt),
    }).filter(([, doubt]) => doubt !== null),
  );
}

function doubtThickness(thicknessIn: number): Doubt | null {
  if (!(thicknessIn > 0)) return wrong('Write the thickness as a size above 0, such as 4/4 or 1.25.');
  if (thicknessIn >= NO_BOARD.thicknessIn) return wrong('No board is that thick. Write it as 4/4, 5/4 or 8/4.');
  if (thicknessIn < THICK_BOARD_IN || !Number.isInteger(thicknessIn)) return null;
  const quarters = figure(thicknessIn, 0);
  return ask(`${quarters} in is a thick board. If ${quarters}/4 is meant, write ${quarters}/4.`);
}

function doubtWidth(widthIn: number): Doubt | null {
  if (!(widthIn > 0)) return wrong('Write the width in inches, above 0.');
  if (widthIn >= NO_BOARD.widthIn) return wrong('No board is that wide. Write the width in inches.');
  if (widthIn < WIDE_BOARD_IN) return null;
  return ask(`${figure(widthIn, 2)} in is a very wide board. Check that width and length are not swapped.`);
}

function doubtLength(lengthFt: number): Doubt | null {
  if (!(lengthFt > 0)) return wrong('Write the length in feet, above 0.');
  if (lengthFt >= NO_BOARD.lengthFt) return wrong('No board is that long. Write the length in feet.');
  if (lengthFt < LONG_BOARD_FT) return null;
  const typed = figure(lengthFt, 2);
  return ask(`${typed} ft is longer than boards come. If ${typed} in is meant, write ${figure(lengthFt / 12, 2)} ft.`);
}
