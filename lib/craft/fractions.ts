/** An exact number: reduced, both parts safe integers, the denominator above 0. */
export type Fraction = { numerator: number; denominator: number };

/** The reduced fraction. @throws RangeError when the denominator is 0 or a part leaves the safe integers */
export function fraction(numerator: bigint, denominator: bigint): Fraction {
  if (denominator === 0n) throw new RangeError('A fraction cannot have 0 below its line.');
  const sign = denominator < 0n ? -1n : 1n;
  const divisor = sign * greatestDivisor(numerator, denominator);
  return { numerator: safe(numerator / divisor), denominator: safe(denominator / divisor) };
}

export function add(a: Fraction, b: Fraction): Fraction {
  const [an, ad, bn, bd] = parts(a, b);
  return fraction(an * bd + bn * ad, ad * bd);
}

export function subtract(a: Fraction, b: Fraction): Fraction {
  return add(a, negate(b));
}

export function multiply(a: Fraction, b: Fraction): Fraction {
  const [an, ad, bn, bd] = parts(a, b);
  return fraction(an * bn, ad * bd);
}

/** @throws RangeError when b is 0 */
export function divide(a: Fraction, b: Fraction): Fraction {
  const [an, ad, bn, bd] = parts(a, b);
  return fraction(an * bd, ad * bn);
}

/** Below, at or above 0 as a is less than, equal to or more than b; never rounded. */
export function compare(a: Fraction, b: Fraction): -1 | 0 | 1 {
  const [an, ad, bn, bd] = parts(a, b);
  const difference = an * bd - bn * ad;
  if (difference === 0n) return 0;
  return difference < 0n ? -1 : 1;
}

/** The same distance from 0 on its other side. */
export function negate(a: Fraction): Fraction {
  return { numerator: a.numerator === 0 ? 0 : -a.numerator, denominator: a.denominator };
}

/** The nearest double. */
export function valueOf(a: Fraction): number {
  return a.numerator / a.denominator;
}

function parts(a: Fraction, b: Fraction): [bigint, bigint, bigint, bigint] {
  return [BigInt(a.numerator), BigInt(a.denominator), BigInt(b.numerator), BigInt(b.denominator)];
}

function greatestDivisor(a: bigint, b: bigint): bigint {
  let [larger, smaller] = [a < 0n ? -a : a, b < 0n ? -b : b];
  while (smaller > 0n) [larger, smaller] = [smaller, larger % smaller];
  return larger;
}

function safe(part: bigint): number {
  const number = Number(part);
  if (!Number.isSafeInteger(number)) throw new RangeError('This number has too many digits to be kept exactly.');
  return number;
}
