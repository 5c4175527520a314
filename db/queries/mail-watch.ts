import { and, count, desc, eq, inArray, isNotNull, lt, or, sql, type SQL } from 'drizzle-orm';
import { requireCan } from './standing';
import { db, write } from '../client';
import { outbox, providerEvents, users } from '../schema';
import { OutOfReach } from '@/lib/errors';
import { isZone } from '@/lib/schedule/digest-times';
import type { Viewer } from '@/lib/viewer';

const PAGE = 50;

export const mailViews = ['trouble', 'waiting', 'sent', 'bounced', 'dropped'] as const;
/** trouble: what needs a look; the others are what their names say. */
export type MailView = (typeof mailViews)[number];

const trouble = or(
  inArray(outbox.state, ['failed', 'parked']),
  and(eq(outbox.state, 'waiting'), sql`${outbox.attempts} > 0`),
);

const conditions: Record<MailView, SQL | undefined> = {
  trouble,
  waiting: inArray(outbox.state, ['waiting', 'sending']),
  sent: eq(outbox.state, 'sent'),
  bounced: or(isNotNull(outbox.bouncedAt), isNotNull(outbox.complainedAt)),
  dropped: eq(outbox.state, 'dropped'),
};

/** For the admin: how much mail is in which state. */
export async function countMails(viewer: Viewer) {
  await requireCan(viewer, 'mail.watch');
  return db().select({ state: outbox.state, n: count() }).from(outbox).groupBy(outbox.state);
}

/** Mail as the admin sees it, newest first, 50 a page; `beforeId` is the last one of the page above. No texts, no addresses. */
export async function listMails(viewer: Viewer, view: MailView, beforeId?: string) {
  await requireCan(viewer, 'mail.watch');
  // A self-join: drizzle would give both sides of one table the same name.
  const isBelow = sql`(${outbox.createdAt}, ${outbox.id}) < (select above.created_at, above.id from outbox as above where above.id = ${beforeId})`;
  return db()
    .select({
      id: outbox.id,
      kind: outbox.kind,
      state: outbox.state,
      attempts: outbox.attempts,
      problem: outbox.lastProblem,
      createdAt: outbox.createdAt,
      nextAttemptAt: outbox.nextAttemptAt,
      sentAt: outbox.sentAt,
      deliveredAt: outbox.deliveredAt,
      bouncedAt: outbox.bouncedAt,
      complainedAt: outbox.complainedAt,
      person: users.name,
    })
    .from(outbox)
    .innerJoin(users, eq(users.id, outbox.userId))
    .where(and(conditions[view], beforeId === undefined ? undefined : isBelow))
    .orderBy(desc(outbox.createdAt), desc(outbox.id))
    .limit(PAGE);
}

export type WatchedMail = Awaited<ReturnType<typeof listMails>>[number];

/** Replies that were not kept as letters, and why, newest first, 50 a page. */
export async function listRefusedReplies(viewer: Viewer, beforeMs?: number) {
  await requireCan(viewer, 'mail.watch');
  return db()
    .select({
      id: providerEvents.id,
      note: providerEvents.note,
      receivedAt: providerEvents.receivedAt,
      person: users.name,
    })
    .from(providerEvents)
    .leftJoin(users, eq(users.id, providerEvents.userId))
    .where(
      and(
        eq(providerEvents.kind, 'email.received'),
        inArray(providerEvents.outcome, ['refused', 'ignored']),
        beforeMs === undefined ? undefined : lt(providerEvents.receivedAt, beforeMs),
      ),
    )
    .orderBy(desc(providerEvents.receivedAt))
    .limit(PAGE);
}

export type RefusedReply = Awaited<ReturnType<typeof listRefusedReplies>>[number];

/** People whom mail does not reach, and those whose time zone this machine no longer knows. */
export async function listTroubledReaders(viewer: Viewer) {
  await requireCan(viewer, 'mail.watch');
  const columns = {
    id: users.id,
    name: users.name,
    zone: users.timeZone,
    since: users.unreachableSinceAt,
    why: users.unreachableWhy,
  };
  const unreachable = await db()
    .select(columns)
    .from(users)
    .where(isNotNull(users.unreachableSinceAt))
    .orderBy(desc(users.unreachableSinceAt))
    .limit(200);
  const zones = await db().selectDistinct({ zone: users.timeZone }).from(users);
  const lost = zones.map(({ zone }) => zone).filter((zone) => !isZone(zone));
  const astray =
    lost.length > 0 ? await db().select(columns).from(users).where(inArray(users.timeZone, lost)).limit(200) : [];
  return { unreachable, astray };
}

export type TroubledReader = Awaited<ReturnType<typeof listTroubledReaders>>['unreachable'][number];

/** Mail goes to this person again: their address was mended, or they want it after all. @throws OutOfReach */
export function markReachable(viewer: Viewer, userId: string): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'mail.watch');
    const reached = await tx
      .update(users)
      .set({ unreachableSinceAt: null, unreachableWhy: null })
      .where(eq(users.id, userId))
      .returning({ id: users.id });
    if (reached.length === 0) throw new OutOfReach();
  });
}
