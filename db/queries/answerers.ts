import { and, eq, inArray, isNull, sql } from 'drizzle-orm';
import { union } from 'drizzle-orm/sqlite-core';
import type { Db, Tx } from '../client';
import { buildIsVisible } from '../scope';
import { assignments, builds, departments, shop, standingAssignments, users } from '../schema';
import { routeQuestion, type Candidate, type Route, type RoutingTopic } from '@/lib/questions/route-question';

const candidateColumns = {
  id: users.id,
  name: users.name,
  role: users.role,
  department: users.department,
  awayFromAt: users.awayFromAt,
  awayUntilAt: users.awayUntilAt,
  disabledAt: users.disabledAt,
};

type Row = Pick<Candidate, 'id' | 'name' | 'role' | 'department'> & {
  awayFromAt: number | null;
  awayUntilAt: number | null;
  disabledAt: number | null;
};

function candidate(
  { awayFromAt, awayUntilAt, disabledAt, ...person }: Row,
  reaches: boolean,
  nowMs: number,
): Candidate {
  const isAway = awayFromAt !== null && awayFromAt <= nowMs && (awayUntilAt === null || awayUntilAt > nowMs);
  return { ...person, reaches, isAway, hasLeft: disabledAt !== null };
}

/** Later than any instant: whom a rule put on a build stands behind whoever was put on it by name. */
const AFTER_ALL_MS = 1e15;

/**
 * The staff who reach a build, in the order in which they were put on it, then those whom a rule puts there. While it is
 * held from view that is only who is cleared for it: anybody else could not read what they should answer.
 */
export async function staffOn(reader: Db | Tx, buildId: string, nowMs: number): Promise<Candidate[]> {
  const byName = reader
    .select({ id: assignments.userId })
    .from(assignments)
    .where(and(eq(assignments.buildId, buildId), isNull(assignments.endedAt)));
  const byRule = reader
    .select({ id: standingAssignments.userId })
    .from(standingAssignments)
    .where(isNull(standingAssignments.endedAt));
  const live = and(eq(assignments.buildId, buildId), eq(assignments.userId, users.id), isNull(assignments.endedAt));
  const rows = await reader
    .select(candidateColumns)
    .from(users)
    .innerJoin(builds, eq(builds.id, buildId))
    .leftJoin(assignments, live)
    .where(
      and(
        inArray(users.id, union(byName, byRule)),
        inArray(users.role, ['builder', 'rep', 'admin']),
        isNull(users.disabledAt),
        buildIsVisible({ id: users.id, role: 'builder' }),
      ),
    )
    .orderBy(sql`coalesce(${assignments.startedAt}, ${AFTER_ALL_MS})`, sql`coalesce(${assignments.id}, ${users.id})`);
  return rows.map((row) => candidate(row, true, nowMs));
}

/** Department leads by department, and whom the admin named for what nobody else can answer. */
async function namedAnswerers(reader: Db | Tx, onBuild: Candidate[], nowMs: number) {
  const leads = await reader
    .select({ key: departments.key, ...candidateColumns })
    .from(departments)
    .innerJoin(users, eq(users.id, departments.leadId));
  const [fallback] = await reader
    .select(candidateColumns)
    .from(shop)
    .innerJoin(users, eq(users.id, shop.fallbackUserId));
  const told = (row: Row) =>
    candidate(
      row,
      onBuild.some(({ id }) => id === row.id),
      nowMs,
    );
  return {
    leadOf: new Map(leads.map(({ key, ...row }) => [key, told(row)])),
    fallback: fallback ? told(fallback) : null,
  };
}

export type Router = { onBuild: Candidate[]; route: (topic: RoutingTopic) => Route };

/** Reads once who could answer on a build; `route` then finds the holder of the pen for any topic. */
export async function openRouter(reader: Db | Tx, buildId: string, nowMs: number): Promise<Router> {
  const onBuild = await staffOn(reader, buildId, nowMs);
  const { leadOf, fallback } = await namedAnswerers(reader, onBuild, nowMs);
  const lead = ({ department }: RoutingTopic) => (department === null ? null : (leadOf.get(department) ?? null));
  return { onBuild, route: (topic) => routeQuestion({ topic, onBuild, lead: lead(topic), fallback }) };
}

/** The reps of a build who are at work; whoever is named for the rest where it has none. */
export async function listReps(reader: Db | Tx, buildId: string, nowMs: number): Promise<string[]> {
  const router = await openRouter(reader, buildId, nowMs);
  const reps = router.onBuild.filter(({ role, isAway }) => role === 'rep' && !isAway);
  if (reps.length > 0) return reps.map(({ id }) => id);
  const { holder } = router.route({ answeredBy: 'rep', department: null, repsOnly: true });
  return holder ? [holder.id] : [];
}
