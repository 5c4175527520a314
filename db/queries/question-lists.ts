import { and, asc, count, eq, gte, isNull, lt, ne, or, sql, type SQL } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import { unscopedCalendar } from './calendar';
import { requireCan } from './standing';
import { db } from '../client';
import { buildIsVisible, questionIsVisible } from '../scope';
import { builds, letters, questions, topics, users } from '../schema';
import { isStaffRole } from '@/lib/access';
import { medianWorkingMinutes, weekStartOf } from '@/lib/questions/answer-times';
import type { Viewer } from '@/lib/viewer';

const PAGE = 40;
const asker = alias(users, 'asker');
const holder = alias(users, 'holder');
const reply = alias(letters, 'reply');

const lastReplyAt = sql`(select max(${reply.writtenAt}) from ${letters} ${sql.identifier('reply')} where ${reply.questionId} = ${questions.id} and ${reply.side} = 'shop')`;
/** Since the first letter that the shop has not answered: who writes again does not go back to the end of the queue. */
const waitingSince = sql<number>`coalesce((select min(${letters.writtenAt}) from ${letters} where ${letters.questionId} = ${questions.id} and ${letters.side} = 'client' and ${letters.writtenAt} > coalesce(${lastReplyAt}, -1)), ${questions.lastLetterAt})`;

/** Later than any instant, so that what is counted down from it stands behind everything that waits. */
const AFTER_ALL_MS = 1e15;
const newestFirst = sql<number>`${AFTER_ALL_MS} - ${questions.lastLetterAt}`;
/** What is due first comes first; a question without a clock stands where its oldest unanswered letter puts it. */
const nextDue = sql<number>`case ${questions.state} when 'waiting' then coalesce(${questions.dueAt}, ${waitingSince}) else ${newestFirst} end`;

const questionColumns = {
  id: questions.id,
  orderNumber: builds.orderNumber,
  instrument: builds.instrument,
  subject: questions.subject,
  topic: topics.name,
  state: questions.state,
  waitingSince,
  lastLetterAt: questions.lastLetterAt,
  dueAt: questions.dueAt,
  closedAt: questions.closedAt,
  closedHow: questions.closedHow,
  askerName: asker.name,
  penHolderId: questions.penHolderId,
  penHolderName: holder.name,
};

type Place = { key: number; tie: number; id: string };

/** @returns null for anything that is not a place this product wrote */
export function parsePlace(text: unknown): Place | null {
  const match = /^(\d{1,16})\.(\d{1,16})\.([\w-]{1,40})$/.exec(typeof text === 'string' ? text : '');
  return match ? { key: Number(match[1]), tie: Number(match[2]), id: match[3] ?? '' } : null;
}

/** Rows stand by `key`, those with the same key by `tie`. */
type Order = { key: SQL<number>; tie: SQL<number> };
const newest: Order = { key: newestFirst, tie: sql<number>`cast(0 as integer)` };
const dueFirst: Order = { key: nextDue, tie: waitingSince };

/** A page of questions after `place`, with the place of the next page or null. */
async function pageOf(viewer: Viewer, which: SQL | undefined, { key, tie }: Order, place: Place | null) {
  const later = place ? sql`(${key}, ${tie}, ${questions.id}) > (${place.key}, ${place.tie}, ${place.id})` : undefined;
  const rows = await db()
    .select({ ...questionColumns, key, tie })
    .from(questions)
    .innerJoin(builds, eq(builds.id, questions.buildId))
    .innerJoin(topics, eq(topics.id, questions.topicId))
    .innerJoin(asker, eq(asker.id, questions.askedById))
    .leftJoin(holder, eq(holder.id, questions.penHolderId))
    .where(and(which, buildIsVisible(viewer), questionIsVisible(viewer), later))
    .orderBy(asc(key), asc(tie), asc(questions.id))
    .limit(PAGE + 1);
  const page = rows.slice(0, PAGE);
  const last = page.at(-1);
  return { questions: page, next: rows.length > PAGE && last ? `${last.key}.${last.tie}.${last.id}` : null };
}

export type QuestionRow = Awaited<ReturnType<typeof pageOf>>['questions'][number];

export const queueFilters = ['all', 'mine', 'late'] as const;
export type QueueFilter = (typeof queueFilters)[number];

/** mine: what waits on the viewer, or on nobody where they could answer. late: what was due before now. */
function filtered(viewer: Viewer, filter: QueueFilter, nowMs: number): SQL | undefined {
  const isMine = eq(questions.penHolderId, viewer.id);
  if (filter === 'late') return and(eq(questions.state, 'waiting'), lt(questions.dueAt, nowMs));
  if (filter === 'mine')
    return and(
      ne(questions.state, 'closed'),
      viewer.role === 'builder' ? isMine : or(isMine, isNull(questions.penHolderId)),
    );
  return undefined;
}

