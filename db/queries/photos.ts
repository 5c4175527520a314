import { randomBytes } from 'node:crypto';
import { and, asc, count, eq, inArray, isNull, lt, lte, sql } from 'drizzle-orm';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { buildIsVisible, photoIsVisible } from '../scope';
import { builds, checkMarks, documents, doomedObjects, photos } from '../schema';
import { Denied, OutOfReach } from '@/lib/errors';
import type { NewPhoto } from '@/lib/validation/photos';
import type { Viewer } from '@/lib/viewer';

export const GRANT_MS = 5 * 60_000;
const DAY_MS = 86_400_000;
const MAX_UNPOSTED = 36;

/** What a letter holds, an owner is asked to sign, or an inspection shows, stays: such a photo is neither posted elsewhere nor swept away. */
export const isUnbound = sql`(${photos.letterId} is null and not exists (select 1 from ${documents} where ${documents.photoId} = ${photos.id}) and not exists (select 1 from ${checkMarks} where ${checkMarks.photoId} = ${photos.id}))`;

const newKey = (area: string) => `${area}/${randomBytes(24).toString('base64url')}`;

const grantColumns = {
  id: photos.id,
  state: photos.state,
  originalKey: photos.originalKey,
  contentType: photos.contentType,
  sizeBytes: photos.sizeBytes,
  sha256: photos.sha256,
  refusal: photos.refusal,
};

/**
 * Promises room for one photo of exactly this length, type and SHA-256. Asking again for the same upload renews the
 * promise; a photo that has arrived is told as it stands.
 * @throws OutOfReach, or Denied: not theirs to do, too many unposted, or the mark of another photo
 */
export function grantPhoto(viewer: Viewer, orderNumber: string, photo: NewPhoto, nowMs: number) {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'photo.send', orderNumber, tx);
    const mine = and(eq(photos.uploaderId, viewer.id), eq(photos.uploadKey, photo.uploadKey));
    const [earlier] = await tx
      .update(photos)
      .set({ expiresAt: nowMs + GRANT_MS })
      .where(and(mine, eq(photos.sha256, photo.sha256), eq(photos.buildId, build.id)))
      .returning(grantColumns);
    if (earlier) return earlier;
    const [other] = await tx.select({ id: photos.id }).from(photos).where(mine);
    if (other) throw new Denied('conflict', 'Another photo was being sent in its place. Choose this one again.');
    await requireRoom(tx, viewer);
    const row = { ...photo, buildId: build.id, uploaderId: viewer.id, originalKey: newKey('in'), createdAt: nowMs };
    const [granted] = await tx
      .insert(photos)
      .values({ ...row, state: 'granted', expiresAt: nowMs + GRANT_MS })
      .returning(grantColumns);
    if (!granted) throw new Error('an insert without a row');
    return granted;
  });
}

async function requireRoom(tx: Tx, viewer: Viewer): Promise<void> {
  const [row] = await tx
    .select({ n: count() })
    .from(photos)
    .where(and(eq(photos.uploaderId, viewer.id), isNull(photos.entryId), isUnbound));
  if ((row?.n ?? 0) < MAX_UNPOSTED) return;
  throw new Denied(
    'too_many',
    `You have ${MAX_UNPOSTED} photos that are in no entry yet. Post or discard some of them first.`,
  );
}

/** The viewer's own photo that is not posted yet. @throws OutOfReach */
export async function requireOwnPhoto(viewer: Viewer, photoId: string) {
  const [photo] = await db()
    .select(grantColumns)
    .from(photos)
    .innerJoin(builds, eq(builds.id, photos.buildId))
    .where(
      and(
        eq(photos.id, photoId),
        eq(photos.uploaderId, viewer.id),
        isNull(photos.entryId),
        isNull(photos.letterId),
        buildIsVisible(viewer),
      ),
    );
  if (!photo) throw new OutOfReach();
  return photo;
}

/** granted -> uploaded, once. */
export function markUploaded(viewer: Viewer, photoId: string): Promise<boolean> {
  return write(async (tx) => {
    const moved = await tx
      .update(photos)
      .set({ state: 'uploaded' })
      .where(and(eq(photos.id, photoId), eq(photos.uploaderId, viewer.id), eq(photos.state, 'granted')))
      .returning({ id: photos.id });
    return moved.length === 1;
  });
}

/** uploaded -> granted: nothing lies under the key, so the sender may ask for a link again. */
export function settleMissing(photoId: string): Promise<unknown> {
  const notThere = and(eq(photos.id, photoId), eq(photos.state, 'uploaded'));
  return write((tx) => tx.update(photos).set({ state: 'granted' }).where(notThere));
}

/** Uploads whose check was cut off by a restart. No viewer: the pipeline's own list. */
export function unscopedUploadedPhotos(limit: number) {
  return db()
    .select(grantColumns)
    .from(photos)
    .where(eq(photos.state, 'uploaded'))
    .orderBy(asc(photos.createdAt))
    .limit(limit);
}

/** Where a photo's sizes and its original lie; `widthsPx` are the widths it is served at. */
export type ReadyPhoto = {
  outPrefix: string;
  keptKey: string;
  widthPx: number;
  heightPx: number;
  blurDataUrl: string;
  widthsPx: number[];
};

