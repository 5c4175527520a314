import { cleanText, hasVisibleText } from './characters';

const CODE_POINTS_PER_GRAPHEME = 16;

const segmenter = new Intl.Segmenter('en', { granularity: 'grapheme' });

/**
 * A name or a subject on one line: cleaned as cleanText does, every run of spaces or breaks one space, at most
 * `maxGraphemes` characters as a reader counts them. A grapheme keeps 16 code points, enough for a family emoji and too
 * few for a tower of accents over the lines above. Text nobody could see gives ''.
 */
export function cleanLine(text: string, maxGraphemes: number): string {
  const line = cleanText(text.replace(/[\u2028\u2029]/g, ' '))
    .replace(/\s+/g, ' ')
    .trim();
  let kept = '';
  let count = 0;
  for (const { segment } of segmenter.segment(line)) {
    if (count === maxGraphemes) break;
    kept += [...segment].slice(0, CODE_POINTS_PER_GRAPHEME).join('');
    count += 1;
  }
  return hasVisibleText(kept) ? kept.trim() : '';
}
