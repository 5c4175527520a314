'use server';

import { revalidatePath } from 'next/cache';
import { z } from 'zod';
import { releaseEntry, withdrawEntry } from '@/db/queries/entries';
import { action } from '@/lib/action';
import { wakeMail } from '@/lib/jobs/run';
import { idField } from '@/lib/validation/people';

const entry = z.object({ entryId: idField });

export const withdraw = action(entry, async (viewer, { entryId }) => {
  revalidatePath(`/builds/${await withdrawEntry(viewer, entryId, Date.now())}`);
});

export const release = action(entry, async (viewer, { entryId }) => {
  revalidatePath(`/builds/${await releaseEntry(viewer, entryId, Date.now())}`);
  wakeMail();
});
