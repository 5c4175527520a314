import { createHmac } from 'node:crypto';
import { count, eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { POST } from '@/app/api/webhooks/mail/route';
import { db, write } from '@/db/client';
import { outbox, providerEvents, users } from '@/db/schema';
import { newId } from '@/db/schema/columns';
import { openTestDatabase, testEnv } from '../../support/database';
import { makePerson, openShop } from '../../support/world';

await openTestDatabase();
await openShop();

const inSeconds = (more: number) => Math.floor(Date.now() / 1000) + more;

/** Standard Webhooks, made here by hand: HMAC-SHA256 over "id.timestamp.body", the key in base64 behind whsec_. */
function sign(body: string, over: { id?: string; seconds?: number; secret?: string } = {}) {
  const { id = `msg_${newId()}`, seconds = inSeconds(0), secret = testEnv.RESEND_WEBHOOK_SECRET } = over;
  const key = Buffer.from(secret.replace('whsec_', ''), 'base64');
  const signature = createHmac('sha256', key).update(`${id}.${seconds}.${body}`).digest('base64');
  return { 'svix-id': id, 'svix-timestamp': String(seconds), 'svix-signature': `v1,${signature}` };
}

const send = (body: BodyInit, headers: Record<string, string>) =>
  POST(
    new Request('https://diary.example/api/webhooks/mail', { method: 'POST', headers, body, ...{ duplex: 'half' } }),
  );

async function openSent() {
  const person = await makePerson('buyer');
  const providerId = newId();
  await write((tx) =>
    tx.insert(outbox).values({
      kind: 'letter',
      userId: person.id,
      about: {},
      state: 'sent',
      dedupeKey: newId(),
      nextAttemptAt: 1,
      providerId,
      sentAt: Date.now(),
    }),
  );
  const event = (type: string, more: object = {}, createdAt = new Date().toISOString()) =>
    JSON.stringify({ type, created_at: createdAt, data: { email_id: providerId, ...more } });
  const why = async () => (await db().select().from(users).where(eq(users.id, person.id)))[0]?.unreachableWhy;
  const mail = async () => (await db().select().from(outbox).where(eq(outbox.providerId, providerId)))[0];
  return {
    person,
    event,
    why,
    mail,
    bounced: event('email.bounced', { bounce: { type: 'Permanent', message: 'Gone.' } }),
  };
}

const events = async () => (await db().select({ n: count() }).from(providerEvents))[0]?.n ?? 0;

describe('nothing is done, and 401 answered, when', () => {
  test.each([
    { what: 'there is no signature', headers: (): Record<string, string> => ({}) },
    {
      what: 'another key signed it',
      headers: (body: string) => sign(body, { secret: `whsec_${Buffer.alloc(32).toString('base64')}` }),
    },
    { what: 'another body was signed', headers: (body: string) => sign(`${body} `) },
    {
      what: 'it is older than five minutes',
      headers: (body: string) => sign(body, { seconds: inSeconds(-301) }),
    },
    { what: 'it comes from the future', headers: (body: string) => sign(body, { seconds: inSeconds(400) }) },
    { what: 'its id was exchanged', headers: (body: string) => ({ ...sign(body), 'svix-id': 'msg_other' }) },
    { what: 'its time was exchanged', headers: (body: string) => ({ ...sign(body), 'svix-timestamp': '1' }) },
    { what: 'its time is no number', headers: (body: string) => ({ ...sign(body), 'svix-timestamp': 'now' }) },
  ])('$what', async ({ headers }) => {
    const { bounced, why } = await openSent();
    const before = await events();
    expect((await send(bounced, headers(bounced))).status).toBe(401);
    expect(await why()).toBeNull();
    expect(await events()).toBe(before);
  });
});

test('one that is told again changes nothing a second time', async () => {
  const { bounced, event, why } = await openSent();
  const signed = sign(bounced);
  expect((await send(bounced, signed)).status).toBe(200);
  expect(await why()).toBe('bounced');
  const delivered = event('email.delivered');
  expect((await send(delivered, sign(delivered))).status).toBe(200);
  await write((tx) => tx.update(users).set({ unreachableSinceAt: null, unreachableWhy: null }));
  const before = await events();
  expect((await send(bounced, signed)).status).toBe(200);
  expect(await why()).toBeNull();
  expect(await events()).toBe(before);
});

test('one that is too long is refused before it is read, whether it says so or not', async () => {
  const long = JSON.stringify({ type: 'email.delivered', junk: 'x'.repeat(300_000) });
  expect((await send(long, sign(long))).status).toBe(413);
  let sent = 0;
  const endless = new ReadableStream<Uint8Array>({
    pull: (controller) => {
      sent += 1;
      controller.enqueue(new Uint8Array(64 * 1024));
    },
  });
  expect((await send(endless, sign(long))).status).toBe(413);
  expect(sent).toBeLessThan(10);
});

test('a mailbox that is full today does not stop mail; one that is gone does', async () => {
  const { event, why, mail } = await openSent();
  const full = event('email.bounced', { bounce: { type: 'Transient', message: 'Full.' } });
  expect((await send(full, sign(full))).status).toBe(200);
  expect(await why()).toBeNull();
  expect(await mail()).toMatchObject({ lastProblem: 'it came back: Full.' });
  const gone = event('email.suppressed');
  await send(gone, sign(gone));
  expect(await why()).toBe('bounced');
});

test('news of a mail that we do not know yet is asked for again, and left alone when it is old', async () => {
  const { event } = await openSent();
  const early = event('email.delivered').replace(/"email_id":"[^"]+"/, `"email_id":"${newId()}"`);
  expect((await send(early, sign(early))).status).toBe(503);
  const old = early.replace(/"created_at":"[^"]+"/, '"created_at":"2020-01-01T00:00:00Z"');
  expect((await send(old, sign(old))).status).toBe(200);
});

test.each([
  '{}',
  '[]',
  '"x"',
  '{"type":"email.opened","data":{}}',
  '{"type":"email.received","data":{"email_id":"../../x"}}',
])('a signed %s that means nothing to us is taken and does nothing', async (body) => {
  expect((await send(body, sign(body))).status).toBe(200);
});
