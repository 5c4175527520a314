import { z } from 'zod';
import { recordVisit } from '@/db/queries/builds';
import { writeRoute } from '@/lib/route';

/** The viewer has the diary open. */
export const POST = writeRoute(z.strictObject({}), 'visit', async ({ viewer, params }) => {
  await recordVisit(viewer, params.orderNumber ?? '', Date.now());
  return {};
});
