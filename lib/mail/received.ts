import { Resend } from 'resend';
import { z } from 'zod';
import { env } from '@/lib/env';
import { readLimited } from '@/lib/mail/limited-body';

const CALL_MS = 15_000;

const attachment = z.object({
  id: z.string().regex(/^[\w-]{1,100}$/),
  size: z.number().catch(0),
  content_type: z.string().catch(''),
  content_disposition: z.string().nullish(),
});

const receivedMail = z.object({
  from: z.string(),
  to: z.array(z.string()),
  text: z.string().nullable().catch(null),
  html: z.string().nullable().catch(null),
  headers: z.record(z.string(), z.string()).nullable().catch(null),
  message_id: z.string().catch(''),
  attachments: z.array(attachment).catch([]),
});

export type ReceivedAttachment = z.output<typeof attachment>;

export type ReceivedMail = Omit<z.output<typeof receivedMail>, 'headers' | 'message_id'> & {
  /** By name in small letters. */
  fields: Record<string, string>;
};

const client = () => new Resend(env().RESEND_API_KEY, { baseUrl: env().RESEND_BASE_URL });
const patience = () => ({ signal: AbortSignal.timeout(CALL_MS) });

/** A mail that came in, as the provider keeps it. @throws Error when the provider does not give it out now */
export async function fetchReceived(emailId: string): Promise<ReceivedMail> {
  const { data, error } = await client().emails.receiving.get(emailId, {}, patience());
  if (error) throw new Error(`the provider did not give out a mail: ${error.name}`);
  const { headers, message_id: messageId, ...mail } = receivedMail.parse(data);
  const fields = Object.fromEntries(Object.entries(headers ?? {}).map(([name, value]) => [name.toLowerCase(), value]));
  return { ...mail, fields: { 'message-id': messageId, ...fields } };
}

/** The provider's own hosts over https; a stand-in's attachments come from the stand-in. */
function isProviders(url: string): boolean {
  if (!URL.canParse(url)) return false;
  const { protocol, origin, username } = new URL(url);
  const standIn = env().RESEND_BASE_URL;
  return username === '' && (standIn === undefined ? protocol === 'https:' : origin === new URL(standIn).origin);
}

/** An attachment's bytes; null when there are more than `limitBytes`. @throws Error when they cannot be had now */
export async function fetchAttachment(emailId: string, id: string, limitBytes: number): Promise<Buffer | null> {
  const { data, error } = await client().emails.receiving.attachments.get({ emailId, id }, patience());
  if (error) throw new Error(`the provider did not give out an attachment: ${error.name}`);
  const { download_url: url } = z.object({ download_url: z.string() }).parse(data);
  if (!isProviders(url)) throw new Error('an attachment lies where the provider keeps none');
  const answer = await fetch(url, { redirect: 'error', ...patience() });
  if (!answer.ok) throw new Error(`an attachment answered ${answer.status}`);
  return readLimited(answer.body, limitBytes);
}
