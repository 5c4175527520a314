'use server';

import { z } from 'zod';
import { unsubscribe } from '@/db/queries/mail-settings';
import { openAction } from '@/lib/action';
import { readUnsubscribeToken } from '@/lib/mail/unsubscribe-token';

/** The same answer for a token that is not ours. */
export const stopDiaryMail = openAction(z.object({ token: z.string().max(200) }), async ({ token }) => {
  const userId = readUnsubscribeToken(token);
  if (userId) await unsubscribe(userId);
  return 'No more diary mails. You can turn them on again under your settings.';
});
