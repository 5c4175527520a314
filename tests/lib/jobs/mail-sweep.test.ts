import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { db, write } from '@/db/client';
import {
  BODIES_KEPT_MS,
  dropOldBodies,
  EVENTS_KEPT_MS,
  NEWS_KEPT_MS,
  sweepNews,
  sweepProviderEvents,
} from '@/db/queries/mail-sweep';
import { insertMail, sendAgain } from '@/db/queries/outbox';
import { newsItems, outbox, providerEvents } from '@/db/schema';
import { newId } from '@/db/schema/columns';
import { sendDueMail } from '@/lib/jobs/outbox';
import { sweep } from '@/lib/jobs/sweep';
import { makePerson, NOW_MS } from '../../support/world';
import { clock, openStandIns } from './stand-ins';

const { mailsTo, behave, failMail } = await openStandIns();
const LATER_MS = NOW_MS + BODIES_KEPT_MS + 1;

beforeEach(async () => {
  await behave();
  clock.nowMs = NOW_MS;
  await write(async (tx) => {
    await tx.delete(newsItems);
    await tx.delete(providerEvents);
    await tx.delete(outbox);
  });
});

/** An invitation that went through the mail room now. */
async function mailTo(person: { id: string }) {
  const inviter = await makePerson('admin');
  const mail = { kind: 'invitation', userId: person.id, about: { inviterId: inviter.id }, dedupeKey: newId() } as const;
  await write((tx) => insertMail(tx, mail, NOW_MS));
  await sendDueMail('sender', clock.now);
  return rowOf(person);
}

async function rowOf({ id }: { id: string }) {
  const [row] = await db().select().from(outbox).where(eq(outbox.userId, id));
  if (!row) throw new Error('no mail');
  return row;
}

describe('the text of a mail that is over', () => {
  test('goes after its month; its key, headers and subject stay', async () => {
    const person = await makePerson('buyer');
    const before = await mailTo(person);
    expect(before.frozen?.html).toContain('<html');
    expect(await dropOldBodies(NOW_MS + BODIES_KEPT_MS)).toBe(0);
    expect(await dropOldBodies(LATER_MS)).toBe(1);
    expect(await dropOldBodies(LATER_MS)).toBe(0);
    const after = await rowOf(person);
    expect(after.frozen).toEqual({ ...before.frozen, html: '', text: '', photos: [] });
    expect({ ...after, frozen: null, bodyDroppedAt: null }).toEqual({ ...before, frozen: null });
  });

  test('stays with one that failed, which is tried again with the same bytes', async () => {
    const person = await makePerson('buyer');
    await failMail({ status: 422, times: 1 });
    const before = await mailTo(person);
    expect(before.state).toBe('failed');
    expect(await dropOldBodies(LATER_MS)).toBe(0);
    expect((await rowOf(person)).frozen).toEqual(before.frozen);
  });

  test('is written anew when an admin sends it again', async () => {
    const [person, admin] = [await makePerson('buyer'), await makePerson('admin')];
    const { id } = await mailTo(person);
    await dropOldBodies(LATER_MS);
    clock.nowMs = LATER_MS;
    await sendAgain(admin, id, LATER_MS);
    await sendDueMail('sender', clock.now);
    const [first, again] = await mailsTo(person);
    expect(again?.text).toBe(first?.text);
  });
});

const newsOf = (userId: string, ages: number[]) =>
  ages.map((ageMs) => ({ kind: 'ready' as const, userId, about: {}, dedupeKey: newId(), createdAt: NOW_MS - ageMs }));

test('news is forgotten after its time, told or not, and not a day earlier', async () => {
  const { id } = await makePerson('buyer');
  const [told, ...rest] = newsOf(id, [NEWS_KEPT_MS + 1, NEWS_KEPT_MS + 1, NEWS_KEPT_MS, 0]);
  if (!told) throw new Error('no news');
  await write((tx) => tx.insert(newsItems).values([{ ...told, toldAt: NOW_MS }, ...rest]));
  expect(await sweepNews(NOW_MS)).toBe(2);
  expect(await db().select({ id: newsItems.id }).from(newsItems)).toHaveLength(2);
});

test('the provider’s events are forgotten after their time', async () => {
  const event = (id: string, ageMs: number) => ({
    id,
    kind: 'email.delivered',
    outcome: 'kept',
    receivedAt: NOW_MS - ageMs,
  });
  await write((tx) => tx.insert(providerEvents).values([event('old', EVENTS_KEPT_MS + 1), event('new', 0)]));
  expect(await sweepProviderEvents(NOW_MS)).toBe(1);
  expect(await db().select({ id: providerEvents.id }).from(providerEvents)).toEqual([{ id: 'new' }]);
});

test('a sweep ends with all of it gone, however many batches that takes, and none holds the others up for long', async () => {
  const { id } = await makePerson('buyer');
  const many = newsOf(
    id,
    Array.from({ length: 1201 }, (_, age) => NEWS_KEPT_MS + 1 + age),
  );
  await write(async (tx) => {
    for (let from = 0; from < many.length; from += 300) await tx.insert(newsItems).values(many.slice(from, from + 300));
  });
  expect(await sweepNews(NOW_MS)).toBeLessThanOrEqual(500);
  await sweep(NOW_MS);
  expect(await db().select({ id: newsItems.id }).from(newsItems)).toEqual([]);
});
