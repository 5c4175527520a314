'use server';

import { revalidatePath } from 'next/cache';
import { z } from 'zod';
import { retryMail } from '@/db/queries/outbox';
import { action } from '@/lib/action';
import { wakeMail } from '@/lib/jobs/run';
import { idField } from '@/lib/validation/people';

export const retry = action(z.object({ mailId: idField }), async (viewer, { mailId }) => {
  await retryMail(viewer, mailId, Date.now());
  wakeMail();
  revalidatePath('/access/mail');
});
