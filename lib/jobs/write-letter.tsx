import type { Told, Writer } from './mail-writer';
import { findMailedLetter } from '@/db/queries/mail-content';
import { findShop } from '@/db/queries/shop';
import * as letter from '@/emails/letter';
import * as questionAsked from '@/emails/question-asked';
import { env } from '@/lib/env';
import { threadHeaders } from '@/lib/mail/question-headers';
import { replyAddress } from '@/lib/mail/reply-address';
import { excerpt } from '@/lib/rich-text/excerpt';
import { localDateTimeWords, soundZone } from '@/lib/schedule/digest-times';

const EXCERPT_CHARS = 600;

export const questionUrl = (questionId: string) => `${env().APP_URL}/questions/${questionId}`;

/** What every mail about a question carries, so that answers by mail arrive and its mails stand together. */
export function answerable(questionId: string, userId: string): Pick<Told, 'headers' | 'replyTo'> {
  const replyTo = replyAddress(questionId, userId);
  return { headers: threadHeaders(questionId, env().MAIL_FROM), ...(replyTo === undefined ? {} : { replyTo }) };
}

export const writeQuestion: Writer = async ({ letterId }, reader) => {
  const found = letterId ? await findMailedLetter(reader, letterId) : null;
  if (!found) return null;
  const carried = answerable(found.questionId, reader.id);
  const props = {
    shopName: (await findShop()).name,
    orderNumber: found.orderNumber,
    topic: found.topic,
    askerName: found.writerName,
    url: questionUrl(found.questionId),
    repliesArrive: carried.replyTo !== undefined,
    ...(found.held ? {} : { instrument: found.instrument, excerpt: excerpt(found.text, EXCERPT_CHARS) }),
    ...(found.dueAt === null
      ? {}
      : { dueWords: localDateTimeWords(found.dueAt, soundZone(reader.timeZone), reader.locale) }),
  };
  const element = <questionAsked.QuestionAsked {...props} />;
  return { subject: questionAsked.subject(props), url: props.url, element, ...carried };
};

export const writeLetter: Writer = async ({ letterId }, reader) => {
  const found = letterId ? await findMailedLetter(reader, letterId) : null;
  if (!found) return null;
  const carried = answerable(found.questionId, reader.id);
  const side = found.side === 'shop' ? ('client' as const) : ('shop' as const);
  const props = {
    shopName: (await findShop()).name,
    reader: side,
    authorName: found.writerName,
    topic: found.topic,
    url: questionUrl(found.questionId),
    repliesArrive: carried.replyTo !== undefined,
    ...(found.held && side === 'client' ? {} : { orderNumber: found.orderNumber }),
    ...(found.held ? {} : { instrument: found.instrument, excerpt: excerpt(found.text, EXCERPT_CHARS) }),
  };
  return { subject: letter.subject(props), url: props.url, element: <letter.Letter {...props} />, ...carried };
};
