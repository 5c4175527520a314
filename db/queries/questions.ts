import { and, eq, sql } from 'drizzle-orm';
import { openRouter } from './answerers';
import { addLetter } from './letters';
import { recordPass } from './pen';
import { startedClock, stoppedClock } from './question-clock';
import { findQuotedEntry } from './question-form';
import { findQuestionRow } from './question-lists';
import { requireReachable, type ReachedQuestion } from './question-reach';
import { listLetters, listReaders } from './question-thread';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { buildIsVisible, entryIsVisible, questionIsVisible } from '../scope';
import { builds, entries, letters, marginNotes, questionReads, questions, topics } from '../schema';
import { can, isStaffRole } from '@/lib/access';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import { routeWords } from '@/lib/questions/route-question';
import { canReopen, startsClock, type Side } from '@/lib/questions/thread-rules';
import type { Letter, NewQuestion } from '@/lib/validation/questions';
import type { Viewer } from '@/lib/viewer';

/**
 * Asks a question on a build, or from an entry of it, once. The topic decides who holds the pen and gets mail, and when
 * the answer is due. Where nobody on the build can answer it is asked all the same, and the shop's admin sees that.
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
    const route = (await openRouter(tx, build.id, nowMs)).route(topic);
    const penHolderId = route.holder?.id ?? null;
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
        ...(await startedClock(tx, topic.dueHours, nowMs)),
        idempotencyKey: question.idempotencyKey,
        lastLetterAt: nowMs,
        createdAt: nowMs,
      })
      .returning({ id: questions.id, buildId: questions.buildId });
    if (!asked) throw new Error('an insert without a row');
    if (route.passedOver.length > 0 || !penHolderId) {
      const pass = { questionId: asked.id, fromId: null, toId: penHolderId, byId: null, reason: routeWords(route) };
      await recordPass(tx, pass, nowMs);
    }
    const letter = { letter: question, arrivedBy: 'page', side: 'client', kind: 'question', to: penHolderId } as const;
    await addLetter(tx, { question: asked, viewer, ...letter }, nowMs);
    return { id: asked.id };
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

export type WrittenLetter = { id: string; repeated: boolean };

/**
 * Adds a letter to a question, once: the owner writes to the shop, the holder of the pen or a rep writes to the owner.
 * The shop's letter stops the clock, the owner's next one starts it anew; a letter takes up a closed question again
 * within 30 days. `arrivedBy` mail cannot be corrected, and is told on at once.
 * @throws OutOfReach, or Denied when somebody else holds the pen or the question has been closed for too long
 */
export function writeLetter(
  viewer: Viewer,
  questionId: string,
  letter: Letter,
  nowMs: number,
  arrivedBy: 'page' | 'mail' = 'page',
): Promise<WrittenLetter> {
  return write(async (tx) => {
    const question = await requireReachable(viewer, questionId, tx);
    const sameKey = and(eq(letters.authorId, viewer.id), eq(letters.idempotencyKey, letter.idempotencyKey));
    const [earlier] = await tx.select({ id: letters.id }).from(letters).where(sameKey);
    if (earlier) return { id: earlier.id, repeated: true };
    const side = isStaffRole(viewer.role) ? 'shop' : 'client';
    await requireAnswerer(tx, viewer, question);
    requireOpenable(question, nowMs);
    const to = side === 'shop' ? question.askedById : question.penHolderId;
    const id = await addLetter(tx, { question, viewer, side, letter, arrivedBy, to, kind: 'letter' }, nowMs);
    await tx
      .update(questions)
      .set({ ...(await movedBy(tx, side, question, nowMs)), lastLetterAt: nowMs })
      .where(eq(questions.id, questionId));
    return { id, repeated: false };
  });
}

function requireOpenable({ state, closedAt }: ReachedQuestion, nowMs: number): void {
  if (state !== 'closed' || canReopen(closedAt, nowMs)) return;
  throw new Denied('conflict', 'This question has been closed for more than 30 days. Please ask a new one.');
}

