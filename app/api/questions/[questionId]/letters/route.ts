import { requireQuestionMark, writeLetter } from '@/db/queries/questions';
import { wakeMail } from '@/lib/jobs/run';
import { readRoute, writeRoute } from '@/lib/route';
import { newLetter } from '@/lib/validation/questions';

/** What an open page of the question asks every few seconds. */
export const GET = readRoute(({ viewer, params }) => requireQuestionMark(viewer, params.questionId ?? ''));

export const POST = writeRoute(newLetter, 'letter', async ({ viewer, input, params }) => {
  const { id } = await writeLetter(viewer, params.questionId ?? '', input, Date.now());
  wakeMail();
  return { id };
});