/** uploaded -> ready; the upload's own object is no longer needed. */
export function settleReady(photoId: string, ready: ReadyPhoto, nowMs: number): Promise<boolean> {
  return write(async (tx) => {
    const [photo] = await tx
      .select({ key: photos.originalKey })
      .from(photos)
      .where(and(eq(photos.id, photoId), eq(photos.state, 'uploaded')));
    if (!photo) {
      await doom(tx, [ready.keptKey, ...outKeys(ready.outPrefix, ready.widthsPx)], nowMs);
      return false;
    }
    await tx
      .update(photos)
      .set({
        state: 'ready',
        originalKey: ready.keptKey,
        outPrefix: ready.outPrefix,
        widthPx: ready.widthPx,
        heightPx: ready.heightPx,
        blurDataUrl: ready.blurDataUrl,
        variantWidthsPx: ready.widthsPx.join(','),
      })
      .where(eq(photos.id, photoId));
    await doom(tx, [photo.key], nowMs);
    return true;
  });
}

/** The bytes were not a photo: they go, and the sentence stays for whoever sent them. */
export function settleRefused(photoId: string, refusal: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const [photo] = await tx
      .update(photos)
      .set({ state: 'refused', refusal })
      .where(and(eq(photos.id, photoId), inArray(photos.state, ['granted', 'uploaded'])))
      .returning({ key: photos.originalKey });
    if (photo) await doom(tx, [photo.key], nowMs);
  });
}

export const mailJpegKey = (outPrefix: string) => `${outPrefix}/mail.jpg`;
export const variantKey = (outPrefix: string, widthPx: number) => `${outPrefix}/${widthPx}.webp`;
const outKeys = (outPrefix: string, widthsPx: number[]) => [
  mailJpegKey(outPrefix),
  ...widthsPx.map((widthPx) => variantKey(outPrefix, widthPx)),
];

async function doom(tx: Tx, keys: string[], nowMs: number): Promise<void> {
  if (keys.length === 0) return;
  await tx
    .insert(doomedObjects)
    .values(keys.map((key) => ({ key, nextAttemptAt: nowMs })))
    .onConflictDoNothing();
}

type Unposted = { id: string; originalKey: string; outPrefix: string | null; variantWidthsPx: string | null };
const unpostedColumns = {
  id: photos.id,
  originalKey: photos.originalKey,
  outPrefix: photos.outPrefix,
  variantWidthsPx: photos.variantWidthsPx,
};

async function remove(tx: Tx, gone: Unposted[], nowMs: number): Promise<void> {
  for (const photo of gone) {
    const widthsPx = (photo.variantWidthsPx ?? '').split(',').filter(Boolean).map(Number);
    await doom(tx, [photo.originalKey, ...(photo.outPrefix ? outKeys(photo.outPrefix, widthsPx) : [])], nowMs);
    await tx.delete(photos).where(eq(photos.id, photo.id));
  }
}

/** Removes the viewer's own photo that is in no entry, with everything made of it. */
export function discardPhoto(viewer: Viewer, photoId: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const own = and(eq(photos.id, photoId), eq(photos.uploaderId, viewer.id), isNull(photos.entryId), isUnbound);
    await remove(tx, await tx.select(unpostedColumns).from(photos).where(own), nowMs);
  });
}

/** Uploads that never finished and photos never posted, a day on. @returns how many went */
export function sweepUnfinishedPhotos(nowMs: number): Promise<number> {
  return write(async (tx) => {
    const old = await tx
      .select(unpostedColumns)
      .from(photos)
      .where(and(isNull(photos.entryId), isUnbound, lt(photos.createdAt, nowMs - DAY_MS)))
      .limit(200);
    await remove(tx, old, nowMs);
    return old.length;
  });
}

export function unscopedDoomedObjects(nowMs: number, limit: number) {
  return db()
    .select({ key: doomedObjects.key })
    .from(doomedObjects)
    .where(lte(doomedObjects.nextAttemptAt, nowMs))
    .limit(limit);
}

export function settleDoomed(deleted: string[], failed: string[], nowMs: number): Promise<void> {
  return write(async (tx) => {
    if (deleted.length > 0) await tx.delete(doomedObjects).where(inArray(doomedObjects.key, deleted));
    if (failed.length === 0) return;
    await tx
      .update(doomedObjects)
      .set({
        attempts: sql`${doomedObjects.attempts} + 1`,
        nextAttemptAt: sql`${nowMs} + min(3600000, 30000 << min(7, ${doomedObjects.attempts}))`,
      })
      .where(inArray(doomedObjects.key, failed));
  });
}

/** The object that serves a photo at about this width, if the viewer may see the photo. @throws OutOfReach */
export async function requirePhotoObject(viewer: Viewer, photoId: string, widthPx: number): Promise<string> {
  const [photo] = await db()
    .select({ outPrefix: photos.outPrefix, widthsPx: photos.variantWidthsPx })
    .from(photos)
    .innerJoin(builds, eq(builds.id, photos.buildId))
    .where(and(eq(photos.id, photoId), buildIsVisible(viewer), photoIsVisible(viewer)))
    .limit(1);
  if (!photo?.outPrefix) throw new OutOfReach();
  const widthsPx = (photo.widthsPx ?? '').split(',').map(Number);
  const best = widthsPx.find((width) => width >= widthPx) ?? widthsPx.at(-1);
  if (!best) throw new OutOfReach();
  return variantKey(photo.outPrefix, best);
}
