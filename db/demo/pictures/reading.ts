// One reader for each kind of array: a shared one would see many kinds and run several times slower.

/** The value at an index that is known to be held. */
export const at = (values: readonly number[], index: number): number => values[index] ?? 0;
export const real = (values: Float32Array, index: number): number => values[index] ?? 0;
export const whole = (values: Int32Array, index: number): number => values[index] ?? 0;
export const byte = (values: Uint8Array, index: number): number => values[index] ?? 0;
