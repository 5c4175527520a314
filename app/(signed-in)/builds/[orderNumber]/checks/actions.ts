'use server';

import { revalidatePath } from 'next/cache';
import { redirect } from 'next/navigation';
import { keepCheck, tellOfCheck } from '@/db/queries/check-telling';
import { finishCheck, startCheck } from '@/db/queries/checks';
import { action } from '@/lib/action';
import { wakeMail } from '@/lib/jobs/run';
import { checkEnd, keptCheck, newCheck, toldCheck } from '@/lib/validation/checks';

const renew = (orderNumber: string) => revalidatePath(`/builds/${orderNumber}`, 'layout');

export const start = action(newCheck, async (viewer, { orderNumber, listId }) => {
  const runId = await startCheck(viewer, orderNumber, listId, Date.now());
  redirect(`/builds/${orderNumber}/checks/${runId}`);
});

export const finish = action(checkEnd, async (viewer, end) => {
  await finishCheck(viewer, end, Date.now());
  renew(end.orderNumber);
  redirect(`/builds/${end.orderNumber}/checks`);
});

export const tell = action(toldCheck, async (viewer, told) => {
  await tellOfCheck(viewer, told, Date.now());
  wakeMail();
  renew(told.orderNumber);
});

export const keep = action(keptCheck, async (viewer, kept) => {
  await keepCheck(viewer, kept, Date.now());
  renew(kept.orderNumber);
});
