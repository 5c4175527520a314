import { figure } from './figure';

export type FinishWindow = {
  material: string;
  step: string;
  least: number;
  most: number;
  unit: 'hours' | 'days' | 'coats';
  /** True until the shop has put in the figures of its product's data sheet: what is here has no source. */
  isPlaceholder: boolean;
};

const placeholder = (
  material: string,
  step: string,
  least: number,
  most: number,
  unit: FinishWindow['unit'],
): FinishWindow => ({ material, step, least, most, unit, isPlaceholder: true });

/**
 * Windows to start a shop's own list from. Trade habit without any source: none of these is a published figure, and every row
 * is to be overwritten from the product's data sheet.
 */
export const finishWindows: readonly FinishWindow[] = [
  placeholder('nitrocellulose lacquer', 'recoat between coats', 1, 2, 'hours'),
  placeholder('nitrocellulose lacquer', 'coats in one day', 1, 3, 'coats'),
  placeholder('nitrocellulose lacquer', 'before wet sanding and buffing', 10, 28, 'days'),
  placeholder('polyurethane (2K), clear', 'recoat', 1, 4, 'hours'),
  placeholder('polyurethane (2K), clear', 'before wet sanding and buffing', 1, 7, 'days'),
  placeholder('polyester (2K) base', 'before sanding', 12, 48, 'hours'),
  placeholder('water-borne clear', 'recoat', 1, 3, 'hours'),
  placeholder('water-borne clear', 'before wet sanding and buffing', 5, 21, 'days'),
  placeholder('oil finish', 'recoat', 12, 24, 'hours'),
  placeholder('hide or PVA glue joint', 'before machining across the joint', 12, 24, 'hours'),
  placeholder(
    'lumber brought into the wood room',
    'settling to room EMC before machining, per 25 mm of thickness',
    14,
    60,
    'days',
  ),
  placeholder('neck blank', 'rest between roughing and final machining', 7, 30, 'days'),
];

/** Which materials are put on in coats, and how a can that holds one is labelled; the first that fits counts. */
const coated: readonly [sign: RegExp, material: string][] = [
  [/water/i, 'water-borne clear'],
  [/polyester/i, 'polyester (2K) base'],
  [/polyurethane|\b2k\b|urethane/i, 'polyurethane (2K), clear'],
  [/nitro|lacquer/i, 'nitrocellulose lacquer'],
  [/\boil/i, 'oil finish'],
];

export const coatMaterials = coated.map(([, material]) => material);

/** The material that a product is most likely, by what stands on its can; null where that names none. */
export const materialOf = (product: string) => coated.find(([sign]) => sign.test(product))?.[1] ?? null;

export const windowsOf = (material: string) => finishWindows.filter((window) => window.material === material);

/** "1 to 2 hours" */
export const spanWords = ({ least, most, unit }: FinishWindow) => `${figure(least, 0)} to ${figure(most, 0)} ${unit}`;

/** Said wherever a placeholder is shown. */
export const PLACEHOLDER_SENTENCE = "This is a placeholder. Put in the figures of the product's own data sheet.";

const MS_PER_UNIT = { hours: 3_600_000, days: 86_400_000 };

export type WindowState = { state: 'too_soon' | 'open' | 'past'; opensAtMs: number; closesAtMs: number; words: string };

/**
 * Where a window stands now. It starts at the clock time of the last coat, not at a working day; instants in milliseconds
 * since 1970. Null for a window that counts coats.
 */
export function windowState(window: FinishWindow, lastCoatAtMs: number, nowMs: number): WindowState | null {
  if (window.unit === 'coats') return null;
  const unitMs = MS_PER_UNIT[window.unit];
  const opensAtMs = lastCoatAtMs + window.least * unitMs;
  const closesAtMs = lastCoatAtMs + window.most * unitMs;
  const [untilOpen, untilClosed] = [(opensAtMs - nowMs) / unitMs, (closesAtMs - nowMs) / unitMs];
  if (untilOpen > 0) {
    const words = `Opens in ${amountWords(Math.ceil(untilOpen), window.unit)}.`;
    return { state: 'too_soon', opensAtMs, closesAtMs, words };
  }
  if (untilClosed > 0) {
    const words = `Open for ${amountWords(Math.floor(untilClosed), window.unit)} more.`;
    return { state: 'open', opensAtMs, closesAtMs, words };
  }
  return { state: 'past', opensAtMs, closesAtMs, words: 'The window is past. See the data sheet before going on.' };
}

/** "1 hour", "3 days", "less than 1 hour" */
function amountWords(amount: number, unit: 'hours' | 'days'): string {
  const one = unit.slice(0, -1);
  if (amount < 1) return `less than 1 ${one}`;
  return `${figure(amount, 0)} ${amount === 1 ? one : unit}`;
}
