import { divide, multiply, type Fraction } from './fractions';

export type LengthUnit = 'in' | 'mm' | 'thou' | '64ths';
export type Unit = LengthUnit | 'um' | 'deg' | 'cents' | 'kohm' | 'g' | 'percent' | 'count' | 'dE' | 'lb';

/** The international inch of 1959. */
export const MM_PER_INCH = 25.4;

/** One of each in inches: 1 in = 25.4 mm = 127/5 mm by the international definition of 1959; a thou is 1/1000 in. */
const inchesPer: Record<LengthUnit, Fraction> = {
  in: { numerator: 1, denominator: 1 },
  mm: { numerator: 5, denominator: 127 },
  thou: { numerator: 1, denominator: 1000 },
  '64ths': { numerator: 1, denominator: 64 },
};

const unitWords: Record<Unit, string> = {
  in: 'in',
  mm: 'mm',
  thou: 'thou',
  '64ths': '64ths',
  um: 'µm',
  deg: '°',
  cents: 'cents',
  kohm: 'kΩ',
  g: 'g',
  percent: '%',
  count: '',
  dE: 'ΔE',
  lb: 'lb',
};

/** How a unit may be typed behind a number, in lower case. */
const typedUnits: Record<string, Unit> = {
  in: 'in',
  'in.': 'in',
  inch: 'in',
  inches: 'in',
  '"': 'in',
  "''": 'in',
  mm: 'mm',
  millimetre: 'mm',
  millimetres: 'mm',
  millimeter: 'mm',
  millimeters: 'mm',
  thou: 'thou',
  mil: 'thou',
  mils: 'thou',
  '64th': '64ths',
  '64ths': '64ths',
  um: 'um',
  µm: 'um',
  micron: 'um',
  microns: 'um',
  '°': 'deg',
  deg: 'deg',
  degree: 'deg',
  degrees: 'deg',
  cent: 'cents',
  cents: 'cents',
  kohm: 'kohm',
  kω: 'kohm',
  g: 'g',
  grams: 'g',
  '%': 'percent',
  percent: 'percent',
  de: 'dE',
  δe: 'dE',
  lb: 'lb',
  lbs: 'lb',
};

export function isLengthUnit(unit: Unit): unit is LengthUnit {
  return unit in inchesPer;
}

/** A length in another unit, exactly: 1 in = 127/5 mm = 1000 thou = 64 64ths. */
export function inUnit(exact: Fraction, from: LengthUnit, to: LengthUnit): Fraction {
  return divide(multiply(exact, inchesPer[from]), inchesPer[to]);
}

/** How a unit is written behind a number; a count has none. */
export function unitWord(unit: Unit): string {
  return unitWords[unit];
}

/** The unit somebody typed behind a number, or null when it is none that is known here. */
export function readUnit(typed: string): Unit | null {
  const plain = typed.trim().toLowerCase().replace(/[″”“]/g, '"').replace(/μ/g, 'µ');
  return Object.hasOwn(typedUnits, plain) ? (typedUnits[plain] ?? null) : null;
}
