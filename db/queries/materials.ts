import { asc } from 'drizzle-orm';
import { requireCan } from './standing';
import { db } from '../client';
import { materials } from '../schema';
import type { Viewer } from '@/lib/viewer';

/** The shop's materials by name, for the spec of a build this viewer reads. @throws OutOfReach, Denied */
export async function listMaterials(viewer: Viewer, orderNumber: string) {
  await requireCan(viewer, 'spec.read', orderNumber);
  return db()
    .select({
      key: materials.key,
      name: materials.name,
      kind: materials.kind,
      papersMayBeNeeded: materials.papersMayBeNeeded,
    })
    .from(materials)
    .orderBy(asc(materials.name));
}

export type MaterialRow = Awaited<ReturnType<typeof listMaterials>>[number];
