import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import { recordEvent } from './audit';
import { routeAgain } from './pen';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { assignments, builds, standingAssignments, users } from '../schema';
import { BadInput, OutOfReach } from '@/lib/errors';
import type { Assignment, StepIn } from '@/lib/validation/people';
import type { Viewer } from '@/lib/viewer';

/** Who can be put on builds. */
export async function listStaffPeople(viewer: Viewer) {
  await requireCan(viewer, 'assignment.manage');
  return db()
    .select({ id: users.id, name: users.name, role: users.role, department: users.department })
    .from(users)
    .where(and(isNull(users.disabledAt), sql`${users.role} in ('builder', 'rep')`))
    .orderBy(asc(users.role), asc(users.name))
    .limit(200);
}

/**
 * Puts staff on builds, several at once, or on none if one of the numbers is unknown; who is on one already stays, and
 * is cleared for its hold if that is asked for. @returns how many assignments are new or newly cleared
 */
export function assignStaff(
  viewer: Viewer,
  { userId, orderNumbers, cleared }: Assignment,
  nowMs: number,
): Promise<number> {
  return write(async (tx) => {
    await requireCan(viewer, 'assignment.manage');
    await requireAssignable(tx, userId);
    let added = 0;
    for (const orderNumber of orderNumbers) {
      const [build] = await tx.select({ id: builds.id }).from(builds).where(eq(builds.orderNumber, orderNumber));
      if (!build)
        throw new BadInput({ orderNumbers: `There is no order ${orderNumber}. Nobody was assigned to anything.` });
      added += await addAssignment(tx, viewer, { buildId: build.id, userId, cleared, reason: null }, nowMs);
    }
    return added;
  });
}

async function requireAssignable(tx: Tx, userId: string): Promise<void> {
  const [person] = await tx.select({ role: users.role }).from(users).where(eq(users.id, userId));
  if (!person) throw new OutOfReach();
  if (person.role === 'builder' || person.role === 'rep') return;
  throw new BadInput({ userId: 'Only builders and reps are assigned. An admin steps in, with a reason.' });
}

type NewAssignment = { buildId: string; userId: string; cleared: boolean; reason: string | null };

/** Puts one person on one build and writes it down. @returns 1 when that, or their clearance, is new */
export async function addAssignment(
  tx: Tx,
  viewer: Viewer,
  { buildId, userId, cleared, reason }: NewAssignment,
  nowMs: number,
): Promise<number> {
  const [added] = await tx
    .insert(assignments)
    .values({ buildId, userId, cleared, stepInReason: reason, assignedById: viewer.id, startedAt: nowMs })
    .onConflictDoNothing()
    .returning({ id: assignments.id });
  if (!added) return cleared ? clearForHold(tx, viewer, { buildId, userId }, nowMs) : 0;
  const action = reason === null ? 'assigned' : 'stepped_in';
  await recordEvent(tx, { actorId: viewer.id, action, buildId, subjectId: userId, reason: reason ?? undefined }, nowMs);
  await routeAgain(tx, { buildId }, nowMs);
  return 1;
}

async function clearForHold(
  tx: Tx,
  viewer: Viewer,
  { buildId, userId }: { buildId: string; userId: string },
  nowMs: number,
): Promise<number> {
  const uncleared = and(
    eq(assignments.buildId, buildId),
    eq(assignments.userId, userId),
    eq(assignments.cleared, false),
    isNull(assignments.endedAt),
  );
  const cleared = await tx
    .update(assignments)
    .set({ cleared: true })
    .where(uncleared)
    .returning({ id: assignments.id });
  if (cleared.length > 0)
    await recordEvent(tx, { actorId: viewer.id, action: 'cleared', buildId, subjectId: userId }, nowMs);
  return cleared.length;
}

/** Takes somebody off a build; their very next request is refused. */
export function endAssignment(viewer: Viewer, assignmentId: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'assignment.manage');
    const [ended] = await tx
      .update(assignments)
      .set({ endedAt: nowMs })
      .where(and(eq(assignments.id, assignmentId), isNull(assignments.endedAt)))
      .returning({ buildId: assignments.buildId, userId: assignments.userId });
    if (!ended) throw new OutOfReach();
    const { buildId, userId } = ended;
    await recordEvent(tx, { actorId: viewer.id, action: 'assignment_ended', buildId, subjectId: userId }, nowMs);
    await routeAgain(tx, { buildId, holderId: userId }, nowMs);
  });
}

/** An admin puts themselves on a build, cleared for a hold, with a reason that the owner can read. */
export function stepIn(viewer: Viewer, { orderNumber, reason }: StepIn, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'build.step_in');
    const [build] = await tx.select({ id: builds.id }).from(builds).where(eq(builds.orderNumber, orderNumber));
    if (!build) throw new BadInput({ orderNumber: 'There is no order with this number.' });
    await addAssignment(tx, viewer, { buildId: build.id, userId: viewer.id, cleared: true, reason }, nowMs);
  });
}

/** Takes somebody off every build they were put on, and ends the rules that put them there. */
export async function endWork(tx: Tx, viewer: Viewer, userId: string, nowMs: number): Promise<void> {
  const ended = await tx
    .update(assignments)
    .set({ endedAt: nowMs })
    .where(and(eq(assignments.userId, userId), isNull(assignments.endedAt)))
    .returning({ buildId: assignments.buildId });
  for (const { buildId } of ended)
    await recordEvent(tx, { actorId: viewer.id, action: 'assignment_ended', buildId, subjectId: userId }, nowMs);
  await tx
    .update(standingAssignments)
    .set({ endedAt: nowMs })
    .where(and(eq(standingAssignments.userId, userId), isNull(standingAssignments.endedAt)));
  await routeAgain(tx, { holderId: userId }, nowMs);
}
