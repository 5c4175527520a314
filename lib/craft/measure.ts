import { compare, divide, negate, subtract, valueOf, type Fraction } from './fractions';
import { readMeasure, typedParts, type Measure, type Refused } from './read-measure';
import { inUnit, isLengthUnit, unitWord, type Unit } from './units';

export type { Fraction } from './fractions';
export type { Quantity } from './quantities';
export { readMeasure, type Measure, type ReadMeasure, type Refused } from './read-measure';
export { inUnit, type LengthUnit, type Unit } from './units';

export type ShownUnit = 'in' | 'fraction' | 'mm';

/** The aim's allowed distance below and above, both at least 0, in the aim's unit. */
export type Tolerance = { minus: Fraction; plus: Fraction };

export type Verdict =
  | { ok: true; standing: 'within' | 'outside'; distance: Fraction; distanceValue: number; unit: Unit; words: string }
  | Refused;

const FINEST_FRACTION = 64;
const ROUNDED_PLACES = { in: 4, mm: 3 } as const;

/**
 * A measure as the reader's unit system shows it: `25 1/2 in`, `647.7 mm`, `25.5 in`. What was typed in that form keeps its digits.
 * Inches show as a fraction where that is exact to 1/64, as `about` the nearest 64th from one inch on, else as a decimal.
 * Anything that is no length keeps its own unit; text that is no number is shown as it is.
 */
export function lengthWords(measure: Measure, show: ShownUnit): string {
  const typed = typedParts(measure);
  if (!typed) return measure.text;
  const { unit, digits, exact } = typed;
  if (!isLengthUnit(unit)) return withUnit(digits, unit);
  const shownUnit = show === 'mm' ? 'mm' : 'in';
  if (unit === shownUnit && (show === 'mm' || typed.isFraction === (show === 'fraction')))
    return withUnit(digits, unit);
  if (show !== 'fraction') return withUnit(decimalWords(inUnit(exact, unit, shownUnit), shownUnit), shownUnit);
  const inches = inUnit(exact, unit, 'in');
  return unit === '64ths' ? sixtyFourthsWords(digits, inches) : fractionWords(inches);
}

/**
 * A tolerance as typed: `0.005`, `± 0.005`, or `+0.010 -0.005`, each with or without a unit; plus and minus in the aim's unit.
 * One that is wider than the value it belongs to is refused.
 */
export function readTolerance(text: string, aim: Measure): ({ ok: true } & Tolerance) | Refused {
  const [, plusText = text, minusText = plusText] = /^\s*\+\s*([^+-]+?)\s*[-−]\s*([^+-]+)$/.exec(text) ?? [];
  const plus = sideOfTolerance(plusText, aim.unit);
  const minus = sideOfTolerance(minusText, aim.unit);
  if (!plus.ok) return plus;
  if (!minus.ok) return minus;
  const value = exactIn(aim, aim.unit);
  const widest = compare(plus.exact, minus.exact) > 0 ? plus.exact : minus.exact;
  const mayBeNegative = aim.unit === 'cents' || aim.unit === 'deg';
  if (value && value.numerator > 0 && !mayBeNegative && compare(widest, value) > 0) {
    return {
      ok: false,
      message: `A tolerance of ${text.trim()} is wider than the value itself, ${aim.text.trim()}. Give a smaller one.`,
    };
  }
  return { ok: true, plus: plus.exact, minus: minus.exact };
}

/**
 * Whether a measured value is within its tolerance, compared exactly across units; the edge itself is within. `distance` is measured
 * less aim, in the aim's unit. Refused with a sentence when one of the three cannot be read or the units do not go together.
 */
export function verdict(measured: Measure, aim: Measure, tolerance: string): Verdict {
  const allowed = readTolerance(tolerance, aim);
  if (!allowed.ok) return allowed;
  const aimed = exactIn(aim, aim.unit);
  const found = exactIn(measured, aim.unit);
  if (!aimed) return { ok: false, message: `The aim "${aim.text}" is not a measure in ${unitWord(aim.unit)}.` };
  if (!found)
    return { ok: false, message: `"${measured.text}" cannot be compared with ${withUnit(aim.text, aim.unit)}.` };
  const distance = subtract(found, aimed);
  const isWithin = compare(distance, allowed.plus) <= 0 && compare(distance, negate(allowed.minus)) >= 0;
  const standing = isWithin ? 'within' : 'outside';
  const words = isWithin ? `within ${toleranceWords(allowed, aim.unit)}` : outsideWords(distance, allowed, aim.unit);
  return { ok: true, standing, distance, distanceValue: valueOf(distance), unit: aim.unit, words };
}

