import { eq } from 'drizzle-orm';
import { addAssignment } from './assignments';
import { recordEvent } from './audit';
import { routeAgain } from './pen';
import { requireCan } from './standing';
import { write } from '../client';
import { builds } from '../schema';
import type { Viewer } from '@/lib/viewer';

/**
 * Holds a build from view until an instant, or opens it (null). Companions stop seeing it at once, and so do the staff
 * who are not cleared. Who holds it is cleared, and put on it if only a rule had: a rule never covers a held build.
 */
export function holdBuild(viewer: Viewer, orderNumber: string, untilAt: number | null, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'build.hold', orderNumber, tx);
    await tx.update(builds).set({ heldUntilAt: untilAt }).where(eq(builds.id, build.id));
    if (untilAt !== null)
      await addAssignment(tx, viewer, { buildId: build.id, userId: viewer.id, cleared: true, reason: null }, nowMs);
    const action = untilAt === null ? 'opened' : 'held';
    await recordEvent(tx, { actorId: viewer.id, action, buildId: build.id }, nowMs);
    await routeAgain(tx, { buildId: build.id }, nowMs);
  });
}
