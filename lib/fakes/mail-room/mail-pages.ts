import { escapeMarkup } from '../markup';
import type { Answer } from './answer';
import { attachmentSize_bytes, type Attachment } from './attachment';
import { receivers, type Mail } from './mailbox';
import { foreign, pageAnswer, timeElement } from './page';

/** A mail's links open outside of the frame; nothing else in it can do anything. */
const SANDBOX = 'allow-popups allow-popups-to-escape-sandbox allow-top-navigation-by-user-activation';

const PART_POLICY = [
  "default-src 'none'",
  'img-src data:',
  "style-src 'unsafe-inline'",
  "base-uri 'none'",
  "form-action 'none'",
  "frame-ancestors 'self'",
  `sandbox ${SANDBOX}`,
].join('; ');

function terms(pairs: readonly (readonly [name: string, value: string])[]): string {
  const rows = pairs.map(([name, value]) => `<dt>${escapeMarkup(name)}</dt><dd>${value}</dd>`);
  return `<dl>${rows.join('\n')}</dl>`;
}

function envelope(mail: Mail): string {
  const lists = [
    ['To', mail.to],
    ['Copy', mail.cc],
    ['Blind copy', mail.bcc],
    ['Reply to', mail.replyTo],
  ] as const;
  return terms([
    ['From', foreign(mail.from)],
    ...lists.filter(([, list]) => list.length > 0).map(([name, list]) => [name, list.map(foreign).join(', ')] as const),
    ['Sent', timeElement(mail.createdAt)],
  ]);
}

function headerSection({ headers, idempotencyKey, tags }: Mail): string {
  const pairs = [
    ...Object.entries(headers),
    ...(idempotencyKey === null ? [] : [['Idempotency key', idempotencyKey] as const]),
    ...tags.map(({ name, value }) => [`Tag ${name}`, value] as const),
  ].map(([name, value]) => [name, foreign(value)] as const);
  if (pairs.length === 0) return '';
  return `<h2 id="headers">Headers</h2>\n${terms(pairs)}`;
}

function attachmentSection({ id, attachments }: Mail): string {
  if (attachments.length === 0) return '';
  const items = attachments.map((attachment, index) => {
    const kind = `${escapeMarkup(attachment.contentType)}, ${attachmentSize_bytes(attachment)} bytes`;
    return `<li><a href="/mail/${id}/attachments/${index}">${foreign(attachment.filename)}</a> <span class="soft">${kind}</span></li>`;
  });
  return `<h2 id="attachments">Attachments</h2>\n<ul class="mails">${items.join('\n')}</ul>`;
}

/** Plain text with its web addresses made into links. */
function linkedText(text: string): string {
  const parts = text.split(/(https?:\/\/[^\s<>"]*[^\s<>".,;:!?)\]'])/);
  return parts
    .map((part, index) => {
      const escaped = escapeMarkup(part);
      return index % 2 === 0 ? escaped : `<a href="${escaped}" target="_blank" rel="noopener">${escaped}</a>`;
    })
    .join('');
}

function parts({ id, html, text }: Mail): string {
  const frame = `<h2>HTML part</h2>\n<iframe title="HTML part of the mail" sandbox="${SANDBOX}" src="/mail/${id}/html"></iframe>`;
  const plain = `<h2>Text part</h2>\n<pre>${linkedText(text ?? '')}</pre>`;
  return `${html ? frame : ''}\n${text ? plain : ''}`;
}

/** One mail: envelope, HTML part in a sandbox, text part, headers, attachments, and what its reader can do with it. */
export function mailPage(mail: Mail, forms: string): Answer {
  const inboxes = receivers(mail).map(
    (address) => `<a href="/inbox?to=${encodeURIComponent(address)}">${foreign(address)}</a>`,
  );
  const title = mail.subject === '' ? '(no subject)' : mail.subject;
  return pageAnswer(
    200,
    `${title} · Mail room`,
    `<nav aria-label="Mail room"><a href="/">All addresses</a>${inboxes.join('')}</nav>
<main>
<h1>${foreign(title)}</h1>
${envelope(mail)}
${parts(mail)}
${attachmentSection(mail)}
${forms}
${headerSection(mail)}
</main>`,
  );
}

/** Makes every link of a document open in a tab of its own; the frame could not hold the page behind it. */
function withLinksInNewTabs(html: string): string {
  const base = '<base target="_blank">';
  const opening = /<head(?:\s[^>]*)?>/i.exec(html) ?? /<html(?:\s[^>]*)?>/i.exec(html) ?? /<!doctype[^>]*>/i.exec(html);
  const at = opening === null ? 0 : opening.index + opening[0].length;
  return html.slice(0, at) + base + html.slice(at);
}

/** The HTML part alone, as the sandboxed frame shows it: no scripts, no forms, nothing from the network. */
export function htmlPart(mail: Mail): Answer {
  const headers = {
    'content-type': 'text/html; charset=utf-8',
    'content-security-policy': PART_POLICY,
    'referrer-policy': 'no-referrer',
  };
  return { status: 200, headers, body: withLinksInNewTabs(mail.html ?? '') };
}

/** An attachment, always as a download. */
export function attachmentAnswer({ filename, contentType, contentBase64 }: Attachment): Answer {
  const headers = {
    'content-type': contentType,
    'content-disposition': `attachment; filename*=UTF-8''${encodeURIComponent(filename).replace(/['()*]/g, '_')}`,
    'content-security-policy': "default-src 'none'; sandbox",
  };
  return { status: 200, headers, body: Buffer.from(contentBase64, 'base64') };
}
