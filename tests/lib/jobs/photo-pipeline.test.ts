import { createHash } from 'node:crypto';
import exifr from 'exifr';
import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { db } from '@/db/client';
import { discardPhoto, grantPhoto, markUploaded, requireOwnPhoto, requirePhotoObject } from '@/db/queries/photos';
import { doomedObjects, photos } from '@/db/schema';
import { newId } from '@/db/schema/columns';
import { developLeftovers, developPhoto } from '@/lib/jobs/photo-pipeline';
import { deleteDoomedObjects, sweep } from '@/lib/jobs/sweep';
import { PHOTO_REFUSALS } from '@/lib/photos/refusals';
import { findObject, presignUpload, presignView, readObject } from '@/lib/storage';
import type { PhotoType } from '@/lib/photos/limits';
import { jpegWithExif } from '../../support/photo-fixtures';
import { DAY_MS, makeBuild, makePerson } from '../../support/world';
import { openStandIns } from './stand-ins';

const { failStore, behave } = await openStandIns();
const picture = await jpegWithExif({ widthPx: 800, heightPx: 600, gps: true, cameraTime: '2026:11:03 14:05:09' });

beforeEach(behave);

async function openBench() {
  const builder = await makePerson('builder');
  return { builder, build: await makeBuild({ staff: [{ person: builder }] }) };
}

type Bench = Awaited<ReturnType<typeof openBench>>;

/** Asks for room as the bench does, for these bytes under this name of their kind. */
async function ask({ builder, build }: Bench, bytes: Buffer, contentType: PhotoType = 'image/jpeg') {
  const sha256 = createHash('sha256').update(bytes).digest('base64');
  const photo = { uploadKey: newId(), label: 'bench.jpg', contentType, sizeBytes: bytes.length, sha256 };
  const { originalKey: key, ...granted } = await grantPhoto(builder, build.orderNumber, photo, Date.now());
  return { id: granted.id, key, upload: await presignUpload({ key, ...granted }) };
}

type Asked = Awaited<ReturnType<typeof ask>>;

const put = ({ upload: { url, headers } }: Asked, bytes: Buffer) =>
  fetch(url, { method: 'PUT', headers, body: new Uint8Array(bytes) });

/** What the door does when the bench says that the bytes are there. */
async function finish({ builder }: Bench, { id }: Asked) {
  const photo = await requireOwnPhoto(builder, id);
  await markUploaded(builder, id);
  return developPhoto(photo);
}

const rowOf = async (id: string) => (await db().select().from(photos).where(eq(photos.id, id)))[0];

