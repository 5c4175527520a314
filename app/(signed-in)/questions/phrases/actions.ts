'use server';

import { revalidatePath } from 'next/cache';
import { dropPhrase, savePhrase } from '@/db/queries/phrases';
import { action } from '@/lib/action';
import { phraseRef, savedPhrase } from '@/lib/validation/questions';

export const keep = action(savedPhrase, async (viewer, phrase) => {
  await savePhrase(viewer, phrase);
  revalidatePath('/questions/phrases');
  return 'Kept.';
});

export const drop = action(phraseRef, async (viewer, { phraseId }) => {
  await dropPhrase(viewer, phraseId);
  revalidatePath('/questions/phrases');
});
