'use server';

import { revalidatePath } from 'next/cache';
import { z } from 'zod';
import { markReachable } from '@/db/queries/mail-watch';
import { retryMail, sendAgain } from '@/db/queries/outbox';
import { action } from '@/lib/action';
import { wakeMail } from '@/lib/jobs/run';
import { idField } from '@/lib/validation/people';

export const retry = action(z.object({ mailId: idField }), async (viewer, { mailId }) => {
  await retryMail(viewer, mailId, Date.now());
  wakeMail();
  revalidatePath('/access/mail');
});

export const sendOnceMore = action(z.object({ mailId: idField }), async (viewer, { mailId }) => {
  await sendAgain(viewer, mailId, Date.now());
  wakeMail();
  revalidatePath('/access/mail');
  return 'It goes out once more.';
});

export const reachAgain = action(z.object({ userId: idField }), async (viewer, { userId }) => {
  await markReachable(viewer, userId);
  revalidatePath('/access/mail');
});
