import { and, eq, exists, isNull, lte, or, sql, type Placeholder, type SQL, type SQLWrapper } from 'drizzle-orm';
import { QueryBuilder, alias } from 'drizzle-orm/sqlite-core';
import { isStaffRole, type Role } from '@/lib/access';
import type { Viewer } from '@/lib/viewer';
import {
  assignments,
  buildPeople,
  builds,
  buildStages,
  entries,
  photos,
  questions,
  standingAssignments,
  topics,
} from './schema';

/**
 * Which rows a viewer reaches; nothing else in the product decides this. Every function returns a condition, never
 * undefined: a dropped condition would be a leak.
 */

/** Who asks. A prepared query leaves the person open and fixes the role, which decides the shape of the condition. */
export type Reader = { id: Viewer['id'] | Placeholder; role: Role };

const from = new QueryBuilder();
const one = { one: sql`1` };
const never = sql`0`;
const nowMs = sql`(unixepoch('subsec') * 1000)`;

function all(...conditions: (SQL | undefined)[]): SQL {
  return and(...conditions) ?? never;
}

/** Open to view: not, or no longer, under secrecy. */
export const isOpen: SQL = or(isNull(builds.heldUntilAt), lte(builds.heldUntilAt, nowMs)) ?? never;

const currentStageKey = sql`(select ${buildStages.key} from ${buildStages} where ${buildStages.buildId} = ${builds.id} and ${buildStages.startedAt} is not null and ${buildStages.finishedAt} is null order by ${buildStages.position} limit 1)`;

function isOnTheBuild(viewer: Reader): SQL {
  const row = all(
    eq(buildPeople.buildId, builds.id),
    eq(buildPeople.userId, viewer.id),
    or(eq(buildPeople.standing, 'owner'), isOpen),
  );
  return exists(from.select(one).from(buildPeople).where(row));
}

function isAssigned(viewer: Reader): SQL {
  const row = all(
    eq(assignments.buildId, builds.id),
    eq(assignments.userId, viewer.id),
    isNull(assignments.endedAt),
    or(eq(assignments.cleared, true), isOpen),
  );
  return exists(from.select(one).from(assignments).where(row));
}

function isAssignedByRule(viewer: Reader): SQL {
  const rule = all(
    eq(standingAssignments.userId, viewer.id),
    isNull(standingAssignments.endedAt),
    or(isNull(standingAssignments.routeId), eq(standingAssignments.routeId, builds.routeId)),
    or(isNull(standingAssignments.stageKey), eq(standingAssignments.stageKey, currentStageKey)),
  );
  return all(isOpen, exists(from.select(one).from(standingAssignments).where(rule)));
}

/** The builds this viewer reaches. A client by being its owner or companion; staff, admins included, by assignment. */
export function buildIsVisible(viewer: Reader): SQL {
  if (!isStaffRole(viewer.role)) return isOnTheBuild(viewer);
  return or(isAssigned(viewer), isAssignedByRule(viewer)) ?? never;
}

/** The entries of a visible build that this viewer reads: the client side only what was published for it. */
export function entryIsVisible(
  viewer: Pick<Viewer, 'role'>,
  entry: { state: SQLWrapper; audience: SQLWrapper } = entries,
): SQL {
  if (isStaffRole(viewer.role)) return sql`${entry.state} <> 'withdrawn'`;
  return sql`${entry.state} = 'published' and ${entry.audience} = 'buyer'`;
}

/** Ready photos of entries that this viewer reads; an uploader also sees their own before the entry is posted. */
export function photoIsVisible(viewer: Viewer): SQL {
  const entry = alias(entries, 'photo_entry');
  const readable = all(eq(entry.id, photos.entryId), entryIsVisible(viewer, entry));
  const ofReadableEntry = exists(from.select(one).from(entry).where(readable));
  const ownUnposted = isStaffRole(viewer.role) ? all(isNull(photos.entryId), eq(photos.uploaderId, viewer.id)) : never;
  return all(eq(photos.state, 'ready'), or(ofReadableEntry, ownUnposted));
}

/** The questions of a visible build that this viewer reads: its owner's; staff all, builders not money or artist matters. */
export function questionIsVisible(viewer: Viewer): SQL {
  if (!isStaffRole(viewer.role)) {
    const ownsIt = all(
      eq(buildPeople.buildId, questions.buildId),
      eq(buildPeople.userId, viewer.id),
      eq(buildPeople.standing, 'owner'),
    );
    return exists(from.select(one).from(buildPeople).where(ownsIt));
  }
  if (viewer.role !== 'builder') return sql`1`;
  const open = all(eq(topics.id, questions.topicId), eq(topics.repsOnly, false));
  return exists(from.select(one).from(topics).where(open));
}
