import { eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { db, write } from '@/db/client';
import { diaryAnswer, diaryPage, diaryState } from '@/db/queries/diary';
import { postEntry, releaseEntry, withdrawEntry } from '@/db/queries/entries';
import { findBench, listBoards, listReadings } from '@/db/queries/readings';
import { entries, materials, proofs, readings, signOffs, specVersions } from '@/db/schema';
import { newId } from '@/db/schema/columns';
import { materialRows } from '@/lib/craft/materials';
import { emcPercent, moistureWords } from '@/lib/craft/moisture';
import { BadInput, Denied } from '@/lib/errors';
import type { CoatReading, NewReading, WoodRoomReading } from '@/lib/readings/reading';
import type { SpecDocument } from '@/lib/specs/document';
import { plainNote } from '@/lib/rich-text/plain-text';
import { newEntry } from '@/lib/validation/entries';
import { openTestDatabase } from '../support/database';
import { measureItem, smallSpec } from '../support/spec';
import { entryFor, makeBuild, makePerson, NOW_MS, openShop, type Person, type TestBuild } from '../support/world';

await openTestDatabase();
await openShop();
await write((tx) => tx.insert(materials).values(materialRows()));

/** A version of the spec that was sent, and signed if asked. */
async function sendSpec(build: TestBuild, sender: Person, number: number, document: SpecDocument, isSigned: boolean) {
  const id = newId();
  const sent = { id, buildId: build.id, number, document, contentHash: id, sentById: sender.id, sentAt: NOW_MS };
  const signOff = {
    buildId: build.id,
    kind: 'spec',
    title: `Spec, version ${number}`,
    specVersionId: id,
    contentHash: id,
    dueOn: '2026-12-12',
    askedById: sender.id,
    askedAt: NOW_MS,
    state: isSigned ? 'signed' : 'asked',
    signedName: isSigned ? 'Maren Oduya' : null,
    answeredAt: isSigned ? NOW_MS : null,
  } as const;
  await write(async (tx) => {
    await tx.insert(specVersions).values(sent);
    await tx.insert(signOffs).values(signOff);
  });
}

async function openBench(wish: { releaseNeeded?: boolean } = {}) {
  const people = {
    owner: await makePerson('buyer'),
    companion: await makePerson('buyer'),
    builder: await makePerson('builder'),
    rep: await makePerson('rep'),
  };
  const { owner, companion, builder, rep } = people;
  const build = await makeBuild({
    owner,
    companions: [companion],
    staff: [{ person: builder }, { person: rep }],
    ...wish,
  });
  await sendSpec(build, rep, 1, smallSpec(), true);
  return { ...people, build };
}

const nut = (text: string): NewReading => ({
  itemKey: 'nut_width',
  value: { kind: 'measure', name: 'whatever', measured: { text, unit: 'in' } },
});

const airOf = (over: Partial<WoodRoomReading> = {}): NewReading => ({
  itemKey: null,
  value: { kind: 'wood_room', temperatureC: 21, relativeHumidityPercent: 45, moisturePercent: 9.1, ...over },
});
const air = airOf();

const film = { wetFilmUm: 120, volumeSolidsPercent: 25, dryFilmUm: null };
const coat = (coatNumber: number, over: Partial<CoatReading> = {}): NewReading => ({
  itemKey: null,
  value: { kind: 'coat', product: 'Clear', coatNumber, ...film, ...over },
});

const entriesOf = (build: TestBuild) => db().select().from(entries).where(eq(entries.buildId, build.id));
const readBy = async (viewer: Person, build: TestBuild) => (await diaryPage(viewer, build.id, null)).entries;

describe('an entry with readings', () => {
  test('is told in the diary by what the shop computed, not by what arrived', async () => {
    const { builder, owner, build } = await openBench();
    await postEntry(builder, entryFor(build, { readings: [air, nut('1.720')], proves: ['gloss'] }), NOW_MS);
    const [entry] = await readBy(owner, build);
    expect(entry?.readings).toMatchObject([
      {
        label: 'Wood room',
        figures: '21 °C (70 °F), 45 %',
        words: expect.stringContaining(`settle at ${moistureWords(emcPercent(21, 45))}`),
      },
      { label: 'Nut width', figures: '1.720 in (43.688 mm)', standing: 'outside', bar: { value: 1.72 } },
    ]);
    expect(entry?.shows.toSorted()).toEqual(['Nut width', 'Sheen']);
  });

  test('sent twice stores them once', async () => {
    const { builder, build, owner } = await openBench();
    const entry = entryFor(build, { readings: [air], proves: ['gloss'] });
    await Promise.all(Array.from({ length: 10 }, () => postEntry(builder, entry, NOW_MS)));
    expect(await listReadings(owner, build.orderNumber)).toHaveLength(1);
    expect(await db().select().from(proofs).where(eq(proofs.buildId, build.id))).toHaveLength(1);
  });

  test.each<{ what: string; reading: NewReading; says: RegExp }>([
    { what: 'a humidity of 0.5', reading: airOf({ relativeHumidityPercent: 0.5 }), says: /write 50/ },
    { what: 'a nut of 43 in', reading: nut('43'), says: /43 mm was meant/ },
    { what: 'an item that the spec does not have', reading: { ...nut('1.7'), itemKey: 'no_such' }, says: /Reload/ },
    { what: 'a measure of nothing', reading: { ...nut('1.7'), itemKey: null }, says: /Reload/ },
    { what: 'a coat of solid water', reading: coat(1, { volumeSolidsPercent: 0 }), says: /solids/ },
  ])('with $what is not posted at all, and the sentence stands at that reading', async ({ reading, says }) => {
    const { builder, build } = await openBench();
    const refusal = postEntry(builder, entryFor(build, { readings: [air, reading] }), NOW_MS);
    await expect(refusal).rejects.toMatchObject({ fields: { 'readings.1': expect.stringMatching(says) } });
    expect(await entriesOf(build)).toEqual([]);
    expect(await db().select().from(readings).where(eq(readings.buildId, build.id))).toEqual([]);
  });

  test('cannot show an item that is not in the spec', async () => {
    const { builder, build } = await openBench();
    const refusal = postEntry(builder, entryFor(build, { proves: ['gloss', 'no_such'] }), NOW_MS);
    await expect(refusal).rejects.toBeInstanceOf(BadInput);
    expect(await entriesOf(build)).toEqual([]);
  });

  test('is new to every reader: the mark of the diary changes and the next page has it', async () => {
    const { builder, owner, build } = await openBench();
    const before = await diaryAnswer(owner, build.orderNumber, null, null);
    await postEntry(builder, entryFor(build, { readings: [nut('1.701')] }), NOW_MS);
    const after = await diaryAnswer(owner, build.orderNumber, null, before.etag);
    expect(after.page).toContain('1.701 in');
    expect((await diaryState(owner, build.orderNumber)).etag).toBe(after.etag);
  });

  test('that is damaged in the database harms only itself', async () => {
    const { builder, owner, build } = await openBench();
    await postEntry(builder, entryFor(build, { readings: [air, nut('1.7')] }), NOW_MS);
    const [first] = await db().select({ id: readings.id }).from(readings).where(eq(readings.buildId, build.id));
    const broken = `update readings set shown = '{"kind' where id = '${first?.id}'`;
    await write((tx) => tx.run(broken));
    const [entry] = await readBy(owner, build);
    expect(entry?.readings).toMatchObject([null, { label: 'Nut width' }]);
  });
});

describe('readings are read by who reads their entry', () => {
  test('those for the shop only and those that wait for release reach no client', async () => {
    const { builder, rep, owner, companion, build } = await openBench({ releaseNeeded: true });
    await postEntry(builder, entryFor(build, { readings: [air], audience: 'shop' }), NOW_MS);
    const held = await postEntry(builder, entryFor(build, { readings: [nut('1.7')] }), NOW_MS);
    const read = async (viewer: Person) =>
      (await listReadings(viewer, build.orderNumber)).map(({ shown }) => shown?.label);
    expect(await read(owner)).toEqual([]);
    expect((await read(builder)).toSorted()).toEqual(['Nut width', 'Wood room']);
    await releaseEntry(rep, held.id, NOW_MS + 1);
    expect(await read(owner)).toEqual(['Nut width']);
    expect(await read(companion)).toEqual(['Nut width']);
    await withdrawEntry(rep, held.id, NOW_MS + 2);
    expect(await read(owner)).toEqual([]);
    expect(await read(rep)).toEqual(['Wood room']);
  });

  test('a companion reads them and not the spec behind them', async () => {
    const { companion, build } = await openBench();
    await expect(listBoards(companion, build.orderNumber)).rejects.toBeInstanceOf(Denied);
    await expect(findBench(companion, build.orderNumber)).rejects.toBeInstanceOf(Denied);
  });
});

describe('what the bench measures against', () => {
  test('is the version that was signed, not a later one that was only sent', async () => {
    const { builder, rep, build } = await openBench();
    const wider = smallSpec(measureItem({ aim: { text: '1.750', unit: 'in' } }));
    await sendSpec(build, rep, 2, wider, false);
    const aim = async () => (await findBench(builder, build.orderNumber)).items[0]?.aim?.text;
    expect(await aim()).toBe('1.700');
    await sendSpec(build, rep, 3, wider, true);
    expect(await aim()).toBe('1.750');
  });

  test('is the version sent last while none is signed, and nothing before that', async () => {
    const builder = await makePerson('builder');
    const rep = await makePerson('rep');
    const build = await makeBuild({ staff: [{ person: builder }, { person: rep }] });
    expect((await findBench(builder, build.orderNumber)).items).toEqual([]);
    await sendSpec(build, rep, 1, smallSpec(), false);
    expect((await findBench(builder, build.orderNumber)).items).toHaveLength(2);
  });

  test('counts the coats that are in the diary, a withdrawn one not', async () => {
    const { builder, build } = await openBench();
    const first = await postEntry(builder, entryFor(build, { readings: [coat(1)] }), NOW_MS);
    await postEntry(builder, entryFor(build, { readings: [coat(2)] }), NOW_MS + 1);
    expect((await findBench(builder, build.orderNumber)).coats.map(({ coatNumber }) => coatNumber)).toEqual([1, 2]);
    const third = await postEntry(builder, entryFor(build, { readings: [coat(3)] }), NOW_MS + 2);
    const shown = (await listReadings(builder, build.orderNumber)).find(({ entryId }) => entryId === third.id)?.shown;
    expect(shown?.words).toBe('the 3 coats written down make 90 µm (3.5 mil)');
    await withdrawEntry(builder, first.id, NOW_MS + 3);
    expect((await findBench(builder, build.orderNumber)).coats).toHaveLength(2);
  });

  test('names the boards whose wood and width the spec has, with how that wood moves', async () => {
    const { owner, rep, build } = await openBench();
    const wood = {
      kind: 'material',
      group: 'fingerboard',
      key: 'wood',
      label: 'Board',
      frozenFrom: null,
      provenAt: null,
    } as const;
    const document = smallSpec(measureItem(), { ...wood, materialKey: 'sugar_maple', words: '' });
    await sendSpec(build, rep, 2, document, true);
    const [board] = await listBoards(owner, build.orderNumber);
    expect(board).toMatchObject({ label: 'Board', widthLabel: 'Nut width' });
    expect(board?.movement?.tangential.coefficientPerPercent).toBe(0.00353);
  });
});

describe('the door', () => {
  const arrived = (over: object) =>
    newEntry.safeParse({
      orderNumber: 'Q-1',
      idempotencyKey: 'a-key-that-is-long-enough',
      stageId: 'stage',
      startStage: false,
      audience: 'buyer',
      note: plainNote(''),
      photos: [{ id: 'photo', alt: '' }],
      ...over,
    });

  test('takes a draft from before readings were taken', () => {
    expect(arrived({}).data).toMatchObject({ readings: [], proves: [] });
  });

  test('takes an entry of readings alone, without a word', () => {
    expect(arrived({ photos: [], readings: [air] }).success).toBe(true);
    expect(arrived({ photos: [], readings: [] }).success).toBe(false);
  });

  test.each([
    { what: 'a kind that is none', readings: [{ itemKey: null, value: { kind: 'weather' } }] },
    { what: 'not-a-number', readings: [{ itemKey: null, value: { ...air.value, temperatureC: null } }] },
    { what: 'text for a number', readings: [{ itemKey: null, value: { ...air.value, temperatureC: '21' } }] },
    {
      what: 'a unit that is none',
      readings: [{ itemKey: null, value: { kind: 'measure', name: 'x', measured: { text: '1', unit: 'ell' } } }],
    },
    { what: 'more than it asked for', readings: [{ ...air, standing: 'within' }] },
    { what: 'a thousand readings', readings: Array.from({ length: 1000 }, () => air) },
  ])('refuses $what', ({ readings: sent }) => {
    const parsed = arrived({ readings: sent });
    expect(parsed.success).toBe(false);
    expect(parsed.error?.issues.every(({ path }) => path[0] === 'readings')).toBe(true);
  });
});
