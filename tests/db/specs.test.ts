import { describe, expect, test } from 'vitest';
import { eq } from 'drizzle-orm';
import { db, write } from '@/db/client';
import { requestChange, declineChange, listChangeRequests, offerChange } from '@/db/queries/change-requests';
import { listDrawings } from '@/db/queries/documents';
import { findDraft, saveDraft, startDraft } from '@/db/queries/spec-drafts';
import { requireFreezeGround } from '@/db/queries/spec-freeze';
import { findVersion, listVersions, requireComparison, sendVersion } from '@/db/queries/spec-versions';
import { buildStages, changeRequests, signOffs, specDrafts, specTemplates, specVersions } from '@/db/schema';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import { contentHashOf } from '@/lib/specs/content-hash';
import type { SpecDocument } from '@/lib/specs/document';
import type { Viewer } from '@/lib/viewer';
import { openTestDatabase } from '../support/database';
import { choiceItem, lookItem, measureItem, smallSpec } from '../support/spec';
import { askDrawing, makeDocument } from '../support/sign-off-world';
import { DAY_MS, makeBuild, makePerson, NOW_MS, openShop, type TestBuild } from '../support/world';

await openTestDatabase();
await openShop();
await write((tx) =>
  tx.insert(specTemplates).values({ id: 'small', name: 'Small', document: smallSpec(), position: 1 }),
);

const satin = smallSpec(measureItem(), choiceItem({ value: 'satin' }));
const wide = smallSpec(measureItem({ aim: { text: '1.750', unit: 'in' } }), choiceItem());
const dueOn = new Date(NOW_MS + 10 * DAY_MS).toISOString().slice(0, 10);

async function openScene(stageKey = 'wood') {
  const people = {
    owner: await makePerson('buyer'),
    companion: await makePerson('buyer'),
    builder: await makePerson('builder'),
    rep: await makePerson('rep'),
  };
  const { owner, companion, builder, rep } = people;
  const staff = [{ person: builder }, { person: rep }];
  const build = await makeBuild({ owner, companions: [companion], staff, stageKey });
  await startDraft(builder, build.orderNumber, 'small', NOW_MS);
  return { ...people, build };
}

const save = (viewer: Viewer, build: TestBuild, document: SpecDocument, revision: number) =>
  saveDraft(viewer, { orderNumber: build.orderNumber, revision, document }, NOW_MS);

const send = (viewer: Viewer, build: TestBuild, revision: number, atMs = NOW_MS) =>
  sendVersion(viewer, { orderNumber: build.orderNumber, revision, message: '', dueOn, blocksStageKey: null }, atMs);

async function begin(build: TestBuild, key: string) {
  const stageId = build.stages.find((stage) => stage.key === key)?.id ?? '';
  await write((tx) => tx.update(buildStages).set({ startedAt: NOW_MS }).where(eq(buildStages.id, stageId)));
}

const refusalOf = (promise: Promise<unknown>) => promise.then(() => null).catch((error: unknown) => error);

async function sentencesOf(promise: Promise<unknown>): Promise<Record<string, string>> {
  const error = await refusalOf(promise);
  if (!(error instanceof BadInput)) throw error;
  return error.fields;
}

describe('a draft', () => {
  test('begins from a template, and beginning again changes nothing', async () => {
    const { builder, rep, build } = await openScene();
    await save(builder, build, satin, 1);
    await startDraft(rep, build.orderNumber, 'small', NOW_MS);
    expect(await findDraft(rep, build.orderNumber)).toMatchObject({
      document: satin,
      revision: 2,
      editedBy: builder.name,
    });
  });

  test('saved by two from one revision takes the first and tells the second who was first', async () => {
    const { builder, rep, build } = await openScene();
    const [first, second] = await Promise.allSettled([save(builder, build, satin, 1), save(rep, build, wide, 1)]);
    expect(first).toEqual({ status: 'fulfilled', value: 2 });
    expect(second).toMatchObject({
      status: 'rejected',
      reason: { code: 'conflict', message: expect.stringContaining(builder.name) },
    });
    expect((await findDraft(rep, build.orderNumber))?.document).toEqual(satin);
  });

  test('with a field that cannot be is refused at that field, and nothing of it is kept', async () => {
    const { builder, build } = await openScene();
    const bad = smallSpec(measureItem({ tolerance: { plus: '9', minus: '9' }, provenAt: 'varnish' }), choiceItem());
    expect(Object.keys(await sentencesOf(save(builder, build, bad, 1))).sort()).toEqual([
      'items.nut_width.provenAt',
      'items.nut_width.tolerance',
    ]);
    expect(await findDraft(builder, build.orderNumber)).toMatchObject({ document: smallSpec(), revision: 1 });
  });

  test('points to a drawing of its own build only', async () => {
    const [{ rep, build }, other] = [await openScene(), await openScene()];
    const pointing = (documentId: string) => smallSpec(measureItem(), lookItem({ documentId }));
    const foreign = pointing(await makeDocument(other.build, other.rep));
    expect(Object.keys(await sentencesOf(save(rep, build, foreign, 1)))).toEqual(['items.headstock_logo.drawing']);
    const own = pointing(await makeDocument(build, rep));
    expect(await save(rep, build, own, 1)).toBe(2);
    expect((await findDraft(rep, build.orderNumber))?.document).toEqual(own);
  });

  test('is the shop’s own: its owner sees none of it', async () => {
    const { owner, build } = await openScene();
    await expect(findDraft(owner, build.orderNumber)).rejects.toBeInstanceOf(Denied);
    await expect(save(owner, build, satin, 1)).rejects.toBeInstanceOf(Denied);
  });
});

