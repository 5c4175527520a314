import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { db, write } from '@/db/client';
import { readAsBuilt } from '@/db/queries/as-built';
import { withdrawEntry } from '@/db/queries/entries';
import { linkProof, listProofLines, unlinkProof } from '@/db/queries/proofs';
import { builds, proofs, shop } from '@/db/schema';
import { BadInput, Denied } from '@/lib/errors';
import { openTestDatabase } from '@/tests/support/database';
import { makeMeasured, makeVersion } from '@/tests/support/proof';
import { choiceItem, measureItem, smallSpec } from '@/tests/support/spec';
import { makeBuild, makeEntry, makePerson, makePhoto, NOW_MS, openShop, type TestBuild } from '@/tests/support/world';
import type { Viewer } from '@/lib/viewer';

await openTestDatabase();
beforeAll(openShop);

async function openScene(document = smallSpec()) {
  const owner = await makePerson('buyer', { name: 'Maren Oduya' });
  const companion = await makePerson('buyer');
  const rep = await makePerson('rep');
  const builder = await makePerson('builder', { name: 'Bo Lindgren' });
  const build = await makeBuild({ owner, companions: [companion], staff: [{ person: rep }, { person: builder }] });
  await makeVersion(build, { rep, owner }, document);
  return { owner, companion, rep, builder, build };
}

const statesFor = async (viewer: Viewer, { orderNumber }: TestBuild) =>
  Object.fromEntries((await listProofLines(viewer, orderNumber)).lines.map(({ item, state }) => [item.key, state]));

const link = ({ orderNumber }: TestBuild, itemKey: string, entryId: string) => ({ orderNumber, itemKey, entryId });
const revisionOf = async ({ id }: TestBuild) =>
  (await db().select({ revision: builds.diaryRevision }).from(builds).where(eq(builds.id, id)))[0]?.revision ?? 0;

describe('what proves an item', () => {
  test('is read against the version signed last, not one that only was sent', async () => {
    const { build, owner, rep } = await openScene();
    const wider = smallSpec(measureItem({ aim: { text: '1.800', unit: 'in' } }));
    await makeVersion(build, { rep, owner }, wider, { number: 2, state: 'asked' });
    const { version, lines } = await listProofLines(owner, build.orderNumber);
    expect(version).toMatchObject({ number: 1, signedName: 'Maren Oduya' });
    expect(lines.map(({ signed }) => signed)).toEqual(['1.700 in', 'gloss']);
  });

  test('is nothing while no version is signed', async () => {
    const owner = await makePerson('buyer');
    const build = await makeBuild({ owner });
    expect(await listProofLines(owner, build.orderNumber)).toEqual({ version: null, lines: [] });
    expect(await readAsBuilt(owner, build.orderNumber)).toBeNull();
  });

  test('counts for the client side only when it was published for them; for staff all that stands', async () => {
    const { build, builder, owner } = await openScene();
    const shopOnly = await makeEntry(build, builder, { audience: 'shop' });
    const held = await makeEntry(build, builder, { state: 'held' });
    await makeMeasured(build, shopOnly, 'nut_width', '1.701');
    await linkProof(builder, link(build, 'gloss', held), NOW_MS);
    expect(await statesFor(builder, build)).toEqual({ nut_width: 'proven', gloss: 'proven' });
    expect(await statesFor(owner, build)).toEqual({ nut_width: 'open', gloss: 'open' });
  });

  test('counts no longer once its entry is withdrawn', async () => {
    const { build, builder } = await openScene();
    const entryId = await makeEntry(build, builder);
    await makeMeasured(build, entryId, 'nut_width', '1.701');
    await linkProof(builder, link(build, 'gloss', entryId), NOW_MS);
    await withdrawEntry(builder, entryId, NOW_MS);
    expect(await statesFor(builder, build)).toEqual({ nut_width: 'open', gloss: 'open' });
  });

  test('goes by the latest dated reading, and names who showed it with the first ready photo', async () => {
    const { build, builder, owner } = await openScene();
    const late = await makeEntry(build, builder, { datedAt: NOW_MS });
    const early = await makeEntry(build, builder, { datedAt: NOW_MS - 1000 });
    await makeMeasured(build, late, 'nut_width', '1.73');
    await makeMeasured(build, early, 'nut_width', '1.70');
    const photoId = await makePhoto(build, builder, { entryId: late });
    const [nut] = (await listProofLines(owner, build.orderNumber)).lines;
    expect(nut).toMatchObject({ state: 'out_of_tolerance', measured: '1.73 in' });
    expect(nut?.proofs[0]).toMatchObject({ entryId: late, authorName: 'Bo Lindgren', photoId });
  });
});

