import { createHash, randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { db } from '@/db/client';
import {
  discardDocument,
  grantDocument,
  requireDocumentFile,
  requireOwnDocument,
  sweepUnusedDocuments,
} from '@/db/queries/documents';
import { discardPhoto, grantPhoto, markUploaded, requireOwnPhoto, requirePhotoObject } from '@/db/queries/photos';
import { sendForSignature } from '@/db/queries/sign-off-sending';
import { withdrawSignOff } from '@/db/queries/sign-off-answers';
import { documents, photos, signOffs } from '@/db/schema';
import { PDF_TYPE } from '@/lib/documents/limits';
import { PDF_REFUSALS } from '@/lib/documents/refusals';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import { checkDocument, hashShownPhoto } from '@/lib/jobs/document-check';
import { developPhoto } from '@/lib/jobs/photo-pipeline';
import { deleteDoomedObjects, sweep } from '@/lib/jobs/sweep';
import { findObject, presignDocument, presignUpload } from '@/lib/storage';
import { openStandIns } from './stand-ins';
import { pdfOf } from '../../support/pdf-bytes';
import { jpegWithExif } from '../../support/photo-fixtures';
import { signOffCast } from '../../support/sign-off-world';
import { DAY_MS } from '../../support/world';
import type { Viewer } from '@/lib/viewer';

const { behave } = await openStandIns();
const pdf = pdfOf();
beforeEach(behave);

type Cast = Awaited<ReturnType<typeof signOffCast>>;

const base64 = (bytes: Buffer) => createHash('sha256').update(bytes).digest('base64');
const hex = (bytes: Buffer) => createHash('sha256').update(bytes).digest('hex');

async function ask({ rep, build }: Cast, bytes: Buffer, uploadKey: string = randomUUID()) {
  const [sizeBytes, sha256] = [bytes.length, base64(bytes)];
  const file = { orderNumber: build.orderNumber, uploadKey, label: 'logo.pdf', sizeBytes, sha256 };
  const { id, objectKey } = await grantDocument(rep, file, Date.now());
  const key = objectKey ?? '';
  return { id, key, upload: await presignUpload({ key, contentType: PDF_TYPE, sizeBytes, sha256 }) };
}

type Asked = Awaited<ReturnType<typeof ask>>;

const put = ({ upload: { url, headers } }: Asked, bytes: Buffer, over: Record<string, string> = {}) =>
  fetch(url, { method: 'PUT', headers: { ...headers, ...over }, body: new Uint8Array(bytes) });

async function finish({ rep }: Cast, documentId: string) {
  const { id, objectKey, sizeBytes, sha256 } = await requireOwnDocument(rep, documentId);
  return checkDocument({ id, objectKey: objectKey ?? '', sizeBytes: sizeBytes ?? 0, sha256: sha256 ?? '' });
}

async function sendUp(cast: Cast, bytes = pdf): Promise<string> {
  const asked = await ask(cast, bytes);
  expect((await put(asked, bytes)).status).toBe(200);
  expect(await finish(cast, asked.id)).toEqual({ state: 'ready' });
  return asked.id;
}

const rowOf = async (id: string) => (await db().select().from(documents).where(eq(documents.id, id)))[0];

const inAMonth = new Date(Date.now() + 30 * DAY_MS).toISOString().slice(0, 10);

function wishFor({ build }: Cast, over: { documentId?: string; photoId?: string; title?: string }) {
  return {
    orderNumber: build.orderNumber,
    kind: 'drawing' as const,
    title: over.title ?? 'Headstock logo, drawing 1',
    message: '',
    dueOn: inAMonth,
    blocksStageKey: null,
    documentId: over.documentId ?? null,
    photoId: over.photoId ?? null,
  };
}

const opened = (viewer: Viewer, id: string) =>
  requireDocumentFile(viewer, id).then(
    () => true,
    (error: unknown) => {
      if (error instanceof OutOfReach) return false;
      throw error;
    },
  );

describe('a PDF sent up', () => {
  test('is served as the very bytes that were checked, as a PDF, for five minutes at most', async () => {
    const cast = await signOffCast();
    const id = await sendUp(cast);
    const { key } = await requireDocumentFile(cast.rep, id);
    const url = await presignDocument(key, 'Q-1 logo.pdf', Date.now());
    expect(Number(new URL(url).searchParams.get('X-Amz-Expires'))).toBeLessThanOrEqual(300);
    const answer = await fetch(url);
    expect(answer.headers.get('content-type')).toBe('application/pdf');
    expect(answer.headers.get('content-disposition')).toBe('inline; filename="Q-1 logo.pdf"');
    const served = Buffer.from(await answer.arrayBuffer());
    expect(served.equals(pdf)).toBe(true);
    expect((await rowOf(id))?.sha256).toBe(hex(served));
  });

  test('no longer lies where its link could write', async () => {
    const cast = await signOffCast();
    const asked = await ask(cast, pdf);
    await put(asked, pdf);
    await finish(cast, asked.id);
    await deleteDoomedObjects(Date.now());
    expect(await findObject(asked.key)).toBeNull();
    expect((await requireDocumentFile(cast.rep, asked.id)).key).toMatch(/^document\//);
  });

  test('can be sent under its promise only: other bytes, another length, another kind and a second time are refused', async () => {
    const cast = await signOffCast();
    const asked = await ask(cast, pdf);
    const other = Buffer.from(pdf);
    other[20] = 0x41;
    expect((await put(asked, other)).status).toBeGreaterThanOrEqual(400);
    expect((await put(asked, Buffer.concat([pdf, pdf]))).status).toBeGreaterThanOrEqual(400);
    expect((await put(asked, pdf, { 'Content-Type': 'text/html' })).status).toBeGreaterThanOrEqual(400);
    expect((await put(asked, pdf)).status).toBe(200);
    expect((await put(asked, pdf)).status).toBe(412);
  });

  test('that is none is refused with its sentence, and its bytes go at once', async () => {
    const cast = await signOffCast();
    const page = Buffer.from('<!doctype html><script>alert(1)</script>');
    const asked = await ask(cast, page);
    await put(asked, page);
    expect(await finish(cast, asked.id)).toEqual({ state: 'refused', message: PDF_REFUSALS.not_a_pdf });
    expect(await findObject(asked.key)).toBeNull();
    expect(await rowOf(asked.id)).toMatchObject({ state: 'refused', refusal: PDF_REFUSALS.not_a_pdf });
    expect(await opened(cast.rep, asked.id)).toBe(false);
  });

  test('finished three times at once is checked once; before it arrived it is missing', async () => {
    const cast = await signOffCast();
    const asked = await ask(cast, pdf);
    expect(await finish(cast, asked.id)).toEqual({ state: 'missing' });
    await put(asked, pdf);
    const outcomes = await Promise.all([1, 2, 3].map(() => finish(cast, asked.id)));
    expect(outcomes).toEqual(outcomes.map(() => ({ state: 'ready' })));
  });

  test('asked for again under its key is the same; another file under that key is refused', async () => {
    const cast = await signOffCast();
    const first = await ask(cast, pdf, 'the-same-key');
    expect((await ask(cast, pdf, 'the-same-key')).id).toBe(first.id);
    await expect(ask(cast, Buffer.from('%PDF-other'), 'the-same-key')).rejects.toThrow(Denied);
  });
});

describe('what nobody was asked to sign', () => {
  test('goes after a day, row and object; what was sent stays', async () => {
    const cast = await signOffCast();
    const [left, sent] = [await sendUp(cast), await sendUp(cast)];
    const { key } = await requireDocumentFile(cast.rep, left);
    await sendForSignature(cast.rep, wishFor(cast, { documentId: sent }), null, Date.now());
    expect(await sweepUnusedDocuments(Date.now() + DAY_MS - 60_000)).toBe(0);
    await sweep(Date.now() + DAY_MS + 60_000);
    expect(await rowOf(left)).toBeUndefined();
    expect(await findObject(key)).toBeNull();
    expect(await opened(cast.owner, sent)).toBe(true);
  });

  test('is at most twelve for one person', async () => {
    const cast = await signOffCast();
    for (let i = 0; i < 12; i += 1) await ask(cast, pdf);
    await expect(ask(cast, pdf)).rejects.toThrow(/nobody was asked to sign/);
  });

  test('can be discarded by who sent it; what was sent to be signed cannot', async () => {
    const cast = await signOffCast();
    const [left, sent] = [await sendUp(cast), await sendUp(cast)];
    await sendForSignature(cast.rep, wishFor(cast, { documentId: sent }), null, Date.now());
    for (const id of [left, sent]) await discardDocument(cast.builder, id, Date.now());
    expect(await rowOf(left)).toBeDefined();
    for (const id of [left, sent]) await discardDocument(cast.rep, id, Date.now());
    expect(await rowOf(left)).toBeUndefined();
    expect(await rowOf(sent)).toBeDefined();
  });
});

describe('sending to be signed', () => {
  test('shows the owner the drawing under its name, and nobody else of the client side', async () => {
    const cast = await signOffCast();
    const documentId = await sendUp(cast);
    expect(await opened(cast.owner, documentId)).toBe(false);
    const { id } = await sendForSignature(cast.rep, wishFor(cast, { documentId }), null, Date.now());
    expect(await opened(cast.owner, documentId)).toBe(true);
    for (const viewer of [cast.companion, cast.stranger, cast.admin])
      expect(await opened(viewer, documentId)).toBe(false);
    expect((await requireDocumentFile(cast.owner, documentId)).title).toBe('Headstock logo, drawing 1');
    await withdrawSignOff(cast.rep, id, Date.now());
    expect(await opened(cast.owner, documentId)).toBe(false);
  });

  test('of a PDF that is of another build, not checked, or nowhere is refused at its field', async () => {
    const [cast, other] = [await signOffCast(), await signOffCast()];
    const documentIds = [await sendUp(other), (await ask(cast, pdf)).id, 'nowhere'];
    for (const documentId of documentIds) {
      const sent = sendForSignature(cast.rep, wishFor(cast, { documentId }), null, Date.now());
      await expect(sent).rejects.toThrow(BadInput);
    }
  });

  test('what was signed keeps the name it was sent under, though it be sent again', async () => {
    const cast = await signOffCast();
    const documentId = await sendUp(cast);
    await sendForSignature(cast.rep, wishFor(cast, { documentId }), null, Date.now());
    await sendForSignature(cast.rep, wishFor(cast, { documentId, title: 'Something else' }), null, Date.now());
    expect((await rowOf(documentId))?.title).toBe('Headstock logo, drawing 1');
  });
});

describe('a photo as a sample', () => {
  async function photoOf({ rep, build }: Cast): Promise<string> {
    const bytes = await jpegWithExif({ widthPx: 800, heightPx: 600 });
    const [sizeBytes, sha256] = [bytes.length, base64(bytes)];
    const photo = { uploadKey: randomUUID(), label: 'a.jpg', contentType: 'image/jpeg' as const, sizeBytes, sha256 };
    const { originalKey: key, ...granted } = await grantPhoto(rep, build.orderNumber, photo, Date.now());
    const { url, headers } = await presignUpload({ key, ...granted });
    await fetch(url, { method: 'PUT', headers, body: new Uint8Array(bytes) });
    await markUploaded(rep, granted.id);
    expect(await developPhoto(await requireOwnPhoto(rep, granted.id))).toEqual({ state: 'ready' });
    return granted.id;
  }

  const sees = (viewer: Viewer, photoId: string) =>
    requirePhotoObject(viewer, photoId, 640).then(
      () => true,
      () => false,
    );

  test('is signed by the bytes that are shown, and seen by the owner and the staff alone', async () => {
    const cast = await signOffCast();
    const photoId = await photoOf(cast);
    expect(await sees(cast.owner, photoId)).toBe(false);
    const sha256 = await hashShownPhoto(cast.rep, photoId);
    const { id } = await sendForSignature(cast.rep, wishFor(cast, { photoId }), sha256, Date.now());
    const [row] = await db().select().from(signOffs).where(eq(signOffs.id, id));
    expect(row?.contentHash).toBe(sha256);
    for (const viewer of [cast.owner, cast.builder, cast.rep]) expect(await sees(viewer, photoId)).toBe(true);
    for (const viewer of [cast.companion, cast.stranger, cast.admin]) expect(await sees(viewer, photoId)).toBe(false);
  });

  test('stays when unposted photos are swept, cannot be discarded, and is one document however often it is sent', async () => {
    const cast = await signOffCast();
    const photoId = await photoOf(cast);
    const sha256 = await hashShownPhoto(cast.rep, photoId);
    const send = () => sendForSignature(cast.rep, wishFor(cast, { photoId }), sha256, Date.now());
    const [first, second] = [await send(), await send()];
    expect(second).toEqual(first);
    await discardPhoto(cast.rep, photoId, Date.now());
    await sweep(Date.now() + 2 * DAY_MS);
    expect(await db().select().from(photos).where(eq(photos.id, photoId))).toHaveLength(1);
    expect(await sees(cast.owner, photoId)).toBe(true);
  });

  test('of somebody else, or of another build, is refused', async () => {
    const [cast, other] = [await signOffCast(), await signOffCast()];
    const photoId = await photoOf(other);
    await expect(sendForSignature(cast.rep, wishFor(cast, { photoId }), 'f'.repeat(64), Date.now())).rejects.toThrow(
      BadInput,
    );
  });
});
