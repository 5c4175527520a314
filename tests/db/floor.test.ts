import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { db, write } from '@/db/client';
import { floorAnswer, listRack } from '@/db/queries/floor';
import { moveBuilds, undoMoves } from '@/db/queries/floor-moves';
import { passPen } from '@/db/queries/pen';
import { builds, buildStages, signOffs, standingAssignments } from '@/db/schema';
import { newId } from '@/db/schema/columns';
import { OutOfReach } from '@/lib/errors';
import type { Floor } from '@/lib/floor/row';
import type { Viewer } from '@/lib/viewer';
import { openTestDatabase } from '../support/database';
import { askOn, openThread, rowOf, writeOn } from '../support/question-world';
import { DAY_MS, makeBuild, makeEntry, makePerson, NOW_MS, openShop, type TestBuild } from '../support/world';

await openTestDatabase();
await openShop();

const HELD_UNTIL = Date.now() + 400 * DAY_MS;
let builder: Viewer;
let other: Viewer;
let mine: TestBuild;
let theirs: TestBuild;

beforeEach(async () => {
  [builder, other] = [await makePerson('builder'), await makePerson('builder')];
  mine = await makeBuild({ owner: await makePerson('buyer'), staff: [{ person: builder }] });
  theirs = await makeBuild({ staff: [{ person: other }] });
});

async function floorOf(viewer: Viewer, nowMs = NOW_MS): Promise<Floor> {
  return JSON.parse((await floorAnswer(viewer, null, nowMs)).text ?? '');
}
const numbers = (floor: Floor) => floor.rows.map(({ orderNumber }) => orderNumber);
const putOnRack = (rack: string, ...all: TestBuild[]) =>
  write(async (tx) => {
    for (const { id } of all) await tx.update(builds).set({ rack }).where(eq(builds.id, id));
  });
const stageNow = async ({ id }: TestBuild) => {
  const stages = await db().select().from(buildStages).where(eq(buildStages.buildId, id)).orderBy(buildStages.position);
  return stages.find(({ startedAt, finishedAt }) => startedAt !== null && finishedAt === null)?.key;
};
const to = (build: TestBuild, toStageKey: string) => ({ orderNumber: build.orderNumber, toStageKey });
const moving = (...moves: { orderNumber: string; toStageKey: string }[]) => ({ moves, rack: null, reason: null });

test('a builder sees the builds they are on, and nothing of the others', async () => {
  const floor = await floorOf(builder);
  expect(numbers(floor)).toEqual([mine.orderNumber]);
  expect(floor.numbersOnly).toEqual([]);
});

test('a floor lead sees every build that is open to view; one held from view by its number only', async () => {
  const lead = await makePerson('builder');
  const held = await makeBuild({ heldUntilAt: HELD_UNTIL, instrument: 'A secret one' });
  await write((tx) => tx.insert(standingAssignments).values({ userId: lead.id, startedAt: NOW_MS }));
  const floor = await floorOf(lead);
  expect(numbers(floor)).toEqual(expect.arrayContaining([mine.orderNumber, theirs.orderNumber]));
  expect(numbers(floor)).not.toContain(held.orderNumber);
  expect(floor.numbersOnly).toEqual([held.orderNumber]);
  expect(JSON.stringify(floor)).not.toContain('A secret one');
});

test('who is cleared sees a held build whole; a builder who is on it without that, its number', async () => {
  const [cleared, uncleared] = [await makePerson('builder'), await makePerson('builder')];
  const held = await makeBuild({
    heldUntilAt: HELD_UNTIL,
    staff: [{ person: cleared, cleared: true }, { person: uncleared }],
  });
  expect(numbers(await floorOf(cleared))).toEqual([held.orderNumber]);
  const floor = await floorOf(uncleared);
  expect([numbers(floor), floor.numbersOnly]).toEqual([[], [held.orderNumber]]);
});

test('an admin reads of every build its number, and of none anything else', async () => {
  const floor = await floorOf(await makePerson('admin'));
  expect(floor.rows).toEqual([]);
  expect(floor.numbersOnly).toEqual(expect.arrayContaining([mine.orderNumber, theirs.orderNumber]));
});

