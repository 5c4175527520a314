import { randomUUID } from 'node:crypto';
import type { IncomingMessage } from 'node:http';
import { BodyTooLarge, readSmallBody } from '../body';
import type { Answer } from './answer';
import { bareAddress } from './address';
import type { Mail, Mailbox } from './mailbox';
import { outcomePage } from './outcome-page';
import { Refusal } from './refusal';
import type { ReceivedFile, ReceivedMails } from './received';
import { sendWebhook, type WebhookTarget } from './webhooks';

const FORM_LIMIT_BYTES = 30 * 1_024 * 1_024;
const BOUNCE = { type: 'Permanent', subType: 'General', message: 'No such mailbox.' };

/** What a mail's reader does with it here: answers it, or has it come back. */
export interface ReaderDesk {
  mailbox: Mailbox;
  received: ReceivedMails;
  webhook: WebhookTarget | undefined;
  now: () => number;
}

/** A form of this room's own pages; a page of somebody else's may not send one. */
async function readForm(request: IncomingMessage): Promise<FormData> {
  const { origin, host, 'content-type': type = '' } = request.headers;
  if (origin !== undefined && origin !== `http://${host}`)
    throw new Refusal('validation_error', 'Not a form of this room.');
  try {
    const body = new Uint8Array(await readSmallBody(request, FORM_LIMIT_BYTES));
    return await new Response(body, { headers: { 'content-type': type } }).formData();
  } catch (error) {
    const tooLarge = error instanceof BodyTooLarge;
    throw new Refusal('validation_error', tooLarge ? 'The form is too large.' : 'Send a form.');
  }
}

function field(form: FormData, name: string): string {
  const value = form.get(name);
  return typeof value === 'string' ? value : '';
}

/** The answer with the mail quoted below it, as mail programs write it. */
function quoting(text: string, { from, text: original, createdAt }: Mail): string {
  const quoted = (original ?? '').split('\n').map((line) => `> ${line}`);
  return `${text}\n\nOn ${new Date(createdAt).toUTCString()}, ${from} wrote:\n\n${quoted.join('\n')}\n`;
}

async function filesOf(form: FormData): Promise<ReceivedFile[]> {
  const files = form.getAll('photo').filter((file): file is File => file instanceof File && file.size > 0);
  return Promise.all(
    files.map(async (file) => ({
      id: randomUUID(),
      filename: file.name,
      contentType: file.type,
      bytes: Buffer.from(await file.arrayBuffer()),
    })),
  );
}

async function reply(desk: ReaderDesk, target: WebhookTarget, mail: Mail, form: FormData): Promise<number> {
  const from = field(form, 'from') || (mail.to[0] ?? '');
  if (bareAddress(from) === undefined) throw new Refusal('validation_error', 'A reply needs a sender.');
  const createdAt = new Date(desk.now()).toISOString();
  const headers: Record<string, string> =
    field(form, 'automatic') === 'yes' ? { 'Auto-Submitted': 'auto-replied' } : {};
  const { id, to, subject, files, messageId } = desk.received.add({
    from,
    to: mail.replyTo,
    subject: `Re: ${mail.subject}`,
    text: quoting(field(form, 'text'), mail),
    headers: { 'In-Reply-To': mail.headers['Message-ID'] ?? '', ...headers },
    createdAt,
    files: await filesOf(form),
  });
  const attachments = files.map(({ id: fileId, filename, contentType }) => ({
    id: fileId,
    filename,
    content_type: contentType,
  }));
  const data = {
    email_id: id,
    from,
    to,
    cc: [],
    bcc: [],
    subject,
    message_id: messageId,
    created_at: createdAt,
    attachments,
  };
  return sendWebhook(target, { type: 'email.received', created_at: createdAt, data }, desk.now());
}

function tell(desk: ReaderDesk, target: WebhookTarget, mail: Mail, form: FormData): Promise<number> {
  const happened = field(form, 'happened');
  if (!/^(?:delivered|bounced|complained)$/.test(happened))
    throw new Refusal('validation_error', 'Nothing that happens.');
  const { id, from, to, subject, createdAt } = mail;
  const bounce = happened === 'bounced' ? { bounce: BOUNCE } : {};
  const data = {
    email_id: id,
    message_id: mail.headers['Message-ID'] ?? '',
    from,
    to,
    subject,
    created_at: createdAt,
    ...bounce,
  };
  const event = { type: `email.${happened}`, created_at: new Date(desk.now()).toISOString(), data };
  return sendWebhook(target, event, desk.now());
}

/** Answers `POST /mail/:id/reply` and `POST /mail/:id/events`, the two forms of a mail's page. */
export async function answerReader(desk: ReaderDesk, request: IncomingMessage, path: string): Promise<Answer> {
  const [, , mailId = '', act] = path.split('/');
  const mail = desk.mailbox.find(mailId);
  if (!mail || !desk.webhook) throw new Refusal('not_found', 'There is no such mail, or nobody to tell of it.');
  const form = await readForm(request);
  const isReply = act === 'reply';
  if (isReply && mail.replyTo.length === 0) throw new Refusal('validation_error', 'This mail takes no answers.');
  const status = isReply ? await reply(desk, desk.webhook, mail, form) : await tell(desk, desk.webhook, mail, form);
  return outcomePage(mail, status);
}