describe('a photo sent from the bench', () => {
  test('is put into the store, finished and ready; what is served is re-encoded and tells nothing but the picture', async () => {
    const bench = await openBench();
    const asked = await ask(bench, picture);
    expect((await put(asked, picture)).status).toBe(200);
    expect(await finish(bench, asked)).toEqual({ state: 'ready' });
    const row = await rowOf(asked.id);
    expect(row).toMatchObject({ state: 'ready', widthPx: 800, heightPx: 600, variantWidthsPx: '320,640,800' });
    for (const widthPx of [320, 640, 800]) {
      const url = await presignView(await requirePhotoObject(bench.builder, asked.id, widthPx), Date.now());
      const answer = await fetch(url);
      expect(answer.headers.get('content-type')).toBe('image/webp');
      const served = Buffer.from(await answer.arrayBuffer());
      expect(await exifr.parse(served, true).catch(() => undefined)).toBeUndefined();
      for (const trace of ['Exif', 'XMP ', 'xmpmeta', 'unreleased', 'Test camera', 'SN-0001', 'wood room']) {
        expect(served.includes(trace)).toBe(false);
      }
    }
    const mailed = await readObject(`${row?.outPrefix}/mail.jpg`);
    expect(mailed.subarray(0, 3)).toEqual(Buffer.from([0xff, 0xd8, 0xff]));
    expect(mailed.includes('unreleased') || mailed.includes('Exif')).toBe(false);
  });

  test('leaves nothing under the key that it was uploaded to', async () => {
    const bench = await openBench();
    const asked = await ask(bench, picture);
    await put(asked, picture);
    await finish(bench, asked);
    await deleteDoomedObjects(Date.now());
    expect(await findObject(asked.key)).toBeNull();
    expect((await rowOf(asked.id))?.originalKey).toMatch(/^original\//);
  });

  test('finished three times at once is made ready once', async () => {
    const bench = await openBench();
    const asked = await ask(bench, picture);
    await put(asked, picture);
    const outcomes = await Promise.all([1, 2, 3].map(() => finish(bench, asked)));
    expect(outcomes).toEqual(outcomes.map(() => ({ state: 'ready' })));
    const prefix = (await rowOf(asked.id))?.outPrefix ?? '';
    const doomed = (await db().select().from(doomedObjects)).map(({ key }) => key);
    expect(doomed.filter((key) => key.startsWith('out/'))).toEqual([]);
    expect(await findObject(`${prefix}/320.webp`)).not.toBeNull();
  });

  test('said to be there before it is can still be sent', async () => {
    const bench = await openBench();
    const asked = await ask(bench, picture);
    expect(await finish(bench, asked)).toEqual({ state: 'missing' });
    await put(asked, picture);
    expect(await finish(bench, asked)).toEqual({ state: 'ready' });
  });

  test('discarded while it is being made ready leaves nothing behind', async () => {
    const bench = await openBench();
    const asked = await ask(bench, picture);
    await put(asked, picture);
    const developing = finish(bench, asked);
    await new Promise((r) => setTimeout(r, 30));
    await discardPhoto(bench.builder, asked.id, Date.now());
    await developing;
    const doomed = (await db().select().from(doomedObjects)).map(({ key }) => key);
    await sweep(Date.now());
    for (const key of doomed) expect(await findObject(key)).toBeNull();
    expect(await rowOf(asked.id)).toBeUndefined();
  });
});

// SECURITY.md P13: the promise pins the bytes.
describe('the store takes', () => {
  const changed = Buffer.concat([picture.subarray(0, -1), Buffer.from([0])]);
  test.each([
    { what: 'other bytes of the same length', bytes: changed, headers: {} },
    { what: 'one byte more', bytes: Buffer.concat([picture, Buffer.from([0])]), headers: {} },
    { what: 'one byte less', bytes: picture.subarray(0, -1), headers: {} },
    { what: 'another type', bytes: picture, headers: { 'Content-Type': 'text/html' } },
    { what: 'an upload without the promised sum', bytes: picture, headers: { 'x-amz-checksum-sha256': '' } },
    { what: 'an upload that may overwrite', bytes: picture, headers: { 'If-None-Match': '' } },
  ])('not $what', async ({ bytes, headers }) => {
    const asked = await ask(await openBench(), picture);
    const sent = Object.entries({ ...asked.upload.headers, ...headers }).filter(([, value]) => value !== '');
    const answer = await fetch(asked.upload.url, { method: 'PUT', headers: sent, body: new Uint8Array(bytes) });
    expect(answer.status).toBeGreaterThanOrEqual(400);
    expect(answer.status).toBeLessThan(500);
    expect(await findObject(asked.key)).toBeNull();
  });

  test('the promised bytes once: a second time is refused and overwrites nothing', async () => {
    const asked = await ask(await openBench(), picture);
    expect((await put(asked, picture)).status).toBe(200);
    expect((await put(asked, picture)).status).toBe(412);
  });
});

describe('what is not a photo', () => {
  test.each([
    { what: 'a page of HTML', bytes: Buffer.from('<html><script>alert(1)</script>'), type: 'image/jpeg' as const },
    { what: 'half a photo', bytes: picture.subarray(0, 20_000), type: 'image/jpeg' as const },
    { what: 'a JPEG that says it is a PNG', bytes: picture, type: 'image/png' as const },
  ])('is refused with a sentence, and its bytes are gone at once: $what', async ({ bytes, type }) => {
    const bench = await openBench();
    const asked = await ask(bench, bytes, type);
    expect((await put(asked, bytes)).status).toBe(200);
    const outcome = await finish(bench, asked);
    expect(outcome.state).toBe('refused');
    const sentences: string[] = Object.values(PHOTO_REFUSALS);
    expect(sentences).toContain(outcome.state === 'refused' ? outcome.message : '');
    expect(await findObject(asked.key)).toBeNull();
    expect(await rowOf(asked.id)).toMatchObject({ state: 'refused', outPrefix: null });
  });
});

describe('while the store is away', () => {
  test('a photo that has arrived stays, and is taken up again by itself', async () => {
    const bench = await openBench();
    const asked = await ask(bench, picture);
    await put(asked, picture);
    await failStore({ status: 503, times: 1000 });
    await expect(finish(bench, asked)).rejects.toThrow();
    expect(await rowOf(asked.id)).toMatchObject({ state: 'uploaded' });
    await behave();
    await developLeftovers();
    expect(await rowOf(asked.id)).toMatchObject({ state: 'ready' });
  });

  test('one photo that cannot be taken up does not hold up the others', async () => {
    const bench = await openBench();
    const first = await ask(bench, picture);
    const second = await ask(bench, picture);
    for (const asked of [first, second]) {
      await put(asked, picture);
      await markUploaded(bench.builder, asked.id);
    }
    await failStore({ status: 503, times: 3 });
    await developLeftovers();
    await behave();
    expect([(await rowOf(first.id))?.state, (await rowOf(second.id))?.state]).toContain('ready');
  });

  test('what should be deleted is kept on the list and deleted when the store is back', async () => {
    const bench = await openBench();
    const asked = await ask(bench, picture);
    await put(asked, picture);
    await discardPhoto(bench.builder, asked.id, Date.now());
    await failStore({ status: 503, times: 1000 });
    await sweep(Date.now());
    await behave();
    expect(await findObject(asked.key)).not.toBeNull();
    await sweep(Date.now() + DAY_MS);
    expect(await findObject(asked.key)).toBeNull();
  });
});

// SECURITY.md P17.
test('uploads never finished are gone a day on, rows and objects', async () => {
  const bench = await openBench();
  const asked = await ask(bench, picture);
  await put(asked, picture);
  await sweep(Date.now() + DAY_MS - 60_000);
  expect(await findObject(asked.key)).not.toBeNull();
  await sweep(Date.now() + DAY_MS + 60_000);
  expect(await findObject(asked.key)).toBeNull();
  expect(await rowOf(asked.id)).toBeUndefined();
});
