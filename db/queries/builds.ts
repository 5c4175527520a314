import { and, asc, desc, eq, gt, inArray, isNotNull, isNull, lt, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import { ownerNameOf } from './owners';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { correlated } from '../correlated';
import { buildIsVisible, entryIsVisible, isOpen } from '../scope';
import { assignments, buildPeople, builds, buildStages, diaryVisits, entries, users } from '../schema';
import { can, isStaffRole } from '@/lib/access';
import type { Viewer } from '@/lib/viewer';

const PAGE = 40;
/** Before a first visit nothing counts as new. */
const ALL_OLD = Number.MAX_SAFE_INTEGER;

const stageNow = alias(buildStages, 'stage_now');
const isNow = and(eq(stageNow.buildId, builds.id), isNotNull(stageNow.startedAt), isNull(stageNow.finishedAt));
const stageCount = sql<number>`(select count(*) from ${buildStages} where ${buildStages.buildId} = ${builds.id})`;
const stagesDone = sql<number>`(select count(*) from ${buildStages} where ${buildStages.buildId} = ${builds.id} and ${buildStages.finishedAt} is not null)`;

/**
 * The builds this viewer reaches, newest order first, 40 a page; `before` is the last order number of the page above.
 * `newCount` counts entries since the viewer's last visit. The owner's name goes to staff only.
 */
export function listBuilds(viewer: Viewer, before?: string) {
  const newCount = sql<number>`(select count(*) from (select 1 from ${entries} where ${entries.buildId} = ${builds.id} and ${entryIsVisible(viewer)} and ${entries.authorId} <> ${viewer.id} and ${entries.datedAt} > coalesce((select ${diaryVisits.visitedAt} from ${diaryVisits} where ${diaryVisits.buildId} = ${builds.id} and ${diaryVisits.userId} = ${viewer.id}), ${ALL_OLD}) limit 100))`;
  return db()
    .select({
      orderNumber: builds.orderNumber,
      instrument: builds.instrument,
      finishName: builds.finishName,
      finishHex: builds.finishHex,
      rack: isStaffRole(viewer.role) ? builds.rack : sql<null>`null`,
      heldUntilAt: builds.heldUntilAt,
      deliveredAt: builds.deliveredAt,
      ownerName: isStaffRole(viewer.role) ? ownerNameOf(builds.id) : sql<null>`null`,
      stageName: stageNow.name,
      stageKey: stageNow.key,
      stageSince: stageNow.startedAt,
      stageCount,
      stagesDone,
      newCount,
    })
    .from(builds)
    .leftJoin(stageNow, isNow)
    .where(and(buildIsVisible(viewer), before ? lt(builds.orderNumber, before) : undefined))
    .orderBy(desc(builds.orderNumber))
    .limit(PAGE);
}

export type BuildRow = Awaited<ReturnType<typeof listBuilds>>[number];

/** One build as the head of its pages show it. @throws OutOfReach */
export async function requireBuild(viewer: Viewer, orderNumber: string) {
  const reached = await requireCan(viewer, 'diary.read', orderNumber);
  const [build] = await db()
    .select({
      id: builds.id,
      orderNumber: builds.orderNumber,
      instrument: builds.instrument,
      finishName: builds.finishName,
      finishHex: builds.finishHex,
      scaleLengthIn: builds.scaleLengthIn,
      rack: builds.rack,
      heldUntilAt: builds.heldUntilAt,
      readyAt: builds.readyAt,
      shippedAt: builds.shippedAt,
      shippedBy: builds.shippedBy,
      deliveredAt: builds.deliveredAt,
      releaseNeeded: builds.releaseNeeded,
      visitedAt: diaryVisits.visitedAt,
      visitBeforeAt: diaryVisits.visitBeforeAt,
    })
    .from(builds)
    .leftJoin(diaryVisits, and(eq(diaryVisits.buildId, builds.id), eq(diaryVisits.userId, viewer.id)))
    .where(eq(builds.id, reached.id));
  if (!build) throw new Error('a reached build without a row');
  return { ...build, standing: reached.standing };
}

export type BuildHead = Awaited<ReturnType<typeof requireBuild>>;

export function listStages(viewer: Viewer, buildId: string) {
  return db()
    .select({
      id: buildStages.id,
      position: buildStages.position,
      key: buildStages.key,
      name: buildStages.name,
      department: buildStages.department,
      work: buildStages.work,
      startedAt: buildStages.startedAt,
      finishedAt: buildStages.finishedAt,
      usualDays: buildStages.usualDays,
    })
    .from(buildStages)
    .innerJoin(builds, eq(builds.id, buildStages.buildId))
    .where(and(eq(buildStages.buildId, buildId), buildIsVisible(viewer)))
    .orderBy(asc(buildStages.position));
}

export type StageRow = Awaited<ReturnType<typeof listStages>>[number];

/** The staff on a build by name and department; never an address. */
export function listStaff(viewer: Viewer, buildId: string) {
  return db()
    .select({ id: users.id, name: users.name, role: users.role, department: users.department })
    .from(assignments)
    .innerJoin(users, and(eq(users.id, assignments.userId), isNull(users.disabledAt)))
    .innerJoin(builds, eq(builds.id, assignments.buildId))
    .where(and(eq(assignments.buildId, buildId), isNull(assignments.endedAt), buildIsVisible(viewer)))
    .orderBy(sql`case ${users.role} when 'rep' then 0 else 1 end`, asc(users.name))
    .limit(30);
}

/** The client side of a build. Reps read addresses; builders and companions get names, and the owner their companions. */
export async function listClients(viewer: Viewer, orderNumber: string) {
  const build = await requireCan(viewer, 'diary.read', orderNumber);
  const withContacts = can(viewer.role, build.standing, 'contacts.read') || build.standing === 'owner';
  return db()
    .select({
      id: users.id,
      name: users.name,
      role: users.role,
      standing: buildPeople.standing,
      email: withContacts ? users.email : sql<null>`null`,
      unreachableWhy: isStaffRole(viewer.role) && withContacts ? users.unreachableWhy : sql<null>`null`,
    })
    .from(buildPeople)
    .innerJoin(users, eq(users.id, buildPeople.userId))
    .where(and(eq(buildPeople.buildId, build.id), build.standing === 'companion' ? sql`0` : undefined))
    .orderBy(desc(buildPeople.standing), asc(users.name))
    .limit(30);
}

const VISIT_MS = 30 * 60_000;

/** Remembers that the viewer has the diary open. Within half an hour it is still the same visit. */
export function recordVisit(viewer: Viewer, orderNumber: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'diary.read', orderNumber, tx);
    await tx
      .insert(diaryVisits)
      .values({ buildId: build.id, userId: viewer.id, visitedAt: nowMs })
      .onConflictDoUpdate({
        target: [diaryVisits.buildId, diaryVisits.userId],
        set: {
          visitBeforeAt: sql`case when ${nowMs} - ${diaryVisits.visitedAt} > ${VISIT_MS} then ${diaryVisits.visitedAt} else ${diaryVisits.visitBeforeAt} end`,
          visitedAt: nowMs,
        },
      });
  });
}

