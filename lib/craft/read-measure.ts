import { valueOf, type Fraction } from './fractions';
import { cannotBeMeant, type Quantity } from './quantities';
import { readTypedNumber, type TypedNumber } from './typed-number';
import { inUnit, isLengthUnit, readUnit, unitWord, type Unit } from './units';

/** A measure as typed, stored as it is; a unit typed behind the number wins over `unit`. */
export type Measure = { text: string; unit: Unit };

export type Refused = { ok: false; message: string };
/** `exact` and `value` are in `unit`: the unit asked for, or the typed one where none was asked for. */
export type ReadMeasure = { ok: true; exact: Fraction; value: number; unit: Unit } | Refused;

/**
 * Reads what somebody typed, exactly. A length typed with another length unit is turned into `unit` (25.5 in as 647.7 mm). `unit` is ''
 * where the unit must be typed. With a quantity, numbers that cannot be meant for it are refused (a scale length of 25.5 mm);
 * without one a length must be above 0. Each refusal is a sentence that says what to do.
 */
export function readMeasure(text: string, unit: Unit | '', quantity?: Quantity): ReadMeasure {
  const typed = readTypedNumber(text);
  if (!typed.ok) return typed;
  const { number } = typed;
  const typedUnit = number.behind === '' ? impliedUnit(number, unit) : readUnit(number.behind);
  if (typedUnit === null) return refused(`"${number.behind}" is not a unit used here. ${unitAdvice(unit)}`);
  if (typedUnit === '') return refused(`Say the unit too: in, mm, thou or 64ths, such as ${number.digits} in.`);
  const message = cannotBeMeant(number.exact, typedUnit, number.digits, quantity);
  if (message) return refused(message);
  const wanted = unit === '' ? typedUnit : unit;
  if (wanted === typedUnit) return read(number.exact, wanted);
  if (!isLengthUnit(wanted) || !isLengthUnit(typedUnit)) return refused(unitAdvice(unit));
  return read(inUnit(number.exact, typedUnit, wanted), wanted);
}

/** The digits as typed, without the unit, and the unit they are in; null when the text is no number. */
export function typedParts(
  measure: Measure,
): { digits: string; isFraction: boolean; exact: Fraction; unit: Unit } | null {
  const typed = readTypedNumber(measure.text);
  if (!typed.ok) return null;
  const { behind, digits, isFraction, exact } = typed.number;
  const unit = behind === '' ? impliedUnit(typed.number, measure.unit) : readUnit(behind);
  return unit ? { digits, isFraction, exact, unit } : null;
}

/** In a field of 64ths, 4/64 and 3/32 are inches written out, while 1/2 is half a 64th. */
function impliedUnit<U extends Unit | ''>(number: TypedNumber, unit: U): U | 'in' {
  return unit === '64ths' && /\/\s*(32|64|128)$/.test(number.digits) ? 'in' : unit;
}

function unitAdvice(unit: Unit | ''): string {
  if (unit === '' || isLengthUnit(unit)) return 'Write in, mm, thou or 64ths behind the number.';
  return unit === 'count' ? 'Write a plain number here.' : `Write the number in ${unitWord(unit)}.`;
}

function read(exact: Fraction, unit: Unit): ReadMeasure {
  return { ok: true, exact, value: valueOf(exact), unit };
}

function refused(message: string): Refused {
  return { ok: false, message };
}
