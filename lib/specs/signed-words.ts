import type { SpecItem } from './document';
import { itemWords, type MaterialNames } from './item-words';
import { asTyped, figuresOf } from '@/lib/craft/typed-form';

/** The value of an item as its owner signed it: `27 in`, `4/64 in`, `Ebony, one piece`. */
export function signedWords(item: SpecItem, materials: MaterialNames): string {
  return item.kind === 'measure' ? asTyped(item.aim) : itemWords(item, 'in', materials);
}

/** The same with a length in the other unit system behind it: `27 in (685.8 mm)`. */
export function signedFigures(item: SpecItem, materials: MaterialNames): string {
  return item.kind === 'measure' ? figuresOf(item.aim) : itemWords(item, 'in', materials);
}
