import { eq } from 'drizzle-orm';
import { routeAgain } from './pen';
import { requireCan } from './standing';
import { db, write } from '../client';
import { users } from '../schema';
import type { Viewer } from '@/lib/viewer';

/** When the viewer is out of office; null times where they are not. @throws OutOfReach for the client side */
export async function findAway(viewer: Viewer) {
  await requireCan(viewer, 'away.set');
  const [row] = await db()
    .select({ fromAt: users.awayFromAt, untilAt: users.awayUntilAt })
    .from(users)
    .where(eq(users.id, viewer.id));
  return row ?? { fromAt: null, untilAt: null };
}

/** The first moment away and the first back; without an end it lasts until it is taken back, without a beginning there is none. */
export type Away = { fromAt: number | null; untilAt: number | null };

/** Out of office, questions pass the viewer over, and those they hold find somebody else when it begins. */
export function saveAway(viewer: Viewer, { fromAt, untilAt }: Away, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'away.set');
    await tx.update(users).set({ awayFromAt: fromAt, awayUntilAt: untilAt }).where(eq(users.id, viewer.id));
    await routeAgain(tx, { holderId: viewer.id }, nowMs);
  });
}
