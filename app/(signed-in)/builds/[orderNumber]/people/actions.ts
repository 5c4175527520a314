'use server';

import { revalidatePath } from 'next/cache';
import { addCompanion, removeCompanion } from '@/db/queries/companions';
import { holdBuild } from '@/db/queries/holds';
import { action } from '@/lib/action';
import { wakeMail } from '@/lib/jobs/run';
import { holdForm, holdUntilMs, openForm } from '@/lib/validation/hold';
import { companionForm, companionRef } from '@/lib/validation/people';

export const letLookOn = action(companionForm, async (viewer, { orderNumber, ...person }) => {
  await addCompanion(viewer, orderNumber, person, Date.now());
  wakeMail();
  revalidatePath(`/builds/${orderNumber}`, 'layout');
  return `${person.name} may look on from now.`;
});

export const stopLookingOn = action(companionRef, async (viewer, { orderNumber, userId }) => {
  await removeCompanion(viewer, orderNumber, userId, Date.now());
  revalidatePath(`/builds/${orderNumber}`, 'layout');
});

export const hold = action(holdForm, async (viewer, { orderNumber, until }) => {
  const nowMs = Date.now();
  await holdBuild(viewer, orderNumber, holdUntilMs(until, viewer.timeZone, nowMs), nowMs);
  revalidatePath(`/builds/${orderNumber}`, 'layout');
  return 'Held. Only its owner and cleared staff see it now.';
});

export const openToView = action(openForm, async (viewer, { orderNumber }) => {
  await holdBuild(viewer, orderNumber, null, Date.now());
  revalidatePath(`/builds/${orderNumber}`, 'layout');
});
