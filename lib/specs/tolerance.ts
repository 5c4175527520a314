import type { Tolerance } from './document';

/** As it was typed: `0.005`, or `+0.010 -0.005` where the sides differ. */
export function toleranceText({ plus, minus }: Tolerance): string {
  return plus === minus ? plus : `+${plus} -${minus}`;
}

/** What was typed in one field as the two sides of a document; nothing typed means no tolerance. */
export function toleranceFrom(text: string): Tolerance | null {
  if (text.trim() === '') return null;
  const [, plus, minus] = /^\s*\+\s*([^+\s-]+(?:\s[^+-]+?)?)\s*[-−]\s*([^+\s-][^+-]*)$/.exec(text) ?? [];
  return plus && minus ? { plus, minus } : { plus: text, minus: text };
}
