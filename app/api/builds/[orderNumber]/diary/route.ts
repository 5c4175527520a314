import { diaryPageJson, diaryState, parseCursor } from '@/db/queries/diary';
import { readRoute } from '@/lib/route';

const headers = {
  'Content-Type': 'application/json',
  'Cache-Control': 'private, no-store',
  'X-Content-Type-Options': 'nosniff',
};

/** One page of a diary; 304 while nothing has changed for this viewer. */
export const GET = readRoute(async ({ viewer, params, request }) => {
  const { buildId, etag } = await diaryState(viewer, params.orderNumber ?? '');
  if (request.headers.get('if-none-match') === etag)
    return new Response(null, { status: 304, headers: { ETag: etag } });
  const before = parseCursor(new URL(request.url).searchParams.get('before'));
  const page = await diaryPageJson(viewer, buildId, before);
  return new Response(page, { headers: { ...headers, ETag: etag } });
});
