'use server';

import { redirect } from 'next/navigation';
import { stepIn as stepInOn } from '@/db/queries/assignments';
import { action } from '@/lib/action';
import { stepInForm } from '@/lib/validation/people';

export const stepIn = action(stepInForm, async (viewer, step) => {
  await stepInOn(viewer, step, Date.now());
  redirect(`/builds/${step.orderNumber}`);
});
