import { db } from '@/db/client';
import { outbox } from '@/db/schema';
import { writeDueDigests } from '@/lib/jobs/digests';
import { attachPhotos } from '@/lib/jobs/mail-photos';
import { sendDueMail } from '@/lib/jobs/outbox';
import { env } from '@/lib/env';
import type { FrozenMail } from '@/lib/mail/kinds';
import { Resend } from 'resend';

/** A process of its own for `digest-run`: the product's job, or the same mails by the bare SDK, timed from the inside. */

async function timed(work: () => Promise<unknown>): Promise<number> {
  const start = performance.now();
  await work();
  return (performance.now() - start) / 1000;
}

async function runJobs(): Promise<void> {
  await writeDueDigests('bench', Date.now);
  await sendDueMail('bench', Date.now);
}

type Message = { key: string; frozen: FrozenMail; attachments: Awaited<ReturnType<typeof attachPhotos>> };

async function readMessages(): Promise<Message[]> {
  const rows = await db().select({ key: outbox.dedupeKey, frozen: outbox.frozen }).from(outbox);
  const messages: Message[] = [];
  for (const { key, frozen } of rows)
    if (frozen) messages.push({ key, frozen, attachments: await attachPhotos(frozen) });
  return messages;
}

/** As many at once as the product has under way. */
async function sendBare(messages: Message[]): Promise<void> {
  const client = new Resend(env().RESEND_API_KEY, { baseUrl: env().RESEND_BASE_URL });
  const queue = messages.values();
  const lane = async () => {
    for (const { key, frozen, attachments } of queue) {
      const { to, subject, html, text, headers } = frozen;
      const message = { from: env().MAIL_FROM, to, subject, html, text, headers, attachments };
      const { error } = await client.emails.send(message, { idempotencyKey: key });
      if (error) throw new Error(error.message);
    }
  };
  await Promise.all(Array.from({ length: env().MAIL_AT_ONCE }, lane));
}

process.on('message', async ({ word }: { word: string }) => {
  if (word === 'bare') {
    const messages = await readMessages();
    process.send?.({ seconds: await timed(() => sendBare(messages)), mails: messages.length });
  } else process.send?.({ seconds: await timed(runJobs) });
});
process.once('disconnect', () => process.exit(0));
process.send?.('ready');
