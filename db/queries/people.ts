import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import { recordEvent } from './audit';
import { touchDiariesOf } from './builds';
import { lastSeq } from './mail-settings';
import { queueMail } from './outbox';
import { listOwnerIds } from './owners';
import { routeAgain } from './pen';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { correlated } from '../correlated';
import {
  assignments,
  buildPeople,
  builds,
  departments,
  mailSettings,
  sessions,
  standingAssignments,
  users,
} from '../schema';
import { newId } from '../schema/columns';
import { isClientRole, isStaffRole, type Role } from '@/lib/access';
import { BadInput, OutOfReach } from '@/lib/errors';
import type { Assignment, ChangedPerson, Invitation, StepIn } from '@/lib/validation/people';
import type { Viewer } from '@/lib/viewer';

const PAGE = 50;

/** Everybody with an account or an invitation, by name, 50 a page; `afterId` is the last person of the page above. */
export async function listPeople(viewer: Viewer, search: string, afterId?: string) {
  await requireCan(viewer, 'people.manage');
  const matches = sql`(instr(lower(${users.name}), lower(${search})) > 0 or instr(${users.email}, lower(${search})) > 0)`;
  // A self-join: drizzle would give both sides of one table the same name.
  const isBelow = sql`(${users.name}, ${users.id}) > (select above.name, above.id from users as above where above.id = ${afterId})`;
  return db()
    .select({
      id: users.id,
      name: users.name,
      email: users.email,
      role: users.role,
      department: users.department,
      verifiedAt: users.emailVerifiedAt,
      disabledAt: users.disabledAt,
      sessionCount: correlated(
        sql<number>`(select count(*) from ${sessions} where ${sessions.userId} = ${users.id} and ${sessions.endsAt} > unixepoch() * 1000 and ${sessions.idleEndsAt} > unixepoch() * 1000)`,
      ),
      buildCount: correlated(
        sql<number>`(select count(*) from ${assignments} where ${assignments.userId} = ${users.id} and ${assignments.endedAt} is null) + (select count(*) from ${buildPeople} where ${buildPeople.userId} = ${users.id})`,
      ),
    })
    .from(users)
    .where(and(matches, afterId === undefined ? undefined : isBelow))
    .orderBy(asc(users.name), asc(users.id))
    .limit(PAGE);
}

export type PersonRow = Awaited<ReturnType<typeof listPeople>>[number];

export function listDepartments() {
  return db()
    .select({ key: departments.key, name: departments.name })
    .from(departments)
    .orderBy(asc(departments.position));
}

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

/** Invites one person, and mails them. With an order number a buyer or artist becomes the owner of that build. */
export function invitePerson(viewer: Viewer, invitation: Invitation, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'people.manage');
    const [known] = await tx.select({ id: users.id }).from(users).where(eq(users.email, invitation.email));
    if (known)
      throw new BadInput({
        email: 'Somebody with this address has been invited already. Find them in the list below.',
      });
    const department = await requireDepartment(tx, invitation);
    const userId = await addPerson(tx, viewer, { ...invitation, department }, nowMs);
    if (invitation.orderNumber) await makeOwner(tx, userId, invitation.role, invitation.orderNumber);
  });
}

/** Where a builder works; nobody else has a department. */
async function requireDepartment(tx: Tx, person: { role: Role; department: string | null }): Promise<string | null> {
  if (person.role !== 'builder') return null;
  const [known] = await tx
    .select({ key: departments.key })
    .from(departments)
    .where(eq(departments.key, person.department ?? ''));
  if (!known) throw new BadInput({ department: 'Choose the department a builder works in.' });
  return known.key;
}

type NewPerson = { name: string; email: string; role: Role; department: string | null };

async function addPerson(
  tx: Tx,
  viewer: Viewer,
  { name, email, role, department }: NewPerson,
  nowMs: number,
): Promise<string> {
  const userId = newId();
  await tx
    .insert(users)
    .values({ id: userId, name, email, role, department, invitedById: viewer.id, createdAt: nowMs });
  if (isClientRole(role))
    await tx.insert(mailSettings).values({ userId, cadence: 'weekly', nextDigestAt: nowMs, toldSeq: lastSeq });
  await recordEvent(tx, { actorId: viewer.id, action: 'invited', subjectId: userId }, nowMs);
  const about = { inviterId: viewer.id };
  await queueMail(tx, { kind: 'invitation', userId, about, dedupeKey: `invitation/${userId}` }, nowMs);
  return userId;
}

async function makeOwner(tx: Tx, userId: string, role: Role, orderNumber: string): Promise<void> {
  if (!isClientRole(role))
    throw new BadInput({ orderNumber: 'Only a buyer or an artist can own a build. Leave the order number empty.' });
  const [build] = await tx.select({ id: builds.id }).from(builds).where(eq(builds.orderNumber, orderNumber));
  if (!build) throw new BadInput({ orderNumber: 'There is no order with this number.' });
  if ((await listOwnerIds(tx, build.id)).length > 0)
    throw new BadInput({ orderNumber: 'This order has an owner already.' });
  await tx.insert(buildPeople).values({ buildId: build.id, userId, standing: 'owner' });
}

/**
 * Changes what somebody is. Between the client side and the shop nobody moves: such a person gets a second account. Who
 * becomes an admin leaves every build, since an admin is on one only by stepping in; an admin who stops being one too.
 */
