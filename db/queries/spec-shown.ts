import { and, desc, eq } from 'drizzle-orm';
import { requireCan } from './standing';
import { db } from '../client';
import { signOffs, specDrafts, specVersions } from '../schema';
import { can } from '@/lib/access';
import type { SpecDocument } from '@/lib/specs/document';
import type { Viewer } from '@/lib/viewer';

export type ShownSpec = {
  document: SpecDocument;
  state: 'signed' | 'sent' | 'draft';
  /** Null for a draft. */
  number: number | null;
};

/**
 * The spec that counts for this viewer: the version signed last, else the one sent last, else for staff the draft. Null where
 * there is none of them. @throws OutOfReach, Denied
 */
export async function findShownSpec(viewer: Viewer, orderNumber: string): Promise<ShownSpec | null> {
  const build = await requireCan(viewer, 'spec.read', orderNumber);
  const columns = { number: specVersions.number, document: specVersions.document };
  const ofBuild = eq(specVersions.buildId, build.id);
  const [signed] = await db()
    .select(columns)
    .from(specVersions)
    .innerJoin(signOffs, and(eq(signOffs.specVersionId, specVersions.id), eq(signOffs.state, 'signed')))
    .where(ofBuild)
    .orderBy(desc(specVersions.number))
    .limit(1);
  if (signed) return { ...signed, state: 'signed' };
  const [sent] = await db()
    .select(columns)
    .from(specVersions)
    .where(ofBuild)
    .orderBy(desc(specVersions.number))
    .limit(1);
  if (sent) return { ...sent, state: 'sent' };
  if (!can(viewer.role, build.standing, 'spec.edit')) return null;
  const [draft] = await db()
    .select({ document: specDrafts.document })
    .from(specDrafts)
    .where(eq(specDrafts.buildId, build.id));
  return draft ? { ...draft, state: 'draft', number: null } : null;
}
