import { and, asc, eq, sql } from 'drizzle-orm';
import { endWork } from './assignments';
import { recordEvent } from './audit';
import { touchDiariesOf } from './builds';
import { lastSeq } from './mail-settings';
import { queueMail } from './outbox';
import { listOwnerIds } from './owners';
import { routeAgain } from './pen';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { correlated } from '../correlated';
import { assignments, buildPeople, builds, departments, mailSettings, sessions, users } from '../schema';
import { newId } from '../schema/columns';
import { isClientRole, isStaffRole, type Role } from '@/lib/access';
import { BadInput, OutOfReach } from '@/lib/errors';
import type { ChangedPerson, Invitation } from '@/lib/validation/people';
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

/** Writes a person down who was not known, and invites them by mail. @returns their id */
export async function addPerson(
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
