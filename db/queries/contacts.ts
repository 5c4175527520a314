import { and, asc, eq, isNotNull } from 'drizzle-orm';
import { requireCan } from './standing';
import { db } from '../client';
import { buildPeople, users } from '../schema';
import type { Viewer } from '@/lib/viewer';

/** The owners of a build whom mail does not reach, and why. @throws OutOfReach, or Denied for who reads no contacts */
export async function listUnreachableOwners(viewer: Viewer, orderNumber: string) {
  const build = await requireCan(viewer, 'contacts.read', orderNumber);
  const rows = await db()
    .select({ id: users.id, name: users.name, why: users.unreachableWhy })
    .from(buildPeople)
    .innerJoin(users, eq(users.id, buildPeople.userId))
    .where(and(eq(buildPeople.buildId, build.id), eq(buildPeople.standing, 'owner'), isNotNull(users.unreachableWhy)))
    .orderBy(asc(users.name));
  return rows.flatMap(({ why, ...owner }) => (why === null ? [] : [{ ...owner, why }]));
}

export type UnreachableOwner = Awaited<ReturnType<typeof listUnreachableOwners>>[number];