/** What a letter does to the question: its state and its clock. */
async function movedBy(tx: Tx, side: Side, question: ReachedQuestion, nowMs: number) {
  const reopened = { closedAt: null, closedById: null, closedHow: null };
  if (side === 'shop') {
    const firstAnsweredAt = question.firstAnsweredAt ?? nowMs;
    return { ...reopened, ...stoppedClock, state: 'answered' as const, firstAnsweredAt };
  }
  const clock = startsClock(side, question) ? await startedClock(tx, question.topic.dueHours, nowMs) : {};
  return { ...reopened, ...clock, state: 'waiting' as const };
}

async function requireAnswerer(tx: Tx, viewer: Viewer, question: ReachedQuestion): Promise<void> {
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

/** One question with its letters, the latest 200 of them, oldest first. @throws OutOfReach */
export async function requireQuestion(viewer: Viewer, questionId: string) {
  const question = await findQuestionRow(viewer, questionId);
  if (!question) throw new OutOfReach();
  const [entry, thread, { mark }, readBy] = await Promise.all([
    question.entryId ? findQuotedEntry(viewer, question.entryId) : null,
    listLetters(viewer, questionId),
    requireQuestionMark(viewer, questionId),
    listReaders(questionId),
  ]);
  return { ...question, mark, entry, letters: thread, readBy };
}

export type QuestionPage = Awaited<ReturnType<typeof requireQuestion>>;
export type LetterRow = QuestionPage['letters'][number];
export type QuestionReader = QuestionPage['readBy'][number];

/** Changes whenever the page of the question would show its viewer something else; cheap to ask for. @throws OutOfReach */
export async function requireQuestionMark(viewer: Viewer, questionId: string): Promise<{ mark: string }> {
  const notes = isStaffRole(viewer.role)
    ? sql<number>`(select count(*) from ${marginNotes} where ${marginNotes.questionId} = ${questions.id})`
    : sql<number>`0`;
  const [parts] = await db()
    .select({
      lastLetterAt: questions.lastLetterAt,
      state: questions.state,
      penHolderId: questions.penHolderId,
      dueAt: questions.dueAt,
      correctedAt: sql<
        number | null
      >`(select max(${letters.correctedAt}) from ${letters} where ${letters.questionId} = ${questions.id})`,
      readAt: sql<
        number | null
      >`(select max(${questionReads.readAt}) from ${questionReads} where ${questionReads.questionId} = ${questions.id} and ${questionReads.userId} <> ${viewer.id})`,
      notes,
    })
    .from(questions)
    .innerJoin(builds, eq(builds.id, questions.buildId))
    .where(and(eq(questions.id, questionId), buildIsVisible(viewer), questionIsVisible(viewer)));
  if (!parts) throw new OutOfReach();
  return { mark: Object.values(parts).join('.') };
}

/**
 * Writes down that the viewer has the question open, once for what was written since they looked last: the moment that is
 * kept is when they first saw the newest letter.
 * @throws OutOfReach
 */
export function markRead(viewer: Viewer, questionId: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const { lastLetterAt } = await requireReachable(viewer, questionId, tx);
    await tx
      .insert(questionReads)
      .values({ questionId, userId: viewer.id, readAt: nowMs })
      .onConflictDoUpdate({
        target: [questionReads.questionId, questionReads.userId],
        set: { readAt: nowMs },
        setWhere: sql`${questionReads.readAt} < ${lastLetterAt}`,
      });
  });
}

/** Whether the viewer may write the next letter; what `writeLetter` decides again. */
export function mayWrite(
  viewer: Viewer,
  question: { penHolderId: string | null; state: string; closedAt: number | null },
  nowMs: number,
): boolean {
  if (question.state === 'closed' && !canReopen(question.closedAt, nowMs)) return false;
  if (!isStaffRole(viewer.role)) return true;
  return can(viewer.role, 'assigned', 'question.answer_any') || question.penHolderId === viewer.id;
}
