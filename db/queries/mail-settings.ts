import { and, eq, gt, inArray, isNotNull, isNull, lt, lte, max, or, sql } from 'drizzle-orm';
import { queueMail } from './outbox';
import { db, write } from '../client';
import { buildIsVisible, entryIsVisible } from '../scope';
import { buildPeople, builds, diaryEvents, entries, mailSettings, users } from '../schema';
import { nextDigestAt, type DigestPlan } from '@/lib/schedule/digest-times';
import type { Viewer } from '@/lib/viewer';

export type MailWish = Omit<DigestPlan, 'zone'>;

const defaults: MailWish = { cadence: 'weekly', hourLocal: 8, weekday: 5 };

/** How the viewer gets the diary by mail. */
export async function findMailSettings(viewer: Viewer) {
  const [row] = await db()
    .select({
      cadence: mailSettings.cadence,
      hourLocal: mailSettings.hourLocal,
      weekday: mailSettings.weekday,
      nextDigestAt: mailSettings.nextDigestAt,
    })
    .from(mailSettings)
    .where(eq(mailSettings.userId, viewer.id));
  return row ?? { ...defaults, nextDigestAt: null };
}

/** The newest event there is; what came before a reader is old news to them. */
export const lastSeq = sql<number>`(select coalesce(max(${diaryEvents.seq}), 0) from ${diaryEvents})`;

/**
 * Saves when the viewer wants mail, and where they are. What happened before the first wish, or while they wanted none,
 * is not mailed.
 */
export function saveMailSettings(viewer: Viewer, wish: MailWish, zone: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await tx.update(users).set({ timeZone: zone, timeZoneAskedAt: nowMs }).where(eq(users.id, viewer.id));
    const row = { ...wish, nextDigestAt: nextDigestAt({ ...wish, zone }, nowMs) };
    await tx
      .insert(mailSettings)
      .values({ userId: viewer.id, ...row, toldSeq: lastSeq })
      .onConflictDoUpdate({
        target: mailSettings.userId,
        set: {
          ...row,
          toldSeq: sql`case when ${mailSettings.cadence} = 'none' then ${lastSeq} else ${mailSettings.toldSeq} end`,
        },
      });
  });
}

/** Saves where the viewer is, for staff, who get no diary by mail. */
export function saveTimeZone(viewer: Viewer, zone: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await tx.update(users).set({ timeZone: zone, timeZoneAskedAt: nowMs }).where(eq(users.id, viewer.id));
  });
}

/** Ends the diary mails of one person; sign-in and answers to their own questions still come. */
export function unsubscribe(userId: string): Promise<boolean> {
  return write(async (tx) => {
    const stopped = await tx
      .update(mailSettings)
      .set({ cadence: 'none', nextDigestAt: null })
      .where(eq(mailSettings.userId, userId))
      .returning({ userId: mailSettings.userId });
    return stopped.length === 1;
  });
}

export type DueReader = { viewer: Viewer; wish: MailWish; toldSeq: number; upToSeq: number; dueAt: number };

/**
 * Takes the next reader whose digest is due, for `leaseMs`; null when nobody is. No viewer: the job's own list, and what
 * it finds for a reader is read with that reader's rights.
 */
export function claimDueReader(owner: string, nowMs: number, leaseMs: number): Promise<DueReader | null> {
  return write(async (tx) => {
    const free = or(isNull(mailSettings.leaseEndsAt), lt(mailSettings.leaseEndsAt, nowMs));
    const next = tx
      .select({ id: mailSettings.userId })
      .from(mailSettings)
      .where(and(isNotNull(mailSettings.nextDigestAt), lte(mailSettings.nextDigestAt, nowMs), free))
      .orderBy(mailSettings.nextDigestAt)
      .limit(1);
    const [claimed] = await tx
      .update(mailSettings)
      .set({ leaseOwner: owner, leaseEndsAt: nowMs + leaseMs })
      .where(inArray(mailSettings.userId, next))
      .returning();
    if (!claimed) return null;
    const [viewer] = await tx
      .select({
        id: users.id,
        role: users.role,
        name: users.name,
        department: users.department,
        timeZone: users.timeZone,
      })
      .from(users)
      .where(eq(users.id, claimed.userId));
    const [last] = await tx.select({ seq: max(diaryEvents.seq) }).from(diaryEvents);
    if (!viewer) throw new Error('mail settings of nobody');
    const { cadence, hourLocal, weekday, toldSeq, nextDigestAt: dueAt } = claimed;
    return { viewer, wish: { cadence, hourLocal, weekday }, toldSeq, upToSeq: last?.seq ?? 0, dueAt: dueAt ?? nowMs };
  });
}

