function requireShare(p: number): void {
  if (!(p >= 0 && p <= 1)) throw new RangeError(`A share is 0 to 1, not ${p}.`);
}

function ascending(values: readonly number[]): number[] {
  if (values.length === 0) throw new RangeError('There is no quantile of no values.');
  if (values.some(Number.isNaN)) throw new RangeError('There is no quantile of what is not a number.');
  return [...values].sort((one, other) => one - other);
}

/** A product such as 0.7 * 10 comes out a hair above the whole number it stands for. */
const HAIR = 4 * Number.EPSILON;

/**
 * The smallest value that a share `p` of the values do not exceed: type 1 of Hyndman & Fan (1996), always one of the
 * values.
 * @throws RangeError for no values, or a share outside 0 to 1
 */
export function quantileType1(values: readonly number[], p: number): number {
  requireShare(p);
  const sorted = ascending(values);
  const place = Math.ceil(sorted.length * p * (1 - HAIR));
  return sorted[Math.max(0, place - 1)] ?? NaN;
}

/**
 * Quantile with straight lines between the values, h = 1 + (n - 1) p: type 7 of Hyndman & Fan (1996), R's and numpy's own.
 * @throws RangeError for no values, or a share outside 0 to 1
 */
export function quantileType7(values: readonly number[], p: number): number {
  requireShare(p);
  const sorted = ascending(values);
  const place = (sorted.length - 1) * p;
  const below = sorted[Math.floor(place)] ?? NaN;
  const above = sorted[Math.ceil(place)] ?? NaN;
  return below + (place - Math.floor(place)) * (above - below);
}

/** What is usual: from the 25th to the 75th percentile (type 7) in whole days; null with fewer than four builds. */
export function usualDays(durationsDays: readonly number[]): { lowDays: number; highDays: number } | null {
  if (durationsDays.length < 4) return null;
  return {
    lowDays: Math.round(quantileType7(durationsDays, 0.25)),
    highDays: Math.round(quantileType7(durationsDays, 0.75)),
  };
}

/** "usual 8 to 12 days", "usual 8 days", or "usual not known yet". */
export function usualWords(usual: { lowDays: number; highDays: number } | null): string {
  if (usual === null) return 'usual not known yet';
  const { lowDays, highDays } = usual;
  if (lowDays !== highDays) return `usual ${lowDays} to ${highDays} days`;
  return `usual ${lowDays} ${lowDays === 1 ? 'day' : 'days'}`;
}
