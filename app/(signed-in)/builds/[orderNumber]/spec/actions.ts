'use server';

import { revalidatePath } from 'next/cache';
import { redirect } from 'next/navigation';
import { startDraft } from '@/db/queries/spec-drafts';
import { action } from '@/lib/action';
import { startSpecForm } from '@/lib/validation/specs';

export const start = action(startSpecForm, async (viewer, { orderNumber, templateId }) => {
  await startDraft(viewer, orderNumber, templateId, Date.now());
  revalidatePath(`/builds/${orderNumber}/spec`);
  redirect(`/builds/${orderNumber}/spec/edit`);
});
