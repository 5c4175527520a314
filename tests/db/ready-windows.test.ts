import { and, eq } from 'drizzle-orm';
import { beforeAll, beforeEach, expect, test } from 'vitest';
import { db, write } from '@/db/client';
import { findWindow, listWindowMoves, refreshWindows } from '@/db/queries/ready-windows';
import { addClosure, saveStage } from '@/db/queries/shop-calendar';
import { moveBack, startStage, undoMove } from '@/db/queries/stages';
import { builds, buildStages, newsItems, readyWindows, routeStages, signOffs } from '@/db/schema';
import { newId } from '@/db/schema/columns';
import type { Viewer } from '@/lib/viewer';
import { openTestDatabase } from '../support/database';
import { DAY_MS, makeBuild, makePerson, NOW_MS, openShop, type TestBuild } from '../support/world';

await openTestDatabase();
await openShop();

const SETTLED_MS = 21_000;

beforeAll(() =>
  write(async (tx) => {
    await tx.update(routeStages).set({ bestDays: 8, likelyDays: 10, worstDays: 15 });
  }),
);

let owner: Viewer;
let builder: Viewer;
let build: TestBuild;
/** Each test comes a day after the one before, so that none meets the settings another has just changed. */
let nowMs = NOW_MS;

beforeEach(async () => {
  nowMs += DAY_MS;
  [owner, builder] = [await makePerson('buyer'), await makePerson('builder')];
  build = await makeBuild({ owner, staff: [{ person: builder }], stageKey: 'neck' });
});

const stageOf = (key: string) => build.stages.find((stage) => stage.key === key)?.id ?? '';
const move = (key: string) => ({ buildId: build.id, stageId: stageOf(key), byId: builder.id });
const rows = () =>
  db().select().from(readyWindows).where(eq(readyWindows.buildId, build.id)).orderBy(readyWindows.givenOn);
const told = () =>
  db()
    .select({ about: newsItems.about })
    .from(newsItems)
    .where(and(eq(newsItems.userId, owner.id), eq(newsItems.kind, 'window_moved')));
const revision = async () =>
  (await db().select({ at: builds.diaryRevision }).from(builds).where(eq(builds.id, build.id)))[0]?.at;

test('a build gets its window of the day once, and another the next day beside it', async () => {
  await refreshWindows(nowMs);
  expect(await refreshWindows(nowMs + 60_000)).toBe(0);
  await refreshWindows(nowMs + DAY_MS);
  const kept = await rows();
  expect(kept.map(({ kind }) => kind)).toEqual(['window', 'window']);
  expect(kept.every(({ earliestOn, latestOn }) => earliestOn && latestOn && earliestOn <= latestOn)).toBe(true);
});

test('of three days in one stage the curves of the first and the last are kept', async () => {
  for (const days of [0, 1, 2]) await refreshWindows(nowMs + days * DAY_MS);
  expect((await rows()).map(({ curve }) => curve !== null)).toEqual([true, false, true]);
});

test('a move counts when it can no longer be taken back, and one that was taken back does not count', async () => {
  await refreshWindows(nowMs);
  const moveId = await write((tx) => startStage(tx, move('finish'), nowMs + 1000));
  await refreshWindows(nowMs + 5000);
  expect((await rows())[0]?.stageKey).toBe('neck');
  await write((tx) => undoMove(tx, build.id, moveId ?? '', builder.id, nowMs + 6000));
  await refreshWindows(nowMs + 40_000);
  expect((await rows())[0]?.stageKey).toBe('neck');
  await write((tx) => startStage(tx, move('finish'), nowMs + 50_000));
  await refreshWindows(nowMs + 50_000 + SETTLED_MS);
  expect((await rows())[0]?.stageKey).toBe('finish');
});

test('an owner is told once, with the reason and without what the shop wrote, when a build goes back', async () => {
  await write((tx) => startStage(tx, move('finish'), nowMs - DAY_MS));
  await refreshWindows(nowMs);
  const before = await revision();
  await write((tx) => moveBack(tx, move('wood'), 'Somebody dropped it', nowMs + 1000));
  await refreshWindows(nowMs + 1000 + SETTLED_MS);
  await refreshWindows(nowMs + 90_000);
  const [latest] = await listWindowMoves(owner, build.id);
  expect(latest?.movedWhy).toMatch(/working days later: it went back to wood room\.$/i);
  expect(latest?.movedWhy).not.toContain('dropped');
  expect(await told()).toEqual([{ about: { buildId: build.id, givenOn: latest?.givenOn } }]);
  expect(await revision()).toBe(Number(before) + 1);
});

