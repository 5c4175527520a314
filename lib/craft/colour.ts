import {
  clampChroma,
  formatHex,
  modeLrgb,
  modeOklch,
  modeRgb,
  useMode as registerMode,
  wcagLuminance,
  type Oklch,
} from 'culori/fn';

registerMode(modeRgb);
registerMode(modeLrgb);
const toOklch = registerMode(modeOklch);

export type Theme = 'light' | 'dark';

export type FinishTones = {
  /** The finish itself, as given. */
  finish: string;
  /** Links, headings of now and button grounds: at least 4.5:1 on film, sheet, tint and wash. */
  finishDeep: string;
  /** Bands and tracks. */
  finishWash: string;
  /** Quiet grounds: initials, a place to tap. */
  tint: string;
  /** Text or marks on `finish`, at least 4.5:1. */
  onFinish: string;
  /** Text on `finishDeep`, at least 4.5:1. */
  onFinishDeep: string;
};

/** Text contrast of WCAG 2.2, 1.4.3 (AA). */
const TEXT_CONTRAST = 4.5;

const HEX_COLOUR = /^#[0-9a-f]{6}$/i;

/** Page ground and raised sheet of each theme; app/globals.css holds the same values. */
export const grounds = {
  light: { film: { l: 0.968, c: 0.006, h: 195 }, sheet: { l: 0.995, c: 0.002, h: 195 } },
  dark: { film: { l: 0.185, c: 0.008, h: 65 }, sheet: { l: 0.232, c: 0.009, h: 65 } },
} as const;

/** How far each tone may go: lightness to aim at and the most chroma it keeps, by theme. */
const recipes = {
  light: { deep: { l: 0.36, c: 0.12 }, wash: { l: 0.83, c: 0.055 }, tint: { l: 0.945, c: 0.02 }, step: -0.01 },
  dark: { deep: { l: 0.8, c: 0.11 }, wash: { l: 0.42, c: 0.05 }, tint: { l: 0.31, c: 0.03 }, step: 0.01 },
} as const;

/** Lower-case `#rrggbb`. @throws RangeError when the text is not a six-digit hex colour */
export function normaliseHex(hex: string): string {
  if (!HEX_COLOUR.test(hex))
    throw new RangeError(`A colour is written as # and six hex digits, such as #1b8a8f; got "${hex}".`);
  return hex.toLowerCase();
}

/** Relative luminance, 0 (black) to 1 (white). WCAG 2.2, definition "relative luminance". @throws RangeError on a bad hex */
export function relativeLuminance(hex: string): number {
  return wcagLuminance(normaliseHex(hex));
}

/** Contrast ratio, 1 to 21, in either order. WCAG 2.2, definition "contrast ratio". @throws RangeError on a bad hex */
export function contrastRatio(a: string, b: string): number {
  const [one, other] = [relativeLuminance(a), relativeLuminance(b)];
  return (Math.max(one, other) + 0.05) / (Math.min(one, other) + 0.05);
}

/** An OKLCH colour as the nearest sRGB hex of the same lightness and hue. */
export function oklchToHex(colour: { l: number; c: number; h: number }): string {
  return formatHex(clampChroma({ mode: 'oklch', ...colour }, 'oklch'));
}

/**
 * The tones a diary wears, as `#rrggbb`, from the colour of its finish, derived in OKLCH. Any finish is allowed, white, black and yellow
 * included: text tones move in lightness until they are readable.
 * @throws RangeError when finishHex is not `#rrggbb`
 */
export function finishTones(finishHex: string, theme: Theme): FinishTones {
  const finish = normaliseHex(finishHex);
  const { c, h } = chromaAndHue(toOklch(finish));
  const { deep, wash, tint } = recipes[theme];
  const tone = (aim: { l: number; c: number }, share: number) =>
    oklchToHex({ l: aim.l, c: Math.min(c * share, aim.c), h });
  const finishWash = tone(wash, 0.5);
  const tintHex = tone(tint, 0.2);
  const { film, sheet } = grounds[theme];
  const finishDeep = readableTone(
    { l: deep.l, c: Math.min(c, deep.c), h },
    [oklchToHex(film), oklchToHex(sheet), tintHex, finishWash],
    recipes[theme].step,
  );
  return {
    finish,
    finishDeep,
    finishWash,
    tint: tintHex,
    onFinish: readableOn(finish),
    onFinishDeep: readableOn(finishDeep),
  };
}

/** A grey has no hue; any will do, as it has no chroma either. */
function chromaAndHue(colour: Oklch | undefined): { c: number; h: number } {
  return { c: colour?.c ?? 0, h: colour?.h ?? 0 };
}

/** Steps the lightness towards the end of the scale until the tone is readable on every ground. */
function readableTone(aim: { l: number; c: number; h: number }, on: string[], step: number): string {
  for (let l = aim.l; l >= 0 && l <= 1; l += step) {
    const hex = oklchToHex({ ...aim, l });
    if (on.every((ground) => contrastRatio(hex, ground) >= TEXT_CONTRAST)) return hex;
  }
  return step < 0 ? '#000000' : '#ffffff';
}

/** Soft white or ink where they are readable; pure white or black for the few mid greys where only those are. */
function readableOn(ground: string): string {
  const candidates = ['#fcfefe', '#131f23', '#ffffff', '#000000'];
  const [best = '#000000'] = candidates
    .filter((hex) => contrastRatio(hex, ground) >= TEXT_CONTRAST)
    .concat(candidates.slice(2).sort((a, b) => contrastRatio(b, ground) - contrastRatio(a, ground)));
  return best;
}
