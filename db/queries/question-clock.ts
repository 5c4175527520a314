import { and, asc, desc, eq, isNotNull, isNull, sql } from 'drizzle-orm';
import { unscopedCalendar } from './calendar';
import { listReps } from './answerers';
import { queueMail } from './outbox';
import { write, type Tx } from '../client';
import { letters, questions } from '../schema';
import { answerDueAt, isEarly, reminderOf, REMIND_BEFORE_MIN, type Reminder } from '@/lib/questions/answer-due';

const AT_ONCE = 200;

/** The columns of a clock that starts with a letter: its due time, and nothing said yet. */
export async function startedClock(tx: Tx, dueHours: number, letterAtMs: number) {
  const calendar = await unscopedCalendar(tx);
  return {
    dueAt: answerDueAt(calendar, letterAtMs, dueHours),
    // A clock as short as the reminder would remind with the question itself.
    remindedBeforeAt: dueHours * 60 <= REMIND_BEFORE_MIN ? letterAtMs : null,
    remindedDueAt: null,
    overdueToldAt: null,
  };
}

/** The columns of a clock that stands. */
export const stoppedClock = { dueAt: null, remindedBeforeAt: null, remindedDueAt: null, overdueToldAt: null };

const runningColumns = {
  id: questions.id,
  buildId: questions.buildId,
  penHolderId: questions.penHolderId,
  dueAt: sql<number>`${questions.dueAt}`,
  remindedBeforeAt: questions.remindedBeforeAt,
  remindedDueAt: questions.remindedDueAt,
  overdueToldAt: questions.overdueToldAt,
};

type Running = {
  id: string;
  buildId: string;
  penHolderId: string | null;
  dueAt: number;
  remindedBeforeAt: number | null;
  remindedDueAt: number | null;
  overdueToldAt: number | null;
};

const said: Record<Reminder, 'remindedBeforeAt' | 'remindedDueAt' | 'overdueToldAt'> = {
  before: 'remindedBeforeAt',
  due: 'remindedDueAt',
  overdue: 'overdueToldAt',
};

/**
 * Reminds the holders of the pen before and when an answer is due, and tells the reps after, once each.
 * @returns how many reminders were written
 */
export function remindOfAnswers(nowMs: number): Promise<number> {
  return write(async (tx) => {
    const calendar = await unscopedCalendar(tx);
    const running = await tx
      .select(runningColumns)
      .from(questions)
      .where(and(eq(questions.state, 'waiting'), isNotNull(questions.dueAt), isNull(questions.overdueToldAt)))
      .orderBy(asc(questions.dueAt))
      .limit(AT_ONCE);
    let count = 0;
    for (const question of running) {
      if (isEarly(calendar, question.dueAt, nowMs)) break;
      const reminder = reminderOf(calendar, question, nowMs);
      if (reminder === null) continue;
      await remind(tx, question, reminder, nowMs);
      count++;
    }
    return count;
  });
}

async function remind(tx: Tx, question: Running, reminder: Reminder, nowMs: number): Promise<void> {
  await tx
    .update(questions)
    .set({ [said[reminder]]: nowMs })
    .where(eq(questions.id, question.id));
  const about = { questionId: question.id, letterId: await lastLetterOf(tx, question.id) };
  const kind = reminder === 'overdue' ? 'question_overdue' : 'question_due';
  const readers = reminder === 'overdue' ? await listReps(tx, question.buildId, nowMs) : [question.penHolderId];
  for (const userId of readers) {
    if (userId === null) continue;
    const dedupeKey = `${kind}/${question.id}/${reminder}/${question.dueAt}/${userId}`;
    await queueMail(tx, { kind, userId, about, dedupeKey }, nowMs);
  }
}

/** What the mail about a waiting question quotes. */
export async function lastLetterOf(tx: Tx, questionId: string): Promise<string | undefined> {
  const [letter] = await tx
    .select({ id: letters.id })
    .from(letters)
    .where(and(eq(letters.questionId, questionId), eq(letters.side, 'client')))
    .orderBy(desc(letters.writtenAt), desc(letters.id))
    .limit(1);
  return letter?.id;
}
