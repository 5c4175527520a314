import type { ShownUnit } from '../craft/measure';
import { isSame } from './canonical';
import type { SpecDocument, SpecGroup, SpecItem } from './document';
import { drawingWords, type Drawing } from './drawings';
import { groupName } from './groups';
import { allowedWords, itemWords, type MaterialNames } from './item-words';

/** One thing said differently about an item; null where it was not said. */
export type FieldChange = { name: string; before: string | null; after: string | null };

export type SpecChange = {
  key: string;
  group: SpecGroup;
  label: string;
  kind: 'added' | 'removed' | 'changed';
  fields: FieldChange[];
};

export type DiffWords = {
  show: ShownUnit;
  materials: MaterialNames;
  stageNames: Readonly<Record<string, string>>;
  /** Those that the reader may open. */
  drawings: readonly Drawing[];
};

/** What the second version says differently from the first, item by item in its order; another order is no change. */
export function diffSpecs(before: SpecDocument, after: SpecDocument, words: DiffWords): SpecChange[] {
  const earlier = new Map(before.items.map((item) => [item.key, item]));
  const later = new Set(after.items.map(({ key }) => key));
  const changes = after.items.flatMap((item) => changeOf(earlier.get(item.key), item, words) ?? []);
  const removed = before.items.flatMap((item) => (later.has(item.key) ? [] : (changeOf(item, undefined, words) ?? [])));
  return [...changes, ...removed];
}

function changeOf(before: SpecItem | undefined, after: SpecItem | undefined, words: DiffWords): SpecChange | null {
  const item = after ?? before;
  if (!item || isSame(before, after)) return null;
  const { key, group, label } = item;
  const kind = before && after ? 'changed' : after ? 'added' : 'removed';
  const [one, other] = [fieldsOf(before, words), fieldsOf(after, words)];
  const fields = fieldNames
    .map((name) => ({ name, before: one[name] ?? null, after: other[name] ?? null }))
    .filter(({ name, before: was, after: is }) => was !== is || (name === 'drawing' && isOtherDrawing(before, after)));
  return { key, group, label, kind, fields };
}

const fieldNames = [
  'value',
  'tolerance',
  'colour',
  'drawing',
  'choices',
  'name',
  'group',
  'frozen from',
  'proven at',
] as const;
type Fields = Partial<Record<(typeof fieldNames)[number], string | null>>;

function fieldsOf(item: SpecItem | undefined, { show, materials, stageNames, drawings }: DiffWords): Fields {
  if (!item) return {};
  const stage = (key: string | null) => (key === null ? null : (stageNames[key] ?? key));
  return {
    value: exactWords(item, show, materials),
    tolerance: item.kind === 'measure' ? allowedWords(item) : null,
    colour: colourWords(item),
    drawing: drawingWords(item, drawings),
    choices: item.kind === 'choice' && item.options.length > 0 ? item.options.join(', ') : null,
    name: item.label,
    group: groupName(item.group),
    'frozen from': stage(item.frozenFrom),
    'proven at': stage(item.provenAt),
  };
}

/** Two drawings that the reader may not open are called alike, and differ all the same. */
const isOtherDrawing = (before: SpecItem | undefined, after: SpecItem | undefined) =>
  drawingIdOf(before) !== drawingIdOf(after);

const drawingIdOf = (item: SpecItem | undefined) => (item?.kind === 'look' ? item.documentId : null);

/** As typed as well, where two different measures would read alike in the reader's unit. */
function exactWords(item: SpecItem, show: ShownUnit, materials: MaterialNames): string {
  const words = itemWords(item, show, materials);
  if (item.kind !== 'measure') return words;
  const typed = `${item.aim.text} ${item.aim.unit}`;
  return words === typed || words.startsWith(item.aim.text) ? words : `${words} (${typed})`;
}

function colourWords(item: SpecItem): string | null {
  if (item.kind !== 'look' || !item.colour) return null;
  const { l, a, b, illuminant, limitDeltaE } = item.colour;
  return `L ${l}, a ${a}, b ${b} (${illuminant}), ΔE up to ${limitDeltaE}`;
}
