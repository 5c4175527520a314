import { and, asc, eq, gt, or, sql, type SQL } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import { requireCan } from './standing';
import { db } from '../client';
import { buildIsVisible, questionIsVisible } from '../scope';
import { builds, letters, questions, topics, users } from '../schema';
import { isStaffRole } from '@/lib/access';
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
const oldestWaitingFirst = sql<number>`case ${questions.state} when 'waiting' then ${waitingSince} else ${newestFirst} end`;

const questionColumns = {
  id: questions.id,
  orderNumber: builds.orderNumber,
  instrument: builds.instrument,
  subject: questions.subject,
  topic: topics.name,
  state: questions.state,
  waitingSince,
  lastLetterAt: questions.lastLetterAt,
  askerName: asker.name,
  penHolderId: questions.penHolderId,
  penHolderName: holder.name,
};

type Place = { key: number; id: string };

/** @returns null for anything that is not a place this product wrote */
export function parsePlace(text: unknown): Place | null {
  const match = /^(\d{1,16})\.([\w-]{1,40})$/.exec(typeof text === 'string' ? text : '');
  return match ? { key: Number(match[1]), id: match[2] ?? '' } : null;
}

/** A page of questions after `place`, with the place of the next page or null. */
async function pageOf(viewer: Viewer, which: SQL | undefined, order: SQL<number>, place: Place | null) {
  const later = place ? or(gt(order, place.key), and(eq(order, place.key), gt(questions.id, place.id))) : undefined;
  const rows = await db()
    .select({ ...questionColumns, key: order })
    .from(questions)
    .innerJoin(builds, eq(builds.id, questions.buildId))
    .innerJoin(topics, eq(topics.id, questions.topicId))
    .innerJoin(asker, eq(asker.id, questions.askedById))
    .leftJoin(holder, eq(holder.id, questions.penHolderId))
    .where(and(which, buildIsVisible(viewer), questionIsVisible(viewer), later))
    .orderBy(asc(order), asc(questions.id))
    .limit(PAGE + 1);
  const page = rows.slice(0, PAGE);
  const last = page.at(-1);
  return { questions: page, next: rows.length > PAGE && last ? `${last.key}.${last.id}` : null };
}

export type QuestionRow = Awaited<ReturnType<typeof pageOf>>['questions'][number];

/**
 * What the viewer answers for: a builder what they hold the pen of, a rep everything on their builds; oldest waiting
 * first, then the answered. A client gets their own, newest letter first.
 */
export function listQueue(viewer: Viewer, place: Place | null) {
  const mine = viewer.role === 'builder' ? eq(questions.penHolderId, viewer.id) : undefined;
  return pageOf(viewer, mine, isStaffRole(viewer.role) ? oldestWaitingFirst : newestFirst, place);
}

/** The questions of one build, newest letter first. @throws OutOfReach or Denied */
export async function listBuildQuestions(viewer: Viewer, orderNumber: string, place: Place | null) {
  const build = await requireCan(viewer, 'question.read', orderNumber);
  return pageOf(viewer, eq(questions.buildId, build.id), newestFirst, place);
}

/** One question as its page heads it; null when it is unknown or out of reach. */
export async function findQuestionRow(viewer: Viewer, questionId: string) {
  const [row] = await db()
    .select({
      ...questionColumns,
      finishHex: builds.finishHex,
      heldUntilAt: builds.heldUntilAt,
      entryId: questions.entryId,
    })
    .from(questions)
    .innerJoin(builds, eq(builds.id, questions.buildId))
    .innerJoin(topics, eq(topics.id, questions.topicId))
    .innerJoin(asker, eq(asker.id, questions.askedById))
    .leftJoin(holder, eq(holder.id, questions.penHolderId))
    .where(and(eq(questions.id, questionId), buildIsVisible(viewer), questionIsVisible(viewer)));
  return row ?? null;
}
