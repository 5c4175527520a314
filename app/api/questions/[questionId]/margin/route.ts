import { writeMargin } from '@/db/queries/margin';
import { writeRoute } from '@/lib/route';
import { newMarginNote } from '@/lib/validation/questions';

/** A note beside a question that only the staff on the build read. Nobody is mailed. */
export const POST = writeRoute(newMarginNote, 'letter', async ({ viewer, input, params }) => {
  await writeMargin(viewer, params.questionId ?? '', input, Date.now());
  return {};
});
