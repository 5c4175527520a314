import { randomBytes } from 'node:crypto';
import { and, asc, count, eq, isNull, lt, sql } from 'drizzle-orm';
import { GRANT_MS } from './photos';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { buildIsVisible, documentIsVisible } from '../scope';
import { builds, documents, doomedObjects, photos, signOffs, specDrafts, specVersions } from '../schema';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import { MAX_UNASKED_DOCUMENTS } from '@/lib/documents/limits';
import type { SentUp } from '@/lib/specs/drawings';
import type { NewDocument } from '@/lib/validation/sign-offs';
import type { Viewer } from '@/lib/viewer';

const DAY_MS = 86_400_000;

const newKey = (area: string) => `${area}/${randomBytes(24).toString('base64url')}`;
const toHex = (base64: string) => Buffer.from(base64, 'base64').toString('hex');

/** Nothing rests on it: it was put before nobody, and no spec shows it. */
const isUnused = sql`not exists (select 1 from ${signOffs} where ${signOffs.documentId} = ${documents.id}) and not exists (select 1 from ${specDrafts} where ${specDrafts.buildId} = ${documents.buildId} and instr(${specDrafts.document}, ${documents.id}) > 0) and not exists (select 1 from ${specVersions} where ${specVersions.buildId} = ${documents.buildId} and instr(${specVersions.document}, ${documents.id}) > 0)`;

const grantColumns = {
  id: documents.id,
  state: documents.state,
  objectKey: documents.objectKey,
  sizeBytes: documents.sizeBytes,
  sha256: documents.sha256,
  refusal: documents.refusal,
};

/**
 * Promises room for one PDF of exactly this length and SHA-256. Asking again for the same upload renews the promise; a
 * PDF that has arrived is told as it stands.
 * @throws OutOfReach, or Denied: not theirs to do, too many that were put before nobody, or the mark of another file
 */
export function grantDocument(viewer: Viewer, file: NewDocument, nowMs: number) {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'sign_off.ask', file.orderNumber, tx);
    const mine = and(eq(documents.uploaderId, viewer.id), eq(documents.uploadKey, file.uploadKey));
    const sha256 = toHex(file.sha256);
    const [earlier] = await tx
      .update(documents)
      .set({ expiresAt: nowMs + GRANT_MS })
      .where(and(mine, eq(documents.sha256, sha256), eq(documents.buildId, build.id)))
      .returning(grantColumns);
    if (earlier) return earlier;
    const [other] = await tx.select({ id: documents.id }).from(documents).where(mine);
    if (other) throw new Denied('conflict', 'Another file was being sent in its place. Choose this one again.');
    await requireRoom(tx, viewer);
    const [granted] = await tx
      .insert(documents)
      .values({
        buildId: build.id,
        kind: 'drawing',
        title: file.label,
        objectKey: newKey('in'),
        sizeBytes: file.sizeBytes,
        sha256,
        state: 'granted',
        uploaderId: viewer.id,
        uploadKey: file.uploadKey,
        expiresAt: nowMs + GRANT_MS,
        createdAt: nowMs,
      })
      .returning(grantColumns);
    if (!granted) throw new Error('an insert without a row');
    return granted;
  });
}

async function requireRoom(tx: Tx, viewer: Viewer): Promise<void> {
  const [row] = await tx
    .select({ n: count() })
    .from(documents)
    .where(and(eq(documents.uploaderId, viewer.id), isUnused));
  if ((row?.n ?? 0) < MAX_UNASKED_DOCUMENTS) return;
  throw new Denied(
    'too_many',
    `You have sent up ${MAX_UNASKED_DOCUMENTS} drawings that nobody was asked to sign. They go by themselves after a day; until then use one of them.`,
  );
}

/** The viewer's own upload. @throws OutOfReach */
export async function requireOwnDocument(viewer: Viewer, documentId: string) {
  const [document] = await db()
    .select(grantColumns)
    .from(documents)
    .innerJoin(builds, eq(builds.id, documents.buildId))
    .where(and(eq(documents.id, documentId), eq(documents.uploaderId, viewer.id), buildIsVisible(viewer)));
  if (!document) throw new OutOfReach();
  return document;
}

async function doom(tx: Tx, keys: (string | null)[], nowMs: number): Promise<void> {
  const named = keys.filter((key) => key !== null);
  if (named.length === 0) return;
  await tx
    .insert(doomedObjects)
    .values(named.map((key) => ({ key, nextAttemptAt: nowMs })))
    .onConflictDoNothing();
}

const stillGranted = (documentId: string) => and(eq(documents.id, documentId), eq(documents.state, 'granted'));

/** granted -> ready: `checkedKey` is where the very bytes lie that were looked at. */
export function settleDocumentReady(documentId: string, checkedKey: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const [document] = await tx.select({ key: documents.objectKey }).from(documents).where(stillGranted(documentId));
    if (!document) return doom(tx, [checkedKey], nowMs);
    await tx.update(documents).set({ state: 'ready', objectKey: checkedKey }).where(eq(documents.id, documentId));
    await doom(tx, [document.key], nowMs);
  });
}

