import type { Told, Writer } from './mail-writer';
import { findMailedChange } from '@/db/queries/mail-events';
import { findShop } from '@/db/queries/shop';
import { nameInLine } from '@/emails/name';
import * as notice from '@/emails/notice';
import { env } from '@/lib/env';
import { excerpt } from '@/lib/rich-text/excerpt';

type Found = NonNullable<Awaited<ReturnType<typeof findMailedChange>>>;

const urlOf = ({ orderNumber }: Found) => `${env().APP_URL}/builds/${orderNumber}/spec/changes`;
const named = ({ orderNumber, instrument, held }: Found) => (held ? {} : { build: { orderNumber, instrument } });

async function told(props: Omit<notice.NoticeProps, 'shopName'>): Promise<Told> {
  const whole = { shopName: (await findShop()).name, ...props };
  return { subject: notice.subject(whole), url: props.url, element: <notice.Notice {...whole} /> };
}

/** To the reps, while the wish waits for what the shop says to it. */
export const writeChangeAsked: Writer = async ({ changeId = '' }, reader) => {
  const found = await findMailedChange(reader, changeId);
  if (found?.state !== 'asked') return null;
  const what = found.held ? found.orderNumber : found.label;
  return told({
    title: `${nameInLine(found.askerName)} asks to change what is frozen: ${what}`,
    ...named(found),
    lines: [
      found.held
        ? 'This order is held from view, so its words are not in this mail.'
        : 'Say what it costs and how many days it takes, or why it cannot be done.',
    ],
    ...(found.held ? {} : { quoted: excerpt(found.wish, 600), waitsOnYou: true }),
    action: 'Answer it',
    url: urlOf(found),
    why: 'You get this because you are on this build: the owner waits for the shop’s answer.',
  });
};

/** To the owner who asked. What the shop offers instead comes as something to sign. */
export const writeChangeDeclined: Writer = async ({ changeId = '' }, reader) => {
  const found = await findMailedChange(reader, changeId);
  if (found?.state !== 'declined') return null;
  return told({
    title: found.held ? 'There is something new on one of your orders' : `A change we cannot make: ${found.label}`,
    ...named(found),
    lines: [],
    ...(found.held || !found.answer ? {} : { quoted: excerpt(found.answer, 600) }),
    action: 'See your changes',
    url: found.held ? `${env().APP_URL}/builds` : urlOf(found),
    why: 'You get this because you asked for the change.',
  });
};
