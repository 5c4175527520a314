import { NOTE_LIMITS } from './limits';

const OPENING = /^(?:https?:\/\/[^/\\]|mailto:[^/\\])/i;
const MAIL_ADDRESS = /^mailto:([a-z0-9.!#$&'*+/=_{|}~-]+@[a-z0-9](?:[a-z0-9.-]*[a-z0-9])?)$/i;

/**
 * The normalised address of a link, or null when it leads anywhere but a web page or one mail address. The opening is
 * matched before `new URL` sees it, because the URL parser drops leading blanks, inner line breaks and missing slashes.
 * Mail links keep the address only: headers after `?` could fill in recipients or attachments.
 */
export function safeHref(raw: unknown): string | null {
  if (typeof raw !== 'string' || raw.length > NOTE_LIMITS.hrefLength) return null;
  if (!OPENING.test(raw) || /\p{Cc}/u.test(raw) || !URL.canParse(raw)) return null;
  const url = new URL(raw);
  if (url.protocol === 'mailto:') return MAIL_ADDRESS.test(withoutHeaders(url)) ? withoutHeaders(url) : null;
  const leadsToThePage = url.hostname !== '' && url.username === '' && url.password === '';
  return leadsToThePage && url.href.length <= NOTE_LIMITS.hrefLength ? url.href : null;
}

function withoutHeaders(url: URL): string {
  return url.protocol + url.pathname;
}

/** What somebody typed into the link field as an address: `example.com` and `ann@example.com` are understood too. */
export function typedHref(typed: string): string | null {
  const text = typed.trim();
  if (safeHref(text)) return safeHref(text);
  const host = /^([^\s/?#@:]+\.[^\s/?#@:]+)(?:[/?#:]|$)/.test(text);
  return safeHref(host ? `https://${text}` : `mailto:${text}`);
}

/**
 * Where a link leads, to be shown in brackets behind its words; null when the words begin with it already, or when it
 * stays on this site. Words that merely hold the host somewhere are not enough: `bank.example/evil.test` names two.
 * @param href a result of safeHref
 */
export function shownHost(href: string, words: string, appUrlHost?: string): string | null {
  const url = new URL(href);
  const target = url.protocol === 'mailto:' ? url.pathname : url.host;
  if (target === appUrlHost) return null;
  const start = words
    .trim()
    .toLowerCase()
    .replace(/^(?:https?:\/\/|mailto:)/, '');
  const named = start.startsWith(target.toLowerCase()) && /^(?:[/?#\s]|$)/.test(start.slice(target.length));
  return named ? null : target;
}
