import { beforeAll, describe, expect, test } from 'vitest';
import { listBuilds, listClients, listStaff, listStages, requireBuild } from '@/db/queries/builds';
import { diaryPage, diaryState } from '@/db/queries/diary';
import { requirePhotoObject } from '@/db/queries/photos';
import { listBuildQuestions, listQueue } from '@/db/queries/question-lists';
import { listReadings } from '@/db/queries/readings';
import { requireQuestion } from '@/db/queries/questions';
import { OutOfReach } from '@/lib/errors';
import { openTestDatabase } from '../support/database';
import { openShop } from '../support/world';
import { castNames, openCast, type Cast, type CastName } from './cast';

await openTestDatabase();
await openShop();

let cast: Cast;
beforeAll(async () => {
  cast = await openCast();
});

const client = 'published';
const staff = 'published, shop only, held';

// PRODUCT.md, section 4. `open` and `held` say whether the person reaches the open build and the one held from view;
// the rest is what they get of the open build. `addresses` lists whose mail address they are told.
const expected: Record<
  CastName,
  { open: boolean; held: boolean; entries?: string; photos?: string; questions?: string; addresses?: string }
> = {
  'its buyer': {
    open: true,
    held: false,
    entries: client,
    photos: `${client}, own`,
    questions: 'neck, money',
    addresses: 'owner, companion',
  },
  'the artist who owns the held build': { open: false, held: true },
  'another buyer': { open: false, held: false },
  'a buyer with a stray assignment': { open: false, held: false },
  'a companion of both': { open: true, held: false, entries: client, photos: client },
  'an assigned builder': { open: true, held: false, entries: staff, photos: `${staff}, own`, questions: 'neck' },
  'a cleared builder': { open: true, held: true, entries: staff, photos: `${staff}, own`, questions: 'neck' },
  'a builder taken off': { open: false, held: false },
  'a builder on another build': { open: false, held: false },
  'a builder named as companion': { open: false, held: false },
  'a lead of every build': { open: true, held: false, entries: staff, photos: `${staff}, own`, questions: 'neck' },
  'a lead of the route': { open: true, held: false, entries: staff, photos: `${staff}, own`, questions: 'neck' },
  'a lead of another route': { open: false, held: false },
  'a lead of the stage it is in': {
    open: true,
    held: false,
    entries: staff,
    photos: `${staff}, own`,
    questions: 'neck',
  },
  'a lead of another stage': { open: false, held: false },
  'a lead of the route in another stage': { open: false, held: false },
  'a lead whose rule has ended': { open: false, held: false },
  'an assigned rep': {
    open: true,
    held: false,
    entries: staff,
    photos: `${staff}, own`,
    questions: 'neck, money',
    addresses: 'owner, companion',
  },
  'a cleared rep': {
    open: true,
    held: true,
    entries: staff,
    photos: `${staff}, own`,
    questions: 'neck, money',
    addresses: 'owner, companion',
  },
  'a rep on another build': { open: false, held: false },
  'an admin': { open: false, held: false },
  'an admin who has stepped in': {
    open: true,
    held: true,
    entries: staff,
    photos: `${staff}, own`,
    questions: 'neck, money',
    addresses: 'owner, companion',
  },
};

async function reaches(load: Promise<unknown>): Promise<boolean> {
  return load.then(
    () => true,
    (error) => {
      if (error instanceof OutOfReach) return false;
      throw error;
    },
  );
}

/** Those of the named things that can be loaded. */
async function reached(things: Record<string, string>, load: (id: string) => Promise<unknown>): Promise<string> {
  const names: string[] = [];
  for (const [name, id] of Object.entries(things)) if (await reaches(load(id))) names.push(name);
  return names.join(', ');
}

test('the table of this test has a row for everybody in it', () => {
  expect(Object.keys(expected).sort()).toEqual([...castNames].sort());
});

describe.each(castNames.map((who) => ({ who, ...expected[who] })))('$who', ({ who, ...may }) => {
  test('reaches exactly these builds, by every way that leads to one', async () => {
    const viewer = cast.people(who);
    for (const [build, isReached] of [
      [cast.open, may.open],
      [cast.held, may.held],
    ] as const) {
      const listed = (await listBuilds(viewer)).some(({ orderNumber }) => orderNumber === build.orderNumber);
      expect({ build: build.instrument, listed }).toEqual({ build: build.instrument, listed: isReached });
      expect(await reaches(requireBuild(viewer, build.orderNumber))).toBe(isReached);
      expect(await reaches(diaryState(viewer, build.orderNumber))).toBe(isReached);
      expect(await reaches(listClients(viewer, build.orderNumber))).toBe(isReached);
      expect((await listStages(viewer, build.id)).length > 0).toBe(isReached);
      expect((await listStaff(viewer, build.id)).length > 0).toBe(isReached);
      expect((await diaryPage(viewer, build.id, null)).entries.length > 0).toBe(isReached);
    }
  });

  test('reads exactly these entries', async () => {
    const { entries } = await diaryPage(cast.people(who), cast.open.id, null);
    const read = Object.entries(cast.entries).filter(([, id]) => entries.some((entry) => entry.id === id));
    expect(read.map(([name]) => name).join(', ')).toBe(may.entries ?? '');
    expect(entries).toHaveLength(read.length);
  });

  test('reads exactly the readings of these entries', async () => {
    const rows = may.open ? await listReadings(cast.people(who), cast.open.orderNumber) : [];
    const read = Object.entries(cast.entries).filter(([, id]) => rows.some(({ entryId }) => entryId === id));
    expect(read.map(([name]) => name).join(', ')).toBe(may.entries ?? '');
    expect(rows).toHaveLength(read.length);
    expect(await reaches(listReadings(cast.people(who), cast.open.orderNumber))).toBe(may.open);
  });

  test('sees exactly these photos', async () => {
    const viewer = cast.people(who);
    const photos = { ...cast.photos, own: cast.ownPhoto(who) };
    expect(await reached(photos, (id) => requirePhotoObject(viewer, id, 640))).toBe(may.photos ?? '');
  });

  test('reads exactly these questions, in every list and one by one', async () => {
    const viewer = cast.people(who);
    const read = may.questions ?? '';
    expect(await reached(cast.questions, (id) => requireQuestion(viewer, id))).toBe(read);
    const named = (rows: { id: string }[]) =>
      Object.entries(cast.questions)
        .filter(([, id]) => rows.some((row) => row.id === id))
        .map(([name]) => name)
        .join(', ');
    if (read) expect(named((await listBuildQuestions(viewer, cast.open.orderNumber, null)).questions)).toBe(read);
    const queue = named((await listQueue(viewer, null)).questions);
    expect(queue).toBe(viewer.role === 'builder' ? '' : read);
  });

  test('is told exactly these addresses, and as a companion not even who else looks on', async () => {
    const rows = may.open ? await listClients(cast.people(who), cast.open.orderNumber) : [];
    const told = rows.filter(({ email }) => email !== null).map(({ standing }) => standing);
    expect([...new Set(told)].join(', ')).toBe(may.addresses ?? '');
    expect(rows.length > 0).toBe(may.open && who !== 'a companion of both');
  });
});
