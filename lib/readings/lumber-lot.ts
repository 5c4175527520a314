import { bundleSizes, doubtBoard, lotBoardFeet, readThicknessIn, type Board } from '../craft/lumber';
import { wrong, type Doubt } from '../craft/doubt';
import { readNumberField } from './number-field';

/** One board of a lot as its fields hold it: thickness as a yard writes it, width in inches, length in feet. */
export type TypedBoard = { thickness: string; width: string; length: string };
export type BoardDoubts = Partial<Record<keyof TypedBoard, Doubt>>;

export const noBoard: TypedBoard = { thickness: '4/4', width: '', length: '' };

export type ReadLot = {
  /** A row for each board, in their order. */
  doubts: BoardDoubts[];
  /** Boards that are counted; one that is half typed is not. */
  boardCount: number;
  exactBoardFeet: number;
  /** Each board by its surface measure, lengths down to the whole foot. */
  talliedBoardFeet: number;
  /** The same with widths to the nearest inch, as a bundle is tallied. */
  bundledBoardFeet: number;
};

/** Board feet of a lot while it is typed in: by exact volume, and as yards tally it. */
export function readLot(typed: readonly TypedBoard[]): ReadLot {
  const rows = typed.map(readBoard);
  const boards = rows.flatMap(({ board }) => board ?? []);
  return {
    doubts: rows.map(({ doubts }) => doubts),
    boardCount: boards.length,
    exactBoardFeet: lotBoardFeet(boards).exactBoardFeet,
    talliedBoardFeet: tallied(boards.map((board) => ({ ...board, lengthFt: Math.floor(board.lengthFt) }))),
    bundledBoardFeet: tallied(bundleSizes(boards)),
  };
}

/** What is left of a board by rounding down may be nothing. */
const tallied = (boards: Board[]) =>
  lotBoardFeet(boards.filter(({ widthIn, lengthFt }) => widthIn > 0 && lengthFt > 0)).talliedBoardFeet;

const NO_THICKNESS = 'Write the thickness as 4/4, 8/4 or 1.25.';

function readBoard({ thickness, width, length }: TypedBoard): { board: Board | null; doubts: BoardDoubts } {
  if (width.trim() === '' && length.trim() === '') return { board: null, doubts: {} };
  const thicknessIn = readThicknessIn(thickness);
  const [wide, long] = [readNumberField(width, ['in', '"']), readNumberField(length, ['ft', "'"])];
  const odd = doubtBoard({ thicknessIn: thicknessIn ?? 1, widthIn: wide.value ?? 1, lengthFt: long.value ?? 1 });
  const found = {
    thickness: thicknessIn === null ? wrong(NO_THICKNESS) : odd.thicknessIn,
    width: wide.doubt ?? odd.widthIn,
    length: long.doubt ?? odd.lengthFt,
  };
  const isRefused = Object.values(found).some((doubt) => doubt?.kind === 'wrong');
  const doubts: BoardDoubts = Object.fromEntries(Object.entries(found).filter(([, doubt]) => doubt));
  if (isRefused || thicknessIn === null || wide.value === null || long.value === null) return { board: null, doubts };
  return { board: { thicknessIn, widthIn: wide.value, lengthFt: long.value }, doubts };
}
