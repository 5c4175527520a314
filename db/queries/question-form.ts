import { and, asc, eq, isNull, or } from 'drizzle-orm';
import { requireCan } from './standing';
import { db, type Db, type Tx } from '../client';
import { buildIsVisible, entryIsVisible, isOpen } from '../scope';
import { assignments, builds, entries, topics, users } from '../schema';
import { penHolder } from '@/lib/questions/pen-holder';
import { excerpt } from '@/lib/rich-text/excerpt';
import type { Viewer } from '@/lib/viewer';

const QUOTE_CHARS = 280;

/** The entry a question is about, if the viewer reads it still. */
export async function findQuotedEntry(viewer: Viewer, entryId: string) {
  const [entry] = await db()
    .select({
      id: entries.id,
      buildId: entries.buildId,
      datedAt: entries.datedAt,
      author: users.name,
      text: entries.bodyText,
    })
    .from(entries)
    .innerJoin(builds, eq(builds.id, entries.buildId))
    .innerJoin(users, eq(users.id, entries.authorId))
    .where(and(eq(entries.id, entryId), buildIsVisible(viewer), entryIsVisible(viewer)));
  if (!entry) return null;
  const { text, ...quoted } = entry;
  return { ...quoted, excerpt: excerpt(text, QUOTE_CHARS) };
}

export type QuotedEntry = NonNullable<Awaited<ReturnType<typeof findQuotedEntry>>>;

/**
 * What the form to ask needs: the build, what can be asked about and who would answer, and the entry asked about, null
 * when none was named or it cannot be read.
 * @throws OutOfReach, or Denied for anybody but the owner
 */
export async function requireAskable(viewer: Viewer, orderNumber: string, entryId: string | null) {
  const build = await requireCan(viewer, 'question.ask', orderNumber);
  const [list, staff, entry] = await Promise.all([
    db().select().from(topics).orderBy(asc(topics.position)).limit(40),
    staffOn(db(), build.id),
    entryId ? findQuotedEntry(viewer, entryId) : null,
  ]);
  return {
    orderNumber: build.orderNumber,
    topics: list.map((topic) => ({ id: topic.id, name: topic.name, answerer: answererOf(topic, staff) })),
    entry: entry?.buildId === build.id ? entry : null,
  };
}

/**
 * Who may hold the pen on a build, in the order in which they were put on it. While it is held from view, only who is
 * cleared for it: anybody else could not read what they should answer.
 */
export function staffOn(reader: Db | Tx, buildId: string) {
  return reader
    .select({ id: users.id, name: users.name, role: users.role, department: users.department })
    .from(assignments)
    .innerJoin(users, and(eq(users.id, assignments.userId), isNull(users.disabledAt)))
    .innerJoin(builds, eq(builds.id, assignments.buildId))
    .where(and(eq(builds.id, buildId), isNull(assignments.endedAt), or(eq(assignments.cleared, true), isOpen)))
    .orderBy(asc(assignments.startedAt), asc(assignments.id));
}

type Staff = Awaited<ReturnType<typeof staffOn>>;

function answererOf(topic: Parameters<typeof penHolder>[0], staff: Staff) {
  const holderId = penHolder(topic, staff);
  const answerer = staff.find(({ id }) => id === holderId);
  return answerer ? { name: answerer.name, role: answerer.role, department: answerer.department } : null;
}

export type AskableTopic = Awaited<ReturnType<typeof requireAskable>>['topics'][number];
