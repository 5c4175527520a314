import { and, asc, count, desc, eq, isNull, lt, or, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import { queueMail } from './outbox';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { buildIsVisible, entryIsVisible, questionIsVisible } from '../scope';
import { assignments, builds, entries, letters, questions, topics, users } from '../schema';
import { can, isStaffRole } from '@/lib/access';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import { penHolder } from '@/lib/questions/pen-holder';
import type { NewLetter, NewQuestion } from '@/lib/validation/questions';
import type { Viewer } from '@/lib/viewer';

const PAGE = 40;
const asker = alias(users, 'asker');
const holder = alias(users, 'holder');

export function listTopics() {
  return db().select({ id: topics.id, name: topics.name }).from(topics).orderBy(asc(topics.position)).limit(40);
}

/**
 * Asks a question on a build, or from an entry of it, once. The topic decides who holds the pen and gets mail.
 * @throws OutOfReach, Denied, or BadInput
 */
export function askQuestion(viewer: Viewer, question: NewQuestion, nowMs: number): Promise<{ id: string }> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'question.ask', question.orderNumber, tx);
    const sameKey = and(eq(questions.askedById, viewer.id), eq(questions.idempotencyKey, question.idempotencyKey));
    const [earlier] = await tx.select({ id: questions.id }).from(questions).where(sameKey);
    if (earlier) return earlier;
    const topic = await requireTopic(tx, question.topicId);
    if (question.entryId) await requireReadableEntry(tx, viewer, build.id, question.entryId);
    const penHolderId = penHolder(topic, await staffOn(tx, build.id));
    const [asked] = await tx
      .insert(questions)
      .values({
        buildId: build.id,
        entryId: question.entryId,
        topicId: topic.id,
        askedById: viewer.id,
        subject: question.subject,
        penHolderId,
        state: 'waiting',
        idempotencyKey: question.idempotencyKey,
        lastLetterAt: nowMs,
        createdAt: nowMs,
      })
      .returning({ id: questions.id });
    if (!asked) throw new Error('an insert without a row');
    await addLetter(tx, {
      questionId: asked.id,
      viewer,
      side: 'client',
      letter: question,
      nowMs,
      to: penHolderId,
      kind: 'question',
    });
    return asked;
  });
}

async function requireTopic(tx: Tx, topicId: string) {
  const [topic] = await tx.select().from(topics).where(eq(topics.id, topicId));
  if (!topic) throw new BadInput({ topicId: 'Choose what it is about from the list.' });
  return topic;
}

async function requireReadableEntry(tx: Tx, viewer: Viewer, buildId: string, entryId: string): Promise<void> {
  const [entry] = await tx
    .select({ id: entries.id })
    .from(entries)
    .where(and(eq(entries.id, entryId), eq(entries.buildId, buildId), entryIsVisible(viewer)));
  if (!entry)
    throw new BadInput({ entryId: 'The entry you ask about is no longer in the diary. Ask about the build instead.' });
}

function staffOn(tx: Tx, buildId: string) {
  return tx
    .select({ id: users.id, role: users.role, department: users.department })
    .from(assignments)
    .innerJoin(users, and(eq(users.id, assignments.userId), isNull(users.disabledAt)))
    .where(and(eq(assignments.buildId, buildId), isNull(assignments.endedAt)))
    .orderBy(asc(assignments.startedAt), asc(assignments.id));
}

type Added = {
  questionId: string;
  viewer: Viewer;
  side: 'client' | 'shop';
  letter: Pick<NewLetter, 'note' | 'idempotencyKey'>;
  nowMs: number;
  to: string | null;
  kind: 'question' | 'letter';
};

async function addLetter(tx: Tx, { questionId, viewer, side, letter, nowMs, to, kind }: Added): Promise<void> {
  const [written] = await tx
    .insert(letters)
    .values({
      questionId,
      authorId: viewer.id,
      side,
      body: JSON.stringify(letter.note.doc),
      bodyText: letter.note.text,
      idempotencyKey: letter.idempotencyKey,
      writtenAt: nowMs,
    })
    .returning({ id: letters.id });
  if (!written) throw new Error('an insert without a row');
  if (!to) return;
  const about = { questionId, letterId: written.id };
  await queueMail(tx, { kind, userId: to, about, dedupeKey: `letter/${written.id}` }, nowMs);
}

/**
 * Adds a letter to a question, once: the owner writes to the shop, the holder of the pen or a rep writes to the owner.
 * @throws OutOfReach, or Denied when somebody else holds the pen
 */
export function writeLetter(viewer: Viewer, questionId: string, letter: NewLetter, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const question = await findReachable(tx, viewer, questionId);
    const sameKey = and(eq(letters.authorId, viewer.id), eq(letters.idempotencyKey, letter.idempotencyKey));
    const [earlier] = await tx.select({ id: letters.id }).from(letters).where(sameKey);
    if (earlier) return;
    const side = isStaffRole(viewer.role) ? 'shop' : 'client';
    await requireAnswerer(tx, viewer, question);
    const to = side === 'shop' ? question.askedById : question.penHolderId;
    await addLetter(tx, { questionId, viewer, side, letter, nowMs, to, kind: 'letter' });
    await tx
      .update(questions)
      .set({ state: side === 'shop' ? 'answered' : 'waiting', lastLetterAt: nowMs })
      .where(eq(questions.id, questionId));
  });
}

