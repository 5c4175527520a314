'use server';

import { revalidatePath } from 'next/cache';
import { declineChange, offerChange, requestChange } from '@/db/queries/change-requests';
import { action } from '@/lib/action';
import { wakeMail } from '@/lib/jobs/run';
import { askChangeForm, declineChangeForm, offerChangeForm } from '@/lib/validation/specs';

const renew = (orderNumber: string) => revalidatePath(`/builds/${orderNumber}/spec`, 'layout');

export const ask = action(askChangeForm, async (viewer, wish) => {
  await requestChange(viewer, wish, Date.now());
  renew(wish.orderNumber);
  return 'Your wish is with the shop. You get its price and days to sign, or the reason why it cannot be done.';
});

export const offer = action(offerChangeForm, async (viewer, offered) => {
  renew(await offerChange(viewer, offered, Date.now()));
  wakeMail();
  return 'The offer is with the owner to be signed.';
});

export const decline = action(declineChangeForm, async (viewer, declined) => {
  renew(await declineChange(viewer, declined, Date.now()));
});