describe('linking', () => {
  test('twice is linking once, and the diary learns of it', async () => {
    const { build, builder } = await openScene();
    const entryId = await makeEntry(build, builder);
    const before = await revisionOf(build);
    await linkProof(builder, link(build, 'gloss', entryId), NOW_MS);
    await linkProof(builder, link(build, 'gloss', entryId), NOW_MS);
    expect(await db().select().from(proofs).where(eq(proofs.buildId, build.id))).toHaveLength(1);
    expect(await revisionOf(build)).toBeGreaterThan(before);
  });

  test('refuses an item that was not signed, and an entry of another build', async () => {
    const { build, builder } = await openScene();
    const other = await makeBuild({ staff: [{ person: builder }] });
    const theirs = await makeEntry(other, builder);
    const ours = await makeEntry(build, builder);
    await expect(linkProof(builder, link(build, 'radius', ours), NOW_MS)).rejects.toThrow(BadInput);
    await expect(linkProof(builder, link(build, 'gloss', theirs), NOW_MS)).rejects.toThrow(BadInput);
    expect(await db().select().from(proofs).where(eq(proofs.buildId, build.id))).toEqual([]);
  });

  test('can be taken back until the final check has passed on it', async () => {
    const { build, builder } = await openScene();
    const entryId = await makeEntry(build, builder);
    await linkProof(builder, link(build, 'gloss', entryId), NOW_MS);
    await unlinkProof(builder, link(build, 'gloss', entryId));
    expect((await statesFor(builder, build)).gloss).toBe('open');
    await linkProof(builder, link(build, 'gloss', entryId), NOW_MS);
    await write((tx) => tx.update(builds).set({ readyAt: NOW_MS }).where(eq(builds.id, build.id)));
    await expect(unlinkProof(builder, link(build, 'gloss', entryId))).rejects.toThrow(Denied);
    expect((await statesFor(builder, build)).gloss).toBe('proven');
  });
});

describe('the as-built sheet', () => {
  test('carries the photos that its reader sees, and no others', async () => {
    const { build, builder, owner } = await openScene(smallSpec(choiceItem()));
    const published = await makeEntry(build, builder);
    const shown = await makePhoto(build, builder, { entryId: published });
    await makePhoto(build, builder, { entryId: await makeEntry(build, builder, { audience: 'shop' }) });
    await makePhoto(build, builder, { entryId: published, state: 'uploaded' });
    await makePhoto(build, owner);
    expect((await readAsBuilt(owner, build.orderNumber))?.photos.map(({ id }) => id)).toEqual([shown]);
    expect((await readAsBuilt(builder, build.orderNumber))?.photos).toHaveLength(2);
  });

  test('is not for companions', async () => {
    const { build, companion } = await openScene();
    await expect(readAsBuilt(companion, build.orderNumber)).rejects.toThrow(Denied);
  });

  test('is signed by the shop that made it', async () => {
    const { build, owner } = await openScene();
    const [row] = await db().select({ name: shop.name }).from(shop);
    expect(await readAsBuilt(owner, build.orderNumber)).toMatchObject({
      shopName: row?.name,
      ownerName: 'Maren Oduya',
    });
  });
});
