'use server';

import { redirect } from 'next/navigation';
import { sendForSignature } from '@/db/queries/sign-off-sending';
import { action } from '@/lib/action';
import { hashShownPhoto } from '@/lib/jobs/document-check';
import { wakeMail } from '@/lib/jobs/run';
import { newSignOff } from '@/lib/validation/sign-offs';

export const send = action(newSignOff, async (viewer, wish) => {
  const photoSha256 = wish.photoId === null ? null : await hashShownPhoto(viewer, wish.photoId);
  const { id, orderNumber } = await sendForSignature(viewer, wish, photoSha256, Date.now());
  wakeMail();
  redirect(`/builds/${orderNumber}/sign-offs/${id}`);
});
