import { floorAnswer } from '@/db/queries/floor';
import { readRoute } from '@/lib/route';

/** The floor as its reader sees it; a 304 costs one look at who reaches what. */
export const GET = readRoute(async ({ viewer, request }) => {
  const known = request.headers.get('if-none-match');
  const { etag, text } = await floorAnswer(viewer, known, Date.now());
  const headers = { ETag: etag, 'Cache-Control': 'private, no-store', 'X-Content-Type-Options': 'nosniff' };
  if (text === null) return new Response(null, { status: 304, headers });
  return new Response(text, { headers: { ...headers, 'Content-Type': 'application/json' } });
});
