import { z } from 'zod';
import { adoptTimeZone } from '@/db/queries/mail-settings';
import { writeRoute } from '@/lib/route';
import { isZone } from '@/lib/schedule/digest-times';

const browserZone = z.strictObject({ zone: z.string().max(60).refine(isZone, 'That is not the name of a time zone.') });

/** The browser says once where its person is; whoever has chosen a zone keeps it. */
export const POST = writeRoute(browserZone, 'manage', async ({ viewer, input }) => {
  await adoptTimeZone(viewer, input.zone, Date.now());
  return {};
});
