import type { SpecDocument, SpecItem } from './document';
import { knownItems } from './known-items';

type Order = {
  /** As ordered, in inches; null where the order does not say. */
  scaleLengthIn: number | null;
  stageKeys: ReadonlySet<string>;
};

/** A template as the first draft of one order: its scale, and no stage that the order's route does not have. */
export function fitTemplate({ items }: SpecDocument, { scaleLengthIn, stageKeys }: Order): SpecDocument {
  const known = (key: string | null) => (key !== null && stageKeys.has(key) ? key : null);
  return {
    items: items.map((item): SpecItem => {
      const placed = { ...item, frozenFrom: known(item.frozenFrom), provenAt: known(item.provenAt) };
      if (placed.kind !== 'measure' || placed.key !== knownItems.scaleLength || scaleLengthIn === null) return placed;
      return { ...placed, aim: { text: String(scaleLengthIn), unit: 'in' } };
    }),
  };
}
