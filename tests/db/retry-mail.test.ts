import { eq } from 'drizzle-orm';
import { beforeAll, expect, test } from 'vitest';
import { db, write } from '@/db/client';
import { retryMail } from '@/db/queries/outbox';
import { outbox } from '@/db/schema';
import { newId } from '@/db/schema/columns';
import { Denied, OutOfReach } from '@/lib/errors';
import { openTestDatabase } from '../support/database';
import { DAY_MS, makePerson, NOW_MS, type Person } from '../support/world';

await openTestDatabase();

let admin: Person;
beforeAll(async () => {
  admin = await makePerson('admin');
});

type Mail = typeof outbox.$inferInsert;

async function makeMail(over: Partial<Mail>): Promise<string> {
  const id = newId();
  const { id: userId } = await makePerson('buyer');
  const tried = { attempts: 8, firstAttemptAt: NOW_MS - DAY_MS, nextAttemptAt: NOW_MS - DAY_MS };
  const mail: Mail = { id, kind: 'digest', userId, about: {}, state: 'failed', dedupeKey: id, ...tried, ...over };
  await write((tx) => tx.insert(outbox).values(mail));
  return id;
}

async function read(id: string) {
  const [mail] = await db().select().from(outbox).where(eq(outbox.id, id));
  return mail;
}

test('a refused mail starts afresh, with its own key', async () => {
  const id = await makeMail({ lastProblem: 'no such mailbox' });
  await retryMail(admin, id, NOW_MS);
  const fresh = { state: 'waiting', attempts: 0, firstAttemptAt: null, nextAttemptAt: NOW_MS, dedupeKey: id };
  expect(await read(id)).toMatchObject(fresh);
});

test('a mail that was given up keeps the time of its first try, so that it is parked a day after that', async () => {
  const id = await makeMail({ lastProblem: 'given up: no answer' });
  await retryMail(admin, id, NOW_MS);
  expect(await read(id)).toMatchObject({ state: 'waiting', firstAttemptAt: NOW_MS - DAY_MS });
});

test.each<Partial<Mail>>([
  { state: 'parked' },
  { state: 'sent' },
  { state: 'dropped' },
  { state: 'sending' },
  { state: 'waiting' },
  { kind: 'sign_in' },
])('a mail with %j is not sent again', async (over) => {
  const id = await makeMail(over);
  const before = await read(id);
  await expect(retryMail(admin, id, NOW_MS)).rejects.toThrow(Denied);
  expect(await read(id)).toEqual(before);
});

test('only an admin sends mail again, and an unknown mail looks the same', async () => {
  const id = await makeMail({});
  await expect(retryMail(await makePerson('rep'), id, NOW_MS)).rejects.toThrow(OutOfReach);
  await expect(retryMail(admin, 'nothing', NOW_MS)).rejects.toThrow(OutOfReach);
});
