import { readMeasure, readTolerance } from '../craft/measure';
import type { LookItem, MaterialItem, MeasureItem, SpecDocument, SpecItem } from './document';
import { quantityOf } from './known-items';
import { checkTogether } from './check-together';
import { toleranceText } from './tolerance';

/** What exists beside the document: stages of the build's route and the shop's materials by key, the build's drawings by id. */
export type SpecSurroundings = {
  stageKeys: ReadonlySet<string>;
  materialKeys: ReadonlySet<string>;
  drawingIds: ReadonlySet<string>;
};

export const MOST_ITEMS = 200;

/** A sentence for each field of one item that cannot stay as it is, by the field's name. */
export function checkItem(item: SpecItem, around: SpecSurroundings): Record<string, string> {
  const sentences: Record<string, string> = {};
  if (item.label.trim() === '') sentences.label = 'Give this item a name.';
  for (const field of ['frozenFrom', 'provenAt'] as const) {
    const key = item[field];
    if (key !== null && !around.stageKeys.has(key))
      sentences[field] = 'That stage is not on this build’s route. Choose one from the list.';
  }
  return { ...sentences, ...checkContent(item, around) };
}

/**
 * A sentence for each field that cannot stay as it is, at `items.<key>.<field>`; `form` for the whole. Empty when the document
 * can be sent.
 */
export function checkDocument(document: SpecDocument, around: SpecSurroundings): Record<string, string> {
  const { items } = document;
  if (items.length === 0) return { form: 'There is nothing in it yet. Add at least one item.' };
  if (items.length > MOST_ITEMS) return { form: `A spec holds at most ${MOST_ITEMS} items. Take some out.` };
  const sentences: Record<string, string> = {};
  const seen = new Set<string>();
  for (const item of items) {
    if (seen.has(item.key))
      sentences[`items.${item.key}.label`] = 'Another item has this key. Take one of the two out.';
    seen.add(item.key);
    for (const [field, sentence] of Object.entries(checkItem(item, around)))
      sentences[`items.${item.key}.${field}`] ??= sentence;
  }
  return { ...checkTogether(document), ...sentences };
}

function checkContent(item: SpecItem, around: SpecSurroundings): Record<string, string> {
  if (item.kind === 'measure') return checkMeasure(item);
  if (item.kind === 'material') return checkMaterial(item, around);
  if (item.kind === 'look') return checkLook(item, around);
  if (item.value.trim() === '') return { value: 'Say what it is to be, or take the item out.' };
  if (item.options.length > 0 && !item.options.includes(item.value))
    return { value: `“${item.value}” is not among its choices. Choose one from the list.` };
  return {};
}

function checkMeasure({ key, aim, tolerance }: MeasureItem): Record<string, string> {
  const read = readMeasure(aim.text, aim.unit, quantityOf(key));
  if (!read.ok && !isZeroOfSigned(aim)) return { aim: read.message };
  if (!tolerance) return {};
  const allowed = readTolerance(toleranceText(tolerance), aim);
  return allowed.ok ? {} : { tolerance: allowed.message };
}

/** An intonation of 0 cents or an angle of 0 is a value like any other. */
const isZeroOfSigned = ({ text, unit }: MeasureItem['aim']) =>
  (unit === 'cents' || unit === 'deg') && /^\s*0+(\.0+)?\s*$/.test(text);

function checkMaterial({ materialKey, words }: MaterialItem, around: SpecSurroundings): Record<string, string> {
  if (materialKey !== null && !around.materialKeys.has(materialKey))
    return { materialKey: 'That material is not on the shop’s list. Choose one from it, or write it in words.' };
  if (materialKey === null && words.trim() === '')
    return { words: 'Choose a material from the list, or write what it is.' };
  return {};
}

function checkLook({ words, documentId, colour }: LookItem, around: SpecSurroundings): Record<string, string> {
  const sentences: Record<string, string> = {};
  if (documentId !== null && !around.drawingIds.has(documentId))
    sentences.drawing = 'That drawing is not among those sent up for this build. Choose one from the list, or none.';
  if (words.trim() === '') sentences.words = 'Say what it is to look like, such as “your sample 2”.';
  if (!colour) return sentences;
  const { l, a, b, limitDeltaE } = colour;
  if (!(l >= 0 && l <= 100) || ![a, b].every((value) => value >= -128 && value <= 128))
    sentences.colour = 'That is no colour: L runs from 0 to 100, a and b from -128 to 128.';
  else if (!(limitDeltaE > 0 && limitDeltaE <= 20))
    sentences.colour = 'The largest difference lies above 0 and up to 20 ΔE; 2 is a common one.';
  return sentences;
}
