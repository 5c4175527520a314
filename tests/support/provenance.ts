type ReferenceRow = Record<string, string>;

/**
 * Rows of a reference table by how far they can be trusted: `outside` was read in a publication or printed by an independent
 * program; `own` is computed from the formula, recalled or trade practice, and only guards against change.
 */
export function byProvenance(
  rows: ReferenceRow[],
  column = 'provenance',
): { outside: ReferenceRow[]; own: ReferenceRow[] } {
  const isOutside = (row: ReferenceRow) => /^(size )?(seen|library)/.test(row[column] ?? '');
  return { outside: rows.filter(isOutside), own: rows.filter((row) => !isOutside(row)) };
}

/** A cell as a number; a cell that is missing or empty is a fault of the table and throws. */
export function cell(row: ReferenceRow, column: string): number {
  const text = row[column];
  if (text === undefined || text.trim() === '' || Number.isNaN(Number(text))) {
    throw new Error(`No number in ${column}: ${JSON.stringify(row)}`);
  }
  return Number(text);
}
