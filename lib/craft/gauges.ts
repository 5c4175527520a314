import type { Construction } from './string-weights';

/** A string's thickness in thou (thousandths of an inch) and how it is made. */
export type Gauge = { gaugeThou: number; construction: Construction; isAssumed: boolean };

const LIGHTEST_THOU = 5;
const HEAVIEST_THOU = 200;

/** Up to here a bare number is taken as plain, from there on as wound; between them both are common, so one asks. */
const PLAIN_UP_TO_THOU = 20;
const WOUND_FROM_THOU = 24;

/**
 * Reads `.010`, `0.010`, `10`, `9.5`, and `20p` or `46w` for plain or wound. `isAssumed` when the construction was not typed.
 * Refused with a sentence when it is no gauge, or when plain and wound are both common at this thickness.
 */
export function readGauge(text: string): { ok: true; gauge: Gauge } | { ok: false; message: string } {
  const plain = text.trim();
  const [, digits = '', construction = ''] =
    /^(\d{0,3}(?:[.,]\d{1,4})?)\s*(?:thou|in|")?\s*(p|plain|w|wound)?$/i.exec(plain) ?? [];
  if (!/\d/.test(digits)) {
    return refused(`"${plain.slice(0, 12)}" is not a string gauge. Write .010, 10, 10p or 46w.`);
  }
  const number = Number(digits.replace(',', '.'));
  const gaugeThou = Math.round((number < 1 ? number * 1000 : number) * 10) / 10;
  if (gaugeThou < LIGHTEST_THOU || gaugeThou > HEAVIEST_THOU) {
    return refused(`A gauge of ${plain} cannot be meant: it lies between .005 and .200. Write .010 or 10.`);
  }
  const made = typedConstruction(construction) ?? usualConstruction(gaugeThou);
  if (!made) return refused(`${gaugeWords(gaugeThou)} comes plain and wound. Write ${gaugeThou}p or ${gaugeThou}w.`);
  return { ok: true, gauge: { gaugeThou, construction: made, isAssumed: construction === '' } };
}

/** Reads gauges parted by spaces, commas or dashes, in the order they stand. */
export function readGauges(text: string): { ok: true; gauges: Gauge[] } | { ok: false; message: string } {
  const words = text.split(/[\s;]+|,\s+|(?<=\d),(?=\d{2})|[-–]/).filter((word) => word !== '');
  if (words.length === 0) return refused('Write the gauges, such as 10 13 17 26 36 46.');
  const gauges: Gauge[] = [];
  for (const word of words) {
    const read = readGauge(word);
    if (!read.ok) return read;
    gauges.push(read.gauge);
  }
  return { ok: true, gauges };
}

/** `.010`, `.0095`: a gauge in inches as it stands on a packet. */
export function gaugeWords(gaugeThou: number): string {
  const decimals = Number.isInteger(gaugeThou) ? 3 : 4;
  return (gaugeThou / 1000).toFixed(decimals).replace(/^0/, '');
}

function typedConstruction(typed: string): Construction | null {
  if (typed === '') return null;
  return typed.toLowerCase().startsWith('p') ? 'plain' : 'wound';
}

function usualConstruction(gaugeThou: number): Construction | null {
  if (gaugeThou <= PLAIN_UP_TO_THOU) return 'plain';
  return gaugeThou >= WOUND_FROM_THOU ? 'wound' : null;
}

function refused(message: string): { ok: false; message: string } {
  return { ok: false, message };
}
