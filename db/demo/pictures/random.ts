export type Random = () => number;

/** mulberry32: a small 32-bit generator; the same seed always gives the same run of numbers in [0, 1). */
export function mulberry32(seed: number): Random {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296;
  };
}

export const between = (random: Random, low: number, high: number) => low + (high - low) * random();

/** One of the choices; at least one must be given, so that there is always an answer. */
export function pick<T>(random: Random, first: T, ...others: T[]): T {
  const index = Math.floor(random() * (others.length + 1));
  return others[index - 1] ?? first;
}
