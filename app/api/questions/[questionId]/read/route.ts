import { z } from 'zod';
import { markRead } from '@/db/queries/questions';
import { writeRoute } from '@/lib/route';

/** The viewer has the question open. */
export const POST = writeRoute(z.strictObject({}), 'visit', async ({ viewer, params }) => {
  await markRead(viewer, params.questionId ?? '', Date.now());
  return {};
});
