import { readGauges } from '../craft/gauges';
import { readNotes } from '../craft/notes';
import { fretTable } from '../craft/fret-table';
import { readMeasure } from '../craft/measure';
import { scalePlanOf } from './board';
import type { SpecDocument, SpecItem } from './document';
import { knownItems } from './known-items';

/** What fields say about each other: strings, notes and gauges are as many; two scales meet on the board. */
export function checkTogether(document: SpecDocument): Record<string, string> {
  const items = new Map(document.items.map((item) => [item.key, item]));
  return { ...checkStrings(items), ...checkScales(document, items), ...checkBand(items) };
}

type Items = ReadonlyMap<string, SpecItem>;

const at = (key: string, field: string) => `items.${key}.${field}`;

function countOf(items: Items, key: string): number | null {
  const item = items.get(key);
  if (item?.kind !== 'measure') return null;
  const read = readMeasure(item.aim.text, item.aim.unit);
  return read.ok ? read.value : null;
}

function textOf(items: Items, key: string): string | null {
  const item = items.get(key);
  return item?.kind === 'choice' && item.value.trim() !== '' ? item.value : null;
}

function checkStrings(items: Items): Record<string, string> {
  const sentences: Record<string, string> = {};
  const strings = countOf(items, knownItems.stringCount);
  const [tuning, gauges] = [textOf(items, knownItems.tuning), textOf(items, knownItems.gauges)];
  if (tuning !== null) {
    const read = readNotes(tuning);
    const message = read.ok ? countTrouble(strings, read.notes.length, 'note', 'notes') : read.message;
    if (message) sentences[at(knownItems.tuning, 'value')] = message;
  }
  if (gauges !== null) {
    const read = readGauges(gauges);
    const message = read.ok ? countTrouble(strings, read.gauges.length, 'gauge', 'gauges') : read.message;
    if (message) sentences[at(knownItems.gauges, 'value')] = message;
  }
  return sentences;
}

function countTrouble(strings: number | null, found: number, one: string, many: string): string | null {
  if (strings === null || strings === found) return null;
  const has = `${strings} ${strings === 1 ? 'string' : 'strings'}`;
  const given = `${found} ${found === 1 ? one : many}`;
  return strings > found
    ? `There are ${has} and only ${given}. Give each string its ${one}.`
    : `There are ${given} for ${has}. Take out what is too many, or change the number of strings.`;
}

function checkScales(document: SpecDocument, items: Items): Record<string, string> {
  const scales = scalePlanOf(document);
  if (!scales.ok) return {};
  const isMultiscale = items.has(knownItems.bassScaleLength);
  if (isMultiscale && !items.has(knownItems.perpendicularFret))
    return {
      [at(knownItems.bassScaleLength, 'aim')]:
        'Two scales need a perpendicular fret: the one that stays square to the middle line. Add it.',
    };
  const table = fretTable(scales.value);
  if (table.ok) return {};
  return { [at(isMultiscale ? knownItems.perpendicularFret : knownItems.fretCount, 'aim')]: table.message };
}

function checkBand(items: Items): Record<string, string> {
  const [low, high] = [countOf(items, knownItems.tensionLow), countOf(items, knownItems.tensionHigh)];
  if (low === null || high === null || low < high) return {};
  return {
    [at(knownItems.tensionHigh, 'aim')]: 'The band runs from a lower to a higher tension. Give a higher one here.',
  };
}
