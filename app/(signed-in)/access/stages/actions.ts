'use server';

import { revalidatePath } from 'next/cache';
import { saveCapacity, saveStage } from '@/db/queries/shop-calendar';
import { action } from '@/lib/action';
import { capacityForm, stageForm } from '@/lib/validation/calendar';

export const estimate = action(stageForm, async (viewer, stage) => {
  await saveStage(viewer, stage, Date.now());
  revalidatePath('/access/stages');
  return 'Saved.';
});

export const setCapacity = action(capacityForm, async (viewer, capacity) => {
  await saveCapacity(viewer, capacity, Date.now());
  revalidatePath('/access/stages');
  return 'Saved.';
});
