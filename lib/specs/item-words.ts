import { lengthWords, readTolerance, toleranceWords, type Measure, type ShownUnit } from '../craft/measure';
import type { SpecItem } from './document';
import { toleranceText } from './tolerance';

export type MaterialNames = Readonly<Record<string, string>>;

/** What was agreed, as the reader's unit system shows it: `25 1/2 in`, `Ebony, one piece`. */
export function itemWords(item: SpecItem, show: ShownUnit, materials: MaterialNames): string {
  if (item.kind === 'measure') return measureIn(item.aim, show);
  if (item.kind === 'choice') return item.value;
  if (item.kind === 'look') return item.words;
  const name = item.materialKey === null ? '' : (materials[item.materialKey] ?? item.materialKey);
  return [name, item.words].filter((part) => part.trim() !== '').join(', ');
}

/** A measure as the reader's unit system shows it; 64ths stay a fraction in inches, as set-up rules are read. */
export function measureIn(measure: Measure, show: ShownUnit): string {
  return lengthWords(measure, measure.unit === '64ths' && show === 'in' ? 'fraction' : show);
}

/** `± 0.005 in` for a measure, `ΔE up to 2` for a measured colour; null where nothing was said. */
export function allowedWords(item: SpecItem): string | null {
  if (item.kind === 'look') return item.colour ? `ΔE up to ${item.colour.limitDeltaE}` : null;
  if (item.kind !== 'measure' || !item.tolerance) return null;
  const text = toleranceText(item.tolerance);
  const read = readTolerance(text, item.aim);
  return read.ok ? toleranceWords(read, item.aim.unit) : text;
}
