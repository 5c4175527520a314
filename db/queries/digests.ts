import { and, eq, gt, inArray, isNotNull, isNull, lt, lte, max, or, sql } from 'drizzle-orm';
import type { MailWish } from './mail-settings';
import { markTold, nextNewsAt } from './news';
import { insertMail } from './outbox';
import { write, type Tx } from '../client';
import { prepared } from '../prepared';
import { buildIsVisible, entryIsVisible } from '../scope';
import { buildPeople, builds, diaryEvents, entries, mailSettings, users } from '../schema';
import { isStaffRole } from '@/lib/access';
import { nextDigestAt, soundZone } from '@/lib/schedule/digest-times';
import type { Viewer } from '@/lib/viewer';

export type DueReader = {
  viewer: Viewer;
  wish: Pick<MailWish, 'cadence' | 'hourLocal' | 'weekday'>;
  toldSeq: number;
  upToSeq: number;
  dueAt: number;
  leaseEndsAt: number;
};

/**
 * Takes the readers whose digests are due next, at most `limit`, for `leaseMs`. No viewer: the job's own list, and what
 * it finds for a reader is read with that reader's rights.
 */
export function claimDueReaders(owner: string, nowMs: number, leaseMs: number, limit: number): Promise<DueReader[]> {
  return write(async (tx) => {
    const leaseEndsAt = nowMs + leaseMs;
    const isFree = or(isNull(mailSettings.leaseEndsAt), lt(mailSettings.leaseEndsAt, nowMs));
    const next = tx
      .select({ id: mailSettings.userId })
      .from(mailSettings)
      .where(and(isNotNull(mailSettings.nextDigestAt), lte(mailSettings.nextDigestAt, nowMs), isFree))
      .orderBy(mailSettings.nextDigestAt)
      .limit(limit);
    const claimed = await tx
      .update(mailSettings)
      .set({ leaseOwner: owner, leaseEndsAt })
      .where(inArray(mailSettings.userId, next))
      .returning();
    if (claimed.length === 0) return [];
    const viewers = await findViewers(
      tx,
      claimed.map(({ userId }) => userId),
    );
    const [last] = await tx.select({ seq: max(diaryEvents.seq) }).from(diaryEvents);
    return claimed.map(({ userId, cadence, hourLocal, weekday, toldSeq, nextDigestAt: dueAt }) => {
      const viewer = viewers.find(({ id }) => id === userId);
      if (!viewer) throw new Error('mail settings of nobody');
      const wish = { cadence, hourLocal, weekday };
      return { viewer, wish, toldSeq, upToSeq: last?.seq ?? 0, dueAt: dueAt ?? nowMs, leaseEndsAt };
    });
  });
}

function findViewers(tx: Tx, ids: string[]): Promise<Viewer[]> {
  const { id, role, name, department, timeZone } = users;
  return tx.select({ id, role, name, department, timeZone }).from(users).where(inArray(users.id, ids));
}

export const MAX_ENTRIES_TOLD = 500;

// Artists reach what buyers do: the role decides the shape of the condition only between the client side and staff.
const reader = { id: sql.placeholder('readerId'), role: 'buyer' } as const;

const untoldEntries = prepared((on) =>
  on
    .selectDistinct({ entryId: diaryEvents.entryId })
    .from(diaryEvents)
    .innerJoin(entries, eq(entries.id, diaryEvents.entryId))
    .innerJoin(builds, eq(builds.id, diaryEvents.buildId))
    .where(
      and(
        inArray(
          diaryEvents.buildId,
          on.select({ id: buildPeople.buildId }).from(buildPeople).where(eq(buildPeople.userId, reader.id)),
        ),
        gt(diaryEvents.seq, sql.placeholder('toldSeq')),
        lte(diaryEvents.seq, sql.placeholder('upToSeq')),
        buildIsVisible(reader),
        entryIsVisible(reader),
      ),
    )
    .orderBy(diaryEvents.seq)
    .limit(MAX_ENTRIES_TOLD)
    .prepare(),
);

/** The entries that this reader has not been told of yet and may read now, oldest first, at most 500; none for staff. */
export async function listUntold({ viewer, toldSeq, upToSeq }: Pick<DueReader, 'viewer' | 'toldSeq' | 'upToSeq'>) {
  if (isStaffRole(viewer.role)) return [];
  return untoldEntries().all({ readerId: viewer.id, toldSeq, upToSeq });
}

export type WrittenDigest = { due: DueReader; entryIds: string[]; newsIds: string[] };

/**
 * Writes these digests, advances their readers' cursors and sets the next ones, all or nothing; a reader whose lease is
 * somebody else's by now is left out. Who wants mail at once and was woken again in the meantime stays woken.
 * @returns for how many readers it did
 */
export function writeDigests(owner: string, digests: WrittenDigest[], nowMs: number): Promise<number> {
  return write(async (tx) => {
    let written = 0;
    for (const digest of digests) if (await writeDigest(tx, owner, digest, nowMs)) written += 1;
    return written;
  });
}

async function writeDigest(tx: Tx, owner: string, digest: WrittenDigest, nowMs: number): Promise<boolean> {
  const { due, entryIds, newsIds } = digest;
  const { viewer, toldSeq, upToSeq, dueAt, leaseEndsAt } = due;
  const isMine = and(
    eq(mailSettings.userId, viewer.id),
    eq(mailSettings.leaseOwner, owner),
    eq(mailSettings.leaseEndsAt, leaseEndsAt),
    eq(mailSettings.toldSeq, toldSeq),
  );
  const [settings] = await tx
    .update(mailSettings)
    .set({ toldSeq: upToSeq, nextDigestAt: nextOf(due, nowMs), leaseOwner: null, leaseEndsAt: null })
    .where(isMine)
    .returning({ cadence: mailSettings.cadence });
  if (!settings) return false;
  if (settings.cadence === 'none' || (entryIds.length === 0 && newsIds.length === 0)) return true;
  const about = { entryIds, ...(newsIds.length > 0 ? { newsIds } : {}) };
  const dedupeKey = `digest/${viewer.id}/${upToSeq}/${dueAt}`;
  await insertMail(tx, { kind: 'digest', userId: viewer.id, about, dedupeKey }, nowMs);
  await markTold(tx, newsIds, nowMs);
  return true;
}

function nextOf({ viewer, wish, dueAt }: DueReader, nowMs: number) {
  if (wish.cadence === 'at_once')
    return sql`case when ${mailSettings.nextDigestAt} = ${dueAt} then ${nextNewsAt(viewer.id, nowMs)} else ${mailSettings.nextDigestAt} end`;
  const regular = nextDigestAt({ ...wish, zone: soundZone(viewer.timeZone) }, nowMs);
  return sql`case when ${mailSettings.cadence} = 'none' then null else ${regular} end`;
}
