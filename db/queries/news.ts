import { and, asc, eq, gt, inArray, isNull, lt, lte, sql } from 'drizzle-orm';
import { lastSeq, usualWish } from './mail-settings';
import { db, type Tx } from '../client';
import { mailSettings, newsItems, users } from '../schema';
import type { MailAbout, MailKind } from '@/lib/mail/kinds';
import { nextDigestAt, soundZone } from '@/lib/schedule/digest-times';

type News = { kind: MailKind; userId: string; about: MailAbout; dedupeKey: string; notBeforeAt?: number };

/** What one digest tells beside entries; the rest waits for the next. */
const NEWS_TOLD = 100;

/** Keeps something for a person's next digest, and sees to it that there will be one, in the transaction of what it tells of. */
export async function addNews(tx: Tx, news: News, nowMs: number): Promise<void> {
  await tx
    .insert(newsItems)
    .values({ ...news, createdAt: nowMs })
    .onConflictDoNothing({ target: newsItems.dedupeKey });
  await requireDigest(tx, news.userId, nowMs);
  await wakeDigest(tx, news.userId, Math.max(nowMs, news.notBeforeAt ?? 0), nowMs);
}

/** Staff have no mail settings until there is something to tell them. */
async function requireDigest(tx: Tx, userId: string, nowMs: number): Promise<void> {
  const [person] = await tx
    .select({ role: users.role, zone: users.timeZone, cadence: mailSettings.cadence })
    .from(users)
    .leftJoin(mailSettings, eq(mailSettings.userId, users.id))
    .where(eq(users.id, userId));
  if (!person) return;
  if (person.cadence === null) {
    const wish = usualWish(person.role);
    const next = nextDigestAt({ ...wish, zone: soundZone(person.zone) }, nowMs);
    await tx.insert(mailSettings).values({ userId, ...wish, nextDigestAt: next, toldSeq: lastSeq });
  }
}

/**
 * Who gets digests at once gets one then, or earlier where one is due before. A digest of now is always marked anew: one
 * that is being written without this news must not take its place.
 */
async function wakeDigest(tx: Tx, userId: string, atMs: number, nowMs: number): Promise<void> {
  const isEarlier = atMs > nowMs ? lt(mailSettings.nextDigestAt, atMs) : sql`0`;
  await tx
    .update(mailSettings)
    .set({ nextDigestAt: sql`case when ${isEarlier} then ${mailSettings.nextDigestAt} else ${atMs} end` })
    .where(and(eq(mailSettings.userId, userId), eq(mailSettings.cadence, 'at_once')));
}

/** What waits for its time need not wait any longer. */
export async function hastenNews(tx: Tx, dedupeKey: string, nowMs: number): Promise<void> {
  const hastened = await tx
    .update(newsItems)
    .set({ notBeforeAt: nowMs })
    .where(and(eq(newsItems.dedupeKey, dedupeKey), isNull(newsItems.toldAt), gt(newsItems.notBeforeAt, nowMs)))
    .returning({ userId: newsItems.userId });
  for (const { userId } of hastened) await wakeDigest(tx, userId, nowMs, nowMs);
}

/** When the next thing of a person's news can be told that could not be told yet; null when there is none. For `at_once`. */
export const nextNewsAt = (userId: string, nowMs: number) =>
  sql<
    number | null
  >`(select min(${newsItems.notBeforeAt}) from ${newsItems} where ${newsItems.userId} = ${userId} and ${newsItems.toldAt} is null and ${newsItems.notBeforeAt} > ${nowMs})`;

/** What these people have not been told yet and may be told now, oldest first, at most 100 each. No viewer: the job's own list. */
export async function unscopedUntoldNews(userIds: string[], nowMs: number): Promise<Map<string, string[]>> {
  const rows = await db()
    .select({ id: newsItems.id, userId: newsItems.userId })
    .from(newsItems)
    .where(and(inArray(newsItems.userId, userIds), isNull(newsItems.toldAt), lte(newsItems.notBeforeAt, nowMs)))
    .orderBy(asc(newsItems.createdAt), asc(newsItems.id));
  const byPerson = new Map<string, string[]>();
  for (const { id, userId } of rows) {
    const ids = byPerson.get(userId) ?? [];
    if (ids.length < NEWS_TOLD) byPerson.set(userId, [...ids, id]);
  }
  return byPerson;
}

/** In the transaction that writes their digest. */
export async function markTold(tx: Tx, newsIds: string[], nowMs: number): Promise<void> {
  if (newsIds.length === 0) return;
  await tx.update(newsItems).set({ toldAt: nowMs }).where(inArray(newsItems.id, newsIds));
}

/** These pieces of a person's news, oldest first; what each says is read with that person's rights when it is written. */
export function listNews(userId: string, newsIds: string[]) {
  return db()
    .select({ id: newsItems.id, kind: newsItems.kind, about: newsItems.about })
    .from(newsItems)
    .where(and(eq(newsItems.userId, userId), inArray(newsItems.id, newsIds)))
    .orderBy(asc(newsItems.createdAt), asc(newsItems.id));
}
