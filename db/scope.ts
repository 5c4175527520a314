import { and, eq, exists, isNull, lte, not, or, sql, type Placeholder, type SQL, type SQLWrapper } from 'drizzle-orm';
import { QueryBuilder, alias } from 'drizzle-orm/sqlite-core';
import { isStaffRole, type Role } from '@/lib/access';
import type { Viewer } from '@/lib/viewer';
import {
  assignments,
  buildPeople,
  builds,
  buildStages,
  checkMarks,
  documents,
  entries,
  letters,
  photos,
  questions,
  signOffs,
  standingAssignments,
  topics,
} from './schema';

/**
 * Which rows a viewer reaches; nothing else in the product decides this. Every function returns a condition, never
 * undefined: a dropped condition would be a leak.
 */

/**
 * Who asks. A prepared query leaves the person open and fixes the role, which decides the shape of the condition; a
 * column asks for every person of the outer query at once.
 */
export type Reader = { id: Viewer['id'] | Placeholder | SQLWrapper; role: Role };

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

const liveAssignment = (viewer: Reader) =>
  all(eq(assignments.buildId, builds.id), eq(assignments.userId, viewer.id), isNull(assignments.endedAt));

function isAssigned(viewer: Reader): SQL {
  const row = all(liveAssignment(viewer), or(eq(assignments.cleared, true), isOpen));
  return exists(from.select(one).from(assignments).where(row));
}

function isUnderARule(viewer: Reader): SQL {
  const rule = all(
    eq(standingAssignments.userId, viewer.id),
    isNull(standingAssignments.endedAt),
    or(isNull(standingAssignments.routeId), eq(standingAssignments.routeId, builds.routeId)),
    or(isNull(standingAssignments.stageKey), eq(standingAssignments.stageKey, currentStageKey)),
  );
  return exists(from.select(one).from(standingAssignments).where(rule));
}

const isAssignedByRule = (viewer: Reader) => all(isOpen, isUnderARule(viewer));

/** The builds this viewer reaches. A client by being its owner or companion; staff, admins included, by assignment. */
export function buildIsVisible(viewer: Reader): SQL {
  if (!isStaffRole(viewer.role)) return isOnTheBuild(viewer);
  return or(isAssigned(viewer), isAssignedByRule(viewer)) ?? never;
}

/**
 * The builds out of this viewer's reach of which they may know the number: to an admin all of them, to other staff those
 * they would work on were they not held from view.
 */
export function buildIsKnownByNumber(viewer: Reader): SQL {
  if (!isStaffRole(viewer.role)) return never;
  const unreached = not(buildIsVisible(viewer));
  if (viewer.role === 'admin') return unreached;
  const assigned = exists(from.select(one).from(assignments).where(liveAssignment(viewer)));
  return all(not(isOpen), unreached, or(assigned, isUnderARule(viewer)));
}

/** The entries of a visible build that this viewer reads: the client side only what was published for it. */
export function entryIsVisible(
  viewer: Pick<Viewer, 'role'>,
  entry: { state: SQLWrapper; audience: SQLWrapper } = entries,
): SQL {
  if (isStaffRole(viewer.role)) return sql`${entry.state} <> 'withdrawn'`;
  return sql`${entry.state} = 'published' and ${entry.audience} = 'buyer'`;
}

/** Ready photos of entries, of letters and of what is signed, as far as this viewer reads those, and for staff those of inspections; an uploader also sees their own before it is posted or sent. */
export function photoIsVisible(viewer: Reader): SQL {
  const entry = alias(entries, 'photo_entry');
  const ofEntry = all(eq(entry.id, photos.entryId), entryIsVisible(viewer, entry));
  const ofReadableEntry = exists(from.select(one).from(entry).where(ofEntry));
  const ofDocument = all(eq(documents.photoId, photos.id), documentIsVisible(viewer));
  const ofReadableDocument = exists(from.select(one).from(documents).where(ofDocument));
  const ofCheck = isStaffRole(viewer.role)
    ? exists(from.select(one).from(checkMarks).where(eq(checkMarks.photoId, photos.id)))
    : never;
  const mayUpload = isStaffRole(viewer.role) ? undefined : ownsTheBuild(viewer);
  const ownUnposted = all(isNull(photos.entryId), isNull(photos.letterId), eq(photos.uploaderId, viewer.id), mayUpload);
  const readable = or(ofReadableEntry, ofReadableLetter(viewer), ofReadableDocument, ofCheck, ownUnposted);
  return all(eq(photos.state, 'ready'), readable);
}

function ofReadableLetter(viewer: Reader): SQL {
  const ofLetter = all(
    eq(letters.id, photos.letterId),
    eq(questions.buildId, photos.buildId),
    questionIsVisible(viewer),
  );
  const readable = from.select(one).from(letters).innerJoin(questions, eq(questions.id, letters.questionId));
  return exists(readable.where(ofLetter));
}

function ownsTheBuild(viewer: Reader): SQL {
  const row = all(
    eq(buildPeople.buildId, builds.id),
    eq(buildPeople.userId, viewer.id),
    eq(buildPeople.standing, 'owner'),
  );
  return exists(from.select(one).from(buildPeople).where(row));
}

/** The sign-offs of a visible build that this viewer reads: staff all, its owner all that the shop did not take back. */
export function signOffIsVisible(viewer: Reader): SQL {
  if (isStaffRole(viewer.role)) return sql`1`;
  return all(sql`${signOffs.state} <> 'withdrawn'`, ownsTheBuild(viewer));
}

/** Checked drawings and samples of a visible build: staff all, its owner those that were put before them. */
export function documentIsVisible(viewer: Reader): SQL {
  const checked = eq(documents.state, 'ready');
  if (isStaffRole(viewer.role)) return checked;
  const asked = all(eq(signOffs.documentId, documents.id), signOffIsVisible(viewer));
  return all(checked, exists(from.select(one).from(signOffs).where(asked)));
}

/** The questions of a visible build that this viewer reads: its owner's; staff all, builders not money or artist matters. */
export function questionIsVisible(viewer: Reader): SQL {
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
