import { checkHealth } from '@/db/queries/health';

/** Whether this process can write and read its database. Tells nothing else. */
export async function GET() {
  const isWell = await checkHealth(Date.now());
  return Response.json({ ok: isWell }, { status: isWell ? 200 : 503, headers: { 'Cache-Control': 'no-store' } });
}
