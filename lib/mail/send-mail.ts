import { Resend } from 'resend';
import { readAnswer, type SendOutcome } from '@/lib/mail/read-answer';
import { requireHeader, requireSubject, UnsafeHeader, type MailHeaders } from '@/lib/mail/headers';

export interface MailAttachment {
  filename: string;
  content: Buffer;
  contentType: string;
  /** Makes the attachment an inline picture, shown by `cid:` and this id. */
  contentId?: string;
}

/** One message to one receiver. `idempotencyKey` holds 1 to 256 characters; the provider remembers it for 24 hours. */
export interface Mail {
  from: string;
  to: string;
  subject: string;
  html: string;
  text: string;
  headers: MailHeaders;
  replyTo?: string;
  attachments?: MailAttachment[];
  idempotencyKey: string;
}

export interface MailConfig {
  apiKey: string;
  /** The provider's address without a final slash; the SDK's own when missing. */
  baseUrl?: string;
}

const clients = new Map<string, Resend>();

// Built at the first mail and not when the module loads: the constructor throws without a key, and a build has none.
function clientFor({ apiKey, baseUrl }: MailConfig): Resend {
  const id = JSON.stringify([apiKey, baseUrl]);
  const client = clients.get(id) ?? new Resend(apiKey, { baseUrl });
  clients.set(id, client);
  return client;
}

function requireOneLineFields(mail: Mail): void {
  requireSubject(mail.subject);
  requireHeader('From', mail.from);
  requireHeader('To', mail.to);
  if (mail.replyTo !== undefined) requireHeader('Reply-To', mail.replyTo);
  for (const [name, value] of Object.entries(mail.headers)) requireHeader(name, value);
  for (const attachment of mail.attachments ?? []) {
    requireHeader('Content-Disposition', attachment.filename);
    requireHeader('Content-Type', attachment.contentType);
    requireHeader('Content-ID', attachment.contentId ?? '');
  }
  if (!/^[!-~]{1,256}$/.test(mail.idempotencyKey)) {
    throw new UnsafeHeader('an idempotency key is 1 to 256 plain characters');
  }
}

/**
 * Sends one mail and says what became of it; never throws for the network or the provider. `retry` with `unknown` means
 * the mail may have been taken: try again only with the same key and the same bytes, and not after 24 hours.
 * @param signalMs how long to wait for the provider, in milliseconds
 * @throws Error when `config.apiKey` is empty and the environment has none
 */
export async function sendMail(mail: Mail, config: MailConfig, signalMs = 10_000): Promise<SendOutcome> {
  const { idempotencyKey, ...message } = mail;
  try {
    requireOneLineFields(mail);
  } catch (error) {
    if (error instanceof UnsafeHeader) return { outcome: 'refused', reason: error.message };
    throw error;
  }
  const signal = AbortSignal.timeout(signalMs);
  return readAnswer(await clientFor(config).emails.send(message, { idempotencyKey, signal }));
}
