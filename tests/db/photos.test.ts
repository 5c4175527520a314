import { eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { db } from '@/db/client';
import { endAssignment } from '@/db/queries/assignments';
import {
  discardPhoto,
  GRANT_MS,
  grantPhoto,
  markUploaded,
  requireOwnPhoto,
  requirePhotoObject,
  settleDoomed,
  settleReady,
  settleRefused,
  sweepUnfinishedPhotos,
  unscopedDoomedObjects,
  unscopedUploadedPhotos,
} from '@/db/queries/photos';
import { assignments, photos } from '@/db/schema';
import { newId } from '@/db/schema/columns';
import { Denied, OutOfReach } from '@/lib/errors';
import type { NewPhoto } from '@/lib/validation/photos';
import { openTestDatabase } from '../support/database';
import { DAY_MS, makeBuild, makeEntry, makePerson, makePhoto, NOW_MS, openShop } from '../support/world';

await openTestDatabase();
await openShop();

async function openBench() {
  const builder = await makePerson('builder');
  return { builder, build: await makeBuild({ staff: [{ person: builder }] }) };
}

const chosen = (over: Partial<NewPhoto> = {}): NewPhoto => ({
  uploadKey: newId(),
  label: 'bench.jpg',
  contentType: 'image/jpeg',
  sizeBytes: 1000,
  sha256: 'A'.repeat(43) + '=',
  ...over,
});

const rowOf = async (photoId: string) => (await db().select().from(photos).where(eq(photos.id, photoId)))[0];
const doomedNow = async (nowMs = Number.MAX_SAFE_INTEGER) =>
  new Set((await unscopedDoomedObjects(nowMs, 10_000)).map(({ key }) => key));

describe('a promise of room for a photo', () => {
  test('asked for again is the same one, good for five more minutes', async () => {
    const { builder, build } = await openBench();
    const photo = chosen();
    const first = await grantPhoto(builder, build.orderNumber, photo, NOW_MS);
    expect((await rowOf(first.id))?.expiresAt).toBe(NOW_MS + GRANT_MS);
    const again = await grantPhoto(builder, build.orderNumber, photo, NOW_MS + 60_000);
    expect(again).toEqual(first);
    expect((await rowOf(first.id))?.expiresAt).toBe(NOW_MS + 60_000 + GRANT_MS);
  });

  test('asked for 20 times at once is one', async () => {
    const { builder, build } = await openBench();
    const photo = chosen();
    const asks = Array.from({ length: 20 }, () => grantPhoto(builder, build.orderNumber, photo, NOW_MS));
    expect(new Set((await Promise.all(asks)).map(({ id }) => id)).size).toBe(1);
  });

  test('under the mark of another photo is refused with a sentence, and the first one stays as it was', async () => {
    const { builder, build } = await openBench();
    const photo = chosen();
    const first = await grantPhoto(builder, build.orderNumber, photo, NOW_MS);
    const other = { ...photo, sha256: 'B'.repeat(43) + '=' };
    await expect(grantPhoto(builder, build.orderNumber, other, NOW_MS)).rejects.toMatchObject({ code: 'conflict' });
    expect(await rowOf(first.id)).toMatchObject({ sha256: photo.sha256, state: 'granted' });
  });

  test('lies under a key that nobody can guess and that holds nothing of the file’s own name', async () => {
    const { builder, build } = await openBench();
    const keys = new Set<string>();
    for (let n = 0; n < 20; n++) {
      const { originalKey } = await grantPhoto(
        builder,
        build.orderNumber,
        chosen({ label: '../../etc/x.jpg' }),
        NOW_MS,
      );
      expect(originalKey).toMatch(/^in\/[\w-]{32}$/);
      keys.add(originalKey);
    }
    expect(keys.size).toBe(20);
  });

  test('is not given for a 37th photo that is in no entry; a posted or discarded one makes room', async () => {
    const { builder, build } = await openBench();
    const ids: string[] = [];
    for (let n = 0; n < 36; n++) ids.push(await makePhoto(build, builder));
    await expect(grantPhoto(builder, build.orderNumber, chosen(), NOW_MS)).rejects.toThrow(Denied);
    await discardPhoto(builder, ids[0] ?? '', NOW_MS);
    await grantPhoto(builder, build.orderNumber, chosen(), NOW_MS);
  });

  test('is worth nothing to anybody but who asked, and to them only while they are on the build', async () => {
    const { builder, build } = await openBench();
    const colleague = await makePerson('builder');
    const other = await makeBuild({ staff: [{ person: colleague }] });
    const { id } = await grantPhoto(builder, build.orderNumber, chosen(), NOW_MS);
    await expect(requireOwnPhoto(colleague, id)).rejects.toThrow(OutOfReach);
    expect(await markUploaded(colleague, id)).toBe(false);
    expect((await requireOwnPhoto(builder, id)).id).toBe(id);
    const [assigned] = await db().select().from(assignments).where(eq(assignments.userId, builder.id));
    await endAssignment(await makePerson('admin'), assigned?.id ?? '', NOW_MS);
    await expect(requireOwnPhoto(builder, id)).rejects.toThrow(OutOfReach);
    expect(other.id).not.toBe(build.id);
  });
});

const ready = (name: string) => ({
  outPrefix: `out/${name}`,
  keptKey: `original/${name}`,
  widthPx: 1600,
  heightPx: 1200,
  blurDataUrl: 'data:',
  widthsPx: [320, 640],
});
const madeKeys = (name: string) => [
  `original/${name}`,
  `out/${name}/mail.jpg`,
  `out/${name}/320.webp`,
  `out/${name}/640.webp`,
];

describe('the way of a photo', () => {
  test('from promised to arrived goes once, however often it is said', async () => {
    const { builder, build } = await openBench();
    const { id } = await grantPhoto(builder, build.orderNumber, chosen(), NOW_MS);
    const said = await Promise.all(Array.from({ length: 10 }, () => markUploaded(builder, id)));
    expect(said.filter(Boolean)).toHaveLength(1);
    expect((await unscopedUploadedPhotos(100)).map((photo) => photo.id)).toContain(id);
  });

  test('ready: what was sent is doomed, what was made of it is kept', async () => {
    const { builder, build } = await openBench();
    const id = await makePhoto(build, builder, { state: 'uploaded' });
    expect(await settleReady(id, ready(id), NOW_MS)).toBe(true);
    const doomed = await doomedNow();
    expect(doomed).toContain(`in/${id}`);
    expect(madeKeys(id).filter((key) => doomed.has(key))).toEqual([]);
    expect(await rowOf(id)).toMatchObject({
      state: 'ready',
      originalKey: `original/${id}`,
      variantWidthsPx: '320,640',
    });
  });

  test('discarded while it was being made ready: everything made of it is doomed', async () => {
    const { builder, build } = await openBench();
    const id = await makePhoto(build, builder, { state: 'uploaded' });
    await discardPhoto(builder, id, NOW_MS);
    expect(await settleReady(id, ready(id), NOW_MS)).toBe(false);
    const doomed = await doomedNow();
    expect([`in/${id}`, ...madeKeys(id)].filter((key) => !doomed.has(key))).toEqual([]);
  });

  test('refused: the sentence stays, the bytes are doomed, and nobody is ever served it', async () => {
    const { builder, build } = await openBench();
    const id = await makePhoto(build, builder, { state: 'uploaded' });
    await settleRefused(id, 'That is not a photo.', NOW_MS);
    expect(await rowOf(id)).toMatchObject({ state: 'refused', refusal: 'That is not a photo.' });
    expect(await doomedNow()).toContain(`in/${id}`);
    await expect(requirePhotoObject(builder, id, 640)).rejects.toThrow(OutOfReach);
  });

  test('a photo that is ready cannot be turned into a refused one', async () => {
    const { builder, build } = await openBench();
    const id = await makePhoto(build, builder);
    await settleRefused(id, 'Too late.', NOW_MS);
    expect(await rowOf(id)).toMatchObject({ state: 'ready', refusal: null });
  });

  test.each([
    { asked: 1, served: 320 },
    { asked: 320, served: 320 },
    { asked: 321, served: 640 },
    { asked: 4000, served: 1600 },
    { asked: 0, served: 320 },
    { asked: -5, served: 320 },
  ])('asked for at $asked px it is served at $served px', async ({ asked, served }) => {
    const { builder, build } = await openBench();
    const id = await makePhoto(build, builder);
    expect(await requirePhotoObject(builder, id, asked)).toBe(`out/${id}/${served}.webp`);
  });
});

describe('discarding', () => {
  test('dooms the upload and every size of the viewer’s own unposted photo', async () => {
    const { builder, build } = await openBench();
    const id = await makePhoto(build, builder);
    await discardPhoto(builder, id, NOW_MS);
    expect(await rowOf(id)).toBeUndefined();
    const doomed = await doomedNow();
    const made = [`in/${id}`, `out/${id}/mail.jpg`, `out/${id}/320.webp`, `out/${id}/640.webp`, `out/${id}/1600.webp`];
    expect(made.filter((key) => !doomed.has(key))).toEqual([]);
  });

  test('does nothing to another’s photo, nor to one that is in an entry', async () => {
    const { builder, build } = await openBench();
    const others = await makePhoto(build, await makePerson('builder'));
    const posted = await makePhoto(build, builder, { entryId: await makeEntry(build, builder) });
    await discardPhoto(builder, others, NOW_MS);
    await discardPhoto(builder, posted, NOW_MS);
    expect([(await rowOf(others))?.state, (await rowOf(posted))?.state]).toEqual(['ready', 'ready']);
  });
});

test('a day on, everything unposted is gone with its objects; younger and posted photos stay', async () => {
  const { builder, build } = await openBench();
  const entryId = await makeEntry(build, builder);
  const at = NOW_MS + 90 * DAY_MS;
  const old = { createdAt: at - DAY_MS - 1 };
  const gone = [
    await makePhoto(build, builder, { ...old, state: 'granted' }),
    await makePhoto(build, builder, { ...old, state: 'uploaded' }),
    await makePhoto(build, builder, { ...old, state: 'refused' }),
    await makePhoto(build, builder, old),
  ];
  const kept = [
    await makePhoto(build, builder, { ...old, entryId }),
    await makePhoto(build, builder, { createdAt: at - DAY_MS + 1 }),
  ];
  while ((await sweepUnfinishedPhotos(at)) > 0);
  expect(await Promise.all(gone.map(rowOf))).toEqual(gone.map(() => undefined));
  expect((await Promise.all(kept.map(rowOf))).map((row) => row?.id)).toEqual(kept);
  const doomed = await doomedNow();
  expect(gone.filter((id) => !doomed.has(`in/${id}`))).toEqual([]);
  expect(kept.filter((id) => doomed.has(`in/${id}`))).toEqual([]);
});

test('an object that the store would not delete is tried again, ever later, at most an hour on', async () => {
  const { builder, build } = await openBench();
  const id = await makePhoto(build, builder, { state: 'granted' });
  await discardPhoto(builder, id, NOW_MS);
  let now = NOW_MS;
  const waits: number[] = [];
  for (let attempt = 0; attempt < 10; attempt++) {
    await settleDoomed([], [`in/${id}`], now);
    const from = now;
    while (!(await doomedNow(now)).has(`in/${id}`)) now += 30_000;
    waits.push((now - from) / 60_000);
  }
  expect(waits).toEqual([0.5, 1, 2, 4, 8, 16, 32, 60, 60, 60]);
  await settleDoomed([`in/${id}`], [], now);
  expect(await doomedNow()).not.toContain(`in/${id}`);
});