describe('a question that waits for the shop', () => {
  let rep: Viewer;
  let asked: Awaited<ReturnType<typeof openThread>>;

  beforeEach(async () => {
    asked = await openThread();
    ({ rep } = asked);
  });
  const waitsFor = async (viewer: Viewer, nowMs?: number) => (await floorOf(viewer, nowMs)).rows[0]?.waits;

  test('says who waits for whom, to its holder that it is them, and is gone with the answer', async () => {
    const { id } = await askOn(asked.build, asked.owner);
    expect(await waitsFor(asked.builder)).toEqual([
      { on: 'you', words: expect.stringMatching(/^Maren Oyelaran waits for your answer on “Fret wire”, due /) },
    ]);
    expect(await waitsFor(rep)).toEqual([
      { on: 'Bo Lindgren', words: expect.stringMatching(/^Maren Oyelaran waits for Bo Lindgren’s answer/) },
    ]);
    await writeOn(asked.builder, id);
    expect(await waitsFor(rep)).toEqual([]);
  });

  test('about money shows to the rep and to no builder', async () => {
    await askOn(asked.build, asked.owner, { topicId: 'money' });
    expect(await waitsFor(rep)).toHaveLength(1);
    expect([await waitsFor(asked.builder), await waitsFor(asked.painter)]).toEqual([[], []]);
  });

  test('of a held build shows to nobody who is not cleared for it', async () => {
    const secret = await openThread({ heldUntilAt: HELD_UNTIL });
    await askOn(secret.build, secret.owner);
    expect((await floorAnswer(secret.builder, null, NOW_MS)).text).not.toContain('Fret wire');
    expect(await waitsFor(secret.rep)).toHaveLength(1);
  });

  test('changes the mark when it is asked, when the pen passes, when it falls due and when it is answered', async () => {
    const mark = async (nowMs = NOW_MS) => (await floorAnswer(rep, null, nowMs)).etag;
    const marks = [await mark()];
    const { id } = await askOn(asked.build, asked.owner);
    marks.push(await mark());
    await passPen(rep, id, { toId: asked.painter.id, reason: 'She laid the wire.' }, NOW_MS);
    marks.push(await mark());
    const { dueAt } = await rowOf(id);
    await write((tx) => tx.run(`update questions set due_at = ${NOW_MS - 1} where id = '${id}'`));
    marks.push(await mark());
    expect(dueAt).toBeGreaterThan(NOW_MS);
    await writeOn(asked.painter, id);
    marks.push(await mark());
    expect(new Set(marks.slice(0, 4)).size).toBe(4);
    expect(marks[4]).toBe(marks[0]);
  });
});

test('clients have no floor', async () => {
  await expect(floorAnswer(await makePerson('buyer'), null, NOW_MS)).rejects.toThrow(OutOfReach);
});

test('the mark stays while nothing changes, and changes with a page, a move, an assignment and the day', async () => {
  const mark = async (nowMs = NOW_MS) => (await floorAnswer(builder, null, nowMs)).etag;
  const first = await mark();
  expect((await floorAnswer(builder, first, NOW_MS)).text).toBeNull();
  await moveBuilds(builder, moving(to(mine, 'neck')), NOW_MS);
  const second = await mark();
  await makeBuild({ staff: [{ person: builder }] });
  const third = await mark();
  expect(new Set([first, second, third, await mark(NOW_MS + DAY_MS)]).size).toBe(4);
});

test('a build taken off somebody is gone at their next look', async () => {
  const before = await floorAnswer(builder, null, NOW_MS);
  await write((tx) => tx.run(`update assignments set ended_at = 1 where user_id = '${builder.id}'`));
  const after = await floorAnswer(builder, before.etag, NOW_MS);
  expect(after.text).not.toBeNull();
  expect(after.text).not.toContain(mine.orderNumber);
});

test('days of silence count from the last page the owner could read', async () => {
  await makeEntry(mine, builder, { datedAt: NOW_MS - 20 * DAY_MS });
  await makeEntry(mine, builder, { datedAt: NOW_MS - 2 * DAY_MS, audience: 'shop' });
  await makeEntry(mine, builder, { datedAt: NOW_MS - DAY_MS, state: 'held' });
  const [row] = (await floorOf(builder)).rows;
  expect(row).toMatchObject({ silentDays: 20, quiet: 1 });
});

test('a move is done once however often it is sent, and undone once', async () => {
  const wish = moving(to(mine, 'neck'));
  const [first, second] = [await moveBuilds(builder, wish, NOW_MS), await moveBuilds(builder, wish, NOW_MS + 500)];
  expect(second).toEqual(first);
  const moves = first.moved.map(({ orderNumber, moveId }) => ({ orderNumber, moveId }));
  expect(await undoMoves(builder, { moves }, NOW_MS + 9000)).toEqual({ left: [] });
  expect(await undoMoves(builder, { moves }, NOW_MS + 9500)).toEqual({ left: [] });
  expect(await stageNow(mine)).toBe('wood');
});

