import { createHash, randomBytes } from 'node:crypto';
import { settleDocumentReady, settleDocumentRefused } from '@/db/queries/documents';
import { requirePhotoObject } from '@/db/queries/photos';
import { PDF_TYPE } from '@/lib/documents/limits';
import { checkPdf } from '@/lib/documents/pdf-check';
import { PDF_REFUSALS } from '@/lib/documents/refusals';
import { deleteObject, findObject, readObject, storeObject } from '@/lib/storage';
import type { Viewer } from '@/lib/viewer';

type Uploaded = { id: string; objectKey: string; sizeBytes: number; sha256: string };
export type DocumentOutcome = { state: 'ready' } | { state: 'refused'; message: string } | { state: 'missing' };

const sha256Of = (bytes: Buffer) => createHash('sha256').update(bytes).digest('hex');

/** Drawings are read into memory one at a time, however many arrive at once. */
let line: Promise<unknown> = Promise.resolve();
const underWay = new Map<string, Promise<DocumentOutcome>>();

/** Checks one uploaded PDF and keeps exactly the bytes that were looked at; asked twice at once, it is done once. */
export function checkDocument(document: Uploaded): Promise<DocumentOutcome> {
  const running = underWay.get(document.id);
  if (running) return running;
  const turn = line.then(() => check(document));
  line = turn.catch(() => undefined);
  const outcome = turn.finally(() => underWay.delete(document.id));
  underWay.set(document.id, outcome);
  return outcome;
}

async function check(document: Uploaded): Promise<DocumentOutcome> {
  const stored = await findObject(document.objectKey);
  if (!stored) return { state: 'missing' };
  if (stored.sizeBytes !== document.sizeBytes) return refuse(document, PDF_REFUSALS.altered);
  const bytes = await readObject(document.objectKey);
  if (sha256Of(bytes) !== document.sha256) return refuse(document, PDF_REFUSALS.altered);
  const verdict = await checkPdf(bytes);
  if (!verdict.ok) return refuse(document, verdict.message);
  // Not under the key of the upload: nobody holds a link that writes to this one.
  const checkedKey = `document/${randomBytes(24).toString('base64url')}`;
  await storeObject(checkedKey, bytes, PDF_TYPE);
  await settleDocumentReady(document.id, checkedKey, Date.now());
  return { state: 'ready' };
}

async function refuse(document: Uploaded, message: string): Promise<DocumentOutcome> {
  await settleDocumentRefused(document.id, message, Date.now());
  await deleteObject(document.objectKey).catch(() => undefined);
  return { state: 'refused', message };
}

/** The SHA-256, hex, of the largest picture made of a photo: of the bytes its owner will be shown. @throws OutOfReach */
export async function hashShownPhoto(viewer: Viewer, photoId: string): Promise<string> {
  return sha256Of(await readObject(await requirePhotoObject(viewer, photoId, Number.MAX_SAFE_INTEGER)));
}