test('nothing is told of a window that only breathes', async () => {
  await refreshWindows(nowMs);
  await refreshWindows(nowMs + DAY_MS);
  expect(await told()).toEqual([]);
});

test('days off that are added move the window and are named as the reason', async () => {
  const admin = await makePerson('admin');
  await refreshWindows(nowMs);
  const closed = { startsOn: '2026-12-09', endsOn: '2026-12-22', name: 'the great move', closesAtMin: null };
  await addClosure(admin, closed, nowMs + 1000);
  await refreshWindows(nowMs + 2000);
  const [latest] = await listWindowMoves(owner, build.id);
  expect(latest?.movedWhy).toMatch(/working days later: the shop will be closed for the great move\.$/i);
});

test('while its owner has something to sign that the next stage needs, the window says so; signed, it runs again', async () => {
  await write((tx) =>
    tx.insert(signOffs).values({
      id: newId(),
      buildId: build.id,
      kind: 'sample',
      title: 'A secret title',
      contentHash: 'x',
      dueOn: '2026-12-20',
      blocksStageKey: 'finish',
      state: 'asked',
      askedById: builder.id,
      askedAt: nowMs - 3 * DAY_MS,
    }),
  );
  await refreshWindows(nowMs);
  const window = await findWindow(owner, build.id);
  expect(window).toMatchObject({ kind: 'waiting', words: 'a sample' });
  await write((tx) =>
    tx
      .update(signOffs)
      .set({ state: 'signed', signedName: 'An Owner', answeredAt: nowMs + 1000 })
      .where(eq(signOffs.buildId, build.id)),
  );
  await refreshWindows(nowMs + 2000);
  expect(await findWindow(owner, build.id)).toMatchObject({ kind: 'window', words: null });
});

test('where nothing is known of a stage the window says that, and gives no date', async () => {
  await write(async (tx) => {
    await tx
      .update(buildStages)
      .set({ key: 'engraving', name: 'Engraving' })
      .where(eq(buildStages.id, stageOf('finish')));
  });
  await refreshWindows(nowMs);
  const window = await findWindow(owner, build.id);
  expect(window).toMatchObject({ kind: 'unsayable', earliestOn: null, latestOn: null });
  expect(window?.words).toContain('engraving');
});

test('an estimate that the shop changes is reckoned with at once', async () => {
  const admin = await makePerson('admin');
  await refreshWindows(nowMs);
  const [before] = await rows();
  const slow = { bestDays: 40, likelyDays: 50, worstDays: 70, minimumWaitDays: 0, silenceDays: 14 };
  await saveStage(admin, { routeId: 'solid', stageKey: 'finish', ...slow }, nowMs + 1000);
  await refreshWindows(nowMs + 2000);
  const [after] = await rows();
  expect(String(after?.earliestOn) > String(before?.latestOn)).toBe(true);
  const usual = { bestDays: 8, likelyDays: 10, worstDays: 15, minimumWaitDays: 0, silenceDays: 14 };
  await saveStage(admin, { routeId: 'solid', stageKey: 'finish', ...usual }, nowMs + 3000);
});

test('a window is read by whoever reaches the build, and by nobody else', async () => {
  const [companion, stranger, cleared] = [
    await makePerson('buyer'),
    await makePerson('buyer'),
    await makePerson('rep'),
  ];
  const held = await makeBuild({
    owner,
    companions: [companion],
    staff: [{ person: builder }, { person: cleared, cleared: true }],
    heldUntilAt: Date.now() + 400 * DAY_MS,
  });
  const open = await makeBuild({ owner, companions: [companion] });
  await refreshWindows(nowMs);
  const reads = async (viewer: Viewer, of: TestBuild) => (await findWindow(viewer, of.id)) !== null;
  expect([await reads(owner, held), await reads(cleared, held)]).toEqual([true, true]);
  expect([await reads(companion, held), await reads(builder, held), await reads(stranger, held)]).toEqual([
    false,
    false,
    false,
  ]);
  expect([await reads(companion, open), await reads(stranger, open)]).toEqual([true, false]);
});