export function changePerson(viewer: Viewer, change: ChangedPerson, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'people.manage');
    const person = await requirePerson(tx, change.userId);
    if (person.id === viewer.id) throw new BadInput({ role: 'Your own role is changed by another admin.' });
    if (isStaffRole(person.role) !== isStaffRole(change.role)) {
      throw new BadInput({
        role: 'Nobody moves between the client side and the shop. Invite them anew at another address.',
      });
    }
    const department = await requireDepartment(tx, change);
    await tx.update(users).set({ role: change.role, department }).where(eq(users.id, person.id));
    await touchDiariesOf(tx, person.id);
    if ((person.role === 'admin') !== (change.role === 'admin')) await endWork(tx, viewer, person.id, nowMs);
    else await routeAgain(tx, { holderId: person.id }, nowMs);
    await recordEvent(
      tx,
      { actorId: viewer.id, action: 'role_changed', subjectId: person.id, reason: change.role },
      nowMs,
    );
  });
}

async function requirePerson(tx: Tx, userId: string) {
  const [person] = await tx.select({ id: users.id, role: users.role }).from(users).where(eq(users.id, userId));
  if (!person) throw new OutOfReach();
  return person;
}

/** Closes an account: every session ends now, every assignment with it. What they wrote stays under their name. */
export function closePerson(viewer: Viewer, userId: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'people.manage');
    const person = await requirePerson(tx, userId);
    if (person.id === viewer.id) throw new BadInput({ userId: 'Your own account is closed by another admin.' });
    await tx.update(users).set({ disabledAt: nowMs }).where(eq(users.id, person.id));
    await tx.delete(sessions).where(eq(sessions.userId, person.id));
    await endWork(tx, viewer, person.id, nowMs);
    await recordEvent(tx, { actorId: viewer.id, action: 'person_closed', subjectId: person.id }, nowMs);
  });
}

/** Takes somebody off every build they were put on, and ends the rules that put them there. */
async function endWork(tx: Tx, viewer: Viewer, userId: string, nowMs: number): Promise<void> {
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

/** Opens a closed account again, without its old assignments. */
export function reopenPerson(viewer: Viewer, userId: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'people.manage');
    const person = await requirePerson(tx, userId);
    await tx.update(users).set({ disabledAt: null }).where(eq(users.id, person.id));
    await recordEvent(tx, { actorId: viewer.id, action: 'person_reopened', subjectId: person.id }, nowMs);
  });
}

/** Signs somebody out of every browser. */
export function endSessionsOf(viewer: Viewer, userId: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'people.manage');
    const person = await requirePerson(tx, userId);
    await tx.delete(sessions).where(eq(sessions.userId, person.id));
    await recordEvent(tx, { actorId: viewer.id, action: 'sessions_ended', subjectId: person.id }, nowMs);
  });
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
    const person = await requirePerson(tx, userId);
    if (person.role !== 'builder' && person.role !== 'rep') {
      throw new BadInput({ userId: 'Only builders and reps are assigned. An admin steps in, with a reason.' });
    }
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

type NewAssignment = { buildId: string; userId: string; cleared: boolean; reason: string | null };

async function addAssignment(
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

/** The owner lets somebody look on. A new address is invited; nobody looks on while the build is held from view. */
export function addCompanion(
  viewer: Viewer,
  orderNumber: string,
  person: { name: string; email: string },
  nowMs: number,
): Promise<void> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'companion.manage', orderNumber, tx);
    const [row] = await tx.select({ heldUntilAt: builds.heldUntilAt }).from(builds).where(eq(builds.id, build.id));
    if (row?.heldUntilAt && row.heldUntilAt > nowMs) {
      throw new BadInput({ email: 'This build is held from view. Companions can be added when the hold ends.' });
    }
    const [known] = await tx
      .select({ id: users.id, role: users.role })
      .from(users)
      .where(eq(users.email, person.email));
    if (known && isStaffRole(known.role))
      throw new BadInput({ email: 'Use a private address: this one belongs to the shop.' });
    const userId = known?.id ?? (await addPerson(tx, viewer, { ...person, role: 'buyer', department: null }, nowMs));
    const added = await tx
      .insert(buildPeople)
      .values({ buildId: build.id, userId, standing: 'companion' })
      .onConflictDoNothing()
      .returning({ userId: buildPeople.userId });
    if (added.length === 0) throw new BadInput({ email: 'This person is on the build already.' });
    await recordEvent(
      tx,
      { actorId: viewer.id, action: 'companion_added', buildId: build.id, subjectId: userId },
      nowMs,
    );
  });
}

export function removeCompanion(viewer: Viewer, orderNumber: string, userId: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'companion.manage', orderNumber, tx);
    const companion = and(
      eq(buildPeople.buildId, build.id),
      eq(buildPeople.userId, userId),
      eq(buildPeople.standing, 'companion'),
    );
    const removed = await tx.delete(buildPeople).where(companion).returning({ userId: buildPeople.userId });
    if (removed.length === 0) throw new OutOfReach();
    await recordEvent(
      tx,
      { actorId: viewer.id, action: 'companion_removed', buildId: build.id, subjectId: userId },
      nowMs,
    );
  });
}

/**
 * Holds a build from view until an instant, or opens it (null). Companions stop seeing it at once, and so do the staff
 * who are not cleared. Who holds it is cleared, and put on it if only a rule had: a rule never covers a held build.
 */
export function holdBuild(viewer: Viewer, orderNumber: string, untilAt: number | null, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'build.hold', orderNumber, tx);
    await tx.update(builds).set({ heldUntilAt: untilAt }).where(eq(builds.id, build.id));
    if (untilAt !== null)
      await addAssignment(tx, viewer, { buildId: build.id, userId: viewer.id, cleared: true, reason: null }, nowMs);
    const action = untilAt === null ? 'opened' : 'held';
    await recordEvent(tx, { actorId: viewer.id, action, buildId: build.id }, nowMs);
    await routeAgain(tx, { buildId: build.id }, nowMs);
  });
}
