import { postEntry } from '@/db/queries/entries';
import { wakeMail } from '@/lib/jobs/run';
import { writeRoute } from '@/lib/route';
import { newEntry } from '@/lib/validation/entries';

export const POST = writeRoute(newEntry, 'entry', async ({ viewer, input }) => {
  const entry = await postEntry(viewer, input, Date.now());
  wakeMail();
  return entry;
});
