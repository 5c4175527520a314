'use server';

import { revalidatePath } from 'next/cache';
import { askForChange, signSignOff, withdrawSignOff } from '@/db/queries/sign-off-answers';
import { action } from '@/lib/action';
import { wakeMail } from '@/lib/jobs/run';
import { changeWish, signature, signOffId } from '@/lib/validation/sign-offs';

/** The build's pages and the count in the navigation show it. */
function changed(orderNumber: string) {
  revalidatePath(`/builds/${orderNumber}`, 'layout');
  wakeMail();
}

export const sign = action(signature, async (viewer, input) => {
  changed((await signSignOff(viewer, input, Date.now())).orderNumber);
});

export const askChange = action(changeWish, async (viewer, input) => {
  changed((await askForChange(viewer, input, Date.now())).orderNumber);
});

export const takeBack = action(signOffId, async (viewer, input) => {
  changed((await withdrawSignOff(viewer, input.signOffId, Date.now())).orderNumber);
});