describe('a version', () => {
  test('is sent with a sign-off that carries the hash of just that content', async () => {
    const { builder, rep, owner, build } = await openScene();
    await expect(send(builder, build, 1)).rejects.toBeInstanceOf(Denied);
    const { number, signOffId } = await send(rep, build, 1);
    const [signOff] = await db().select().from(signOffs).where(eq(signOffs.id, signOffId));
    expect(number).toBe(1);
    expect(signOff).toMatchObject({ kind: 'spec', state: 'asked', contentHash: contentHashOf(smallSpec()), dueOn });
    expect(await listVersions(owner, build.orderNumber)).toMatchObject([{ number: 1, state: 'asked', signOffId }]);
    expect((await findVersion(owner, build.orderNumber, 'latest'))?.document).toEqual(smallSpec());
  });

  test('that was sent stays as it was, whatever the draft becomes and whoever tries', async () => {
    const { builder, rep, owner, build } = await openScene();
    await send(rep, build, 1);
    await save(builder, build, satin, 1);
    expect((await findVersion(owner, build.orderNumber, 1))?.document).toEqual(smallSpec());
    const change = write((tx) =>
      tx.update(specVersions).set({ document: satin }).where(eq(specVersions.buildId, build.id)),
    );
    await expect(change).rejects.toThrow();
  });

  test('is sent only from the draft its sender saw, and only when something changed', async () => {
    const { builder, rep, build } = await openScene();
    await save(builder, build, satin, 1);
    expect(await refusalOf(send(rep, build, 1))).toMatchObject({ code: 'conflict' });
    await send(rep, build, 2);
    expect(await sentencesOf(send(rep, build, 2))).toHaveProperty('form');
    expect(await listVersions(rep, build.orderNumber)).toHaveLength(1);
  });

  test('asks again: the sign-off of the one before is superseded while it was open', async () => {
    const { builder, rep, owner, build } = await openScene();
    await send(rep, build, 1);
    await save(builder, build, satin, 1);
    await send(rep, build, 2, NOW_MS + 1000);
    const states = (await listVersions(owner, build.orderNumber)).map(({ number, state }) => [number, state]);
    expect(states).toEqual([
      [2, 'asked'],
      [1, 'superseded'],
    ]);
  });

  test('compares with any other that was sent; only staff compare with the draft', async () => {
    const { builder, rep, owner, companion, build } = await openScene();
    await send(rep, build, 1);
    await save(builder, build, satin, 1);
    expect(await requireComparison(rep, build.orderNumber, 1, 'draft')).toEqual({ before: smallSpec(), after: satin });
    await expect(requireComparison(owner, build.orderNumber, 1, 'draft')).rejects.toBeInstanceOf(OutOfReach);
    await expect(requireComparison(owner, build.orderNumber, 1, 2)).rejects.toBeInstanceOf(OutOfReach);
    await expect(requireComparison(companion, build.orderNumber, 1, 1)).rejects.toBeInstanceOf(Denied);
  });
});

describe('an item whose stage has begun', () => {
  test('can no longer be edited or slip into a version, while the rest can', async () => {
    const { builder, rep, build } = await openScene();
    await send(rep, build, 1);
    await save(builder, build, wide, 1);
    await begin(build, 'neck');
    expect(await sentencesOf(send(rep, build, 2))).toHaveProperty(['items.nut_width.value']);
    expect(await sentencesOf(save(builder, build, wide, 2))).toHaveProperty(['items.nut_width.value']);
    expect(await save(builder, build, satin, 2)).toBe(3);
  });

  test('is free while no version was sent: nothing was agreed', async () => {
    const { builder, build } = await openScene('finish');
    expect(await save(builder, build, wide, 1)).toBe(2);
  });
});

