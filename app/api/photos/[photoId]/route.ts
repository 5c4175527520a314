import { z } from 'zod';
import { discardPhoto, markUploaded, requireOwnPhoto } from '@/db/queries/photos';
import { developPhoto } from '@/lib/jobs/photo-pipeline';
import { writeRoute } from '@/lib/route';

/** The bytes are in the store: check them and make the sizes. Asking again tells how the photo stands. */
export const POST = writeRoute(z.strictObject({}), 'upload_step', async ({ viewer, params }) => {
  const photoId = params.photoId ?? '';
  const photo = await requireOwnPhoto(viewer, photoId);
  if (photo.state === 'ready') return { state: 'ready' };
  if (photo.state === 'refused') return { state: 'refused', message: photo.refusal };
  await markUploaded(viewer, photoId);
  return developPhoto(photo);
});

/** Leaves a photo out that is in no entry yet. */
export const DELETE = writeRoute(z.strictObject({}), 'upload_step', async ({ viewer, params }) => {
  await discardPhoto(viewer, params.photoId ?? '', Date.now());
  return {};
});
