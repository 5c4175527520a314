import { desc, eq } from 'drizzle-orm';
import { startedClock, stoppedClock } from './question-clock';
import { requireReachable } from './question-reach';
import { requireCan } from './standing';
import { write } from '../client';
import { letters, questions } from '../schema';
import { Denied } from '@/lib/errors';
import { canReopen } from '@/lib/questions/thread-rules';
import type { Viewer } from '@/lib/viewer';

/**
 * Ends a question: it is settled, or it never needed an answer. The clock stops and nobody is reminded.
 * @throws OutOfReach, or Denied for anybody but its owner and the reps
 */
export function endQuestion(
  viewer: Viewer,
  questionId: string,
  how: 'closed' | 'no_answer_needed',
  nowMs: number,
): Promise<void> {
  return write(async (tx) => {
    const question = await requireReachable(viewer, questionId, tx);
    await requireCan(viewer, 'question.end', question.orderNumber, tx);
    if (question.state === 'closed') return;
    await tx
      .update(questions)
      .set({ ...stoppedClock, state: 'closed', closedAt: nowMs, closedById: viewer.id, closedHow: how })
      .where(eq(questions.id, questionId));
  });
}

/**
 * Takes up a closed question again, within 30 days: it waits on whoever the last letter waits on.
 * @throws OutOfReach, Denied for anybody but its owner and the reps, and when it has been closed for too long
 */
export function reopenQuestion(viewer: Viewer, questionId: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const question = await requireReachable(viewer, questionId, tx);
    await requireCan(viewer, 'question.end', question.orderNumber, tx);
    if (question.state !== 'closed') return;
    if (!canReopen(question.closedAt, nowMs))
      throw new Denied('conflict', 'This question has been closed for more than 30 days. Please ask a new one.');
    const [last] = await tx
      .select({ side: letters.side })
      .from(letters)
      .where(eq(letters.questionId, questionId))
      .orderBy(desc(letters.writtenAt), desc(letters.id))
      .limit(1);
    const waits = last?.side !== 'shop';
    const clock = waits ? await startedClock(tx, question.topic.dueHours, nowMs) : stoppedClock;
    const state = waits ? ('waiting' as const) : ('answered' as const);
    await tx
      .update(questions)
      .set({ ...clock, state, closedAt: null, closedById: null, closedHow: null })
      .where(eq(questions.id, questionId));
  });
}
