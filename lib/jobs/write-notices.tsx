import { answerable, questionUrl } from './write-letter';
import type { Told, Writer } from './mail-writer';
import type { MailReader } from '@/db/queries/mail-content';
import { findShop } from '@/db/queries/shop';
import { findMailedBuild, findMailedHeldEntry, findMailedQuestion, findMailedWindow } from '@/db/queries/mail-events';
import { nameInLine } from '@/emails/name';
import * as notice from '@/emails/notice';
import { env } from '@/lib/env';
import { excerpt } from '@/lib/rich-text/excerpt';
import { calendarDayWords, localDateTimeWords, soundZone } from '@/lib/schedule/digest-times';

type OfBuild = { orderNumber: string; instrument: string; held: number };

/** Which build a mail may name: none while it is held from view. */
const named = ({ orderNumber, instrument, held }: OfBuild) => (held ? {} : { build: { orderNumber, instrument } });
const buildUrl = ({ orderNumber }: OfBuild) => `${env().APP_URL}/builds/${orderNumber}`;
/** "your Nightjar", or words that tell nothing while it is held from view. */
const yours = ({ instrument, held }: OfBuild) => (held ? 'one of your orders' : `your ${nameInLine(instrument)}`);

async function told(props: Omit<notice.NoticeProps, 'shopName'>): Promise<Told> {
  const whole = { shopName: (await findShop()).name, ...props };
  return { subject: notice.subject(whole), url: props.url, element: <notice.Notice {...whole} /> };
}

const dueWords = (dueAt: number | null, { timeZone, locale }: MailReader) =>
  dueAt === null ? [] : [`The answer is due by ${localDateTimeWords(dueAt, soundZone(timeZone), locale)}.`];

export const writeQuestionDue: Writer = async ({ questionId = '' }, reader) => {
  const found = await findMailedQuestion(reader, questionId);
  if (!found) return null;
  const written = await told({
    title: `An answer about ${found.orderNumber} is nearly due: ${found.topic}`,
    ...named(found),
    lines: dueWords(found.dueAt, reader),
    ...(found.held ? {} : { quoted: found.subject, waitsOnYou: true }),
    action: 'Answer the question',
    url: questionUrl(questionId),
    why: 'You get this because you hold the pen: this question waits on you.',
  });
  return { ...written, ...answerable(questionId, reader.id) };
};

export const writeQuestionOverdue: Writer = async ({ questionId = '' }, reader) => {
  const found = await findMailedQuestion(reader, questionId);
  if (!found) return null;
  const isHolder = found.penHolderId === reader.id;
  const holder =
    found.holderName === null ? 'Nobody holds' : isHolder ? 'You hold' : `${nameInLine(found.holderName)} holds`;
  const written = await told({
    title: `An answer about ${found.orderNumber} is overdue: ${found.topic}`,
    ...named(found),
    lines: [`${holder} the pen.`, ...dueWords(found.dueAt, reader).map((line) => line.replace(' is due', ' was due'))],
    ...(found.held ? {} : { quoted: found.subject, waitsOnYou: true }),
    action: 'See the question',
    url: questionUrl(questionId),
    why: isHolder
      ? 'You get this because you hold the pen: this question waits on you.'
      : 'You get this because you are on this build.',
  });
  return { ...written, ...answerable(questionId, reader.id) };
};

export const writeHeldEntry: Writer = async ({ entryIds: [entryId = ''] = [] }, reader) => {
  const found = await findMailedHeldEntry(reader, entryId);
  if (!found) return null;
  return told({
    title: `A page of ${found.orderNumber} waits for your release`,
    ...named(found),
    lines: [
      found.held ? 'It was written at the bench.' : `${nameInLine(found.author)} wrote it. Stage: ${found.stage}.`,
    ],
    ...(found.held || found.text === '' ? {} : { quoted: excerpt(found.text, 320), waitsOnYou: true }),
    action: 'Read and release it',
    url: buildUrl(found),
    why: 'You get this because pages of this build wait for a rep before the owner reads them.',
  });
};

export const writeQuietBuild: Writer = async ({ buildId = '' }, reader) => {
  const found = await findMailedBuild(reader, buildId);
  if (!found) return null;
  return told({
    title: `${found.orderNumber} has gone quiet`,
    ...named(found),
    lines: ['Its owner has seen nothing new for longer than its stage usually takes to show something.'],
    action: 'Open the diary',
    url: buildUrl(found),
    why: 'You get this because the build is yours to tell of.',
  });
};

export const writeReady: Writer = async ({ buildId = '' }, reader) => {
  const found = await findMailedBuild(reader, buildId);
  if (found?.readyAt == null) return null;
  return told({
    title: found.held ? 'There is something new on one of your orders' : `${asTitle(yours(found))} is ready`,
    ...named(found),
    lines: found.held ? [] : ['It has passed its last check. We will tell you again when it is on its way.'],
    action: 'Open the diary',
    url: found.held ? `${env().APP_URL}/builds` : buildUrl(found),
    why: 'You get this because the order is yours.',
  });
};

export const writeShipped: Writer = async ({ buildId = '' }, reader) => {
  const found = await findMailedBuild(reader, buildId);
  if (found?.shippedAt == null) return null;
  const carrier = found.shippedBy ? [`It travels with ${found.shippedBy}.`] : [];
  return told({
    title: found.held ? 'There is something new on one of your orders' : `${asTitle(yours(found))} is on its way`,
    ...named(found),
    lines: found.held
      ? []
      : [...carrier, 'Let the closed case come to the temperature of the room before you open it.'],
    action: 'Open the diary',
    url: found.held ? `${env().APP_URL}/builds` : buildUrl(found),
    why: 'You get this because the order is yours.',
  });
};

export const writeWindowMoved: Writer = async ({ buildId = '', givenOn = '' }, reader) => {
  const found = await findMailedWindow(reader, buildId, givenOn);
  if (!found || found.held || found.kind !== 'window' || !found.earliestOn || !found.latestOn) return null;
  const [from, to] = [
    calendarDayWords(found.earliestOn, reader.locale),
    calendarDayWords(found.latestOn, reader.locale),
  ];
  return told({
    title: `The ready window of ${yours(found)} has moved`,
    ...named(found),
    lines: [`It is now between ${from} and ${to}.`, ...(found.movedWhy ? [found.movedWhy] : [])],
    action: 'Open the diary',
    url: buildUrl(found),
    why: 'You get this because the order is yours.',
  });
};

const asTitle = (words: string) => words.charAt(0).toUpperCase() + words.slice(1);
