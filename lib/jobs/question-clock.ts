import { routeAwayAgain } from '@/db/queries/pen';
import { remindOfAnswers } from '@/db/queries/question-clock';

/**
 * One look at what waits for an answer: the pens of whoever is out of office go on, then the reminders that are due are
 * written. @returns how many reminders were written
 */
export async function tendQuestions(nowMs: number): Promise<number> {
  await routeAwayAgain(nowMs);
  return remindOfAnswers(nowMs);
}
