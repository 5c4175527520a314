import { editEntry } from '@/db/queries/entries';
import { writeRoute } from '@/lib/route';
import { editedEntry } from '@/lib/validation/entries';

export const PATCH = writeRoute(editedEntry, 'entry', ({ viewer, input, params }) =>
  editEntry(viewer, params.entryId ?? '', input, Date.now()),
);
