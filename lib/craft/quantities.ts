import { compare, type Fraction } from './fractions';
import { inUnit, isLengthUnit, unitWord, type LengthUnit, type Unit } from './units';

/** What a measure is a measure of, so that a number which cannot be meant is noticed while it is typed. */
export type Quantity =
  | 'scale length'
  | 'nut width'
  | 'fingerboard width'
  | 'fingerboard radius'
  | 'string gauge'
  | 'relief'
  | 'action'
  | 'string height at the first fret'
  | 'pickup height';

type Limits = { unit: Unit; low: number; high: number };

/** Wider than any instrument the shop builds, narrower than a slip of the unit: sanity, not advice. */
const quantityLimits: Record<Quantity, Limits> = {
  'scale length': { unit: 'mm', low: 300, high: 1100 },
  'nut width': { unit: 'mm', low: 25, high: 120 },
  'fingerboard width': { unit: 'mm', low: 30, high: 150 },
  'fingerboard radius': { unit: 'mm', low: 100, high: 1600 },
  'string gauge': { unit: 'thou', low: 5, high: 200 },
  relief: { unit: 'thou', low: -60, high: 120 },
  action: { unit: 'thou', low: 8, high: 300 },
  'string height at the first fret': { unit: 'thou', low: 1, high: 100 },
  'pickup height': { unit: 'thou', low: 8, high: 500 },
};

const unitLimits: Record<Exclude<Unit, LengthUnit>, Limits> = {
  um: { unit: 'um', low: 0, high: 10_000 },
  deg: { unit: 'deg', low: -180, high: 180 },
  cents: { unit: 'cents', low: -1200, high: 1200 },
  kohm: { unit: 'kohm', low: 0, high: 10_000 },
  g: { unit: 'g', low: 0, high: 50_000 },
  percent: { unit: 'percent', low: 0, high: 100 },
  count: { unit: 'count', low: 0, high: 10_000 },
  dE: { unit: 'dE', low: 0, high: 150 },
  lb: { unit: 'lb', low: 0, high: 500 },
};

const MOST_MM = 3000;

/** A sentence when this number cannot be meant for this quantity, or null. `exact` is in `unit`. */
export function cannotBeMeant(exact: Fraction, unit: Unit, typed: string, quantity?: Quantity): string | null {
  const shown = `${typed} ${unitWord(unit)}`.trim();
  if (quantity && !isLengthUnit(unit)) return `${named(quantity)} is a length: write in, mm, thou or 64ths behind it.`;
  if (quantity && isLengthUnit(unit)) return outsideQuantity(exact, unit, shown, quantity);
  if (isLengthUnit(unit)) return outsideLength(exact, unit, shown);
  const { low, high } = unitLimits[unit];
  if (isBetween(exact, low, high) && (unit !== 'count' || exact.denominator === 1)) return null;
  if (unit === 'count') return `${shown} cannot be meant: a count is a whole number from ${low} to ${high}.`;
  const word = unitWord(unit);
  return `${shown} cannot be meant: it lies between ${low} and ${high} ${word}. Look at the number again.`;
}

function outsideQuantity(exact: Fraction, unit: LengthUnit, shown: string, quantity: Quantity): string | null {
  if (isMeant(exact, unit, quantity)) return null;
  const meant = (['in', 'mm', 'thou', '64ths'] as const).find((other) => isMeant(exact, other, quantity));
  const digits = shown.slice(0, shown.length - unitWord(unit).length).trim();
  const instead = meant
    ? `If ${digits} ${unitWord(meant)} was meant, change the unit.`
    : 'Look at the number and its unit.';
  return `${named(quantity)} of ${shown} cannot be meant. ${instead}`;
}

function outsideLength(exact: Fraction, unit: LengthUnit, shown: string): string | null {
  if (exact.numerator <= 0) return `${shown} cannot be meant: a length is above 0.`;
  const mm = inUnit(exact, unit, 'mm');
  if (compare(mm, { numerator: 1, denominator: 1000 }) >= 0 && isBetween(mm, 0, MOST_MM)) return null;
  return `${shown} cannot be meant on an instrument. Look at the number and its unit.`;
}

function isMeant(exact: Fraction, unit: LengthUnit, quantity: Quantity): boolean {
  const { unit: limitUnit, low, high } = quantityLimits[quantity];
  return isLengthUnit(limitUnit) && isBetween(inUnit(exact, unit, limitUnit), low, high);
}

function isBetween(exact: Fraction, low: number, high: number): boolean {
  const [from, to] = [
    { numerator: low, denominator: 1 },
    { numerator: high, denominator: 1 },
  ];
  return compare(exact, from) >= 0 && compare(exact, to) <= 0;
}

function named(quantity: Quantity): string {
  return `${/^[aeiou]/.test(quantity) ? 'An' : 'A'} ${quantity}`;
}
