import { attachMailedPhotos } from './mailed-photos';
import { addLetterByMail, unscopedFindByAddress, unscopedPeopleOn } from '@/db/queries/inbound';
import { isProviderEventKnown, recordProviderEvent } from '@/db/queries/provider-events';
import { takeOne } from '@/db/queries/rate-limits';
import { env } from '@/lib/env';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import { isDisowned, whyAutomatic } from '@/lib/mail/auto-reply';
import { bareAddress } from '@/lib/mail/bare-address';
import { newTextOf } from '@/lib/mail/new-text';
import { fetchReceived, type ReceivedMail } from '@/lib/mail/received';
import { readReplyAddress, type ReplyToken } from '@/lib/mail/reply-address';
import { noteOfText } from '@/lib/mail/reply-note';
import type { ReceivedEvent } from '@/lib/mail/webhook';
import type { Viewer } from '@/lib/viewer';

type Outcome = { outcome: 'letter' | 'ignored' | 'refused'; userId?: string | null; note?: string };

const refused = (note: string, userId: string | null = null): Outcome => ({ outcome: 'refused', note, userId });
const ignored = (note: string, userId: string | null = null): Outcome => ({ outcome: 'ignored', note, userId });

/**
 * Makes a letter of a mail that came in, or writes down why not; told again, it does nothing again.
 * @throws Error when the provider or the store cannot be reached: then the provider tells it again later
 */
export async function takeReply(id: string, { type, data }: ReceivedEvent, nowMs: number): Promise<void> {
  if (await isProviderEventKnown(id)) return;
  const outcome = await read(data, nowMs);
  await recordProviderEvent({ id, kind: type, ...outcome }, nowMs);
}

async function read({ email_id: emailId, to }: ReceivedEvent['data'], nowMs: number): Promise<Outcome> {
  const tokens = to.flatMap((address) => readReplyAddress(bareAddress(address) ?? '') ?? []);
  if (tokens.length === 0) return ignored('It went to no address for answers.');
  const mail = await fetchReceived(emailId);
  const automatic = whyAutomatic(mail.fields, mail.from, env().MAIL_FROM);
  if (automatic) return ignored(`Not taken as an answer: ${automatic}.`);
  const address = bareAddress(mail.from);
  const sender = address === null ? null : await unscopedFindByAddress(address);
  const token = tokens.find(({ isFor }) => sender !== null && isFor(sender.id));
  if (!sender || !token) return refuseStranger(tokens);
  if (isDisowned(mail.fields)) return refused('Its sender’s own mail server did not send it.', sender.id);
  if ((await takeOne('letter', sender.id, nowMs)) > 0)
    return refused('More letters came than are taken at once. Please write again in a few minutes.', sender.id);
  return keep(sender, token, mail, emailId, nowMs);
}

/** Somebody answered from another address, or found the mail: nothing is kept, and the admin sees whose answer it may be. */
async function refuseStranger(tokens: ReplyToken[]): Promise<Outcome> {
  for (const { questionId, isFor } of tokens) {
    const owner = (await unscopedPeopleOn(questionId)).find(isFor);
    if (owner) return refused('It came from another address than the one our mail went to.', owner);
  }
  return refused('The address it went to was not given out by us.');
}

async function keep(
  sender: Viewer,
  { questionId }: ReplyToken,
  mail: ReceivedMail,
  emailId: string,
  nowMs: number,
): Promise<Outcome> {
  const found = newTextOf(mail);
  if (found === null) return refused('Its own words could not be told from what it quotes.', sender.id);
  if (found === '' && mail.attachments.length === 0) return ignored('It says nothing of its own.', sender.id);
  const note = noteOfText(found === '' ? 'A photo, without words.' : found);
  if (!note.ok) return refused(`It could not be kept: ${note.message}`, sender.id);
  try {
    const letter = await addLetterByMail(sender, { questionId, note, emailId }, nowMs);
    const problem = await attachMailedPhotos(sender, { ...letter, emailId, attachments: mail.attachments }, nowMs);
    return { outcome: 'letter', userId: sender.id, ...(problem ? { note: problem } : {}) };
  } catch (error) {
    if (error instanceof OutOfReach) return refused('Its writer can no longer read that question.', sender.id);
    if (error instanceof Denied && error.code !== 'busy') return refused(error.message, sender.id);
    if (error instanceof BadInput) return refused(Object.values(error.fields).join(' '), sender.id);
    throw error;
  }
}
