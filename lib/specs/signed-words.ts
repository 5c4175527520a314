import type { SpecItem } from './document';
import { itemWords, type MaterialNames } from './item-words';
import { lengthWords, type Measure, type ShownUnit } from '@/lib/craft/measure';

/** The form a measure was typed in: what is signed is shown as it was written, whatever the reader's units. */
function ownForm({ text, unit }: Measure): ShownUnit {
  if (unit === 'mm') return 'mm';
  return text.includes('/') ? 'fraction' : 'in';
}

export const measureWords = (measure: Measure) => lengthWords(measure, ownForm(measure));

/** The value of an item as its owner signed it: `27 in`, `Ebony, one piece`. */
export function signedWords(item: SpecItem, materials: MaterialNames): string {
  return itemWords(item, item.kind === 'measure' ? ownForm(item.aim) : 'in', materials);
}
