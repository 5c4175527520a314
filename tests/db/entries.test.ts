import { eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { db } from '@/db/client';
import { requireBuild } from '@/db/queries/builds';
import { diaryPage, diaryState } from '@/db/queries/diary';
import { countHeldEntries, editEntry, postEntry, releaseEntry, withdrawEntry } from '@/db/queries/entries';
import { changePerson } from '@/db/queries/people';
import { buildStages, diaryEvents, entries, newsItems, photos } from '@/db/schema';
import { BadInput, OutOfReach } from '@/lib/errors';
import { openTestDatabase } from '../support/database';
import { entryFor, makeBuild, makeEntry, makePerson, makePhoto, noteOf, NOW_MS, openShop } from '../support/world';

await openTestDatabase();
await openShop();

async function openBench(releaseNeeded = false) {
  const [owner, builder, rep] = [await makePerson('buyer'), await makePerson('builder'), await makePerson('rep')];
  const build = await makeBuild({ owner, staff: [{ person: builder }, { person: rep }], releaseNeeded });
  return { owner, builder, rep, build };
}

type Bench = Awaited<ReturnType<typeof openBench>>;

const entriesOf = ({ build }: Bench) => db().select().from(entries).where(eq(entries.buildId, build.id));
const toldOf = ({ build }: Bench) => db().select().from(diaryEvents).where(eq(diaryEvents.buildId, build.id));
const readBy = async (viewer: Bench['owner'], { build }: Bench) => (await diaryPage(viewer, build.id, null)).entries;

describe('posting', () => {
  test('one key sent 50 times at once is one entry, told once, and every answer names it', async () => {
    const bench = await openBench();
    const entry = entryFor(bench.build);
    const answers = await Promise.all(Array.from({ length: 50 }, () => postEntry(bench.builder, entry, NOW_MS)));
    expect(new Set(answers.map(({ id }) => id)).size).toBe(1);
    expect(answers.filter(({ repeated }) => !repeated)).toHaveLength(1);
    expect(await entriesOf(bench)).toHaveLength(1);
    expect(await toldOf(bench)).toHaveLength(1);
  });

  test('the same key of another person is another entry', async () => {
    const bench = await openBench();
    const entry = entryFor(bench.build);
    await postEntry(bench.builder, entry, NOW_MS);
    await postEntry(bench.rep, entry, NOW_MS);
    expect(await entriesOf(bench)).toHaveLength(2);
  });

  test('with a photo that is not there, or not theirs, or in another entry, nothing at all is posted', async () => {
    const bench = await openBench();
    const { build, builder, rep } = bench;
    const used = await makePhoto(build, builder, { entryId: await makeEntry(build, builder) });
    const before = (await entriesOf(bench)).length;
    const bad = [
      await makePhoto(build, rep),
      await makePhoto(build, builder, { state: 'uploaded' }),
      await makePhoto(await makeBuild({ staff: [{ person: builder }] }), builder),
      used,
      'no-such-photo',
    ];
    const good = await makePhoto(build, builder);
    for (const id of bad) {
      const chosen = [good, id].map((photoId) => ({ id: photoId, alt: '' }));
      await expect(postEntry(builder, entryFor(build, { photos: chosen }), NOW_MS)).rejects.toThrow(BadInput);
    }
    expect(await entriesOf(bench)).toHaveLength(before);
    const [free] = await db().select({ entryId: photos.entryId }).from(photos).where(eq(photos.id, good));
    expect(free).toEqual({ entryId: null });
  });

  test('to a stage of another build is refused with a sentence at that field', async () => {
    const { build, builder } = await openBench();
    const elsewhere = (await makeBuild()).stages[0]?.id ?? '';
    const refusal = postEntry(builder, entryFor(build, { stageId: elsewhere }), NOW_MS);
    await expect(refusal).rejects.toMatchObject({ fields: { stageId: expect.stringContaining('stage') } });
  });

  test('can move the build on: the stage of now ends, those passed over end too, and one is left open', async () => {
    const { build, builder } = await openBench();
    const last = build.stages.at(-1)?.id ?? '';
    await postEntry(builder, entryFor(build, { stageId: last, startStage: true }), NOW_MS);
    const stages = await db().select().from(buildStages).where(eq(buildStages.buildId, build.id));
    const open = stages.filter(({ startedAt, finishedAt }) => startedAt !== null && finishedAt === null);
    expect(open.map(({ id }) => id)).toEqual([last]);
    expect(stages.every(({ startedAt }) => startedAt !== null)).toBe(true);
  });

  test('for the shop only tells the owner nothing', async () => {
    const bench = await openBench();
    await postEntry(bench.builder, entryFor(bench.build, { audience: 'shop' }), NOW_MS);
    expect(await readBy(bench.owner, bench)).toEqual([]);
    expect(await toldOf(bench)).toEqual([]);
  });
});

describe('where a rep releases', () => {
  test('a builder’s entry is held: the owner neither reads nor is told of it until it is released, dated then', async () => {
    const bench = await openBench(true);
    const { id, state } = await postEntry(bench.builder, entryFor(bench.build), NOW_MS);
    expect(state).toBe('held');
    expect(await readBy(bench.owner, bench)).toEqual([]);
    expect(await toldOf(bench)).toEqual([]);
    expect(await countHeldEntries(bench.rep)).toBe(1);
    await releaseEntry(bench.rep, id, NOW_MS + 1000);
    expect(await readBy(bench.owner, bench)).toMatchObject([{ id, datedAt: NOW_MS + 1000 }]);
    expect(await countHeldEntries(bench.rep)).toBe(0);
  });

  test('the rep hears of every version that waits for them, once, and nobody else does', async () => {
    const bench = await openBench(true);
    const entry = entryFor(bench.build);
    const { id } = await postEntry(bench.builder, entry, NOW_MS);
    await postEntry(bench.builder, entry, NOW_MS);
    await editEntry(bench.builder, id, { revision: 1, note: noteOf('Other words.') }, NOW_MS);
    const news = await db().select().from(newsItems).where(eq(newsItems.kind, 'held_entry'));
    const ofThis = news.filter(({ about }) => about.entryIds?.includes(id));
    expect(ofThis.map(({ userId }) => userId)).toEqual([bench.rep.id, bench.rep.id]);
  });

  test('releasing twice at once is releasing once', async () => {
    const bench = await openBench(true);
    const { id } = await postEntry(bench.builder, entryFor(bench.build), NOW_MS);
    await Promise.all([1, 2, 3].map((n) => releaseEntry(bench.rep, id, NOW_MS + n)));
    expect(await toldOf(bench)).toHaveLength(1);
    expect(await readBy(bench.owner, bench)).toMatchObject([{ datedAt: NOW_MS + 1 }]);
  });

  test('a builder’s edit of what was released waits for a release of its own; a rep’s does not', async () => {
    const bench = await openBench(true);
    const { id } = await postEntry(bench.builder, entryFor(bench.build), NOW_MS);
    await releaseEntry(bench.rep, id, NOW_MS);
    await editEntry(bench.builder, id, { revision: 1, note: noteOf('Other words.') }, NOW_MS);
    expect(await readBy(bench.owner, bench)).toEqual([]);
    await releaseEntry(bench.rep, id, NOW_MS);
    await editEntry(bench.rep, id, { revision: 2, note: noteOf('Mended.') }, NOW_MS);
    expect(await readBy(bench.owner, bench)).toHaveLength(1);
  });

  test('a rep’s own entry goes straight to the owner', async () => {
    const bench = await openBench(true);
    expect(await postEntry(bench.rep, entryFor(bench.build), NOW_MS)).toMatchObject({ state: 'published' });
    expect(await readBy(bench.owner, bench)).toHaveLength(1);
  });

  test('an entry withdrawn while it waits can no longer be released', async () => {
    const bench = await openBench(true);
    const { id } = await postEntry(bench.builder, entryFor(bench.build), NOW_MS);
    await withdrawEntry(bench.builder, id, NOW_MS);
    await expect(releaseEntry(bench.rep, id, NOW_MS)).rejects.toThrow(OutOfReach);
    expect(await toldOf(bench)).toEqual([]);
  });
});

describe('editing', () => {
  test('on an old revision is refused, and what was saved in between stays', async () => {
    const bench = await openBench();
    const id = await makeEntry(bench.build, bench.builder);
    await editEntry(bench.rep, id, { revision: 1, note: noteOf('Saved first.') }, NOW_MS);
    const [saved] = await entriesOf(bench);
    const late = editEntry(bench.builder, id, { revision: 1, note: noteOf('Saved late.') }, NOW_MS + 1);
    await expect(late).rejects.toMatchObject({ code: 'conflict' });
    expect(await entriesOf(bench)).toEqual([saved]);
    expect(saved).toMatchObject({ bodyText: 'Saved first.', revision: 2 });
  });

  test('by ten at once on the same revision is saved by one', async () => {
    const bench = await openBench();
    const id = await makeEntry(bench.build, bench.builder);
    const edits = Array.from({ length: 10 }, (_, n) =>
      editEntry(bench.rep, id, { revision: 1, note: noteOf(`Edit ${n}`) }, NOW_MS),
    );
    const outcomes = await Promise.allSettled(edits);
    expect(outcomes.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
    expect(await entriesOf(bench)).toMatchObject([{ revision: 2 }]);
  });

  test('a withdrawn entry is over: nobody reads, edits or withdraws it again, and its row stays', async () => {
    const bench = await openBench();
    const id = await makeEntry(bench.build, bench.builder);
    await withdrawEntry(bench.builder, id, NOW_MS);
    for (const viewer of [bench.owner, bench.builder, bench.rep]) expect(await readBy(viewer, bench)).toEqual([]);
    const edit = { revision: 1, note: noteOf('Back again.') };
    await expect(editEntry(bench.rep, id, edit, NOW_MS)).rejects.toThrow(OutOfReach);
    await expect(withdrawEntry(bench.rep, id, NOW_MS)).rejects.toThrow(OutOfReach);
    expect(await entriesOf(bench)).toMatchObject([{ id, state: 'withdrawn', bodyText: 'The neck blank is glued.' }]);
  });
});

test('the diary’s mark changes with every post, edit, release and withdrawal, and with nothing else', async () => {
  const bench = await openBench(true);
  const { build, builder, rep, owner } = bench;
  const marks: string[] = [];
  const note = async () => marks.push((await diaryState(owner, build.orderNumber)).etag);
  await note();
  const { id } = await postEntry(builder, entryFor(build), NOW_MS);
  await note();
  await editEntry(builder, id, { revision: 1, note: noteOf('Glued and clamped.') }, NOW_MS);
  await note();
  await releaseEntry(rep, id, NOW_MS);
  await note();
  await withdrawEntry(builder, id, NOW_MS);
  await note();
  expect(new Set(marks).size).toBe(5);
  await requireBuild(owner, build.orderNumber);
  await makePhoto(build, builder);
  await note();
  expect(marks.at(-1)).toBe(marks.at(-2));
});

test('the diary’s mark changes when an author moves to another department, since that stands beside their name', async () => {
  const { build, builder, owner } = await openBench();
  await postEntry(builder, entryFor(build), NOW_MS);
  const before = (await diaryState(owner, build.orderNumber)).etag;
  const change = { userId: builder.id, role: 'builder', department: 'wood' } as const;
  await changePerson(await makePerson('admin'), change, NOW_MS);
  expect((await diaryState(owner, build.orderNumber)).etag).not.toBe(before);
  expect((await diaryPage(owner, build.id, null)).entries).toMatchObject([{ department: 'wood' }]);
});

test('the shop’s mark and the client’s differ, since their pages do', async () => {
  const { build, builder, owner } = await openBench();
  const { etag } = await diaryState(owner, build.orderNumber);
  expect((await diaryState(builder, build.orderNumber)).etag).not.toBe(etag);
});
