import { runInNewContext } from 'node:vm';
import EmailReplyParser from 'email-reply-parser';
import { toPlainText } from 'react-email';

/** A reply stands before what it quotes: what lies further down than this is not looked at. */
const READ_CHARS = 20_000;
const HTML_CHARS = 200_000;
/** The libraries can take very long over a text made for them; a real mail takes a few milliseconds. */
const PATIENCE_MS = 250;

/** Quoted parts of the usual mail programs, and what is no text. */
const unread = ['blockquote', '.gmail_quote', '#divRplyFwdMsg', '#appendonsend', 'img', 'style', 'script'];
const selectors = unread.map((selector) => ({ selector, format: 'skip' }));

type Parts = { text: string | null; html: string | null };

function read({ text, html }: Parts): string {
  const plain = text?.trim() ? text : html ? toPlainText(html.slice(0, HTML_CHARS), { selectors }) : '';
  return new EmailReplyParser().read(plain.slice(0, READ_CHARS).replace(/\r\n?/g, '\n')).getVisibleText();
}

/**
 * What the writer of a reply added: quoted text and signature dropped. "" when nothing is left; null when it cannot be told
 * from what it quotes.
 */
export function newTextOf(parts: Parts): string | null {
  try {
    // The time-out stops even a regular expression in its tracks, which nothing else in this thread could.
    const found: unknown = runInNewContext('read(parts)', { read, parts }, { timeout: PATIENCE_MS });
    return typeof found === 'string' ? found.trim() : null;
  } catch {
    return null;
  }
}
