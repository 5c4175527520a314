import { and, eq, isNull, lt, or, sql } from 'drizzle-orm';
import { db, write, type Tx } from '../client';
import { outbox, providerEvents, users } from '../schema';

export type ProviderEvent = { id: string; kind: string; outcome: string; userId?: string | null; note?: string };

/** Whether this event was told before. */
export async function isProviderEventKnown(id: string): Promise<boolean> {
  const [row] = await db().select({ id: providerEvents.id }).from(providerEvents).where(eq(providerEvents.id, id));
  return row !== undefined;
}

/** Writes down what came of an event, once. @returns whether it was new */
export function recordProviderEvent(event: ProviderEvent, nowMs: number): Promise<boolean> {
  return write((tx) => insertEvent(tx, event, nowMs));
}

async function insertEvent(tx: Tx, event: ProviderEvent, nowMs: number): Promise<boolean> {
  const added = await tx
    .insert(providerEvents)
    .values({ ...event, receivedAt: nowMs })
    .onConflictDoNothing({ target: providerEvents.id })
    .returning({ id: providerEvents.id });
  return added.length === 1;
}

/** `unreachable` says that no further mail should go to its receiver; without it the mail alone is marked. */
export type DeliveryNews = {
  id: string;
  kind: string;
  providerId: string;
  happened: 'delivered' | 'bounced' | 'complained' | 'failed';
  unreachable?: 'bounced' | 'complained';
  problem?: string;
};

/**
 * Keeps what became of a mail, and stops mail to a person whom it does not reach or who does not want it; a mail that went
 * out later and is delivered after all ends that.
 * @returns false when no mail of ours has this id (yet)
 */
export function applyDelivery(news: DeliveryNews, nowMs: number): Promise<boolean> {
  return write(async (tx) => {
    const [mail] = await tx
      .select({ id: outbox.id, userId: outbox.userId, sentAt: outbox.sentAt })
      .from(outbox)
      .where(eq(outbox.providerId, news.providerId));
    if (!mail) return false;
    const event = { id: news.id, kind: news.kind, outcome: news.happened, userId: mail.userId };
    if (!(await insertEvent(tx, event, nowMs))) return true;
    await tx.update(outbox).set(marksOf(news, nowMs)).where(eq(outbox.id, mail.id));
    if (news.unreachable) await markUnreachable(tx, mail.userId, news.unreachable, nowMs);
    if (news.happened === 'delivered' && mail.sentAt !== null) await markReached(tx, mail.userId, mail.sentAt);
    return true;
  });
}

function marksOf({ happened, problem }: DeliveryNews, nowMs: number) {
  const lastProblem = problem ? { lastProblem: problem } : {};
  if (happened === 'delivered') return { deliveredAt: nowMs };
  if (happened === 'bounced') return { bouncedAt: nowMs, ...lastProblem };
  if (happened === 'complained') return { complainedAt: nowMs, ...lastProblem };
  return { state: 'failed' as const, ...lastProblem };
}

/** A complaint outweighs a bounce: delivery does not undo it. */
async function markUnreachable(tx: Tx, userId: string, why: 'bounced' | 'complained', nowMs: number): Promise<void> {
  const isNew = or(isNull(users.unreachableWhy), eq(users.unreachableWhy, 'bounced'));
  await tx
    .update(users)
    .set({ unreachableSinceAt: sql`coalesce(${users.unreachableSinceAt}, ${nowMs})`, unreachableWhy: why })
    .where(and(eq(users.id, userId), isNew));
}

async function markReached(tx: Tx, userId: string, sentAt: number): Promise<void> {
  await tx
    .update(users)
    .set({ unreachableSinceAt: null, unreachableWhy: null })
    .where(and(eq(users.id, userId), eq(users.unreachableWhy, 'bounced'), lt(users.unreachableSinceAt, sentAt)));
}