/** The bytes were not a PDF to be signed: they go, and the sentence stays for whoever sent them. */
export function settleDocumentRefused(documentId: string, refusal: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const [document] = await tx.select({ key: documents.objectKey }).from(documents).where(stillGranted(documentId));
    if (!document) return;
    await tx.update(documents).set({ state: 'refused', refusal, objectKey: null }).where(eq(documents.id, documentId));
    await doom(tx, [document.key], nowMs);
  });
}

/** Removes the viewer's own upload that nothing rests on. */
export function discardDocument(viewer: Viewer, documentId: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const own = and(eq(documents.id, documentId), eq(documents.uploaderId, viewer.id), isUnused);
    await remove(tx, await tx.select({ id: documents.id, key: documents.objectKey }).from(documents).where(own), nowMs);
  });
}

async function remove(tx: Tx, gone: { id: string; key: string | null }[], nowMs: number): Promise<void> {
  await doom(
    tx,
    gone.map(({ key }) => key),
    nowMs,
  );
  for (const { id } of gone) await tx.delete(documents).where(eq(documents.id, id));
}

/** Uploads that nobody was asked to sign, a day on. @returns how many went */
export function sweepUnusedDocuments(nowMs: number): Promise<number> {
  return write(async (tx) => {
    const old = await tx
      .select({ id: documents.id, key: documents.objectKey })
      .from(documents)
      .where(and(lt(documents.createdAt, nowMs - DAY_MS), isUnused))
      .limit(200);
    await remove(tx, old, nowMs);
    return old.length;
  });
}

/** The checked drawings and samples of a build that this viewer may open, oldest first. @throws OutOfReach, Denied */
export async function listDrawings(viewer: Viewer, orderNumber: string): Promise<SentUp[]> {
  const build = await requireCan(viewer, 'spec.read', orderNumber);
  return db()
    .select({ id: documents.id, title: documents.title, photoId: documents.photoId, createdAt: documents.createdAt })
    .from(documents)
    .innerJoin(builds, eq(builds.id, documents.buildId))
    .where(and(eq(documents.buildId, build.id), buildIsVisible(viewer), documentIsVisible(viewer)))
    .orderBy(asc(documents.createdAt), asc(documents.id));
}

/** Where a checked PDF lies, if the viewer may see it now. @throws OutOfReach */
export async function requireDocumentFile(viewer: Viewer, documentId: string) {
  const [document] = await db()
    .select({ key: documents.objectKey, title: documents.title, orderNumber: builds.orderNumber })
    .from(documents)
    .innerJoin(builds, eq(builds.id, documents.buildId))
    .where(and(eq(documents.id, documentId), buildIsVisible(viewer), documentIsVisible(viewer)));
  if (!document?.key) throw new OutOfReach();
  return { key: document.key, title: document.title, orderNumber: document.orderNumber };
}

type Named = { kind: 'drawing' | 'sample'; title: string; itemKey: string | null };

const notArrived = () =>
  new BadInput({ file: 'That file has not arrived whole. Wait for it, send it again, or choose another.' });

/**
 * Gives a checked PDF the name it is signed under, in the transaction that puts it before its owner. One that was put
 * before somebody already keeps its name. @throws BadInput when it is not there, or of another build
 */
export async function nameDocument(tx: Tx, buildId: string, documentId: string, named: Named): Promise<string> {
  const ofBuild = and(eq(documents.id, documentId), eq(documents.buildId, buildId), eq(documents.state, 'ready'));
  const [document] = await tx.select({ sha256: documents.sha256 }).from(documents).where(ofBuild);
  if (!document?.sha256) throw notArrived();
  await tx.update(documents).set(named).where(and(ofBuild, isUnused));
  return document.sha256;
}

/**
 * Makes a photo the viewer sent up something to be signed. `sha256` is that of the bytes its owner will see. The same
 * photo is the same document, however often it is sent.
 * @throws BadInput when it is not there, or of another build
 */
export async function documentOfPhoto(
  tx: Tx,
  viewer: Viewer,
  buildId: string,
  photo: { id: string; sha256: string },
  named: Named,
  nowMs: number,
): Promise<string> {
  const [ready] = await tx
    .select({ id: photos.id })
    .from(photos)
    .where(
      and(
        eq(photos.id, photo.id),
        eq(photos.buildId, buildId),
        eq(photos.uploaderId, viewer.id),
        eq(photos.state, 'ready'),
        isNull(photos.entryId),
      ),
    );
  if (!ready) throw notArrived();
  const uploadKey = `photo/${photo.id}`;
  const row = { ...named, buildId, photoId: photo.id, sha256: photo.sha256, state: 'ready' as const };
  await tx
    .insert(documents)
    .values({ ...row, uploaderId: viewer.id, uploadKey, expiresAt: nowMs, createdAt: nowMs })
    .onConflictDoNothing();
  const mine = and(eq(documents.uploaderId, viewer.id), eq(documents.uploadKey, uploadKey));
  const [document] = await tx.select({ id: documents.id }).from(documents).where(mine);
  if (!document) throw new Error('an insert without a row');
  return document.id;
}
