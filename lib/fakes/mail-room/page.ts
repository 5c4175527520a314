import { escapeMarkup } from '../markup';
import type { Answer } from './answer';

const PAGE_POLICY =
  "default-src 'none'; style-src 'self'; frame-src 'self'; base-uri 'none'; form-action 'self'; frame-ancestors 'none'";

const DATE = new Intl.DateTimeFormat('en-GB', { dateStyle: 'long', timeStyle: 'short', timeZone: 'UTC' });

/** An instant in words, with the exact time in the markup. */
export function timeElement(iso: string): string {
  return `<time datetime="${escapeMarkup(iso)}">${escapeMarkup(DATE.format(new Date(iso)))} UTC</time>`;
}

/** Text that came from outside, kept from turning the direction of what stands beside it. */
export function foreign(text: string): string {
  return `<bdi>${escapeMarkup(text)}</bdi>`;
}

/** A whole page; `content` is markup, `title` is text. */
export function pageAnswer(status: number, title: string, content: string): Answer {
  const body = `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="color-scheme" content="light dark">
<title>${escapeMarkup(title)}</title>
<link rel="stylesheet" href="/room.css">
</head>
<body>
${content}
</body>
</html>
`;
  const headers = {
    'content-type': 'text/html; charset=utf-8',
    'content-security-policy': PAGE_POLICY,
    'referrer-policy': 'no-referrer',
  };
  return { status, headers, body };
}
