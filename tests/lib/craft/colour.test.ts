import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { contrastRatio, finishTones, grounds, oklchToHex, relativeLuminance, type Theme } from '@/lib/craft/colour';
import { readReference } from '../../support/reference';

const themes: Theme[] = ['light', 'dark'];
/** The house finish, worn by pages that belong to no build. */
const HOUSE_FINISH = '#007a84';
const css = readFileSync('app/globals.css', 'utf8');

function expectReadable(finishHex: string, theme: Theme) {
  const tones = finishTones(finishHex, theme);
  const film = oklchToHex(grounds[theme].film);
  const sheet = oklchToHex(grounds[theme].sheet);
  const pairs = [
    [tones.finishDeep, film],
    [tones.finishDeep, sheet],
    [tones.finishDeep, tones.tint],
    [tones.finishDeep, tones.finishWash],
    [tones.onFinishDeep, tones.finishDeep],
    [tones.onFinish, tones.finish],
  ] as const;
  for (const [text, ground] of pairs) expect(contrastRatio(text, ground)).toBeGreaterThanOrEqual(4.5);
}

// Source: W3C, WCAG 2.2, "contrast ratio" and "relative luminance"; rows marked seen are printed there or in its techniques.
describe('contrast as WCAG 2.2 defines it', () => {
  test.each(readReference('12e_wcag_contrast'))('$foreground on $background is $published_ratio_2dp to 1', (row) => {
    const ratio = contrastRatio(row.foreground ?? '', row.background ?? '');
    expect(Math.abs(ratio - Number(row.expected_ratio))).toBeLessThanOrEqual(Number(row.tolerance));
    expect(ratio >= 4.5).toBe(row.passes_AA_text_4_5 === 'yes');
  });

  test.each(readReference('12f_relative_luminance'))('$srgb_hex has luminance $expected_luminance', (row) => {
    const error = Math.abs(relativeLuminance(row.srgb_hex ?? '') - Number(row.expected_luminance));
    expect(error).toBeLessThanOrEqual(Number(row.tolerance));
  });
});

describe('the tones of a finish', () => {
  test.each(themes)('text and buttons keep 4.5 to 1 for any finish in the %s theme', (theme) => {
    const channel = fc.integer({ min: 0, max: 255 });
    const hexColour = fc
      .tuple(channel, channel, channel)
      .map((rgb) => `#${rgb.map((value) => value.toString(16).padStart(2, '0')).join('')}`);
    fc.assert(
      fc.property(hexColour, (finishHex) => expectReadable(finishHex, theme)),
      { numRuns: 1000 },
    );
  });

  test.each(['#ffffff', '#000000', '#ffff00', '#777777', '#00ff00', '#ff00ff', '#757575', '#767676'])(
    '%s keeps 4.5 to 1 in both themes',
    (finishHex) => themes.forEach((theme) => expectReadable(finishHex, theme)),
  );

  test('the finish itself is shown as it was given', () => {
    expect(finishTones('#8C1D2B', 'dark').finish).toBe('#8c1d2b');
  });

  test.each(['', 'teal', '#fff', '8c1d2b', '#8c1d2bff', '#8c1d2g', '#8c1d2b;}'])(
    '%j is refused as a finish',
    (finishHex) => {
      expect(() => finishTones(finishHex, 'light')).toThrow(RangeError);
    },
  );
});

describe('the stylesheet', () => {
  const blocks = {
    light: css.split('@media (prefers-color-scheme: dark)')[0],
    dark: css.split('@media (prefers-color-scheme: dark)')[1],
  };

  /** A token's colour in a theme; the dark theme keeps what it does not name. */
  function tokenHex(theme: Theme, name: string): string {
    const pattern = new RegExp(`--${name}: oklch\\(([\\d.]+) ([\\d.]+) ([\\d.]+)\\);`);
    const [, l, c, h] = pattern.exec(blocks[theme] ?? '') ?? pattern.exec(css) ?? [];
    return oklchToHex({ l: Number(l), c: Number(c), h: Number(h) });
  }

  test.each(themes)('has the %s grounds the tones are proven against', (theme) => {
    for (const [name, { l, c, h }] of Object.entries(grounds[theme])) {
      expect(blocks[theme]).toContain(`--${name}: oklch(${l} ${c} ${h});`);
    }
  });

  test.each(
    themes.flatMap((theme) =>
      [
        ['ink', 'film'],
        ['ink', 'sheet'],
        ['ink', 'brass-wash'],
        ['ink', 'late-wash'],
        ['ink', 'line'],
        ['soft', 'film'],
        ['soft', 'sheet'],
        ['brass-deep', 'film'],
        ['brass-deep', 'sheet'],
        ['late', 'film'],
        ['late', 'sheet'],
        ['on-late', 'late'],
        ['on-night', 'night'],
        ['on-night-soft', 'night'],
        ['night-accent', 'night'],
      ].map(([text = '', ground = '']) => ({ theme, text, ground })),
    ),
  )('keeps 4.5 to 1 for $text on $ground in the $theme theme', ({ theme, text, ground }) => {
    expect(contrastRatio(tokenHex(theme, text), tokenHex(theme, ground))).toBeGreaterThanOrEqual(4.5);
  });

  test.each(themes)('starts with the house tones in the %s theme', (theme) => {
    const tones = finishTones(HOUSE_FINISH, theme);
    expect(blocks[theme]).toContain(`--finish: ${tones.finish};`);
    expect(blocks[theme]).toContain(`--finish-deep: ${tones.finishDeep};`);
    expect(blocks[theme]).toContain(`--finish-wash: ${tones.finishWash};`);
    expect(blocks[theme]).toContain(`--tint: ${tones.tint};`);
    expect(blocks[theme]).toContain(`--on-finish: ${tones.onFinish};`);
    expect(blocks[theme]).toContain(`--on-finish-deep: ${tones.onFinishDeep};`);
  });
});
