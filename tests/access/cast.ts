import { write } from '@/db/client';
import { standingAssignments } from '@/db/schema';
import {
  DAY_MS,
  makeBuild,
  makeEntry,
  makePerson,
  makePhoto,
  makeQuestion,
  makeReading,
  NOW_MS,
  type Person,
  type TestBuild,
} from '../support/world';

const rolesOfCast = {
  'its buyer': 'buyer',
  'the artist who owns the held build': 'artist',
  'another buyer': 'buyer',
  'a buyer with a stray assignment': 'buyer',
  'a companion of both': 'buyer',
  'an assigned builder': 'builder',
  'a cleared builder': 'builder',
  'a builder taken off': 'builder',
  'a builder on another build': 'builder',
  'a builder named as companion': 'builder',
  'a lead of every build': 'builder',
  'a lead of the route': 'builder',
  'a lead of another route': 'builder',
  'a lead of the stage it is in': 'builder',
  'a lead of another stage': 'builder',
  'a lead of the route in another stage': 'builder',
  'a lead whose rule has ended': 'builder',
  'an assigned rep': 'rep',
  'a cleared rep': 'rep',
  'a rep on another build': 'rep',
  'an admin': 'admin',
  'an admin who has stepped in': 'admin',
} as const;

export type CastName = keyof typeof rolesOfCast;
export const castNames = Object.keys(rolesOfCast).filter((name): name is CastName => name in rolesOfCast);

const rules = [
  ['a lead of every build', {}],
  ['a lead of the route', { routeId: 'solid' }],
  ['a lead of another route', { routeId: 'bass' }],
  ['a lead of the stage it is in', { stageKey: 'neck' }],
  ['a lead of another stage', { stageKey: 'finish' }],
  ['a lead of the route in another stage', { routeId: 'solid', stageKey: 'wood' }],
  ['a lead whose rule has ended', { endedAt: NOW_MS }],
] as const;

/** One thing for each of the cast. */
async function forEverybody<T>(make: (name: CastName) => Promise<T>): Promise<(name: CastName) => T> {
  const made = new Map<CastName, T>();
  for (const name of castNames) made.set(name, await make(name));
  return (name) => {
    const found = made.get(name);
    if (found === undefined) throw new Error(`nobody is called ${name}`);
    return found;
  };
}

function makePeople() {
  return forEverybody((name) => makePerson(rolesOfCast[name], { name }));
}

async function makeBuilds(people: (name: CastName) => Person) {
  const staff = [
    { person: people('an assigned builder') },
    { person: people('a cleared builder'), cleared: true },
    { person: people('a builder taken off'), cleared: true, endedAt: NOW_MS },
    { person: people('an assigned rep') },
    { person: people('a cleared rep'), cleared: true },
    { person: people('an admin who has stepped in'), cleared: true, stepInReason: 'The owner asked for it' },
    { person: people('a buyer with a stray assignment'), cleared: true },
  ];
  const companions = [people('a companion of both'), people('a builder named as companion')];
  const placed = { staff, companions, stageKey: 'neck' };
  const open = await makeBuild({ ...placed, owner: people('its buyer'), instrument: 'Heron' });
  const artist = people('the artist who owns the held build');
  const heldUntilAt = Date.now() + 90 * DAY_MS;
  const held = await makeBuild({ ...placed, owner: artist, heldUntilAt, instrument: 'Bittern' });
  const elsewhere = [{ person: people('a builder on another build') }, { person: people('a rep on another build') }];
  await makeBuild({ owner: people('another buyer'), staff: elsewhere, routeId: 'bass', instrument: 'Lantern' });
  return { open, held };
}

async function makePhotosOf(open: TestBuild, author: Person, entries: Record<string, string>) {
  const onEntries = new Map<string, string>();
  for (const [name, entryId] of Object.entries(entries))
    onEntries.set(name, await makePhoto(open, author, { entryId }));
  const entryId = entries.published;
  return {
    ...Object.fromEntries(onEntries),
    'arrived but unchecked': await makePhoto(open, author, { entryId, state: 'uploaded' }),
    'promised only': await makePhoto(open, author, { entryId, state: 'granted' }),
    refused: await makePhoto(open, author, { entryId, state: 'refused' }),
    'unposted, of somebody else': await makePhoto(open, author),
  };
}

/** An open build and one held from view, everybody who could want to look at them, and one of each thing to see. */
export async function openCast() {
  const people = await makePeople();
  const { open, held } = await makeBuilds(people);
  const author = await makePerson('builder', { name: 'the author' });
  await write((tx) =>
    tx
      .insert(standingAssignments)
      .values(rules.map(([who, rule]) => ({ userId: people(who).id, startedAt: 0, ...rule }))),
  );
  const entries = {
    published: await makeEntry(open, author),
    'shop only': await makeEntry(open, author, { audience: 'shop' }),
    held: await makeEntry(open, author, { state: 'held' }),
    withdrawn: await makeEntry(open, author, { state: 'withdrawn' }),
  };
  for (const entryId of Object.values(entries)) await makeReading(open, entryId);
  await makeEntry(held, author);
  const ownPhoto = await forEverybody((name) => makePhoto(open, people(name)));
  const questions = {
    neck: await makeQuestion(open, people('its buyer')),
    money: await makeQuestion(open, people('its buyer'), { topicId: 'money' }),
  };
  const photos = await makePhotosOf(open, author, entries);
  return { people, open, held, entries, photos, ownPhoto, questions };
}

export type Cast = Awaited<ReturnType<typeof openCast>>;
