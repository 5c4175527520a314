import { z } from 'zod';
import { sendLetterNow } from '@/db/queries/letters';
import { wakeMail } from '@/lib/jobs/run';
import { writeRoute } from '@/lib/route';
import { idempotencyKey } from '@/lib/validation/entries';

/** Lets the viewer's own letter go by mail now instead of when it can no longer be corrected. */
export const POST = writeRoute(z.strictObject({ idempotencyKey }), 'letter', async ({ viewer, params }) => {
  await sendLetterNow(viewer, params.letterId ?? '', Date.now());
  wakeMail();
  return {};
});
