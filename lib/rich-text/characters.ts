const INVISIBLE_ORDERS = /(?![\n\t])\p{Cc}|[\u2028\u2029\u202a-\u202e\u2066-\u2069]|[\u{e0000}-\u{e007f}]/gu;
const LONE_SURROGATE = /\p{Cs}/gu;
const VISIBLE = /[^\p{White_Space}\p{Default_Ignorable_Code_Point}\p{Cc}\u2800]/u;

/**
 * Text without the characters that give orders instead of being read: C0 and C1 controls (line feed and tab stay),
 * line and paragraph separators, bidi embeddings and isolates, tag characters. Lone surrogates become U+FFFD, because
 * no UTF-8 file can hold them; first of all, because halves that close up when something between them goes could form a
 * tag character. The result is NFC.
 */
export function cleanText(text: string): string {
  return text.replace(LONE_SURROGATE, '\ufffd').replace(/\r\n?/g, '\n').replace(INVISIBLE_ORDERS, '').normalize('NFC');
}

/**
 * True when at least one character leaves ink; spaces, zero-width characters and blank fillers do not. Characters newer
 * than this machine's Unicode tables count as ink.
 */
export function hasVisibleText(text: string): boolean {
  return VISIBLE.test(text);
}
