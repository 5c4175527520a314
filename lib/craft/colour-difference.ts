import {
  differenceCiede2000,
  modeLab,
  modeLab65,
  modeLrgb,
  modeRgb,
  modeXyz50,
  modeXyz65,
  useMode as registerMode,
} from 'culori/fn';
import { normaliseHex } from './colour';
import { ask, wrong, type Doubt } from './doubt';
import { figure } from './figure';

[modeRgb, modeLrgb, modeXyz65, modeXyz50].forEach((mode) => registerMode(mode));
const toLabD65 = registerMode(modeLab65);
const toLabD50 = registerMode(modeLab);
const ciede2000 = differenceCiede2000();

export type Illuminant = 'D50' | 'D65';

/** A colour in CIE L*a*b*; the white point is part of it. */
export type LabColour = { l: number; a: number; b: number; illuminant: Illuminant };

/** CIEDE2000 is made for small differences; above this its figure only says "far off". */
const SMALL_DIFFERENCE = 5;

/** Wider than any surface colour reaches in a or b. */
const MOST_A_OR_B = 150;

/** The illuminants differ, so the figures cannot be compared. */
export class MixedIlluminants extends RangeError {
  constructor(first: LabColour, second: LabColour) {
    super(`One colour is for ${first.illuminant}, the other for ${second.illuminant}. Read both under the same one.`);
  }
}

function requireComparable(first: LabColour, second: LabColour): void {
  for (const colour of [first, second]) {
    const [doubt] = doubtLab(colour).filter(({ kind }) => kind === 'wrong');
    if (doubt) throw new RangeError(doubt.sentence);
  }
  if (first.illuminant !== second.illuminant) throw new MixedIlluminants(first, second);
}

/**
 * CIEDE2000 colour difference, the same in either order; parametric factors 1. Sharma, Wu & Dalal, Color Research and
 * Application 30 (2005) 21-30. No metric: two small steps may measure more or less than the whole.
 * @throws MixedIlluminants when the white points differ
 * @throws RangeError when a colour is not one
 */
export function deltaE2000(first: LabColour, second: LabColour): number {
  requireComparable(first, second);
  return ciede2000(forFormula(first), forFormula(second));
}

/** The formula knows no white point: both colours are named alike, so that no conversion comes between. */
const forFormula = ({ l, a, b }: LabColour) => ({ mode: 'lab65' as const, l, a, b });

/** CIE76: the plain distance in L*a*b*; ISO/CIE 11664-4. @throws as `deltaE2000` */
export function deltaE76(first: LabColour, second: LabColour): number {
  requireComparable(first, second);
  return Math.hypot(first.l - second.l, first.a - second.a, first.b - second.b);
}

/**
 * An sRGB colour in L*a*b* (IEC 61966-2-1; for D50 adapted by Bradford, as CSS Color 4 `lab()` is).
 * @throws RangeError when hex is not `#rrggbb`; one with alpha is none
 */
export function labFromHex(hex: string, illuminant: Illuminant): LabColour {
  const colour = normaliseHex(hex);
  const lab = illuminant === 'D65' ? toLabD65(colour) : toLabD50(colour);
  if (!lab) throw new RangeError(`"${hex}" is no colour.`);
  return { l: lab.l, a: lab.a, b: lab.b, illuminant };
}

/** What is odd about a colour as read from an instrument. */
export function doubtLab({ l, a, b }: LabColour): Doubt[] {
  if (![l, a, b].every(Number.isFinite)) return [wrong('Write L, a and b as numbers, as the instrument shows them.')];
  if (l < 0 || l > 100) return [wrong(`L runs from 0 (black) to 100 (white); ${figure(l, 2)} cannot be meant.`)];
  if (Math.abs(a) > MOST_A_OR_B || Math.abs(b) > MOST_A_OR_B) {
    return [wrong(`a and b stay within -${MOST_A_OR_B} and ${MOST_A_OR_B}. Check the figures.`)];
  }
  if (l > 0 && l <= 1)
    return [ask(`L ${figure(l, 3)} is nearly black. If the instrument shows 0 to 1, multiply by 100.`)];
  return [];
}

export type ColourVerdict = { deltaE: number; isWithin: boolean; words: string };

/**
 * How far a reading is from the approved sample, against the largest CIEDE2000 difference allowed.
 * @throws as `deltaE2000`; RangeError when the limit is not above 0
 */
export function colourVerdict(approved: LabColour, reading: LabColour, limitDeltaE: number): ColourVerdict {
  if (!(limitDeltaE > 0 && Number.isFinite(limitDeltaE))) {
    throw new RangeError(`A colour limit is above 0; got ${limitDeltaE}.`);
  }
  const deltaE = deltaE2000(approved, reading);
  const isWithin = deltaE <= limitDeltaE;
  const figures = `ΔE ${deltaE.toFixed(1)}, limit ${limitDeltaE.toFixed(1)}`;
  const close = !isWithin && deltaE.toFixed(1) === limitDeltaE.toFixed(1) ? ` (${deltaE.toFixed(3)})` : '';
  const far = deltaE > SMALL_DIFFERENCE ? '; too far apart for a fine figure' : '';
  return { deltaE, isWithin, words: `${figures}${isWithin ? '' : `, over the limit${close}`}${far}` };
}

/** Said beside a colour that was taken from a photograph. */
export const PHOTO_COLOUR_SENTENCE = 'A photograph is a hint, not a measurement: take the reading with an instrument.';
