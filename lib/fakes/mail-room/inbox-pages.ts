import type { Answer } from './answer';
import { receivers, type Mail } from './mailbox';
import { foreign, pageAnswer, timeElement } from './page';

interface Inbox {
  address: string;
  count: number;
  latestAt: string;
}

/** The inboxes that mails (newest first) make up, the one with the latest mail first. */
function gatherInboxes(mails: readonly Mail[]): Inbox[] {
  const inboxes = new Map<string, Inbox>();
  for (const mail of mails) {
    for (const address of receivers(mail)) {
      const inbox = inboxes.get(address);
      if (inbox === undefined) inboxes.set(address, { address, count: 1, latestAt: mail.createdAt });
      else inbox.count += 1;
    }
  }
  return [...inboxes.values()];
}

function inboxRow({ address, count, latestAt }: Inbox): string {
  const link = `<a href="/inbox?to=${encodeURIComponent(address)}">${foreign(address)}</a>`;
  return `<tr><td>${link}</td><td class="count">${count}</td><td>${timeElement(latestAt)}</td></tr>`;
}

function inboxTable(inboxes: readonly Inbox[]): string {
  if (inboxes.length === 0) return '<p>No mail yet. As soon as the shop sends one, its address is listed here.</p>';
  return `<table>
<thead><tr><th scope="col">Address</th><th scope="col" class="count">Mails</th><th scope="col">Latest</th></tr></thead>
<tbody>${inboxes.map(inboxRow).join('\n')}</tbody>
</table>`;
}

/** The addresses that have mail, with counts. */
export function frontPage(mails: readonly Mail[]): Answer {
  return pageAnswer(
    200,
    'Mail room',
    `<main>
<h1>Mail room</h1>
<p class="soft">The mail this machine would have sent. It stays here; nobody else receives it.</p>
${inboxTable(gatherInboxes(mails))}
</main>`,
  );
}

function mailItem({ id, subject, from, createdAt, attachments }: Mail): string {
  const enclosed = attachments.length === 0 ? '' : ` · ${attachments.length} attached`;
  const title = subject === '' ? '(no subject)' : subject;
  return `<li><a href="/mail/${id}">${foreign(title)}</a> ${timeElement(createdAt)}
<span class="soft">from ${foreign(from)}${enclosed}</span></li>`;
}

/** The mails of one address, newest first. */
export function inboxPage(address: string, mails: readonly Mail[]): Answer {
  const list = `<ul class="mails">${mails.map(mailItem).join('\n')}</ul>`;
  return pageAnswer(
    200,
    `${address} · Mail room`,
    `<nav aria-label="Mail room"><a href="/">All addresses</a></nav>
<main>
<h1>${foreign(address)}</h1>
${mails.length === 0 ? '<p>No mail for this address.</p>' : list}
</main>`,
  );
}

export function notFoundPage(): Answer {
  return pageAnswer(
    404,
    'Not found · Mail room',
    `<nav aria-label="Mail room"><a href="/">All addresses</a></nav>
<main><h1>Not found</h1><p>The mail room has no such page or mail. It may have been emptied.</p></main>`,
  );
}
