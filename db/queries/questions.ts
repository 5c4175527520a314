import { and, count, desc, eq, isNull, or } from 'drizzle-orm';
import { queueMail } from './outbox';
import { findQuotedEntry, staffOn } from './question-form';
import { findQuestionRow } from './question-lists';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { buildIsVisible, entryIsVisible, questionIsVisible } from '../scope';
import { builds, entries, letters, questions, topics, users } from '../schema';
import { can, isStaffRole } from '@/lib/access';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import { penHolder } from '@/lib/questions/pen-holder';
import type { NewLetter, NewQuestion } from '@/lib/validation/questions';
import type { Viewer } from '@/lib/viewer';

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

const waitsFor = (viewer: Viewer) =>
  viewer.role === 'builder'
    ? eq(questions.penHolderId, viewer.id)
    : or(eq(questions.penHolderId, viewer.id), isNull(questions.penHolderId));

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

/** One question with its letters, the latest 200 of them, oldest first. @throws OutOfReach */
export async function requireQuestion(viewer: Viewer, questionId: string) {
  const question = await findQuestionRow(viewer, questionId);
  if (!question) throw new OutOfReach();
  const [entry, thread] = await Promise.all([
    question.entryId ? findQuotedEntry(viewer, question.entryId) : null,
    db()
      .select({
        id: letters.id,
        body: letters.body,
        side: letters.side,
        writtenAt: letters.writtenAt,
        authorId: letters.authorId,
        author: users.name,
        role: users.role,
        department: users.department,
      })
      .from(letters)
      .innerJoin(users, eq(users.id, letters.authorId))
      .where(eq(letters.questionId, questionId))
      .orderBy(desc(letters.writtenAt), desc(letters.id))
      .limit(200),
  ]);
  return { ...question, mark: markOf(question), entry, letters: thread.reverse() };
}

export type QuestionPage = Awaited<ReturnType<typeof requireQuestion>>;
export type LetterRow = QuestionPage['letters'][number];

const markOf = (question: { lastLetterAt: number; state: string; penHolderId: string | null }) =>
  [question.lastLetterAt, question.state, question.penHolderId].join('.');

/** Changes whenever the page of the question would show something else; cheap to ask for. @throws OutOfReach */
export async function requireQuestionMark(viewer: Viewer, questionId: string): Promise<{ mark: string }> {
  const [question] = await db()
    .select({ lastLetterAt: questions.lastLetterAt, state: questions.state, penHolderId: questions.penHolderId })
    .from(questions)
    .innerJoin(builds, eq(builds.id, questions.buildId))
    .where(and(eq(questions.id, questionId), buildIsVisible(viewer), questionIsVisible(viewer)));
  if (!question) throw new OutOfReach();
  return { mark: markOf(question) };
}

/** Whether the viewer may write the next letter; what `writeLetter` decides again. */
export function mayWrite(viewer: Viewer, question: { penHolderId: string | null }): boolean {
  if (!isStaffRole(viewer.role)) return true;
  return can(viewer.role, 'assigned', 'question.answer_any') || question.penHolderId === viewer.id;
}
