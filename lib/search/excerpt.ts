export type Piece = { text: string; isHit: boolean };

const ASCII = /^[\x20-\x7e]*$/;

const fold = (text: string) =>
  ASCII.test(text) ? text.toLowerCase() : text.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase();

/** A word without the endings that the index leaves off too (Porter); near enough to mark what it found. */
function stem(word: string): string {
  const bare = word.replace(/(?<=.{3})(?:ings?|ed|es|s)$/, '');
  return bare.replace(/(?<=.{3})e$/, '').replace(/([^aeiouls])\1$/, '$1');
}

type Token = { from: number; to: number; word: string };

/** The words of a text that begin as one of those wanted, with their place. */
function tokensLike(text: string, wanted: readonly string[]): Token[] {
  const beginnings = new Set(wanted.map((word) => fold(word).slice(0, 2)));
  const found: Token[] = [];
  for (const match of text.matchAll(/[\p{L}\p{N}\p{M}\p{Co}]+/gu)) {
    const word = fold(match[0]);
    if (beginnings.has(word.slice(0, 2))) found.push({ from: match.index, to: match.index + match[0].length, word });
  }
  return found;
}

/**
 * The part of a text around the first words found, at most about `maxChars` long, in pieces: what was looked for, and
 * what stands between.
 */
export function markedExcerpt(text: string, words: readonly string[], maxChars: number): Piece[] {
  const line = text.replace(/\s+/g, ' ').trim();
  const wanted = new Set(words.map((word) => stem(fold(word))));
  const found = tokensLike(line, words);
  const whole = found.filter(({ word }) => wanted.has(stem(word)));
  const last = words.at(-1);
  // Nothing whole: it was found by the beginning of its last word.
  const hits = whole.length > 0 || last === undefined ? whole : found.filter(({ word }) => word.startsWith(fold(last)));
  const from = wordStart(line, Math.max(0, (hits[0]?.from ?? 0) - Math.floor(maxChars / 3)));
  const to = wordEnd(line, from + maxChars);
  const shown = hits.filter((hit) => hit.from >= from && hit.to <= to);
  return pieces(line, from, to, shown);
}

function wordStart(line: string, at: number): number {
  return at === 0 ? 0 : Math.max(0, line.indexOf(' ', at) + 1);
}

function wordEnd(line: string, at: number): number {
  if (at >= line.length) return line.length;
  const space = line.lastIndexOf(' ', at);
  return space > at / 2 ? space : at;
}

function pieces(line: string, from: number, to: number, hits: { from: number; to: number }[]): Piece[] {
  const found: Piece[] = from > 0 ? [{ text: '… ', isHit: false }] : [];
  let at = from;
  for (const hit of hits) {
    found.push({ text: line.slice(at, hit.from), isHit: false }, { text: line.slice(hit.from, hit.to), isHit: true });
    at = hit.to;
  }
  found.push({ text: line.slice(at, to) + (to < line.length ? ' …' : ''), isHit: false });
  return found.filter(({ text }) => text !== '');
}