/** Entries dated after this are new to the reader; null on a first visit. */
export function newSince({ visitedAt, visitBeforeAt }: BuildHead, nowMs: number): number | null {
  if (visitedAt === null) return null;
  return nowMs - visitedAt > VISIT_MS ? visitedAt : visitBeforeAt;
}

/** Everything that changes a page of the diary goes through here, so that readers' pages learn of it. */
export async function touchDiary(tx: Tx, buildId: string): Promise<void> {
  await tx
    .update(builds)
    .set({ diaryRevision: sql`${builds.diaryRevision} + 1` })
    .where(eq(builds.id, buildId));
}

/** The same for every diary that names this author, whose department stands beside their entries. */
export async function touchDiariesOf(tx: Tx, authorId: string): Promise<void> {
  const written = tx.select({ id: entries.buildId }).from(entries).where(eq(entries.authorId, authorId));
  await tx
    .update(builds)
    .set({ diaryRevision: sql`${builds.diaryRevision} + 1` })
    .where(inArray(builds.id, written));
}

/** What an admin may know without stepping in: that builds exist, their numbers, and who is on them. */
export async function listBuildsByNumber(viewer: Viewer, after: string) {
  await requireCan(viewer, 'builds.count');
  const staff = sql<string>`(select json_group_array(json_object('id', ${assignments.id}, 'userId', ${users.id}, 'name', ${users.name}, 'cleared', ${assignments.cleared}, 'steppedIn', ${assignments.stepInReason} is not null)) from ${assignments} join ${users} on ${users.id} = ${assignments.userId} where ${assignments.buildId} = ${builds.id} and ${assignments.endedAt} is null)`;
  const rows = await db()
    .select({
      orderNumber: builds.orderNumber,
      held: sql<number>`not ${isOpen}`,
      deliveredAt: builds.deliveredAt,
      staff: correlated(staff),
    })
    .from(builds)
    .where(and(gt(builds.orderNumber, after), isNull(builds.deliveredAt)))
    .orderBy(asc(builds.orderNumber))
    .limit(PAGE);
  return rows.map(({ staff: json, held, ...row }) => ({ ...row, held: Boolean(held), staff: parseStaff(json) }));
}

type AssignedPerson = { id: string; userId: string; name: string; cleared: boolean; steppedIn: boolean };

function parseStaff(json: string): AssignedPerson[] {
  const rows: (Omit<AssignedPerson, 'cleared' | 'steppedIn'> & { cleared: number; steppedIn: number })[] =
    JSON.parse(json);
  return rows.map((row) => ({ ...row, cleared: Boolean(row.cleared), steppedIn: Boolean(row.steppedIn) }));
}
