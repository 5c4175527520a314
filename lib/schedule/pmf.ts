/** A whole-day distribution: at index d the probability of exactly d working days; the entries sum to 1. */
export type Pmf = Float64Array;

/**
 * The distribution with these weights, which need not sum to 1.
 * @throws RangeError for values that are not whole days of at least 0, or weights that are negative or sum to 0
 */
export function pmfFromWeights(valuesDays: readonly number[], weights: readonly number[]): Pmf {
  const longest = Math.max(0, ...valuesDays);
  if (!valuesDays.every((value) => Number.isSafeInteger(value) && value >= 0)) {
    throw new RangeError('A duration is a whole number of days, 0 or more.');
  }
  const pmf = new Float64Array(longest + 1);
  valuesDays.forEach((value, i) => {
    const weight = weights[i] ?? NaN;
    if (!(weight >= 0)) throw new RangeError('A weight is 0 or more.');
    pmf[value] = (pmf[value] ?? 0) + weight;
  });
  return normalise(pmf);
}

/** Scales to a sum of 1, in place. @throws RangeError when everything is 0 */
export function normalise(pmf: Pmf): Pmf {
  let sum = 0;
  for (const share of pmf) sum += share;
  if (!(sum > 0) || !Number.isFinite(sum)) throw new RangeError('The weights sum to 0.');
  for (let i = 0; i < pmf.length; i++) pmf[i] = (pmf[i] ?? 0) / sum;
  return pmf;
}

/** The distribution of the sum of two independent durations: exact, no simulation. */
export function convolve(one: Pmf, other: Pmf): Pmf {
  const sum = new Float64Array(one.length + other.length - 1);
  const first = other.findIndex((share) => share > 0);
  for (let i = 0; i < one.length; i++) {
    const share = one[i] ?? 0;
    if (share === 0) continue;
    for (let j = first; j < other.length; j++) sum[i + j] = (sum[i + j] ?? 0) + share * (other[j] ?? 0);
  }
  return sum;
}

/** Share `weight` of one distribution, the rest of the other. */
export function blend(one: Pmf, other: Pmf, weight: number): Pmf {
  const mixed = new Float64Array(Math.max(one.length, other.length));
  for (let i = 0; i < mixed.length; i++) mixed[i] = weight * (one[i] ?? 0) + (1 - weight) * (other[i] ?? 0);
  return mixed;
}

export function meanOf(pmf: Pmf): number {
  return pmf.reduce((sum, share, days) => sum + share * days, 0);
}

export function varianceOf(pmf: Pmf): number {
  const mean = meanOf(pmf);
  return pmf.reduce((sum, share, days) => sum + share * (days - mean) ** 2, 0);
}

/** Sums of many shares miss 1/10 by a few units of the last place. */
const TINY = 1e-12;

/** The smallest whole day by which a share `p` is done (type 1). */
export function quantileOf(pmf: Pmf, p: number): number {
  let sum = 0;
  for (let days = 0; days < pmf.length; days++) {
    sum += pmf[days] ?? 0;
    if (sum >= p - TINY) return days;
  }
  return pmf.length - 1;
}

/** Half the density of the standard normal distribution at its 10 % point. */
const HALF_DENSITY = 0.0877491;

/**
 * The first and last day of eight in ten. A day is taken whole, so the 10 and 90 % days of type 1 hold more than eight in
 * ten, on average by half a day's share at each end; both levels are moved in by that much. What a day's share is follows
 * from `usualSdDays`, the standard deviation of the stages left: a number that stands still while days go by and closures
 * come, so that the two dates never move back on their own. They hold at least six in ten and always the median.
 */
export function eightInTen(pmf: Pmf, usualSdDays: number): { first: number; last: number } {
  const halfDay = Math.min(0.1, HALF_DENSITY / usualSdDays);
  return { first: quantileOf(pmf, 0.1 + halfDay), last: quantileOf(pmf, 0.9 - halfDay) };
}

/**
 * Days still to go given that `elapsedDays` have passed and it is not done: P(T = k | T > e). Null when no duration is
 * longer than that: then nothing can be said, and 0 would be a lie.
 */
export function remainingAfter(pmf: Pmf, elapsedDays: number): Pmf | null {
  const tail = pmf.slice(Math.max(0, elapsedDays + 1));
  if (!tail.some((share) => share > 0)) return null;
  const remaining = new Float64Array(tail.length + 1);
  remaining.set(tail, 1);
  // A stage not begun can still take no day at all.
  return normalise(elapsedDays < 0 ? tail : remaining);
}
