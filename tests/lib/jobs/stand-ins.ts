import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll } from 'vitest';
import { z } from 'zod';
import { writeDueDigests } from '@/lib/jobs/digests';
import { sendDueMail } from '@/lib/jobs/outbox';
import { startMailRoom } from '@/lib/fakes/mail-room/server';
import { startObjectStore } from '@/lib/fakes/object-store/server';
import { openTestDatabase, testEnv } from '../../support/database';
import { openShop } from '../../support/world';

const listedMails = z.array(
  z.object({
    to: z.array(z.string()),
    subject: z.string(),
    html: z.string(),
    text: z.string(),
    headers: z.record(z.string(), z.string()),
    attachments: z.array(z.object({ filename: z.string(), contentId: z.string().nullish(), sizeBytes: z.number() })),
    idempotencyKey: z.string().nullable(),
  }),
);

/** A clock that a test moves by hand, in milliseconds since 1970. */
export const clock = { nowMs: 0, now: () => clock.nowMs };

/** Runs the jobs that mail as they would run at this moment. */
export async function runJobs(nowMs = clock.nowMs): Promise<void> {
  clock.nowMs = nowMs;
  await writeDueDigests('digests', clock.now);
  await sendDueMail('sender', clock.now);
}

/** The database, a mail room and an object store of this test file's own, over HTTP, with the shop's rows. */
export async function openStandIns() {
  const folder = await mkdtemp(join(tmpdir(), 'flitchbook-stand-ins-'));
  const room = await startMailRoom({
    port: 0,
    dataDir: join(folder, 'mails'),
    apiKey: testEnv.RESEND_API_KEY,
    now: clock.now,
  });
  const storeOptions = {
    dataDir: join(folder, 'objects'),
    region: testEnv.S3_REGION,
    credentials: { accessKeyId: testEnv.S3_ACCESS_KEY_ID, secretAccessKey: testEnv.S3_SECRET_ACCESS_KEY },
    buckets: [testEnv.S3_BUCKET],
    allowedOrigins: [testEnv.APP_URL],
  };
  const store = await startObjectStore({ port: 0, ...storeOptions });
  afterAll(async () => {
    await Promise.all([room.close(), store.close()]);
    await rm(folder, { recursive: true, force: true });
  });
  const { database } = await openTestDatabase({ S3_ENDPOINT: store.url, RESEND_BASE_URL: room.url });
  await openShop();
  const misbehave = (url: string) => async (fault: object) => {
    await fetch(`${url}/_fail`, { method: 'POST', body: JSON.stringify(fault) });
  };
  const behave = async () => {
    await Promise.all([room, store].map(({ url }) => fetch(`${url}/_fail`, { method: 'DELETE' })));
  };
  return {
    database,
    /** Every mail that somebody got, oldest first. */
    mailsTo: async ({ email }: { email: string }) => {
      const answer = await fetch(`${room.url}/mails?to=${encodeURIComponent(email)}`);
      return listedMails.parse(await answer.json()).reverse();
    },
    failMail: misbehave(room.url),
    failStore: misbehave(store.url),
    behave,
  };
}
