import { requirePhotoObject } from '@/db/queries/photos';
import { readRoute } from '@/lib/route';
import { presignView } from '@/lib/storage';

/** A photo at about a width, for whoever may see it now: a link into the store that dies within five minutes. */
export const GET = readRoute(async ({ viewer, params }) => {
  const nowMs = Date.now();
  const key = await requirePhotoObject(viewer, params.photoId ?? '', Number(params.widthPx) || 0);
  const url = await presignView(key, nowMs);
  return new Response(null, { status: 302, headers: { Location: url, 'Cache-Control': 'private, no-store' } });
});
