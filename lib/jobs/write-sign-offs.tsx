import type { Writer } from './mail-writer';
import { findShop } from '@/db/queries/shop';
import { findMailedSignOff } from '@/db/queries/mail-events';
import { nameInLine } from '@/emails/name';
import * as notice from '@/emails/notice';
import { env } from '@/lib/env';
import { excerpt } from '@/lib/rich-text/excerpt';
import { calendarDayWords } from '@/lib/schedule/digest-times';

type Found = NonNullable<Awaited<ReturnType<typeof findMailedSignOff>>>;

const urlOf = ({ orderNumber }: Found, signOffId: string) =>
  `${env().APP_URL}/builds/${orderNumber}/sign-offs/${signOffId}`;
const named = ({ orderNumber, instrument, held }: Found) => (held ? {} : { build: { orderNumber, instrument } });

async function told(props: Omit<notice.NoticeProps, 'shopName'>) {
  const whole = { shopName: (await findShop()).name, ...props };
  return { subject: notice.subject(whole), url: props.url, element: <notice.Notice {...whole} /> };
}

/** Something to sign, to its owner, while it still waits; `title` says what is asked, or held back. */
function writeAsked(title: (found: Found) => string): Writer {
  return async ({ signOffId = '' }, reader) => {
    const found = await findMailedSignOff(reader, signOffId);
    if (!found || found.state !== 'asked') return null;
    return told({
      title: found.held ? 'There is something for you to sign on one of your orders' : title(found),
      ...named(found),
      lines: found.held ? [] : [`Please answer by ${calendarDayWords(found.dueOn, reader.locale)}.`],
      ...(found.held || found.message === '' ? {} : { quoted: excerpt(found.message, 600), waitsOnYou: true }),
      action: 'Read and answer',
      url: found.held ? `${env().APP_URL}/builds` : urlOf(found, signOffId),
      why: 'You get this because only you can sign it.',
    });
  };
}

export const writeSignOff = writeAsked(({ askerName, title }) => `${nameInLine(askerName)} asks you to sign: ${title}`);
export const writeSignOffReminder = writeAsked(({ title }) => `Still waits for you: ${title}`);

export const writeSignOffAnswered: Writer = async ({ signOffId = '' }, reader) => {
  const found = await findMailedSignOff(reader, signOffId);
  if (!found || (found.state !== 'signed' && found.state !== 'change_asked')) return null;
  const answerer = nameInLine(found.answererName ?? 'The owner');
  const what = found.held ? found.orderNumber : found.title;
  return told({
    title: found.state === 'signed' ? `${answerer} signed: ${what}` : `${answerer} asks for a change: ${what}`,
    ...named(found),
    lines: found.held ? ['This order is held from view, so its words are not in this mail.'] : [],
    ...(found.held || !found.answer ? {} : { quoted: excerpt(found.answer, 600) }),
    action: 'See the sign-off',
    url: urlOf(found, signOffId),
    why: 'You get this because you are on this build.',
  });
};
