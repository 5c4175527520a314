/** Lanczos approximation (g = 7, nine terms), good to about 15 digits for positive arguments. */
const LANCZOS = [
  676.5203681218851, -1259.1392167224028, 771.3234287776531, -176.6150291621406, 12.507343278686905,
  -0.13857109526572012, 9.984369578019572e-6, 1.5056327351493116e-7,
];

function logGamma(x: number): number {
  if (x < 0.5) return Math.log(Math.PI / Math.sin(Math.PI * x)) - logGamma(1 - x);
  const series = LANCZOS.reduce((sum, term, i) => sum + term / (x + i), 0.9999999999998099);
  const base = x + 6.5;
  return 0.5 * Math.log(2 * Math.PI) + (x - 0.5) * Math.log(base) - base + Math.log(series);
}

const SMALLEST = 1e-300;
const away = (value: number) => (Math.abs(value) < SMALLEST ? SMALLEST : value);

/** The continued fraction DLMF 8.17.22, evaluated by Lentz's method. */
function fraction(x: number, a: number, b: number): number {
  let c = 1;
  let d = 1 / away(1 - ((a + b) * x) / (a + 1));
  let value = d;
  for (let m = 1; m <= 300; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    let factor = 1;
    for (const term of [even, odd]) {
      d = 1 / away(1 + term * d);
      c = away(1 + term / c);
      factor = c * d;
      value *= factor;
    }
    if (Math.abs(factor - 1) < 1e-15) break;
  }
  return value;
}

/** The regularised incomplete beta function I_x(a, b): the share of a beta distribution at or below x. a, b > 0. */
export function betaShare(x: number, a: number, b: number): number {
  if (x <= 0) return 0;
  if (x >= 1) return 1;
  if (x > (a + 1) / (a + b + 2)) return 1 - betaShare(1 - x, b, a);
  const front = Math.exp(logGamma(a + b) - logGamma(a) - logGamma(b) + a * Math.log(x) + b * Math.log(1 - x));
  return (front * fraction(x, a, b)) / a;
}
