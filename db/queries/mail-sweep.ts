import { and, inArray, isNotNull, isNull, lt, sql } from 'drizzle-orm';
import { write } from '../client';
import { newsItems, outbox, providerEvents } from '../schema';

const DAY_MS = 86_400_000;
/** Longer than the longest wait between two digests, and than anybody asks to have one sent again. */
export const NEWS_KEPT_MS = 90 * DAY_MS;
/** Far longer than a provider tells an event again. */
export const EVENTS_KEPT_MS = 90 * DAY_MS;
export const BODIES_KEPT_MS = 30 * DAY_MS;
/** The write queue is held no longer than this many rows take. */
const AT_ONCE = 500;

/** Forgets what was told long ago, or waited for a digest that never came. @returns how much, at most 500 */
export function sweepNews(nowMs: number): Promise<number> {
  return write(async (tx) => {
    const old = tx
      .select({ id: newsItems.id })
      .from(newsItems)
      .where(lt(newsItems.createdAt, nowMs - NEWS_KEPT_MS))
      .limit(AT_ONCE);
    return (await tx.delete(newsItems).where(inArray(newsItems.id, old)).returning({ id: newsItems.id })).length;
  });
}

/** Forgets what the mail provider told long ago. @returns how much, at most 500 */
export function sweepProviderEvents(nowMs: number): Promise<number> {
  return write(async (tx) => {
    const old = tx
      .select({ id: providerEvents.id })
      .from(providerEvents)
      .where(lt(providerEvents.receivedAt, nowMs - EVENTS_KEPT_MS))
      .limit(AT_ONCE);
    const gone = await tx
      .delete(providerEvents)
      .where(inArray(providerEvents.id, old))
      .returning({ id: providerEvents.id });
    return gone.length;
  });
}

/**
 * Takes the text out of mails that are over for a month; their keys, headers and outcomes stay. A failed one keeps it: an
 * admin may try the same bytes again. @returns of how many, at most 500
 */
export function dropOldBodies(nowMs: number): Promise<number> {
  return write(async (tx) => {
    const old = tx
      .select({ id: outbox.id })
      .from(outbox)
      .where(
        and(
          isNotNull(outbox.frozen),
          isNull(outbox.bodyDroppedAt),
          lt(outbox.createdAt, nowMs - BODIES_KEPT_MS),
          // The plus keeps SQLite from the index by state, where all that was ever sent stands.
          sql`+${outbox.state} in ('sent', 'dropped', 'parked')`,
        ),
      )
      .limit(AT_ONCE);
    const emptied = await tx
      .update(outbox)
      .set({
        frozen: sql`json_set(${outbox.frozen}, '$.html', '', '$.text', '', '$.photos', json('[]'))`,
        bodyDroppedAt: nowMs,
      })
      .where(inArray(outbox.id, old))
      .returning({ id: outbox.id });
    return emptied.length;
  });
}