export const MAX_ENTRIES_TOLD = 500;

/** The entries that this reader has not been told of yet and may read now, oldest first, at most 500. */
export function listUntold({ viewer, toldSeq, upToSeq }: DueReader) {
  const own = db().select({ id: buildPeople.buildId }).from(buildPeople).where(eq(buildPeople.userId, viewer.id));
  return db()
    .selectDistinct({ entryId: diaryEvents.entryId })
    .from(diaryEvents)
    .innerJoin(entries, eq(entries.id, diaryEvents.entryId))
    .innerJoin(builds, eq(builds.id, diaryEvents.buildId))
    .where(
      and(
        inArray(diaryEvents.buildId, own),
        gt(diaryEvents.seq, toldSeq),
        lte(diaryEvents.seq, upToSeq),
        buildIsVisible(viewer),
        entryIsVisible(viewer),
      ),
    )
    .orderBy(diaryEvents.seq)
    .limit(MAX_ENTRIES_TOLD);
}

/**
 * Writes the digest, advances the reader's cursor and sets the next one, or none of these. A reader who wants mail at
 * once and was woken again in the meantime stays woken.
 */
export function writeDigest(due: DueReader, entryIds: string[], owner: string, nowMs: number): Promise<boolean> {
  const { viewer, wish, toldSeq, upToSeq, dueAt } = due;
  const regular = nextDigestAt({ ...wish, zone: viewer.timeZone }, nowMs);
  const next =
    wish.cadence === 'at_once'
      ? sql`case when ${mailSettings.nextDigestAt} = ${dueAt} then null else ${mailSettings.nextDigestAt} end`
      : sql`case when ${mailSettings.cadence} = 'none' then null else ${regular} end`;
  return write(async (tx) => {
    const moved = await tx
      .update(mailSettings)
      .set({ toldSeq: upToSeq, nextDigestAt: next, leaseOwner: null, leaseEndsAt: null })
      .where(
        and(eq(mailSettings.userId, viewer.id), eq(mailSettings.leaseOwner, owner), eq(mailSettings.toldSeq, toldSeq)),
      )
      .returning({ cadence: mailSettings.cadence });
    const [settings] = moved;
    if (!settings) return false;
    if (entryIds.length === 0 || settings.cadence === 'none') return true;
    const dedupeKey = `digest/${viewer.id}/${upToSeq}`;
    await queueMail(tx, { kind: 'digest', userId: viewer.id, about: { entryIds }, dedupeKey }, nowMs);
    return true;
  });
}

/** Takes the browser's zone once, for somebody who has not chosen one. */
export function adoptTimeZone(viewer: Viewer, zone: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const [adopted] = await tx
      .update(users)
      .set({ timeZone: zone, timeZoneAskedAt: nowMs })
      .where(and(eq(users.id, viewer.id), isNull(users.timeZoneAskedAt)))
      .returning({ id: users.id });
    if (!adopted) return;
    const [settings] = await tx.select().from(mailSettings).where(eq(mailSettings.userId, viewer.id));
    if (!settings || settings.cadence === 'none') return;
    await tx
      .update(mailSettings)
      .set({ nextDigestAt: nextDigestAt({ ...settings, zone }, nowMs) })
      .where(eq(mailSettings.userId, viewer.id));
  });
}