/**
 * What the viewer answers for: a builder what they hold the pen of, a rep everything on their builds; first what is due
 * first, then the answered and the closed. A client gets their own, newest letter first.
 */
export function listQueue(
  viewer: Viewer,
  place: Place | null,
  { filter, nowMs }: { filter: QueueFilter; nowMs: number } = { filter: 'all', nowMs: 0 },
) {
  if (!isStaffRole(viewer.role)) return pageOf(viewer, undefined, newest, place);
  const mine = viewer.role === 'builder' ? eq(questions.penHolderId, viewer.id) : undefined;
  return pageOf(viewer, and(mine, filtered(viewer, filter, nowMs)), dueFirst, place);
}

/** How many questions each filter of the queue would show at its top: those that wait. */
export async function countQueue(viewer: Viewer, nowMs: number): Promise<Record<QueueFilter, number>> {
  const mine = viewer.role === 'builder' ? eq(questions.penHolderId, viewer.id) : undefined;
  const countOf = async (filter: QueueFilter) => {
    const [row] = await db()
      .select({ n: count() })
      .from(questions)
      .innerJoin(builds, eq(builds.id, questions.buildId))
      .where(
        and(
          eq(questions.state, 'waiting'),
          mine,
          filtered(viewer, filter, nowMs),
          buildIsVisible(viewer),
          questionIsVisible(viewer),
        ),
      );
    return row?.n ?? 0;
  };
  const [all, own, late] = await Promise.all([countOf('all'), countOf('mine'), countOf('late')]);
  return { all, mine: own, late };
}

/**
 * How long the first answers of this week took, the middle one, in minutes of work; null when there was none. Of the
 * questions on the viewer's builds, from the Monday of the shop's week on.
 */
export async function medianFirstAnswer(viewer: Viewer, nowMs: number): Promise<number | null> {
  const calendar = await unscopedCalendar();
  const answered = await db()
    .select({ askedAt: questions.createdAt, answeredAt: sql<number>`${questions.firstAnsweredAt}` })
    .from(questions)
    .innerJoin(builds, eq(builds.id, questions.buildId))
    .where(
      and(
        gte(questions.firstAnsweredAt, weekStartOf(calendar, nowMs)),
        buildIsVisible(viewer),
        questionIsVisible(viewer),
      ),
    )
    .limit(1000);
  return medianWorkingMinutes(calendar, answered);
}

/** The questions of one build, newest letter first. @throws OutOfReach or Denied */
export async function listBuildQuestions(viewer: Viewer, orderNumber: string, place: Place | null) {
  const build = await requireCan(viewer, 'question.read', orderNumber);
  return pageOf(viewer, eq(questions.buildId, build.id), newest, place);
}

/** The questions that wait for the shop on the builds the viewer reaches and that they read, first what is due first. */
export function listWaitingQuestions(viewer: Viewer) {
  return db()
    .select({
      buildId: questions.buildId,
      subject: questions.subject,
      dueAt: questions.dueAt,
      penHolderId: questions.penHolderId,
      holderName: holder.name,
      askerName: asker.name,
    })
    .from(questions)
    .innerJoin(builds, eq(builds.id, questions.buildId))
    .innerJoin(asker, eq(asker.id, questions.askedById))
    .leftJoin(holder, eq(holder.id, questions.penHolderId))
    .where(and(eq(questions.state, 'waiting'), buildIsVisible(viewer), questionIsVisible(viewer)))
    .orderBy(sql`${questions.dueAt} is null`, asc(questions.dueAt), asc(questions.id))
    .limit(500);
}

/** One question as its page heads it; null when it is unknown or out of reach. */
export async function findQuestionRow(viewer: Viewer, questionId: string) {
  const [row] = await db()
    .select({
      ...questionColumns,
      finishHex: builds.finishHex,
      heldUntilAt: builds.heldUntilAt,
      entryId: questions.entryId,
      askedById: questions.askedById,
      createdAt: questions.createdAt,
    })
    .from(questions)
    .innerJoin(builds, eq(builds.id, questions.buildId))
    .innerJoin(topics, eq(topics.id, questions.topicId))
    .innerJoin(asker, eq(asker.id, questions.askedById))
    .leftJoin(holder, eq(holder.id, questions.penHolderId))
    .where(and(eq(questions.id, questionId), buildIsVisible(viewer), questionIsVisible(viewer)));
  return row ?? null;
}