async function findReachable(tx: Tx, viewer: Viewer, questionId: string) {
  const [question] = await tx
    .select({
      id: questions.id,
      orderNumber: builds.orderNumber,
      askedById: questions.askedById,
      penHolderId: questions.penHolderId,
    })
    .from(questions)
    .innerJoin(builds, eq(builds.id, questions.buildId))
    .where(and(eq(questions.id, questionId), buildIsVisible(viewer), questionIsVisible(viewer)));
  if (!question) throw new OutOfReach();
  return question;
}

type Reachable = Awaited<ReturnType<typeof findReachable>>;

async function requireAnswerer(tx: Tx, viewer: Viewer, question: Reachable): Promise<void> {
  if (!isStaffRole(viewer.role)) {
    await requireCan(viewer, 'question.ask', question.orderNumber, tx);
    return;
  }
  if (can(viewer.role, 'assigned', 'question.answer_any')) return;
  await requireCan(viewer, 'question.answer_with_pen', question.orderNumber, tx);
  if (question.penHolderId !== viewer.id) {
    throw new Denied('not_allowed', 'Somebody else holds the pen on this question. Ask your rep to pass it to you.');
  }
}

const listColumns = {
  id: questions.id,
  orderNumber: builds.orderNumber,
  instrument: builds.instrument,
  subject: questions.subject,
  topic: topics.name,
  state: questions.state,
  lastLetterAt: questions.lastLetterAt,
  createdAt: questions.createdAt,
  askerName: asker.name,
  penHolderId: questions.penHolderId,
  penHolderName: holder.name,
};

function selectQuestions() {
  return db()
    .select(listColumns)
    .from(questions)
    .innerJoin(builds, eq(builds.id, questions.buildId))
    .innerJoin(topics, eq(topics.id, questions.topicId))
    .innerJoin(asker, eq(asker.id, questions.askedById))
    .leftJoin(holder, eq(holder.id, questions.penHolderId));
}

export type QuestionRow = Awaited<ReturnType<typeof listQueue>>[number];

/** The questions of one build, newest letter first. */
export async function listBuildQuestions(viewer: Viewer, orderNumber: string) {
  const build = await requireCan(viewer, 'question.read', orderNumber);
  return selectQuestions()
    .where(and(eq(questions.buildId, build.id), buildIsVisible(viewer), questionIsVisible(viewer)))
    .orderBy(desc(questions.lastLetterAt))
    .limit(PAGE);
}

const waitsFor = (viewer: Viewer) =>
  viewer.role === 'builder'
    ? eq(questions.penHolderId, viewer.id)
    : or(eq(questions.penHolderId, viewer.id), isNull(questions.penHolderId));

/**
 * What the viewer answers for: a builder what they hold the pen of, a rep everything on their builds, a client their
 * own; oldest waiting first, then the answered.
 */
export function listQueue(viewer: Viewer, beforeMs = Number.MAX_SAFE_INTEGER) {
  const mine = viewer.role === 'builder' ? waitsFor(viewer) : undefined;
  return selectQuestions()
    .where(and(buildIsVisible(viewer), questionIsVisible(viewer), lt(questions.lastLetterAt, beforeMs), mine))
    .orderBy(sql`case ${questions.state} when 'waiting' then 0 else 1 end`, asc(questions.lastLetterAt))
    .limit(PAGE);
}

/** How many questions wait for this viewer: for staff to answer, for a client to read. */
export async function countWaiting(viewer: Viewer): Promise<number> {
  if (!isStaffRole(viewer.role)) return 0;
  const [row] = await db()
    .select({ n: count() })
    .from(questions)
    .innerJoin(builds, eq(builds.id, questions.buildId))
    .where(and(eq(questions.state, 'waiting'), waitsFor(viewer), buildIsVisible(viewer), questionIsVisible(viewer)));
  return row?.n ?? 0;
}

/** One question with its letters, oldest first. @throws OutOfReach */
export async function requireQuestion(viewer: Viewer, questionId: string) {
  const [question] = await db()
    .select({ ...listColumns, finishHex: builds.finishHex, entryId: questions.entryId, askedById: questions.askedById })
    .from(questions)
    .innerJoin(builds, eq(builds.id, questions.buildId))
    .innerJoin(topics, eq(topics.id, questions.topicId))
    .innerJoin(asker, eq(asker.id, questions.askedById))
    .leftJoin(holder, eq(holder.id, questions.penHolderId))
    .where(and(eq(questions.id, questionId), buildIsVisible(viewer), questionIsVisible(viewer)));
  if (!question) throw new OutOfReach();
  const thread = await db()
    .select({
      id: letters.id,
      body: letters.body,
      side: letters.side,
      writtenAt: letters.writtenAt,
      author: users.name,
      role: users.role,
      department: users.department,
    })
    .from(letters)
    .innerJoin(users, eq(users.id, letters.authorId))
    .where(eq(letters.questionId, questionId))
    .orderBy(asc(letters.writtenAt), asc(letters.id))
    .limit(200);
  return { ...question, letters: thread };
}

export type QuestionPage = Awaited<ReturnType<typeof requireQuestion>>;

/** Whether the viewer may write the next letter; what `writeLetter` decides again. */
export function mayWrite(viewer: Viewer, question: { penHolderId: string | null }): boolean {
  if (!isStaffRole(viewer.role)) return true;
  return can(viewer.role, 'assigned', 'question.answer_any') || question.penHolderId === viewer.id;
}
