'use server';

import { revalidatePath } from 'next/cache';
import { saveDraft } from '@/db/queries/spec-drafts';
import { sendVersion } from '@/db/queries/spec-versions';
import { action } from '@/lib/action';
import { wakeMail } from '@/lib/jobs/run';
import { draftForm, sendSpecForm } from '@/lib/validation/specs';

export const save = action(draftForm, async (viewer, edit) => {
  // Also when it is refused: the page then shows what somebody else has saved meanwhile.
  revalidatePath(`/builds/${edit.orderNumber}/spec`, 'layout');
  await saveDraft(viewer, edit, Date.now());
  return 'Saved. The owner sees it when it is sent.';
});

export const send = action(sendSpecForm, async (viewer, sending) => {
  revalidatePath(`/builds/${sending.orderNumber}/spec`, 'layout');
  const { number } = await sendVersion(viewer, sending, Date.now());
  wakeMail();
  return `Version ${number} is with the owner to be signed.`;
});
