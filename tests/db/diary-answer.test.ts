import { eq } from 'drizzle-orm';
import { expect, test } from 'vitest';
import { write } from '@/db/client';
import { diaryAnswer, diaryPage } from '@/db/queries/diary';
import { postEntry } from '@/db/queries/entries';
import { assignments, buildPeople, builds } from '@/db/schema';
import { OutOfReach } from '@/lib/errors';
import { openTestDatabase } from '../support/database';
import { DAY_MS, entryFor, makeBuild, makeEntry, makePerson, NOW_MS, noteOf, openShop } from '../support/world';

await openTestDatabase();
await openShop();

async function openDiary() {
  const [owner, companion, builder] = [
    await makePerson('buyer'),
    await makePerson('buyer'),
    await makePerson('builder'),
  ];
  const build = await makeBuild({ owner, companions: [companion], staff: [{ person: builder }] });
  await makeEntry(build, builder, { text: 'The first coat.' });
  await makeEntry(build, builder, { text: 'The rack is full.', audience: 'shop' });
  const read = (viewer: typeof owner, known: string | null = null) =>
    diaryAnswer(viewer, build.orderNumber, null, known);
  return { owner, companion, builder, build, read };
}

test('a page that was made for one reader is the page that the next one of the same side would get', async () => {
  const { owner, companion, build, read } = await openDiary();
  const first = await read(owner);
  expect(await read(companion)).toEqual(first);
  expect(JSON.parse(first.page ?? '')).toEqual(await diaryPage(companion, build.id, null));
});

test('a page that was made for the shop never reaches the client, nor the other way round', async () => {
  const { owner, builder, read } = await openDiary();
  for (const round of [1, 2]) {
    expect((await read(builder)).page, `round ${round}`).toContain('The rack is full.');
    expect((await read(owner)).page, `round ${round}`).not.toContain('The rack is full.');
  }
});

test('a new entry is on the very next page, and the state before it is no longer the state', async () => {
  const { owner, builder, build, read } = await openDiary();
  const before = await read(owner);
  expect(await read(owner, before.etag)).toEqual({ etag: before.etag, page: null });
  await postEntry(builder, entryFor(build, { note: noteOf('The second coat.') }), NOW_MS);
  const after = await read(owner, before.etag);
  expect(after.page).toContain('The second coat.');
});

test('who loses the right to look gets nothing more, whatever was made for them before', async () => {
  const { companion, builder, read } = await openDiary();
  await read(companion);
  await read(builder);
  await write((tx) => tx.delete(buildPeople).where(eq(buildPeople.userId, companion.id)));
  await write((tx) => tx.update(assignments).set({ endedAt: NOW_MS }).where(eq(assignments.userId, builder.id)));
  await expect(read(companion)).rejects.toBeInstanceOf(OutOfReach);
  await expect(read(builder)).rejects.toBeInstanceOf(OutOfReach);
});

test('a build put under secrecy is out of a companion’s reach at once, and stays in its owner’s', async () => {
  const { owner, companion, build, read } = await openDiary();
  await read(companion);
  await write((tx) =>
    tx
      .update(builds)
      .set({ heldUntilAt: Date.now() + DAY_MS })
      .where(eq(builds.id, build.id)),
  );
  await expect(read(companion)).rejects.toBeInstanceOf(OutOfReach);
  expect((await read(owner)).page).toContain('The first coat.');
});
