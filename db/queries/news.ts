import { and, asc, eq, inArray, isNull } from 'drizzle-orm';
import { lastSeq, usualWish } from './mail-settings';
import { db, type Tx } from '../client';
import { mailSettings, newsItems, users } from '../schema';
import type { MailAbout, MailKind } from '@/lib/mail/kinds';
import { nextDigestAt, soundZone } from '@/lib/schedule/digest-times';

type News = { kind: MailKind; userId: string; about: MailAbout; dedupeKey: string };

/** What one digest tells beside entries; the rest waits for the next. */
const NEWS_TOLD = 100;

/** Keeps something for a person's next digest, and sees to it that there will be one, in the transaction of what it tells of. */
export async function addNews(tx: Tx, news: News, nowMs: number): Promise<void> {
  await tx
    .insert(newsItems)
    .values({ ...news, createdAt: nowMs })
    .onConflictDoNothing({ target: newsItems.dedupeKey });
  await requireDigest(tx, news.userId, nowMs);
}

/** Staff have no mail settings until there is something to tell them; who gets digests at once is woken. */
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
  if (person.cadence === 'at_once')
    await tx.update(mailSettings).set({ nextDigestAt: nowMs }).where(eq(mailSettings.userId, userId));
}

/** What these people have not been told yet, oldest first, at most 100 each. No viewer: the job's own list. */
export async function unscopedUntoldNews(userIds: string[]): Promise<Map<string, string[]>> {
  const rows = await db()
    .select({ id: newsItems.id, userId: newsItems.userId })
    .from(newsItems)
    .where(and(inArray(newsItems.userId, userIds), isNull(newsItems.toldAt)))
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
