import { normalDensity, normalShare } from './normal';
import type { Pmf } from './pmf';

/** Pinball loss of a predicted quantile at level `alpha`: a (y - q) where y >= q, else (1 - a)(q - y). In the unit of y. */
export function pinballLoss(observed: number, predicted: number, alpha: number): number {
  return observed >= predicted ? alpha * (observed - predicted) : (1 - alpha) * (predicted - observed);
}

/** Continuous ranked probability score of a whole-day forecast, in days: the sum over k of (F(k) - 1{k >= y})^2. */
export function crpsOfPmf(pmf: Pmf, observedDays: number): number {
  let score = 0;
  let share = 0;
  for (let k = Math.min(0, observedDays); k < Math.max(pmf.length, observedDays); k++) {
    share += pmf[k] ?? 0;
    score += (share - (k >= observedDays ? 1 : 0)) ** 2;
  }
  return score;
}

/** The same score of a normal forecast (Gneiting & Raftery 2007, Eq. 21). */
export function crpsOfNormal(mean: number, sd: number, observed: number): number {
  const z = (observed - mean) / sd;
  return sd * (z * (2 * normalShare(z) - 1) + 2 * normalDensity(z) - 1 / Math.sqrt(Math.PI));
}

/** Interval score of a central (1 - alpha) interval (Gneiting & Raftery 2007, Eq. 43): its width and a fine for missing. */
export function intervalScore(lower: number, upper: number, observed: number, alpha: number): number {
  return upper - lower + (2 / alpha) * (Math.max(0, lower - observed) + Math.max(0, observed - upper));
}

/** How many intervals held, with the 95 % bounds of the true share (Wilson's score interval). */
export type Coverage = { held: number; of: number; share: number; low: number; high: number };

const Z95 = 1.959963984540054;

/** @throws RangeError unless 0 <= held <= of, whole, and of is at least 1 */
export function coverageOf(held: number, of: number): Coverage {
  if (!Number.isInteger(held) || !Number.isInteger(of) || held < 0 || of < 1 || held > of) {
    throw new RangeError(`Not so many of so many: ${held} of ${of}.`);
  }
  const share = held / of;
  const square = Z95 * Z95;
  const middle = (share + square / (2 * of)) / (1 + square / of);
  const reach = (Z95 / (1 + square / of)) * Math.sqrt((share * (1 - share)) / of + square / (4 * of * of));
  return { held, of, share, low: Math.max(0, middle - reach), high: Math.min(1, middle + reach) };
}