/** `± 0.005 in`, `+ 0.01 − 0.005 in` where the sides differ, and a limit for a colour difference, which has one side only. */
export function toleranceWords({ minus, plus }: Tolerance, unit: Unit): string {
  const [above, below] = [plainDecimal(plus), plainDecimal(minus)];
  if (unit === 'dE') return `a limit of ΔE ${above}`;
  return withUnit(compare(plus, minus) === 0 ? `± ${above}` : `+ ${above} − ${below}`, unit);
}

function outsideWords(distance: Fraction, allowed: Tolerance, unit: Unit): string {
  const size = distance.numerator < 0 ? negate(distance) : distance;
  const side = distance.numerator < 0 ? 'under' : 'over';
  return `${withUnit(plainDecimal(size), unit)} ${side} the aim, outside ${toleranceWords(allowed, unit)}`;
}

function sideOfTolerance(text: string, unit: Unit): { ok: true; exact: Fraction } | Refused {
  const plain = text.replace(/^\s*(±|\+\/-)\s*/, '').trim();
  if (/^0*[.,]?0+(\D*)$/.test(plain)) return { ok: true, exact: { numerator: 0, denominator: 1 } };
  const read = readMeasure(plain, unit);
  if (!read.ok) return read;
  if (read.exact.numerator < 0) return { ok: false, message: 'A tolerance is written without a minus, such as 0.005.' };
  return read;
}

/** The exact value of a measure in a unit, or null when it is no number or of another kind. */
function exactIn(measure: Measure, unit: Unit): Fraction | null {
  const typed = typedParts(measure);
  if (!typed) return null;
  if (typed.unit === unit) return typed.exact;
  return isLengthUnit(typed.unit) && isLengthUnit(unit) ? inUnit(typed.exact, typed.unit, unit) : null;
}

function fractionWords(inches: Fraction): string {
  if (FINEST_FRACTION % inches.denominator === 0) return `${mixedNumber(inches)} in`;
  const inSixtyFourths = Math.round(valueOf(inches) * FINEST_FRACTION);
  if (Math.abs(inSixtyFourths) < FINEST_FRACTION) return `${decimalWords(inches, 'in')} in`;
  const nearest = divide({ numerator: inSixtyFourths, denominator: 1 }, { numerator: FINEST_FRACTION, denominator: 1 });
  return `about ${mixedNumber(nearest)} in`;
}

/** `4/64 in` as a rule is read; half a 64th is a 128th, and anything finer a decimal. */
function sixtyFourthsWords(digits: string, inches: Fraction): string {
  if (/^\d+$/.test(digits)) return `${digits}/64 in`;
  return (2 * FINEST_FRACTION) % inches.denominator === 0 ? `${mixedNumber(inches)} in` : fractionWords(inches);
}

function mixedNumber({ numerator, denominator }: Fraction): string {
  const whole = Math.trunc(numerator / denominator);
  const rest = Math.abs(numerator % denominator);
  if (rest === 0) return `${whole}`;
  const sign = numerator < 0 && whole === 0 ? '-' : '';
  return `${whole === 0 ? sign : `${whole} `}${rest}/${denominator}`;
}

/** Small inches keep three decimals, as a rule is read in thousandths. */
function decimalWords(exact: Fraction, unit: 'in' | 'mm'): string {
  const value = valueOf(exact);
  const rounded = roundedExactly(exact, ROUNDED_PLACES[unit]).replace(/\.?0+$/, '');
  if (unit === 'mm' || Math.abs(value) >= 1) return rounded;
  return rounded.length < value.toFixed(3).length ? value.toFixed(3) : rounded;
}

/** Halves go away from 0, by the fraction itself: 127/80 is 1.588, which its nearest double is not. */
function roundedExactly({ numerator, denominator }: Fraction, places: number): string {
  const units = Math.round((Math.abs(numerator) * 10 ** places) / denominator);
  return ((Math.sign(numerator) * units) / 10 ** places).toFixed(places);
}

function plainDecimal(exact: Fraction): string {
  return valueOf(exact)
    .toFixed(4)
    .replace(/\.?0+$/, '');
}

function withUnit(digits: string, unit: Unit): string {
  return unit === 'deg' || unit === 'percent' ? `${digits}${unitWord(unit)}` : `${digits} ${unitWord(unit)}`.trim();
}
