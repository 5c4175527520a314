'use server';

import { revalidatePath } from 'next/cache';
import { changePerson, closePerson, endSessionsOf, reopenPerson } from '@/db/queries/people';
import { action } from '@/lib/action';
import { changedPerson, personRef } from '@/lib/validation/people';

export const change = action(changedPerson, async (viewer, person) => {
  await changePerson(viewer, person, Date.now());
  revalidatePath('/access', 'layout');
  return 'Changed. It counts from their next request on.';
});

export const endSessions = action(personRef, async (viewer, { userId }) => {
  await endSessionsOf(viewer, userId, Date.now());
  revalidatePath('/access', 'layout');
});

export const close = action(personRef, async (viewer, { userId }) => {
  await closePerson(viewer, userId, Date.now());
  revalidatePath('/access', 'layout');
});

export const reopen = action(personRef, async (viewer, { userId }) => {
  await reopenPerson(viewer, userId, Date.now());
  revalidatePath('/access', 'layout');
});
