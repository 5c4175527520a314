import { and, desc, eq } from 'drizzle-orm';
import { requireCan } from './standing';
import { db } from '../client';
import { buildIsVisible, documentIsVisible } from '../scope';
import { builds, changeRequests, documents, photos, specDrafts, specVersions } from '../schema';
import type { SignOffPage } from './sign-offs';
import type { Viewer } from '@/lib/viewer';

async function findVersion(viewer: Viewer, versionId: string) {
  const [version] = await db()
    .select({
      id: specVersions.id,
      number: specVersions.number,
      document: specVersions.document,
      sentAt: specVersions.sentAt,
    })
    .from(specVersions)
    .innerJoin(builds, eq(builds.id, specVersions.buildId))
    .where(and(eq(specVersions.id, versionId), buildIsVisible(viewer)));
  return version ?? null;
}

async function findDocument(viewer: Viewer, documentId: string) {
  const [document] = await db()
    .select({
      id: documents.id,
      title: documents.title,
      sizeBytes: documents.sizeBytes,
      photoId: documents.photoId,
      widthPx: photos.widthPx,
      heightPx: photos.heightPx,
      blurDataUrl: photos.blurDataUrl,
    })
    .from(documents)
    .innerJoin(builds, eq(builds.id, documents.buildId))
    .leftJoin(photos, eq(photos.id, documents.photoId))
    .where(and(eq(documents.id, documentId), buildIsVisible(viewer), documentIsVisible(viewer)));
  return document ?? null;
}

async function findChange(viewer: Viewer, changeId: string) {
  const [change] = await db()
    .select({
      id: changeRequests.id,
      itemKey: changeRequests.itemKey,
      wish: changeRequests.wish,
      priceCents: changeRequests.priceCents,
      extraDays: changeRequests.extraDays,
    })
    .from(changeRequests)
    .innerJoin(builds, eq(builds.id, changeRequests.buildId))
    .where(and(eq(changeRequests.id, changeId), buildIsVisible(viewer)));
  return change ?? null;
}

/** Exactly what is signed, for somebody who reads the sign-off; each part is null unless it is of that kind. */
export async function findSubject(
  viewer: Viewer,
  signOff: Pick<SignOffPage, 'specVersionId' | 'documentId' | 'changeRequestId' | 'concession'>,
) {
  const { specVersionId, documentId, changeRequestId, concession } = signOff;
  const [version, document, change] = await Promise.all([
    specVersionId ? findVersion(viewer, specVersionId) : null,
    documentId ? findDocument(viewer, documentId) : null,
    changeRequestId ? findChange(viewer, changeRequestId) : null,
  ]);
  return { version, document, change, concession };
}

export type SubjectOfSignOff = Awaited<ReturnType<typeof findSubject>>;

/** The items of a build's spec that are a look, so that a drawing can be sent for one. @throws OutOfReach, Denied */
export async function listLookItems(viewer: Viewer, orderNumber: string): Promise<{ key: string; label: string }[]> {
  const build = await requireCan(viewer, 'sign_off.ask', orderNumber);
  const [draft] = await db()
    .select({ document: specDrafts.document })
    .from(specDrafts)
    .where(eq(specDrafts.buildId, build.id));
  return (draft?.document.items ?? []).filter(({ kind }) => kind === 'look').map(({ key, label }) => ({ key, label }));
}

/** What the spec calls the item that a change or a concession is about, in the latest version that knows it. */
export async function findItemLabel(
  viewer: Viewer,
  { itemKey, changeRequestId, orderNumber }: Pick<SignOffPage, 'itemKey' | 'changeRequestId' | 'orderNumber'>,
): Promise<string | null> {
  const build = await requireCan(viewer, 'sign_off.read', orderNumber);
  const key = itemKey ?? (changeRequestId ? (await findChange(viewer, changeRequestId))?.itemKey : null);
  if (!key) return null;
  const versions = await db()
    .select({ document: specVersions.document })
    .from(specVersions)
    .where(eq(specVersions.buildId, build.id))
    .orderBy(desc(specVersions.number))
    .limit(20);
  for (const { document } of versions) {
    const item = document.items.find((known) => known.key === key);
    if (item) return item.label;
  }
  return null;
}
