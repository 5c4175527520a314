import { writeLetter } from '@/db/queries/questions';
import { wakeMail } from '@/lib/jobs/run';
import { writeRoute } from '@/lib/route';
import { newLetter } from '@/lib/validation/questions';

export const POST = writeRoute(newLetter, 'letter', async ({ viewer, input, params }) => {
  await writeLetter(viewer, params.questionId ?? '', input, Date.now());
  wakeMail();
  return {};
});
