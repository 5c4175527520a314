import { diaryAnswer, parseCursor } from '@/db/queries/diary';
import { readRoute } from '@/lib/route';

const headers = {
  'Content-Type': 'application/json',
  'Cache-Control': 'private, no-store',
  'X-Content-Type-Options': 'nosniff',
};

/** One page of a diary; 304 while nothing has changed for this viewer. */
export const GET = readRoute(async ({ viewer, params, request }) => {
  const before = parseCursor(new URL(request.url).searchParams.get('before'));
  const known = request.headers.get('if-none-match');
  const { etag, page } = await diaryAnswer(viewer, params.orderNumber ?? '', before, known);
  if (page === null) return new Response(null, { status: 304, headers: { ETag: etag } });
  return new Response(page, { headers: { ...headers, ETag: etag } });
});
