import { createHash } from 'node:crypto';
import { and, asc, desc, eq, gt, inArray, lt, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { auditEvents, builds, users } from '../schema';
import type { Viewer } from '@/lib/viewer';

export type AuditAction =
  | 'signed_in'
  | 'signed_out'
  | 'sessions_ended'
  | 'invited'
  | 'role_changed'
  | 'person_closed'
  | 'person_reopened'
  | 'assigned'
  | 'cleared'
  | 'assignment_ended'
  | 'stepped_in'
  | 'companion_added'
  | 'companion_removed'
  | 'held'
  | 'opened'
  | 'entry_released'
  | 'sign_off_asked'
  | 'sign_off_withdrawn'
  | 'sign_off_signed'
  | 'sign_off_change_asked'
  | 'check_passed'
  | 'check_failed'
  | 'check_told'
  | 'check_kept'
  | 'final_check_passed'
  | 'shipped'
  | 'delivered'
  | 'build_read';

type AuditEvent = {
  actorId: string | null;
  action: AuditAction;
  outcome?: 'done' | 'refused';
  buildId?: string;
  subjectId?: string;
  reason?: string;
};

const PAGE = 50;

const GENESIS = '0'.repeat(64);

type Chained = Omit<typeof auditEvents.$inferSelect, 'seq' | 'hash'>;

function hashOf(event: Chained): string {
  const { at, actorId, action, buildId, subjectId, outcome, reason, previousHash } = event;
  const fields = [previousHash, at, actorId, action, buildId, subjectId, outcome, reason];
  return createHash('sha256').update(JSON.stringify(fields)).digest('hex');
}

/** Adds one event to the chain; call it in the transaction of what it records. */
export async function recordEvent(tx: Tx, event: AuditEvent, nowMs: number): Promise<void> {
  const [last] = await tx.select({ hash: auditEvents.hash }).from(auditEvents).orderBy(desc(auditEvents.seq)).limit(1);
  const row: Chained = {
    at: nowMs,
    actorId: event.actorId,
    action: event.action,
    buildId: event.buildId ?? null,
    subjectId: event.subjectId ?? null,
    outcome: event.outcome ?? 'done',
    reason: event.reason ?? null,
    previousHash: last?.hash ?? GENESIS,
  };
  await tx.insert(auditEvents).values({ ...row, hash: hashOf(row) });
}

/** Writes down that somebody was turned away from a build that exists; silent about one that does not. */
export async function recordRefusal(viewerId: string, orderNumber: string, nowMs: number): Promise<void> {
  const [build] = await db().select({ id: builds.id }).from(builds).where(eq(builds.orderNumber, orderNumber)).limit(1);
  if (!build) return;
  const event: AuditEvent = { actorId: viewerId, action: 'build_read', outcome: 'refused', buildId: build.id };
  await write((tx) => recordEvent(tx, event, nowMs));
}

/** The first event whose hash does not follow from what stands before it, or null when the chain holds. */
export async function findBrokenLink(): Promise<number | null> {
  let previous = GENESIS;
  for (let after = 0; ;) {
    const page = await db()
      .select()
      .from(auditEvents)
      .where(gt(auditEvents.seq, after))
      .orderBy(asc(auditEvents.seq))
      .limit(500);
    for (const { seq, hash, ...event } of page) {
      if (event.previousHash !== previous || hashOf(event) !== hash) return seq;
      previous = hash;
      after = seq;
    }
    if (page.length < 500) return null;
  }
}

const accessActions: AuditAction[] = [
  'assigned',
  'cleared',
  'assignment_ended',
  'stepped_in',
  'companion_added',
  'companion_removed',
  'held',
  'opened',
];

const actors = alias(users, 'actors');
const subjects = alias(users, 'subjects');

const told = {
  seq: auditEvents.seq,
  at: auditEvents.at,
  action: sql<AuditAction>`${auditEvents.action}`,
  outcome: auditEvents.outcome,
  reason: auditEvents.reason,
  actorId: auditEvents.actorId,
  actorName: actors.name,
  subjectId: auditEvents.subjectId,
  subjectName: subjects.name,
};

/** Who was let on or off this build, and by whom, newest first, as its owner and its reps may read it. */
export async function listAccessEvents(viewer: Viewer, orderNumber: string) {
  const build = await requireCan(viewer, 'access.read_events', orderNumber);
  const ofBuild = and(
    eq(auditEvents.buildId, build.id),
    eq(auditEvents.outcome, 'done'),
    inArray(auditEvents.action, accessActions),
  );
  return db()
    .select(told)
    .from(auditEvents)
    .leftJoin(actors, eq(actors.id, auditEvents.actorId))
    .leftJoin(subjects, eq(subjects.id, auditEvents.subjectId))
    .where(ofBuild)
    .orderBy(desc(auditEvents.seq))
    .limit(PAGE);
}

export type AccessEvent = Awaited<ReturnType<typeof listAccessEvents>>[number];

/** The audit log for the admin: ids resolved to names, newest first, 50 a page. */
export async function listAuditEvents(viewer: Viewer, beforeSeq: number) {
  await requireCan(viewer, 'people.manage');
  return db()
    .select({ ...told, orderNumber: builds.orderNumber })
    .from(auditEvents)
    .leftJoin(actors, eq(actors.id, auditEvents.actorId))
    .leftJoin(subjects, eq(subjects.id, auditEvents.subjectId))
    .leftJoin(builds, eq(builds.id, auditEvents.buildId))
    .where(lt(auditEvents.seq, beforeSeq))
    .orderBy(desc(auditEvents.seq))
    .limit(PAGE);
}

/** `findBrokenLink` for the admin; it walks the whole log. */
export async function checkRecord(viewer: Viewer): Promise<number | null> {
  await requireCan(viewer, 'people.manage');
  return findBrokenLink();
}
