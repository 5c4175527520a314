import { and, asc, desc, eq, gt } from 'drizzle-orm';
import { requireCan } from './standing';
import { db, type Db, type Tx } from '../client';
import { buildStages, changeRequests, signOffs, specVersions } from '../schema';
import type { SpecDocument } from '@/lib/specs/document';
import type { FreezeStage } from '@/lib/specs/freeze';
import type { Viewer } from '@/lib/viewer';

export type FreezeGround = {
  agreed: SpecDocument | null;
  stages: FreezeStage[];
  openedKeys: ReadonlySet<string>;
};

/** What decides which items of a build may still change. No viewer: the caller has asked. */
export async function freezeGround(reader: Db | Tx, buildId: string): Promise<FreezeGround> {
  const [last] = await reader
    .select({ document: specVersions.document, sentAt: specVersions.sentAt })
    .from(specVersions)
    .where(eq(specVersions.buildId, buildId))
    .orderBy(desc(specVersions.number))
    .limit(1);
  const stages = await reader
    .select({
      key: buildStages.key,
      name: buildStages.name,
      position: buildStages.position,
      usualDays: buildStages.usualDays,
      startedAt: buildStages.startedAt,
      finishedAt: buildStages.finishedAt,
    })
    .from(buildStages)
    .where(eq(buildStages.buildId, buildId))
    .orderBy(asc(buildStages.position));
  const openedKeys = last ? await listOpenedKeys(reader, buildId, last.sentAt) : new Set<string>();
  return { agreed: last?.document ?? null, stages, openedKeys };
}

/** What the edit page needs to say which items are frozen, which a signed change has opened, and until when others can change. */
export async function requireFreezeGround(viewer: Viewer, orderNumber: string): Promise<FreezeGround> {
  const build = await requireCan(viewer, 'spec.read', orderNumber);
  return freezeGround(db(), build.id);
}

/** Items that a change, signed since the last version went out, has opened for editing. No viewer: the caller has asked. */
async function listOpenedKeys(reader: Db | Tx, buildId: string, sinceMs: number): Promise<ReadonlySet<string>> {
  const rows = await reader
    .select({ itemKey: changeRequests.itemKey })
    .from(changeRequests)
    .innerJoin(signOffs, and(eq(signOffs.changeRequestId, changeRequests.id), eq(signOffs.state, 'signed')))
    .where(and(eq(changeRequests.buildId, buildId), gt(signOffs.answeredAt, sinceMs)));
  return new Set(rows.map(({ itemKey }) => itemKey));
}
