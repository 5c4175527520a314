import { lengthWords, type Measure, type ShownUnit } from './measure';
import { typedParts } from './read-measure';
import { isLengthUnit } from './units';

/** The form a measure was typed in: millimetres, a fraction of an inch (64ths are one), or inches with decimals. */
function typedForm(measure: Measure): ShownUnit {
  const typed = typedParts(measure);
  if (typed?.unit === 'mm') return 'mm';
  return typed?.isFraction || typed?.unit === '64ths' ? 'fraction' : 'in';
}

/** `4/64 in`: a measure in the form it was typed in, whatever the reader's units. */
export const asTyped = (measure: Measure) => lengthWords(measure, typedForm(measure));

/** `4/64 in (1.588 mm)`: a measure as it was typed, and a length in the other unit system behind it. */
export function figuresOf(measure: Measure): string {
  const typed = typedParts(measure);
  if (!typed || !isLengthUnit(typed.unit)) return asTyped(measure);
  return `${asTyped(measure)} (${lengthWords(measure, typed.unit === 'mm' ? 'in' : 'mm')})`;
}
