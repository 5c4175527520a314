import { and, asc, eq, gt, isNull, max, sql, count } from 'drizzle-orm';
import { requireCan } from './standing';
import { db } from '../client';
import { buildIsVisible, isOpen } from '../scope';
import { assignments, buildPeople, builds, routes, routeStages, sessions, standingAssignments, users } from '../schema';
import { OutOfReach } from '@/lib/errors';
import type { Viewer } from '@/lib/viewer';

/** One person as the admin manages them. @throws OutOfReach */
export async function requirePersonPage(viewer: Viewer, userId: string, nowMs: number) {
  await requireCan(viewer, 'people.manage');
  const [person] = await db()
    .select({
      id: users.id,
      name: users.name,
      email: users.email,
      role: users.role,
      department: users.department,
      invitedAt: users.createdAt,
      verifiedAt: users.emailVerifiedAt,
      disabledAt: users.disabledAt,
    })
    .from(users)
    .where(eq(users.id, userId));
  if (!person) throw new OutOfReach();
  const live = and(eq(sessions.userId, userId), gt(sessions.endsAt, nowMs), gt(sessions.idleEndsAt, nowMs));
  const [use] = await db()
    .select({ sessionCount: count(), lastSeenAt: max(sessions.lastSeenAt) })
    .from(sessions)
    .where(live);
  return { ...person, sessionCount: use?.sessionCount ?? 0, lastSeenAt: use?.lastSeenAt ?? null };
}

export type PersonPage = Awaited<ReturnType<typeof requirePersonPage>>;

/** The builds somebody is assigned to now, by number. */
export async function listAssignmentsOf(viewer: Viewer, userId: string) {
  await requireCan(viewer, 'assignment.manage');
  return db()
    .select({
      id: assignments.id,
      orderNumber: builds.orderNumber,
      cleared: assignments.cleared,
      stepInReason: assignments.stepInReason,
      startedAt: assignments.startedAt,
      isOpen: sql<boolean>`${isOpen}`.mapWith(Boolean),
    })
    .from(assignments)
    .innerJoin(builds, eq(builds.id, assignments.buildId))
    .where(and(eq(assignments.userId, userId), isNull(assignments.endedAt)))
    .orderBy(asc(builds.orderNumber))
    .limit(200);
}

export type AssignmentRow = Awaited<ReturnType<typeof listAssignmentsOf>>[number];

/** The builds somebody owns or looks on at. Of those held from view only how many: whose they are is part of the secret. */
export async function listStandingsOf(viewer: Viewer, userId: string) {
  await requireCan(viewer, 'people.manage');
  const rows = await db()
    .select({
      orderNumber: builds.orderNumber,
      standing: buildPeople.standing,
      isOpen: sql<boolean>`${isOpen}`.mapWith(Boolean),
    })
    .from(buildPeople)
    .innerJoin(builds, eq(builds.id, buildPeople.buildId))
    .where(eq(buildPeople.userId, userId))
    .orderBy(asc(builds.orderNumber))
    .limit(200);
  const open = rows.filter((row) => row.isOpen);
  return { open, heldCount: rows.length - open.length };
}

const ruleColumns = {
  id: standingAssignments.id,
  userId: standingAssignments.userId,
  name: users.name,
  role: users.role,
  department: users.department,
  timeZone: users.timeZone,
  routeName: routes.name,
  stageName: sql<
    string | null
  >`(select ${routeStages.name} from ${routeStages} where ${routeStages.key} = ${standingAssignments.stageKey} limit 1)`,
};

function liveRules(userId?: string) {
  const who = userId === undefined ? undefined : eq(standingAssignments.userId, userId);
  return db()
    .select(ruleColumns)
    .from(standingAssignments)
    .innerJoin(users, eq(users.id, standingAssignments.userId))
    .leftJoin(routes, eq(routes.id, standingAssignments.routeId))
    .where(and(isNull(standingAssignments.endedAt), who))
    .orderBy(asc(users.name))
    .limit(100);
}

/** The rules that put somebody on builds as they arrive. */
export async function listRulesOf(viewer: Viewer, userId: string) {
  await requireCan(viewer, 'assignment.manage');
  return liveRules(userId);
}

export type RuleRow = Awaited<ReturnType<typeof listRulesOf>>[number];

/** Who is on one build, by number, and through what. Of a build held from view the client side stays unnamed. @throws OutOfReach */
export async function reviewBuild(viewer: Viewer, orderNumber: string) {
  await requireCan(viewer, 'builds.count');
  const [build] = await db()
    .select({ id: builds.id, isOpen: sql<boolean>`${isOpen}`.mapWith(Boolean), deliveredAt: builds.deliveredAt })
    .from(builds)
    .where(eq(builds.orderNumber, orderNumber));
  if (!build) throw new OutOfReach();
  const staff = await listAssigned(build.id);
  const clients = build.isOpen ? await listClientNames(build.id) : null;
  const assigned = new Set(staff.map(({ userId }) => userId));
  const rules = (await liveRules()).filter(({ userId }) => !assigned.has(userId));
  const reaches = await Promise.all(rules.map(({ userId, ...rule }) => isReached({ ...rule, id: userId }, build.id)));
  return {
    orderNumber,
    isOpen: build.isOpen,
    deliveredAt: build.deliveredAt,
    staff,
    clients,
    byRule: rules.filter((_rule, index) => reaches[index]),
  };
}

export type BuildReview = Awaited<ReturnType<typeof reviewBuild>>;

async function isReached(person: Viewer, buildId: string): Promise<boolean> {
  const rows = await db()
    .select({ id: builds.id })
    .from(builds)
    .where(and(eq(builds.id, buildId), buildIsVisible(person)));
  return rows.length > 0;
}

function listAssigned(buildId: string) {
  return db()
    .select({
      id: assignments.id,
      userId: users.id,
      name: users.name,
      role: users.role,
      department: users.department,
      cleared: assignments.cleared,
      stepInReason: assignments.stepInReason,
      startedAt: assignments.startedAt,
    })
    .from(assignments)
    .innerJoin(users, eq(users.id, assignments.userId))
    .where(and(eq(assignments.buildId, buildId), isNull(assignments.endedAt)))
    .orderBy(asc(users.name))
    .limit(100);
}

function listClientNames(buildId: string) {
  return db()
    .select({ userId: users.id, name: users.name, role: users.role, standing: buildPeople.standing })
    .from(buildPeople)
    .innerJoin(users, eq(users.id, buildPeople.userId))
    .where(eq(buildPeople.buildId, buildId))
    .orderBy(sql`${buildPeople.standing} = 'owner' desc`, asc(users.name))
    .limit(100);
}
