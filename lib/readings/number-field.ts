import { wrong, type Doubt } from '../craft/doubt';
import { valueOf } from '../craft/fractions';
import { readTypedNumber } from '../craft/typed-number';

export type NumberRead = { value: number | null; behind: string; doubt: Doubt | null };

/**
 * A plain number as typed, "45", "45 %", "1 1/2": null and no doubt when the field is empty. `behind` is the unit that
 * stood there, in lower case; one that is none of `units` is refused.
 */
export function readNumberField(text: string, units: readonly string[]): NumberRead {
  if (text.trim() === '') return { value: null, behind: '', doubt: null };
  const typed = readTypedNumber(text);
  if (!typed.ok) return { value: null, behind: '', doubt: wrong(typed.message) };
  const behind = typed.number.behind.toLowerCase().replace(/\s/g, '');
  if (behind !== '' && !units.includes(behind)) {
    const instead = units[0] ? ` Write it in ${units[0]}, or without a unit.` : ' Write a plain number.';
    return { value: null, behind, doubt: wrong(`"${typed.number.behind}" is not the unit of this field.${instead}`) };
  }
  return { value: valueOf(typed.number.exact), behind, doubt: null };
}
