import { createServer } from 'node:http';
import { once } from 'node:events';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll } from 'vitest';
import { POST } from '@/app/api/webhooks/mail/route';
import { startMailRoom } from '@/lib/fakes/mail-room/server';
import { startObjectStore } from '@/lib/fakes/object-store/server';
import { openTestDatabase, testEnv } from '../../support/database';
import { openShop } from '../../support/world';

/** The route behind a port of its own, as the running program has it. */
async function listen() {
  const server = createServer((request, response) => {
    const chunks: Buffer[] = [];
    request.on('data', (chunk: Buffer) => chunks.push(chunk));
    request.on('end', () => {
      const headers = new Headers();
      for (const [name, value] of Object.entries(request.headers)) headers.set(name, String(value));
      const asked = new Request('https://diary.example', { method: 'POST', headers, body: Buffer.concat(chunks) });
      void POST(asked).then((answer) => response.writeHead(answer.status).end());
    });
  }).listen(0, '127.0.0.1');
  await once(server, 'listening');
  const address = server.address();
  if (address === null || typeof address === 'string') throw new Error('no port');
  return { url: `http://127.0.0.1:${address.port}`, close: () => server.close() };
}

/** Database, object store and a mail room that tells the webhook's route what readers do, all of this test file's own. */
export async function openInboundRoom() {
  const folder = await mkdtemp(join(tmpdir(), 'flitchbook-inbound-'));
  const door = await listen();
  const webhook = { url: door.url, secret: testEnv.RESEND_WEBHOOK_SECRET };
  const apiKey = testEnv.RESEND_API_KEY;
  const room = await startMailRoom({ port: 0, dataDir: join(folder, 'mails'), apiKey, webhook });
  const store = await startObjectStore({
    port: 0,
    dataDir: join(folder, 'objects'),
    region: testEnv.S3_REGION,
    credentials: { accessKeyId: testEnv.S3_ACCESS_KEY_ID, secretAccessKey: testEnv.S3_SECRET_ACCESS_KEY },
    buckets: [testEnv.S3_BUCKET],
    allowedOrigins: [testEnv.APP_URL],
  });
  afterAll(async () => {
    door.close();
    await Promise.all([room.close(), store.close()]);
    await rm(folder, { recursive: true, force: true });
  });
  await openTestDatabase({ S3_ENDPOINT: store.url, RESEND_BASE_URL: room.url });
  await openShop();
  type Listed = { id: string; replyTo: string[]; subject: string; headers: Record<string, string>; text: string };
  const mailsTo = async ({ email }: { email: string }): Promise<Listed[]> =>
    (await fetch(`${room.url}/mails?to=${encodeURIComponent(email)}`)).json();
  const press = async (path: string, fields: Record<string, string | Blob>) => {
    const body = new FormData();
    for (const [name, value] of Object.entries(fields)) body.append(name, value);
    return (await fetch(`${room.url}${path}`, { method: 'POST', body })).status;
  };
  return {
    mailsTo,
    /** What the reader of a mail answers, through the form of its page. @returns 200 when the shop has taken it */
    reply: (mailId: string, fields: Record<string, string | Blob>) => press(`/mail/${mailId}/reply`, fields),
    tell: (mailId: string, happened: string) => press(`/mail/${mailId}/events`, { happened }),
  };
}