describe('a change request', () => {
  const ask = (viewer: Viewer, build: TestBuild, itemKey = 'nut_width') =>
    requestChange(viewer, { orderNumber: build.orderNumber, itemKey, wish: 'A wider nut, please.' }, NOW_MS);

  const offer = (viewer: Viewer, requestId: string, price = 18_000) =>
    offerChange(viewer, { requestId, price, extraDays: 6, message: 'It can be done.', dueOn }, NOW_MS);

  async function openFrozen() {
    const scene = await openScene();
    await send(scene.rep, scene.build, 1);
    await begin(scene.build, 'neck');
    return scene;
  }

  /** As the owner's signature leaves it. */
  const sign = (requestId: string) =>
    write(async (tx) => {
      const answered = { state: 'signed', answeredAt: NOW_MS + 1000, signedName: 'A. Buyer' } as const;
      await tx.update(signOffs).set(answered).where(eq(signOffs.changeRequestId, requestId));
      await tx.update(changeRequests).set({ state: 'signed' }).where(eq(changeRequests.id, requestId));
    });

  test('is the owner’s, for an item that is frozen, one at a time', async () => {
    const { owner, rep, companion, build } = await openFrozen();
    await expect(ask(rep, build)).rejects.toBeInstanceOf(Denied);
    await expect(ask(companion, build)).rejects.toBeInstanceOf(Denied);
    expect((await sentencesOf(ask(owner, build, 'gloss'))).wish).toMatch(/can still change/);
    expect(await sentencesOf(ask(owner, build, 'no_such'))).toHaveProperty('itemKey');
    await ask(owner, build);
    expect(await sentencesOf(ask(owner, build))).toHaveProperty('wish');
    expect(await listChangeRequests(owner, build.orderNumber)).toMatchObject([{ state: 'asked', signOffId: null }]);
  });

  test('that is offered waits for the owner’s signature under wish, price and days', async () => {
    const { owner, builder, rep, build } = await openFrozen();
    const id = await ask(owner, build);
    await expect(offer(builder, id)).rejects.toBeInstanceOf(Denied);
    await offer(rep, id);
    const first = await db().select().from(signOffs).where(eq(signOffs.changeRequestId, id));
    expect(first).toMatchObject([{ kind: 'change', state: 'asked', title: 'Change: Nut width' }]);
    await offer(rep, id, 9_000);
    const both = await db().select().from(signOffs).where(eq(signOffs.changeRequestId, id)).orderBy(signOffs.askedAt);
    expect(both.map(({ state }) => state).sort()).toEqual(['asked', 'superseded']);
    expect(new Set(both.map(({ contentHash }) => contentHash)).size).toBe(2);
    expect(await listChangeRequests(owner, build.orderNumber)).toMatchObject([{ priceCents: 9_000, extraDays: 6 }]);
  });

  test('that is signed opens its item, until the next version goes out', async () => {
    const { owner, builder, rep, build } = await openFrozen();
    const id = await ask(owner, build);
    await offer(rep, id);
    await expect(save(builder, build, wide, 1)).rejects.toBeInstanceOf(BadInput);
    await sign(id);
    expect([...(await requireFreezeGround(builder, build.orderNumber)).openedKeys]).toEqual(['nut_width']);
    expect(await save(builder, build, wide, 1)).toBe(2);
    await send(rep, build, 2, NOW_MS + 2000);
    await expect(save(builder, build, smallSpec(), 2)).rejects.toBeInstanceOf(BadInput);
  });

  test('that is declined says why, and takes back what waited for a signature', async () => {
    const { owner, rep, build } = await openFrozen();
    const id = await ask(owner, build);
    await offer(rep, id);
    await declineChange(rep, { requestId: id, answer: 'The board is glued.' }, NOW_MS);
    expect(await listChangeRequests(owner, build.orderNumber)).toMatchObject([
      { state: 'declined', answer: 'The board is glued.' },
    ]);
    const [asked] = await db().select().from(signOffs).where(eq(signOffs.changeRequestId, id));
    expect(asked?.state).toBe('withdrawn');
    expect(await refusalOf(offer(rep, id))).toMatchObject({ code: 'conflict' });
  });

  test('of another build is out of reach', async () => {
    const { owner, build } = await openFrozen();
    const id = await ask(owner, build);
    await expect(offer(await makePerson('rep'), id)).rejects.toBeInstanceOf(OutOfReach);
  });
});

test('drafts are one a build', async () => {
  const { build } = await openScene();
  expect(await db().select().from(specDrafts).where(eq(specDrafts.buildId, build.id))).toHaveLength(1);
});

test('an owner opens the drawings that were put before them, the shop all of its build', async () => {
  const { owner, companion, builder, rep, build } = await openScene();
  const kept = await makeDocument(build, rep, 'Still ours');
  const asked = await makeDocument(build, rep, 'For the owner');
  await askDrawing(build, rep, { documentId: asked });
  const idsFor = async (viewer: Viewer) => (await listDrawings(viewer, build.orderNumber)).map(({ id }) => id);
  expect(await idsFor(owner)).toEqual([asked]);
  expect((await idsFor(builder)).toSorted()).toEqual([kept, asked].toSorted());
  await expect(listDrawings(companion, build.orderNumber)).rejects.toThrow(Denied);
});
