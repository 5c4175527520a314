'use server';

import { revalidatePath } from 'next/cache';
import { assignStaff, endAssignment } from '@/db/queries/assignments';
import { invitePerson } from '@/db/queries/people';
import { action } from '@/lib/action';
import { wakeMail } from '@/lib/jobs/run';
import { assignment, assignmentRef, invitation } from '@/lib/validation/people';

export const invite = action(invitation, async (viewer, person) => {
  await invitePerson(viewer, person, Date.now());
  wakeMail();
  revalidatePath('/access', 'layout');
  return `${person.name} is invited. The mail is on its way.`;
});

export const assign = action(assignment, async (viewer, wish) => {
  const added = await assignStaff(viewer, wish, Date.now());
  revalidatePath('/access', 'layout');
  if (added === 0) return 'They were on all of these already; nothing was changed.';
  return added === 1 ? 'Done: one assignment is new.' : `Done: ${added} assignments are new.`;
});

export const takeOff = action(assignmentRef, async (viewer, { assignmentId }) => {
  await endAssignment(viewer, assignmentId, Date.now());
  revalidatePath('/access', 'layout');
});
