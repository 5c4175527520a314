import { correctLetter } from '@/db/queries/letters';
import { writeRoute } from '@/lib/route';
import { correctedLetter } from '@/lib/validation/questions';

/** Other words for the viewer's own letter, while it has not been mailed. */
export const POST = writeRoute(correctedLetter, 'letter', async ({ viewer, input, params }) => {
  await correctLetter(viewer, params.letterId ?? '', input, Date.now());
  return {};
});
