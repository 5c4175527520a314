import { markLine } from '@/db/queries/checks';
import { writeRoute } from '@/lib/route';
import { markedLine } from '@/lib/validation/checks';

/** One line of an inspection as it is marked; the same again changes nothing. */
export const POST = writeRoute(markedLine, 'check_line', async ({ viewer, input, params }) => {
  await markLine(viewer, params.orderNumber ?? '', params.runId ?? '', input, Date.now());
  return {};
});
