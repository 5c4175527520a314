import { grantPhoto } from '@/db/queries/photos';
import { writeRoute } from '@/lib/route';
import { presignUpload } from '@/lib/storage';
import { newPhoto } from '@/lib/validation/photos';

/** Room for one photo: where to send it, or how it stands if it has arrived before. */
export const POST = writeRoute(newPhoto, 'upload', async ({ viewer, input, params }) => {
  const {
    id,
    state,
    refusal,
    originalKey: key,
    ...promised
  } = await grantPhoto(viewer, params.orderNumber ?? '', input, Date.now());
  if (state !== 'granted') return { id, state, message: refusal };
  return { id, state, upload: await presignUpload({ key, ...promised }) };
});
