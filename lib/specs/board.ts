import { valueOf } from '../craft/fractions';
import type { FingerboardPlan } from '../craft/fingerboard';
import type { ScalePlan } from '../craft/fret-table';
import type { Inlay } from '../craft/inlays';
import { inUnit, readMeasure } from '../craft/measure';
import type { TensionBand } from '../craft/string-balance';
import { readStringSet, type StringPlan } from '../craft/strings';
import { isLengthUnit } from '../craft/units';
import type { SpecDocument, SpecItem } from './document';
import { knownItems, quantityOf } from './known-items';

type Found<T> = { ok: true; value: T } | { ok: false; message: string };
type Items = ReadonlyMap<string, SpecItem>;

const DEFAULT_STRINGS = 6;

const itemsOf = ({ items }: SpecDocument): Items => new Map(items.map((item) => [item.key, item]));

/** The scales and frets a document describes. Refused with a sentence that names what is missing or cannot be read. */
export function scalePlanOf(document: SpecDocument): Found<ScalePlan> {
  const items = itemsOf(document);
  const treble = lengthMm(items, knownItems.scaleLength);
  const frets = count(items, knownItems.fretCount);
  if (treble === null) return missing('a scale length');
  if (frets === null) return missing('the number of frets');
  return {
    ok: true,
    value: {
      trebleScaleMm: treble,
      bassScaleMm: lengthMm(items, knownItems.bassScaleLength) ?? treble,
      perpendicularFret: count(items, knownItems.perpendicularFret) ?? 0,
      fretCount: frets,
    },
  };
}

/** The fingerboard a document describes, as it is drawn. Refused with a sentence, as `scalePlanOf` is. */
export function boardOf(document: SpecDocument): Found<FingerboardPlan> {
  const scales = scalePlanOf(document);
  if (!scales.ok) return scales;
  const items = itemsOf(document);
  const nutWidthMm = lengthMm(items, knownItems.nutWidth);
  const lastFretWidthMm = lengthMm(items, knownItems.lastFretWidth);
  if (nutWidthMm === null) return missing('a nut width');
  if (lastFretWidthMm === null) return missing('the width at the last fret');
  const stringCount = count(items, knownItems.stringCount) ?? DEFAULT_STRINGS;
  const inlay = inlayFrom(wordsOf(items.get(knownItems.inlay)));
  return { ok: true, value: { ...scales.value, stringCount, nutWidthMm, lastFretWidthMm, inlay } };
}

function wordsOf(item: SpecItem | undefined): string {
  if (item?.kind === 'choice') return item.value;
  return item?.kind === 'look' ? item.words : '';
}

/** The words of an inlay as one of those that can be drawn; drawings of the player's own are drawn as dots. */
function inlayFrom(words: string): Inlay {
  if (/block/i.test(words)) return 'blocks';
  if (/dots?.*(bass|upper) side/i.test(words)) return 'bass-side dots';
  return words.trim() === '' || /none|no inlay|plain/i.test(words) ? 'none' : 'dots';
}

/** The set of strings a document describes. Refused with a sentence, as `readStringSet` is. */
export function stringPlanOf(document: SpecDocument): Found<StringPlan> {
  const items = itemsOf(document);
  const [tuning, gauges] = [items.get(knownItems.tuning), items.get(knownItems.gauges)];
  const treble = lengthMm(items, knownItems.scaleLength);
  if (tuning?.kind !== 'choice' || gauges?.kind !== 'choice') return missing('a tuning and gauges');
  if (treble === null) return missing('a scale length');
  const set = readStringSet(tuning.value, gauges.value);
  if (!set.ok) return set;
  const bass = lengthMm(items, knownItems.bassScaleLength) ?? treble;
  return { ok: true, value: { strings: set.strings, trebleScaleMm: treble, bassScaleMm: bass } };
}

/** The tension the player chose for every string, or null. */
export function tensionBandOf(document: SpecDocument): TensionBand | null {
  const items = itemsOf(document);
  const [low, high] = [number(items, knownItems.tensionLow), number(items, knownItems.tensionHigh)];
  return low !== null && high !== null && low < high ? { lowLb: low, highLb: high } : null;
}

/** Everything above in one text: equal texts need nothing computed anew. */
export function computedFrom(document: SpecDocument): string {
  const keys = new Set<string>(Object.values(knownItems));
  return document.items
    .filter(({ key }) => keys.has(key))
    .map((item) => {
      if (item.kind === 'measure') return `${item.key} ${item.aim.text} ${item.aim.unit}`;
      return `${item.key} ${item.kind === 'choice' ? item.value : item.words}`;
    })
    .join('\n');
}

function read(items: Items, key: string) {
  const item = items.get(key);
  if (item?.kind !== 'measure') return null;
  const found = readMeasure(item.aim.text, item.aim.unit, quantityOf(key));
  return found.ok ? found : null;
}

function lengthMm(items: Items, key: string): number | null {
  const found = read(items, key);
  return found && isLengthUnit(found.unit) ? valueOf(inUnit(found.exact, found.unit, 'mm')) : null;
}

const number = (items: Items, key: string) => read(items, key)?.value ?? null;

function count(items: Items, key: string): number | null {
  const found = number(items, key);
  return found !== null && Number.isInteger(found) ? found : null;
}

function missing(what: string): { ok: false; message: string } {
  return { ok: false, message: `The spec does not give ${what} yet, or not one that can be read.` };
}
