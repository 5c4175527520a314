import { readAsBuilt } from '@/db/queries/as-built';
import { requireRoom } from '@/lib/auth/door';
import { asBuiltSheet } from '@/lib/as-built/sheet';
import { OutOfReach } from '@/lib/errors';
import { readRoute } from '@/lib/route';
import { readObject } from '@/lib/storage';

/** The as-built sheet for paper. The renderer is heavy, so it is loaded by those who ask for it only. */
export const GET = readRoute(async ({ viewer, params }) => {
  const facts = await readAsBuilt(viewer, params.orderNumber ?? '');
  if (!facts) throw new OutOfReach();
  await requireRoom('paper', viewer.id);
  const { renderPaper } = await import('@/lib/as-built/render-paper');
  const nowMs = Date.now();
  const pdf = await renderPaper(asBuiltSheet(facts, viewer.timeZone, nowMs), readObject, nowMs);
  return new Response(pdf, {
    headers: {
      'Content-Type': 'application/pdf',
      'Content-Disposition': `attachment; filename="${facts.orderNumber}-as-built.pdf"`,
      'Cache-Control': 'private, no-store',
      'X-Content-Type-Options': 'nosniff',
    },
  });
});
