import { finishTones, normaliseHex, type FinishTones, type Theme } from '@/lib/craft/colour';
import { FinishStyleSheet } from './finish-style-sheet';

/** The value of `data-finish` for an element that wears a finish of its own. @throws RangeError when it is not `#rrggbb` */
export function finishKey(finishHex: string): string {
  return `f${normaliseHex(finishHex).slice(1)}`;
}

/** Dresses the whole page in one build's finish, in both themes. `nonce` is that of the page's content security policy. */
export function FinishStyle({ finishHex, nonce }: { finishHex: string; nonce?: string }) {
  return <FinishStyleSheet css={finishRules('html:root', finishHex)} nonce={nonce} />;
}

/** Makes finishes known to a page of many builds; an element wears one by `data-finish={finishKey(finishHex)}`. */
export function FinishStyles({ finishHexes, nonce }: { finishHexes: string[]; nonce?: string }) {
  const distinct = [...new Set(finishHexes.map(normaliseHex))];
  const css = distinct.map((finishHex) => finishRules(`[data-finish=${finishKey(finishHex)}]`, finishHex)).join('');
  return <FinishStyleSheet css={css} nonce={nonce} />;
}

function finishRules(selector: string, finishHex: string): string {
  const rule = (theme: Theme) => `${selector}{${declarations(finishTones(finishHex, theme))}}`;
  return `${rule('light')}@media (prefers-color-scheme:dark){${rule('dark')}}`;
}

function declarations(tones: FinishTones): string {
  return [
    `--finish:${tones.finish}`,
    `--finish-deep:${tones.finishDeep}`,
    `--finish-wash:${tones.finishWash}`,
    `--tint:${tones.tint}`,
    `--on-finish:${tones.onFinish}`,
    `--on-finish-deep:${tones.onFinishDeep}`,
  ].join(';');
}
