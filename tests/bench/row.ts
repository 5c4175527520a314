/** One line of the table: what the product takes beside what the bare work takes, measured in the same run. */
export type Row = {
  name: string;
  value: number;
  floor: number;
  /** value / floor */
  ratio: number;
  target: number;
  unit: string;
  isMet: boolean;
};

export type Bench = { name: string; run: () => Promise<Row[]> };

type Measured = Pick<Row, 'name' | 'value' | 'floor' | 'unit'>;

/** A row whose ratio must stay at or below the target. */
export function ratioAtMost(target: number, measured: Measured): Row {
  const ratio = measured.value / measured.floor;
  return { ...measured, ratio, target, isMet: ratio <= target };
}

/** A row whose ratio must reach the target. */
export function ratioAtLeast(target: number, measured: Measured): Row {
  const ratio = measured.value / measured.floor;
  return { ...measured, ratio, target, isMet: ratio >= target };
}

/** A row whose value itself, in its unit, must stay below the target. */
export function valueBelow(target: number, measured: Measured): Row {
  return { ...measured, ratio: measured.value / measured.floor, target, isMet: measured.value < target };
}

export function median(values: number[]): number {
  const sorted = [...values].sort((one, other) => one - other);
  return sorted[Math.floor(sorted.length / 2)] ?? NaN;
}
