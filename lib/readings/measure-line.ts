import { saddleWords } from '../craft/cents';
import { wrong } from '../craft/doubt';
import { add, subtract, valueOf, type Fraction } from '../craft/fractions';
import { readTolerance, verdict, type Measure, type Quantity } from '../craft/measure';
import { readMeasure } from '../craft/read-measure';
import { figuresOf } from '../craft/typed-form';
import { setupVerdict, type SetupLine } from '../craft/set-up';
import { inUnit, isLengthUnit } from '../craft/units';
import { toleranceText } from '../specs/tolerance';
import type { MeasureItem } from '../specs/document';
import { quantityOf } from '../specs/known-items';
import type { MeasureReading, ShownReading } from './reading';
import { nothingRead, type PartRead } from './typed';

/** One line to measure: an item of the spec, or a line of the set-up sheet. */
export type MeasureLine = {
  key: string;
  label: string;
  how: string | null;
  aim: Measure;
  /** As typed, in the aim's unit; null where the spec gives none. */
  tolerance: string | null;
  quantity: Quantity | null;
  itemKey: string | null;
  setupLine: SetupLine | null;
};

/** From this aim on a length that is off by more than three times is another unit, not another length. */
const LARGE_MM = 10;

type LineItem = Pick<MeasureItem, 'key' | 'label' | 'aim' | 'tolerance'>;

/** `how` is that of the set-up sheet, where the item is one of its lines. */
export const lineOfItem = ({ key, label, aim, tolerance }: LineItem, how: string | null = null): MeasureLine => ({
  key: `item:${key}`,
  label,
  how,
  aim,
  tolerance: tolerance && toleranceText(tolerance),
  quantity: quantityOf(key) ?? null,
  itemKey: key,
  setupLine: null,
});

export const lineOfSetup = (line: SetupLine): MeasureLine => ({
  key: `setup:${line.key}`,
  label: line.label,
  how: line.how,
  aim: line.aim,
  tolerance: line.tolerance,
  quantity: line.quantity,
  itemKey: null,
  setupLine: line,
});

/** A measured value as typed on its line. The field's name is the line's key. */
export function readLine(text: string, line: MeasureLine): PartRead {
  if (text.trim() === '') return nothingRead;
  const measured = { text: text.trim(), unit: line.aim.unit };
  const trouble = lineTrouble(measured, line);
  if (trouble) return { reading: null, shown: null, doubts: { [line.key]: wrong(trouble) }, missing: {} };
  const value: MeasureReading = {
    kind: 'measure',
    name: line.label,
    measured,
    ...(line.setupLine && { setupLine: line.setupLine.key }),
  };
  return { reading: { value, itemKey: line.itemKey }, shown: showLine(value, line), doubts: {}, missing: {} };
}

/** Why a value cannot be meant on this line, or null. */
export function lineTrouble(measured: Measure, line: MeasureLine): string | null {
  if (measured.unit !== line.aim.unit)
    return `The spec now gives this as ${figuresOf(line.aim)}. Measure it in that unit.`;
  const read = readMeasure(measured.text, line.aim.unit, line.quantity ?? undefined);
  if (!read.ok) return read.message;
  if (line.setupLine) {
    const { standing, words } = setupVerdict(line.setupLine, measured.text);
    return standing === 'refused' ? words : null;
  }
  return isOtherUnit(read.exact, line.aim)
    ? `${measured.text} cannot be meant where ${figuresOf(line.aim)} is the aim. Look at the number and its unit.`
    : null;
}

function isOtherUnit(exact: Fraction, aim: Measure): boolean {
  const aimed = readMeasure(aim.text, aim.unit);
  if (!aimed.ok || !isLengthUnit(aim.unit)) return false;
  if (valueOf(inUnit(aimed.exact, aim.unit, 'mm')) < LARGE_MM) return false;
  const share = valueOf(exact) / aimed.value;
  return share > 3 || share < 1 / 3;
}

/** "1.687 in (42.85 mm)" beside its tolerance; a reading without a line, or on one without a tolerance, is only said. */
export function showLine({ name, measured }: MeasureReading, line: MeasureLine | null): ShownReading {
  const plain = { kind: 'measure', label: name, figures: figuresOf(measured) } as const;
  if (!line?.tolerance) {
    return { ...plain, words: line ? wordsOfAim(measured, line.aim) : '', standing: null, bar: null };
  }
  const found = verdict(measured, line.aim, line.tolerance);
  if (!found.ok) return { ...plain, words: '', standing: null, bar: null };
  const isOff = found.standing === 'outside' && isIntonation(line);
  const words = isOff ? `${found.words}: ${saddleWords(found.distanceValue)}` : found.words;
  return { ...plain, words, standing: found.standing, bar: barOf(measured, line.aim, line.tolerance) };
}

/** Whether a line tells how far off a string sounds at the 12th fret. */
export const isIntonation = ({ key, aim }: MeasureLine) => aim.unit === 'cents' && /:intonation_\d+$/.test(key);

function wordsOfAim(measured: Measure, aim: Measure): string {
  const found = verdict(measured, aim, '0');
  return found.ok && found.standing === 'within' ? 'as asked for' : `the aim is ${figuresOf(aim)}`;
}

function barOf(measured: Measure, aim: Measure, tolerance: string): ShownReading['bar'] {
  const [allowed, aimed, found] = [
    readTolerance(tolerance, aim),
    readMeasure(aim.text, aim.unit),
    readMeasure(measured.text, aim.unit),
  ];
  if (!allowed.ok || !aimed.ok || !found.ok) return null;
  return {
    low: valueOf(subtract(aimed.exact, allowed.minus)),
    high: valueOf(add(aimed.exact, allowed.plus)),
    value: found.value,
    aim: aimed.value,
  };
}
