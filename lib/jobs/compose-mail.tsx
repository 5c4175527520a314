import { composeDigest } from './compose-digest';
import { findMailedLetter, findShop, isLinkLive, type MailReader } from '@/db/queries/mail-content';
import type { ClaimedMail } from '@/db/queries/outbox';
import * as invitation from '@/emails/invitation';
import * as letter from '@/emails/letter';
import * as questionAsked from '@/emails/question-asked';
import { renderMail } from '@/emails/render-mail';
import * as signIn from '@/emails/sign-in';
import { env } from '@/lib/env';
import { autoHeaders } from '@/lib/mail/headers';
import type { FrozenMail } from '@/lib/mail/kinds';
import { excerpt } from '@/lib/rich-text/excerpt';

type Written = Omit<FrozenMail, 'to' | 'about'>;

/** A mail's bytes as its reader may have them now; null when there is nothing left to tell them. */
export async function composeMail(mail: ClaimedMail, reader: MailReader, nowMs: number): Promise<FrozenMail | null> {
  const written = await write(mail, reader, nowMs);
  return written && { ...written, to: reader.email, about: mail.about };
}

function write(mail: ClaimedMail, reader: MailReader, nowMs: number): Promise<Written | null> {
  if (mail.kind === 'sign_in') return writeSignIn(mail, nowMs);
  if (mail.kind === 'invitation') return writeInvitation(reader);
  if (mail.kind === 'digest') return composeDigest(reader, mail.about.entryIds ?? []);
  return writeLetter(mail, reader);
}

const plain = { headers: autoHeaders(), photos: [] };

async function writeSignIn({ about }: ClaimedMail, nowMs: number): Promise<Written | null> {
  if (!about.signIn || !(await isLinkLive(about.signIn.linkId, nowMs))) return null;
  const { token, code } = about.signIn;
  const link = `${env().APP_URL}/sign-in/open#${token}`;
  const props = { shopName: (await findShop()).name, link, code, minutes: 10 };
  return { ...plain, subject: signIn.subject(props), ...(await renderMail(<signIn.SignIn {...props} />)) };
}

const roleWords = {
  buyer: 'somebody we build for',
  artist: 'an artist we build for',
  builder: 'a builder',
  rep: 'a rep',
  admin: 'an admin',
} as const;

async function writeInvitation(reader: MailReader): Promise<Written> {
  const shop = await findShop();
  const link = `${env().APP_URL}/sign-in?address=${encodeURIComponent(reader.email)}`;
  const props = {
    name: reader.name,
    shopName: shop.name,
    roleWords: roleWords[reader.role],
    inviterName: shop.name,
    link,
  };
  return { ...plain, subject: invitation.subject(props), ...(await renderMail(<invitation.Invitation {...props} />)) };
}

async function writeLetter({ kind, about }: ClaimedMail, reader: MailReader): Promise<Written | null> {
  const found = about.letterId ? await findMailedLetter(reader, about.letterId) : null;
  if (!found) return null;
  const shopName = (await findShop()).name;
  const url = `${env().APP_URL}/questions/${found.questionId}`;
  const open = found.held ? {} : { instrument: found.instrument, excerpt: excerpt(found.text, 600) };
  if (kind === 'question') {
    const props = {
      shopName,
      orderNumber: found.orderNumber,
      topic: found.topic,
      askerName: found.writerName,
      url,
      ...open,
    };
    return {
      ...plain,
      subject: questionAsked.subject(props),
      ...(await renderMail(<questionAsked.QuestionAsked {...props} />)),
    };
  }
  const side = found.side === 'shop' ? ('client' as const) : ('shop' as const);
  const order = found.held && side === 'client' ? {} : { orderNumber: found.orderNumber };
  const props = { shopName, reader: side, authorName: found.writerName, topic: found.topic, url, ...order, ...open };
  return { ...plain, subject: letter.subject(props), ...(await renderMail(<letter.Letter {...props} />)) };
}
