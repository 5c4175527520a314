import { and, eq, sql } from 'drizzle-orm';
import { db, type Db, type Tx } from '../client';
import { correlated } from '../correlated';
import { buildIsVisible } from '../scope';
import { buildPeople, builds } from '../schema';
import { can, isStaffRole, type Action, type Standing } from '@/lib/access';
import { Denied, OutOfReach } from '@/lib/errors';
import type { Viewer } from '@/lib/viewer';

export type ReachedBuild = { id: string; orderNumber: string; standing: Standing };

const refusal = () => new Denied('not_allowed', 'Your place on this build does not allow that.');

async function findReached(reader: Db | Tx, viewer: Viewer, orderNumber: string): Promise<ReachedBuild> {
  const own = sql<
    'owner' | 'companion' | null
  >`(select ${buildPeople.standing} from ${buildPeople} where ${buildPeople.buildId} = ${builds.id} and ${buildPeople.userId} = ${viewer.id})`;
  const [build] = await reader
    .select({ id: builds.id, orderNumber: builds.orderNumber, own: correlated(own) })
    .from(builds)
    .where(and(eq(builds.orderNumber, orderNumber), buildIsVisible(viewer)))
    .limit(1);
  if (!build) throw new OutOfReach(orderNumber);
  const standing = isStaffRole(viewer.role) ? 'assigned' : (build.own ?? 'none');
  return { id: build.id, orderNumber: build.orderNumber, standing };
}

/**
 * The guard line of every query: the build, if this viewer reaches it and may do the action on it.
 * @throws OutOfReach when there is no such build for this viewer; Denied when there is, and the action is not theirs
 */
export async function requireCan(
  viewer: Viewer,
  action: Action,
  orderNumber: string,
  reader?: Db | Tx,
): Promise<ReachedBuild>;
export async function requireCan(viewer: Viewer, action: Action): Promise<null>;
export async function requireCan(viewer: Viewer, action: Action, orderNumber?: string, reader: Db | Tx = db()) {
  if (orderNumber === undefined) {
    if (!can(viewer.role, 'none', action)) throw new OutOfReach();
    return null;
  }
  const build = await findReached(reader, viewer, orderNumber);
  if (!can(viewer.role, build.standing, action)) throw refusal();
  return build;
}
