import { askQuestion } from '@/db/queries/questions';
import { wakeMail } from '@/lib/jobs/run';
import { writeRoute } from '@/lib/route';
import { newQuestion } from '@/lib/validation/questions';

export const POST = writeRoute(newQuestion, 'question', async ({ viewer, input }) => {
  const question = await askQuestion(viewer, input, Date.now());
  wakeMail();
  return question;
});