test('after its time a move stays, with a sentence', async () => {
  const { moved } = await moveBuilds(builder, moving(to(mine, 'neck')), NOW_MS);
  const moves = moved.map(({ orderNumber, moveId }) => ({ orderNumber, moveId }));
  const { left } = await undoMoves(builder, { moves }, NOW_MS + 60_000);
  expect(left).toEqual([{ orderNumber: mine.orderNumber, why: expect.stringMatching(/too late/) }]);
  expect(await stageNow(mine)).toBe('neck');
});

test('of a rack those move that the mover is on; the others are named by number and stay', async () => {
  const [second, blocked] = [
    await makeBuild({ staff: [{ person: builder }] }),
    await makeBuild({ staff: [{ person: builder }] }),
  ];
  await putOnRack('rack of four', mine, second, blocked, theirs);
  await write((tx) =>
    tx.insert(signOffs).values({
      id: newId(),
      buildId: blocked.id,
      kind: 'drawing',
      title: 'Inlay',
      contentHash: 'x',
      dueOn: '2026-12-20',
      blocksStageKey: 'neck',
      state: 'asked',
      askedById: builder.id,
      askedAt: NOW_MS,
    }),
  );
  const moves = [mine, second, blocked].map((build) => to(build, 'neck'));
  const { moved, left } = await moveBuilds(builder, { moves, rack: 'rack of four', reason: null }, NOW_MS);
  expect(moved.map(({ orderNumber }) => orderNumber)).toEqual([mine.orderNumber, second.orderNumber]);
  expect(left).toEqual([
    { orderNumber: blocked.orderNumber, why: expect.stringMatching(/waits for the owner to sign “Inlay”/) },
    { orderNumber: theirs.orderNumber, why: expect.stringMatching(/not on this build/) },
  ]);
  expect([await stageNow(blocked), await stageNow(theirs)]).toEqual(['wood', 'wood']);
});

test('a build goes back with a reason, and not ahead of where it has been', async () => {
  await moveBuilds(builder, moving(to(mine, 'neck')), NOW_MS);
  const back = await moveBuilds(
    builder,
    { ...moving(to(mine, 'wood')), reason: 'A check in the board' },
    NOW_MS + 1000,
  );
  expect([back.moved.length, await stageNow(mine)]).toEqual([1, 'wood']);
  const ahead = await moveBuilds(builder, { ...moving(to(mine, 'finish')), reason: 'Why not' }, NOW_MS + 2000);
  expect([ahead.moved.length, ahead.left.length, await stageNow(mine)]).toEqual([0, 1, 'wood']);
});

test('a stage that a build’s route does not have is named, and nothing moves', async () => {
  const { moved, left } = await moveBuilds(builder, moving(to(mine, 'engraving')), NOW_MS);
  expect([moved, left.length]).toEqual([[], 1]);
});

test('a rack’s list has the reader’s builds whole and the others by number; a rack of others is not there', async () => {
  await putOnRack('rack of two', mine, theirs);
  const { rows, others } = await listRack(builder, 'rack of two', NOW_MS);
  expect([rows.map(({ orderNumber }) => orderNumber), others]).toEqual([[mine.orderNumber], [theirs.orderNumber]]);
  await expect(listRack(await makePerson('builder'), 'rack of two', NOW_MS)).rejects.toThrow(OutOfReach);
});

test.each([
  { what: 'a stage finished before it was begun', startedAt: NOW_MS, finishedAt: NOW_MS - 5 * DAY_MS },
  { what: 'a stage finished without being begun', startedAt: null, finishedAt: NOW_MS - 5 * DAY_MS },
  { what: 'a first stage that was skipped', startedAt: null, finishedAt: null },
])('the floor stands with $what', async ({ startedAt, finishedAt }) => {
  await write(async (tx) => {
    const [first, second] = mine.stages;
    await tx
      .update(buildStages)
      .set({ startedAt, finishedAt })
      .where(eq(buildStages.id, first?.id ?? ''));
    await tx
      .update(buildStages)
      .set({ startedAt: NOW_MS - DAY_MS })
      .where(eq(buildStages.id, second?.id ?? ''));
  });
  expect((await floorOf(builder)).rows[0]).toMatchObject({ at: 1, days: 1 });
});
