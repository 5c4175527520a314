import { composeDigest } from './compose-digest';
import { mailWriters } from './mail-writers';
import type { MailReader } from '@/db/queries/mail-content';
import type { ClaimedMail } from '@/db/queries/outbox';
import { renderMail } from '@/emails/render-mail';
import { env } from '@/lib/env';
import { autoHeaders } from '@/lib/mail/headers';
import type { FrozenMail } from '@/lib/mail/kinds';
import { messageId } from '@/lib/mail/question-headers';

type Composed = Omit<FrozenMail, 'to' | 'about'>;
type Asked = Pick<ClaimedMail, 'id' | 'kind' | 'about'>;

/** A mail's bytes as its reader may have them now; null when there is nothing left to tell them. */
export async function composeMail(mail: Asked, reader: MailReader, nowMs: number): Promise<FrozenMail | null> {
  const composed = await compose(mail, reader, nowMs);
  if (!composed) return null;
  const headers = { ...composed.headers, ...autoHeaders(), 'Message-ID': messageId(mail.id, env().MAIL_FROM) };
  return { ...composed, headers, to: reader.email, about: mail.about };
}

async function compose({ kind, about }: Asked, reader: MailReader, nowMs: number): Promise<Composed | null> {
  if (kind === 'digest') return composeDigest(reader, about, nowMs);
  const told = await mailWriters[kind](about, reader, nowMs);
  if (!told) return null;
  const { subject, element, headers = {}, replyTo } = told;
  return { subject, ...(await renderMail(element)), headers, ...(replyTo ? { replyTo } : {}), photos: [] };
}
