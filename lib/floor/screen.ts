import type { Floor } from './row';
import { arrange, choicesOf, type FloorChoices, type FloorWish } from './wish';

/** Rows that the server draws; the browser fetches all of them at once afterwards. */
const FIRST_ROWS = 8;

/** What a page of the floor shows before the rest of its rows has come. */
export type FloorScreen = {
  /** The floor with the first of the rows that were wished for. */
  first: Floor;
  /** How many rows there are of those. */
  total: number;
  choices: FloorChoices;
};

export function screenOf(floor: Floor, wish: FloorWish): FloorScreen {
  const rows = arrange(floor.rows, wish);
  return {
    first: { ...floor, rows: rows.slice(0, FIRST_ROWS) },
    total: rows.length,
    choices: choicesOf(floor.rows),
  };
}
