import { jsonAnswer, type Answer } from './answer';
import { frontPage, inboxPage, notFoundPage } from './inbox-pages';
import { listedMail } from './listing';
import { attachmentAnswer, htmlPart, mailPage } from './mail-pages';
import type { Mailbox } from './mailbox';
import { readerForms } from './reader-forms';
import { STYLE } from './style';

function readMail(mailbox: Mailbox, path: string, isHeard: boolean): Answer {
  const [, id = '', part, index] =
    /^\/mail\/([0-9a-f-]{36})(?:\/(html|attachments)(?:\/(\d{1,3}))?)?$/.exec(path) ?? [];
  const mail = mailbox.find(id);
  if (mail === undefined) return notFoundPage();
  if (part === undefined) return mailPage(mail, isHeard ? readerForms(mail) : '');
  if (part === 'html') return htmlPart(mail);
  const attachment = mail.attachments[Number(index)];
  return attachment === undefined ? notFoundPage() : attachmentAnswer(attachment);
}

/** Answers every GET: the pages for people and the list for tests. `isHeard`: somebody listens to what readers do. */
export function answerReading(mailbox: Mailbox, { pathname, searchParams }: URL, isHeard: boolean): Answer {
  const to = searchParams.get('to') ?? undefined;
  if (pathname === '/mails') return jsonAnswer(200, mailbox.mails(to).map(listedMail));
  if (pathname === '/') return frontPage(mailbox.mails());
  if (pathname === '/inbox' && to !== undefined) return inboxPage(to, mailbox.mails(to));
  if (pathname === '/room.css')
    return { status: 200, headers: { 'content-type': 'text/css; charset=utf-8' }, body: STYLE };
  return readMail(mailbox, pathname, isHeard);
}
