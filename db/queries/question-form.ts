import { and, asc, eq } from 'drizzle-orm';
import { openRouter, type Router } from './answerers';
import { requireCan } from './standing';
import { db } from '../client';
import { buildIsVisible, entryIsVisible } from '../scope';
import { builds, entries, topics, users } from '../schema';
import type { RoutingTopic } from '@/lib/questions/route-question';
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
export async function requireAskable(
  viewer: Viewer,
  orderNumber: string,
  entryId: string | null,
  nowMs: number = Date.now(),
) {
  const build = await requireCan(viewer, 'question.ask', orderNumber);
  const [list, router, entry] = await Promise.all([
    db().select().from(topics).orderBy(asc(topics.position)).limit(40),
    openRouter(db(), build.id, nowMs),
    entryId ? findQuotedEntry(viewer, entryId) : null,
  ]);
  return {
    orderNumber: build.orderNumber,
    topics: list.map((topic) => ({
      id: topic.id,
      name: topic.name,
      dueHours: topic.dueHours,
      answerer: answererOf(topic, router),
    })),
    entry: entry?.buildId === build.id ? entry : null,
  };
}

function answererOf(topic: RoutingTopic, router: Router) {
  const { holder } = router.route(topic);
  return holder ? { name: holder.name, role: holder.role, department: holder.department } : null;
}

export type AskableTopic = Awaited<ReturnType<typeof requireAskable>>['topics'][number];
