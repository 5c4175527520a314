/** Density of the standard normal distribution. */
export function normalDensity(z: number): number {
  return Math.exp(-0.5 * z * z) / Math.sqrt(2 * Math.PI);
}

/** Series for the middle (DLMF 7.6.2), good to the last digits up to |z| = 5. */
function middleShare(z: number): number {
  let term = z;
  let sum = z;
  for (let k = 1; Math.abs(term) > 1e-17 * Math.abs(sum); k++) {
    term *= (z * z) / (2 * k + 1);
    sum += term;
  }
  return 0.5 + normalDensity(z) * sum;
}

/** Continued fraction for the tail above z (DLMF 7.9.3). */
function tailShare(z: number): number {
  let fraction = z;
  for (let k = 60; k >= 1; k--) fraction = z + k / fraction;
  return normalDensity(z) / fraction;
}

/** Share of the standard normal distribution at or below z. */
export function normalShare(z: number): number {
  if (z > 5) return 1 - tailShare(z);
  return z < -5 ? tailShare(-z) : middleShare(z);
}
