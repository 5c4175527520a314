'use server';

import { revalidatePath } from 'next/cache';
import { passPen } from '@/db/queries/pen';
import { endQuestion, reopenQuestion } from '@/db/queries/question-ends';
import { action } from '@/lib/action';
import { wakeMail } from '@/lib/jobs/run';
import { penPass, questionEnd, questionRef } from '@/lib/validation/questions';

const refresh = () => revalidatePath('/questions', 'layout');

export const pass = action(penPass, async (viewer, { questionId, ...wish }) => {
  await passPen(viewer, questionId, wish, Date.now());
  wakeMail();
  refresh();
});

export const end = action(questionEnd, async (viewer, { questionId, how }) => {
  await endQuestion(viewer, questionId, how, Date.now());
  refresh();
});

export const reopen = action(questionRef, async (viewer, { questionId }) => {
  await reopenQuestion(viewer, questionId, Date.now());
  refresh();
});
