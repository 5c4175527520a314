import { randomUUID } from 'node:crypto';
import { and, eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { db, write } from '@/db/client';
import { keepCheck, tellOfCheck } from '@/db/queries/check-telling';
import { addCheckLine, addCheckList, changeCheckLine, listCheckLists, removeCheckLine } from '@/db/queries/check-lists';
import {
  finishCheck,
  listChecks,
  listUndecidedChecks,
  markLine,
  requireCheckRun,
  startCheck,
} from '@/db/queries/checks';
import { askConcession, deliverBuild, passFinalCheck, readFinalCheck, shipBuild } from '@/db/queries/final-check';
import { listBuildSignOffs } from '@/db/queries/sign-offs';
import { signSignOff } from '@/db/queries/sign-off-answers';
import { listStages } from '@/db/queries/builds';
import { linkProof } from '@/db/queries/proofs';
import { discardPhoto, requirePhotoObject, sweepUnfinishedPhotos } from '@/db/queries/photos';
import { moveBack, startStage } from '@/db/queries/stages';
import { auditEvents, builds, checkLines, checkLists, entries, outbox, photos } from '@/db/schema';
import { newId } from '@/db/schema/columns';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import { openTestDatabase } from '@/tests/support/database';
import { makeMeasured, makeVersion } from '@/tests/support/proof';
import { signedIn } from '@/tests/support/sign-off-world';
import {
  DAY_MS,
  makeBuild,
  makeEntry,
  makePerson,
  makePhoto,
  NOW_MS,
  openShop,
  type TestBuild,
} from '@/tests/support/world';
import { smallSpec } from '@/tests/support/spec';
import type { CheckMark } from '@/lib/validation/checks';
import type { Viewer } from '@/lib/viewer';

await openTestDatabase();
beforeAll(openShop);

/** Lists belong to a route and every build of it: these are on `bass`, one before the finish, one in it. */
const neckList = { id: 'before-paint', routeId: 'bass', stageKey: 'neck', name: 'Before paint' };
const lastList = { id: 'before-the-case', routeId: 'bass', stageKey: 'finish', name: 'Before the case' };
const lines = [
  { id: 'edges', listId: neckList.id, position: 1, text: 'Edges are even.', photoNeeded: false },
  { id: 'grain', listId: neckList.id, position: 2, text: 'The grain is filled.', photoNeeded: true },
  { id: 'strap', listId: lastList.id, position: 1, text: 'Strap pins hold.', photoNeeded: false },
];
beforeAll(() =>
  write(async (tx) => {
    await tx.insert(checkLists).values([neckList, lastList]);
    await tx.insert(checkLines).values(lines);
  }),
);

async function openScene(stageKey = 'neck') {
  const owner = await signedIn(await makePerson('buyer', { name: 'Maren Oduya' }));
  const rep = await makePerson('rep');
  const builder = await makePerson('builder');
  const build = await makeBuild({ owner, staff: [{ person: rep }, { person: builder }], stageKey, routeId: 'bass' });
  return { owner, rep, builder, build };
}

type Scene = Awaited<ReturnType<typeof openScene>>;

const stageOf = (build: TestBuild, key: string) => build.stages.find((stage) => stage.key === key)?.id ?? '';
const move = (build: TestBuild, by: Viewer, key: string, atMs = NOW_MS) =>
  write((tx) => startStage(tx, { buildId: build.id, stageId: stageOf(build, key), byId: by.id }, atMs));
const startNeck = ({ build, builder }: Scene, atMs = NOW_MS) =>
  startCheck(builder, build.orderNumber, neckList.id, atMs);
const markOf = (lineId: string, mark: CheckMark, over = {}) => ({ lineId, mark, note: '', photoId: null, ...over });

async function goThrough(scene: Scene, marks: Record<string, CheckMark>, atMs = NOW_MS): Promise<string> {
  const { build, builder } = scene;
  const runId = await startNeck(scene, atMs);
  for (const [lineId, mark] of Object.entries(marks)) {
    const photoId = lineId === 'grain' && mark !== 'not_applicable' ? await makePhoto(build, builder) : null;
    await markLine(builder, build.orderNumber, runId, markOf(lineId, mark, { photoId }), atMs);
  }
  return runId;
}

const finish = ({ build, builder }: Scene, runId: string, over = {}) =>
  finishCheck(builder, { orderNumber: build.orderNumber, runId, backToStageId: null, reason: '', ...over }, NOW_MS);
const sendBack = (scene: Scene, runId: string) =>
  finish(scene, runId, { backToStageId: stageOf(scene.build, 'wood'), reason: 'A knot has opened.' });
const failed = async (scene: Scene) => {
  const runId = await goThrough(scene, { edges: 'fail', grain: 'not_applicable' });
  await sendBack(scene, runId);
  return runId;
};

describe('going through a list', () => {
  test('begins once, however often it is begun', async () => {
    const scene = await openScene();
    const [first, second] = await Promise.all([startNeck(scene), startNeck(scene)]);
    expect(second).toBe(first);
  });

  test('is for the stage of the list, and for this route', async () => {
    const early = await openScene('wood');
    await expect(startNeck(early)).rejects.toThrow(BadInput);
    const elsewhere = await makeBuild({ staff: [{ person: early.builder }], stageKey: 'neck', routeId: 'solid' });
    await expect(startCheck(early.builder, elsewhere.orderNumber, neckList.id, NOW_MS)).rejects.toThrow(OutOfReach);
  });

  test('keeps each line as it is marked last', async () => {
    const scene = await openScene();
    const { build, builder } = scene;
    const runId = await startNeck(scene);
    await markLine(builder, build.orderNumber, runId, markOf('edges', 'fail', { note: 'A dent.' }), NOW_MS);
    await markLine(builder, build.orderNumber, runId, markOf('edges', 'pass'), NOW_MS);
    const run = await requireCheckRun(builder, build.orderNumber, runId);
    expect(run.lines.map(({ id, mark, note }) => ({ id, mark, note }))).toEqual([
      { id: 'edges', mark: 'pass', note: '' },
      { id: 'grain', mark: null, note: null },
    ]);
  });

  test('ends only when every line is marked and every photo that is asked for is there', async () => {
    const scene = await openScene();
    const { build, builder } = scene;
    const runId = await goThrough(scene, { edges: 'pass' });
    await expect(finish(scene, runId)).rejects.toMatchObject({ fields: { lines: expect.stringContaining('grain') } });
    await markLine(builder, build.orderNumber, runId, markOf('grain', 'pass'), NOW_MS);
    await expect(finish(scene, runId)).rejects.toMatchObject({ fields: { lines: expect.stringContaining('photo') } });
    await markLine(builder, build.orderNumber, runId, markOf('grain', 'not_applicable'), NOW_MS);
    expect(await finish(scene, runId)).toBe('passed');
  });

  test('ends once: afterwards its marks stay', async () => {
    const scene = await openScene();
    const { build, builder } = scene;
    const runId = await goThrough(scene, { edges: 'pass', grain: 'pass' });
    expect([await finish(scene, runId), await finish(scene, runId)]).toEqual(['passed', 'passed']);
    await expect(markLine(builder, build.orderNumber, runId, markOf('edges', 'fail'), NOW_MS)).rejects.toThrow(Denied);
    const events = await db()
      .select()
      .from(auditEvents)
      .where(and(eq(auditEvents.buildId, build.id), eq(auditEvents.action, 'check_passed')));
    expect(events).toHaveLength(1);
  });

  test('takes no photo of another person, and none that is in an entry', async () => {
    const scene = await openScene();
    const { build, builder, rep } = scene;
    const runId = await startNeck(scene);
    const theirs = await makePhoto(build, rep);
    const posted = await makePhoto(build, builder, { entryId: await makeEntry(build, builder) });
    for (const photoId of [theirs, posted])
      await expect(
        markLine(builder, build.orderNumber, runId, markOf('grain', 'pass', { photoId }), NOW_MS),
      ).rejects.toThrow(BadInput);
  });
});

describe('the photo of a line', () => {
  test('is seen by the staff of the build and by nobody on the client side', async () => {
    const scene = await openScene();
    const { build, builder, rep, owner } = scene;
    const runId = await startNeck(scene);
    const photoId = await makePhoto(build, builder);
    await markLine(builder, build.orderNumber, runId, markOf('grain', 'pass', { photoId }), NOW_MS);
    expect(await requirePhotoObject(rep, photoId, 320)).toContain(photoId);
    await expect(requirePhotoObject(owner, photoId, 320)).rejects.toThrow(OutOfReach);
    await expect(requirePhotoObject(await makePerson('builder'), photoId, 320)).rejects.toThrow(OutOfReach);
  });

  test('is neither swept away nor discarded', async () => {
    const scene = await openScene();
    const { build, builder } = scene;
    const runId = await startNeck(scene);
    const photoId = await makePhoto(build, builder, { createdAt: NOW_MS - 9 * DAY_MS });
    await markLine(builder, build.orderNumber, runId, markOf('grain', 'pass', { photoId }), NOW_MS);
    await sweepUnfinishedPhotos(NOW_MS);
    await discardPhoto(builder, photoId, NOW_MS);
    expect(await db().select().from(photos).where(eq(photos.id, photoId))).toHaveLength(1);
  });
});

describe('a stage behind a list', () => {
  test('starts only when the list is passed', async () => {
    const scene = await openScene();
    const { build, builder } = scene;
    await expect(move(build, builder, 'finish')).rejects.toMatchObject({
      fields: { stageId: expect.stringContaining('Before paint') },
    });
    await finish(scene, await goThrough(scene, { edges: 'pass', grain: 'pass' }));
    expect(await move(build, builder, 'finish')).not.toBeNull();
  });

  test('cannot be reached by skipping the stage of the list either', async () => {
    const { build, builder } = await openScene('wood');
    await expect(move(build, builder, 'finish')).rejects.toThrow(BadInput);
  });

  test('waits again when the build comes back into the stage of the list', async () => {
    const scene = await openScene();
    const { build, builder } = scene;
    await finish(scene, await goThrough(scene, { edges: 'pass', grain: 'pass' }));
    const back = { buildId: build.id, stageId: stageOf(build, 'wood'), byId: builder.id };
    await write((tx) => moveBack(tx, back, 'The blank has warped.', NOW_MS + 1));
    await move(build, builder, 'neck', NOW_MS + 2);
    await expect(move(build, builder, 'finish', NOW_MS + 3)).rejects.toThrow(BadInput);
  });

  test('is held up by no list on a route that has none', async () => {
    const builder = await makePerson('builder');
    const build = await makeBuild({ staff: [{ person: builder }], stageKey: 'neck', routeId: 'solid' });
    expect(await move(build, builder, 'finish')).not.toBeNull();
  });
});

describe('a fail', () => {
  test('asks for a stage behind and a reason, and sends the build there', async () => {
    const scene = await openScene();
    const { build, builder } = scene;
    const runId = await goThrough(scene, { edges: 'fail', grain: 'not_applicable' });
    await expect(finish(scene, runId)).rejects.toMatchObject({
      fields: { backToStageId: expect.any(String), reason: expect.any(String) },
    });
    const ahead = { backToStageId: stageOf(build, 'finish'), reason: 'A dent.' };
    await expect(finish(scene, runId, ahead)).rejects.toMatchObject({ fields: { backToStageId: expect.any(String) } });
    expect(await sendBack(scene, runId)).toBe('failed');
    const stages = await listStages(builder, build.id);
    expect(stages.find(({ startedAt, finishedAt }) => startedAt !== null && finishedAt === null)?.key).toBe('wood');
  });

  test('tells the player nothing by itself', async () => {
    const scene = await openScene();
    await failed(scene);
    expect(await db().select().from(entries).where(eq(entries.buildId, scene.build.id))).toEqual([]);
    expect(await db().select().from(outbox).where(eq(outbox.userId, scene.owner.id))).toEqual([]);
  });

  test('waits for a rep of the build to decide, and for nobody else', async () => {
    const scene = await openScene();
    const runId = await failed(scene);
    const idsFor = async (viewer: Viewer) => (await listUndecidedChecks(viewer)).map(({ id }) => id);
    expect(await idsFor(scene.rep)).toEqual([runId]);
    expect(await idsFor(scene.builder)).toEqual([]);
    expect(await idsFor(await makePerson('rep'))).toEqual([]);
  });

  test('is told once, in the rep’s words, as an entry for the player', async () => {
    const scene = await openScene();
    const { build, rep } = scene;
    const telling = { orderNumber: build.orderNumber, runId: await failed(scene), words: 'We found a dent.' };
    await tellOfCheck(rep, telling, NOW_MS);
    await tellOfCheck(rep, telling, NOW_MS);
    const told = await db().select().from(entries).where(eq(entries.buildId, build.id));
    expect(told).toMatchObject([{ bodyText: 'We found a dent.', audience: 'buyer', state: 'published' }]);
    expect(await listUndecidedChecks(rep)).toEqual([]);
    await expect(keepCheck(rep, telling, NOW_MS)).rejects.toThrow(Denied);
  });

  test('can be kept in the shop, and then is not told by mistake', async () => {
    const scene = await openScene();
    const { build, rep, builder } = scene;
    const kept = { orderNumber: build.orderNumber, runId: await failed(scene) };
    await expect(keepCheck(builder, kept, NOW_MS)).rejects.toThrow(Denied);
    await keepCheck(rep, kept, NOW_MS);
    await expect(tellOfCheck(rep, { ...kept, words: 'A dent.' }, NOW_MS)).rejects.toThrow(Denied);
    expect(await db().select().from(entries).where(eq(entries.buildId, build.id))).toEqual([]);
  });
});

describe('the final check', () => {
  async function openFinal() {
    const scene = await openScene('finish');
    const { build, builder, rep, owner } = scene;
    await makeVersion(build, { rep, owner }, smallSpec());
    const entryId = await makeEntry(build, builder);
    const runId = await startCheck(builder, build.orderNumber, lastList.id, NOW_MS);
    await markLine(builder, build.orderNumber, runId, markOf('strap', 'pass'), NOW_MS);
    return { ...scene, entryId, runId };
  }
  type Final = Awaited<ReturnType<typeof openFinal>>;
  const pass = ({ build, builder }: Final, atMs = NOW_MS) => passFinalCheck(builder, build.orderNumber, atMs);
  const prove = ({ build, builder, entryId }: Final) =>
    linkProof(builder, { orderNumber: build.orderNumber, itemKey: 'gloss', entryId }, NOW_MS);
  const readyAt = async ({ build }: Final) =>
    (await db().select({ readyAt: builds.readyAt }).from(builds).where(eq(builds.id, build.id)))[0]?.readyAt;

  test('does not pass while an item is open or out of tolerance, or a list of the last stage is not passed', async () => {
    const final = await openFinal();
    await makeMeasured(final.build, final.entryId, 'nut_width', '1.9');
    await prove(final);
    await expect(pass(final)).rejects.toMatchObject({ fields: { check: expect.stringContaining('One signed item') } });
    await makeMeasured(
      final.build,
      await makeEntry(final.build, final.builder, { datedAt: NOW_MS + 1 }),
      'nut_width',
      '1.7',
    );
    await expect(pass(final)).rejects.toMatchObject({ fields: { check: expect.stringContaining('Before the case') } });
    await finish(final, final.runId);
    await pass(final);
    expect(await readyAt(final)).toBe(NOW_MS);
  });

  test('does not pass before a spec is signed, nor while a newer version waits', async () => {
    const { build, builder, rep, owner } = await openScene('finish');
    expect((await readFinalCheck(builder, build.orderNumber)).obstacles[0]).toContain('No version');
    await expect(passFinalCheck(builder, build.orderNumber, NOW_MS)).rejects.toThrow(BadInput);
    await makeVersion(build, { rep, owner }, smallSpec());
    await makeVersion(build, { rep, owner }, smallSpec(), { number: 2, state: 'asked' });
    expect((await readFinalCheck(builder, build.orderNumber)).obstacles).toContainEqual(
      expect.stringContaining('Version 2'),
    );
  });

  test('passes with a concession that the owner signed, and not with one that is only asked for', async () => {
    const final = await openFinal();
    const { build, rep, owner } = final;
    await makeMeasured(build, final.entryId, 'nut_width', '1.72');
    await prove(final);
    await finish(final, final.runId);
    const wish = {
      orderNumber: build.orderNumber,
      itemKey: 'nut_width',
      reason: 'It plays well so.',
      dueOn: '2026-12-20',
    };
    const signOffId = await askConcession(rep, wish, NOW_MS);
    const [asked] = await listBuildSignOffs(owner, build.orderNumber);
    expect(asked).toMatchObject({ id: signOffId, kind: 'concession' });
    await expect(pass(final)).rejects.toThrow(BadInput);
    await signSignOff(owner, { signOffId, name: owner.name }, NOW_MS);
    await pass(final);
    expect(await readyAt(final)).toBe(NOW_MS);
  });

  test('refuses a concession for an item that needs none', async () => {
    const final = await openFinal();
    await prove(final);
    const wish = { orderNumber: final.build.orderNumber, reason: 'It plays well so.', dueOn: '2026-12-20' };
    for (const itemKey of ['gloss', 'radius'])
      await expect(askConcession(final.rep, { ...wish, itemKey }, NOW_MS)).rejects.toMatchObject({
        fields: { itemKey: expect.any(String) },
      });
  });

  test('passes once: one end of the last stage, one mail to the owner', async () => {
    const final = await openFinal();
    await makeMeasured(final.build, final.entryId, 'nut_width', '1.7');
    await prove(final);
    await finish(final, final.runId);
    await Promise.all([pass(final), pass(final, NOW_MS + 5000)]);
    const stages = await listStages(final.builder, final.build.id);
    expect(stages.at(-1)?.finishedAt).toBe(NOW_MS);
    const mails = await db().select().from(outbox).where(eq(outbox.userId, final.owner.id));
    expect(mails).toMatchObject([{ kind: 'ready', about: { buildId: final.build.id } }]);
  });

  test('comes before the carrier, and the carrier before the arrival', async () => {
    const final = await openFinal();
    const { build, rep, builder, owner } = final;
    const by = { orderNumber: build.orderNumber, carrier: 'Harbour Freight Lines', number: 'HF 100' };
    await expect(shipBuild(rep, by, NOW_MS)).rejects.toThrow(Denied);
    await write((tx) => tx.update(builds).set({ readyAt: NOW_MS }).where(eq(builds.id, build.id)));
    await expect(deliverBuild(rep, build.orderNumber, NOW_MS)).rejects.toThrow(Denied);
    await expect(shipBuild(builder, by, NOW_MS)).rejects.toThrow(Denied);
    await shipBuild(rep, by, NOW_MS);
    await shipBuild(rep, { ...by, number: 'HF 101' }, NOW_MS + DAY_MS);
    await deliverBuild(rep, build.orderNumber, NOW_MS + 2 * DAY_MS);
    expect(await readFinalCheck(rep, build.orderNumber)).toMatchObject({
      shippedAt: NOW_MS,
      shippedBy: 'Harbour Freight Lines, HF 101',
      deliveredAt: NOW_MS + 2 * DAY_MS,
    });
    const mails = await db().select().from(outbox).where(eq(outbox.userId, owner.id));
    expect(mails.map(({ kind }) => kind)).toEqual(['shipped']);
  });

  test('counts no longer when the build is sent back', async () => {
    const final = await openFinal();
    await write((tx) => tx.update(builds).set({ readyAt: NOW_MS }).where(eq(builds.id, final.build.id)));
    const back = { buildId: final.build.id, stageId: stageOf(final.build, 'neck'), byId: final.rep.id };
    await write((tx) => moveBack(tx, back, 'A scratch.', NOW_MS));
    expect(await readyAt(final)).toBeNull();
  });
});

describe('setting up lists', () => {
  const admin = () => makePerson('admin');

  test('is for admins', async () => {
    const rep = await makePerson('rep');
    await expect(listCheckLists(rep)).rejects.toThrow(OutOfReach);
    await expect(addCheckLine(rep, { listId: neckList.id, text: 'More', photoNeeded: false })).rejects.toThrow(
      OutOfReach,
    );
  });

  test('refuses a stage of another route and a name that is taken', async () => {
    const viewer = await admin();
    const list = { routeId: 'bass', stageKey: 'neck', name: 'Before paint' };
    await expect(addCheckList(viewer, list)).rejects.toMatchObject({ fields: { name: expect.any(String) } });
    await expect(addCheckList(viewer, { ...list, stageKey: 'buffing' })).rejects.toThrow(BadInput);
  });

  test('rewords a line from the next inspection on; what was marked keeps its words', async () => {
    const viewer = await admin();
    const name = randomUUID();
    const listId = newId();
    await write((tx) => tx.insert(checkLists).values({ id: listId, routeId: 'solid', stageKey: 'wood', name }));
    await addCheckLine(viewer, { listId, text: 'Old words', photoNeeded: false });
    const builder = await makePerson('builder');
    const build = await makeBuild({ staff: [{ person: builder }] });
    const runId = await startCheck(builder, build.orderNumber, listId, NOW_MS);
    const [line] = (await requireCheckRun(builder, build.orderNumber, runId)).lines;
    await markLine(builder, build.orderNumber, runId, markOf(line?.id ?? '', 'pass'), NOW_MS);
    await finish({ build, builder, owner: await signedIn(builder), rep: builder }, runId);
    await changeCheckLine(viewer, { lineId: line?.id ?? '', text: 'New words', photoNeeded: true }, NOW_MS);
    const textOf = async (id: string) =>
      (await requireCheckRun(builder, build.orderNumber, id)).lines.map(({ text }) => text);
    expect(await textOf(runId)).toEqual(['Old words']);
    const next = await startCheck(builder, build.orderNumber, listId, NOW_MS + 1);
    expect(await textOf(next)).toEqual(['New words']);
    const [newLine] = (await requireCheckRun(builder, build.orderNumber, next)).lines;
    await removeCheckLine(viewer, newLine?.id ?? '', NOW_MS);
    expect((await listChecks(builder, build.orderNumber)).lists.map(({ id }) => id)).not.toContain(listId);
  });
});
