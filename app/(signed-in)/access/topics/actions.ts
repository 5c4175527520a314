'use server';

import { revalidatePath } from 'next/cache';
import { saveFallback, saveLead, saveTopic } from '@/db/queries/topics';
import { action } from '@/lib/action';
import { wakeMail } from '@/lib/jobs/run';
import { fallbackForm, leadForm, topicForm } from '@/lib/validation/questions';

export const keepTopic = action(topicForm, async (viewer, topic) => {
  await saveTopic(viewer, topic, Date.now());
  wakeMail();
  revalidatePath('/access/topics');
  return 'Kept.';
});

export const nameLead = action(leadForm, async (viewer, { departmentKey, leadId }) => {
  await saveLead(viewer, departmentKey, leadId);
  revalidatePath('/access/topics');
  return 'Kept.';
});

export const nameFallback = action(fallbackForm, async (viewer, { userId }) => {
  await saveFallback(viewer, userId);
  revalidatePath('/access/topics');
  return 'Kept.';
});
