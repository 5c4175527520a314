import { randomUUID } from 'node:crypto';
import { write } from '@/db/client';
import { startSession } from '@/db/queries/sign-in';
import * as tables from '@/db/schema';
import { newId } from '@/db/schema/columns';
import { isClientRole, type Role } from '@/lib/access';
import { newToken } from '@/lib/auth/secrets';
import { showWoodRoom } from '@/lib/readings/wood-room';
import { checkNote } from '@/lib/rich-text/check';
import type { NewEntry } from '@/lib/validation/entries';
import type { Viewer } from '@/lib/viewer';

export const DAY_MS = 86_400_000;
/** Tuesday 1 December 2026, 09:00 UTC: the clock of tests that take theirs as an argument. */
export const NOW_MS = Date.UTC(2026, 11, 1, 9);

const stagesOfRoute = [
  { key: 'wood', name: 'Wood room', department: 'wood', work: 'wood', usualDays: 15 },
  { key: 'neck', name: 'Neck & frets', department: 'neck', work: 'neck', usualDays: 10 },
  { key: 'finish', name: 'Finish', department: 'finish', work: 'finish', usualDays: 20 },
] as const;

const departments = [
  { key: 'wood', name: 'Wood room', position: 1 },
  { key: 'neck', name: 'Neck & frets', position: 2 },
  { key: 'finish', name: 'Finish', position: 3 },
];

const topicRows = [
  { id: 'neck-work', name: 'The neck', position: 1, answeredBy: 'department', department: 'neck', repsOnly: false },
  { id: 'shipping', name: 'Shipping', position: 2, answeredBy: 'rep', department: null, repsOnly: false },
  { id: 'money', name: 'Money', position: 3, answeredBy: 'rep', department: null, repsOnly: true },
] as const;

/** The rows every test of a file shares: the shop, its departments, two routes and the topics of questions. */
export async function openShop(): Promise<void> {
  await write(async (tx) => {
    await tx.insert(tables.shop).values({ id: 1, name: 'Quillhaven Guitar Works', timeZone: 'Europe/Lisbon' });
    await tx.insert(tables.departments).values(departments);
    for (const id of ['solid', 'bass']) {
      await tx.insert(tables.routes).values({ id, name: id });
      await tx
        .insert(tables.routeStages)
        .values(stagesOfRoute.map((stage, position) => ({ routeId: id, position, ...stage })));
    }
    await tx.insert(tables.topics).values([...topicRows]);
  });
}

export type Person = Viewer & { email: string };

/** Somebody with an account. Clients get mail settings, as an invitation gives them. */
export async function makePerson(role: Role, over: Partial<Person & { disabledAt: number }> = {}): Promise<Person> {
  const id = over.id ?? newId();
  const row = {
    id,
    role,
    name: over.name ?? `${role} ${id.slice(0, 4)}`,
    email: over.email ?? `${randomUUID()}@people.example`,
    department: over.department ?? (role === 'builder' ? 'neck' : null),
    timeZone: over.timeZone ?? 'UTC',
  };
  await write(async (tx) => {
    await tx.insert(tables.users).values({ ...row, disabledAt: over.disabledAt ?? null });
    if (isClientRole(role)) await tx.insert(tables.mailSettings).values({ userId: id, cadence: 'none' });
  });
  return row;
}

type Assigned = { person: Viewer; cleared?: boolean; endedAt?: number; stepInReason?: string };

type BuildWish = {
  owner?: Viewer;
  companions?: Viewer[];
  staff?: Assigned[];
  heldUntilAt?: number;
  releaseNeeded?: boolean;
  routeId?: 'solid' | 'bass';
  /** Which stage the build is in. */
  stageKey?: string;
  instrument?: string;
};

export type TestBuild = {
  id: string;
  orderNumber: string;
  instrument: string;
  stages: { id: string; key: string; name: string }[];
};

let orders = 1000;

/** A build in its first stage unless told otherwise, with the people who belong to it. */
export async function makeBuild(wish: BuildWish = {}): Promise<TestBuild> {
  const id = newId();
  const orderNumber = `Q-${(orders += 1)}`;
  const instrument = wish.instrument ?? 'Nightjar';
  const now = stagesOfRoute.findIndex(({ key }) => key === (wish.stageKey ?? 'wood'));
  const stages = stagesOfRoute.map((stage, position) => ({
    id: newId(),
    position,
    ...stage,
    startedAt: position <= now ? NOW_MS - 9 * DAY_MS : null,
    finishedAt: position < now ? NOW_MS - 9 * DAY_MS : null,
  }));
  await write(async (tx) => {
    await tx.insert(tables.builds).values({
      id,
      orderNumber,
      instrument,
      finishName: 'Oxblood',
      finishHex: '#5a1a1f',
      scaleLengthIn: 25.5,
      routeId: wish.routeId ?? 'solid',
      heldUntilAt: wish.heldUntilAt ?? null,
      releaseNeeded: wish.releaseNeeded ?? false,
      orderedAt: NOW_MS - 40 * DAY_MS,
    });
    await tx.insert(tables.buildStages).values(stages.map((stage) => ({ buildId: id, ...stage })));
    if (wish.owner)
      await tx.insert(tables.buildPeople).values({ buildId: id, userId: wish.owner.id, standing: 'owner' });
    for (const { id: userId } of wish.companions ?? [])
      await tx.insert(tables.buildPeople).values({ buildId: id, userId, standing: 'companion' });
    for (const { person, ...assigned } of wish.staff ?? [])
      await tx
        .insert(tables.assignments)
        .values({ buildId: id, userId: person.id, startedAt: NOW_MS - 30 * DAY_MS, ...assigned });
  });
  return { id, orderNumber, instrument, stages };
}

/** A note as the door hands it on: checked, with its plain words. */
export function noteOf(text: string) {
  const note = checkNote({ type: 'doc', content: [{ type: 'paragraph', content: [{ type: 'text', text }] }] });
  if (!note.ok) throw new Error(note.message);
  return { doc: note.doc, text: note.text };
}

/** What the bench sends for one entry, after the door has checked it. */
export function entryFor(build: TestBuild, over: Partial<NewEntry> = {}): NewEntry {
  return {
    orderNumber: build.orderNumber,
    idempotencyKey: randomUUID(),
    stageId: build.stages[0]?.id ?? '',
    startStage: false,
    audience: 'buyer',
    note: noteOf('The neck blank is glued.'),
    photos: [],
    readings: [],
    proves: [],
    ...over,
  };
}

type EntryWish = {
  text?: string;
  body?: string;
  audience?: 'buyer' | 'shop';
  state?: 'held' | 'published' | 'withdrawn';
  datedAt?: number;
  id?: string;
};

/** An entry that is simply there; nobody is told of it. */
export async function makeEntry(build: TestBuild, author: Viewer, wish: EntryWish = {}): Promise<string> {
  const { doc, text } = noteOf(wish.text ?? 'The neck blank is glued.');
  const id = wish.id ?? newId();
  await write((tx) =>
    tx.insert(tables.entries).values({
      id,
      buildId: build.id,
      stageId: build.stages[0]?.id ?? '',
      authorId: author.id,
      body: wish.body ?? JSON.stringify(doc),
      bodyText: text,
      audience: wish.audience ?? 'buyer',
      state: wish.state ?? 'published',
      datedAt: wish.datedAt ?? NOW_MS,
      idempotencyKey: randomUUID(),
    }),
  );
  return id;
}

type PhotoWish = { entryId?: string; state?: 'granted' | 'uploaded' | 'ready' | 'refused'; createdAt?: number };

/** A photo's row; no object lies behind it. */
export async function makePhoto(build: TestBuild, uploader: Viewer, wish: PhotoWish = {}): Promise<string> {
  const id = newId();
  await write((tx) =>
    tx.insert(tables.photos).values({
      id,
      buildId: build.id,
      entryId: wish.entryId ?? null,
      uploaderId: uploader.id,
      uploadKey: randomUUID(),
      state: wish.state ?? 'ready',
      label: 'bench.jpg',
      contentType: 'image/jpeg',
      sizeBytes: 1000,
      sha256: 'A'.repeat(43) + '=',
      originalKey: `in/${id}`,
      outPrefix: `out/${id}`,
      widthPx: 1600,
      heightPx: 1200,
      variantWidthsPx: '320,640,1600',
      expiresAt: NOW_MS,
      createdAt: wish.createdAt ?? NOW_MS,
    }),
  );
  return id;
}

/** A reading of an entry that is simply there, out of a wood room. */
export async function makeReading(build: TestBuild, entryId: string): Promise<void> {
  const value = { kind: 'wood_room', temperatureC: 21, relativeHumidityPercent: 45, moisturePercent: null } as const;
  await write((tx) =>
    tx.insert(tables.readings).values({ buildId: build.id, entryId, position: 0, value, shown: showWoodRoom(value) }),
  );
}

type QuestionWish = { topicId?: (typeof topicRows)[number]['id']; penHolder?: Viewer; entryId?: string };

/** A question with its first letter. */
export async function makeQuestion(build: TestBuild, asker: Viewer, wish: QuestionWish = {}): Promise<string> {
  const id = newId();
  const { doc, text } = noteOf('Which fret wire is it?');
  await write(async (tx) => {
    await tx.insert(tables.questions).values({
      id,
      buildId: build.id,
      entryId: wish.entryId ?? null,
      topicId: wish.topicId ?? 'neck-work',
      askedById: asker.id,
      subject: 'Fret wire',
      penHolderId: wish.penHolder?.id ?? null,
      state: 'waiting',
      idempotencyKey: randomUUID(),
      lastLetterAt: NOW_MS,
      createdAt: NOW_MS,
    });
    await tx.insert(tables.letters).values({
      questionId: id,
      authorId: asker.id,
      side: 'client',
      body: JSON.stringify(doc),
      bodyText: text,
      idempotencyKey: randomUUID(),
      writtenAt: NOW_MS,
    });
  });
  return id;
}

/** A signed-in browser. @returns the raw token that its cookie holds */
export async function makeSession(userId: string, nowMs = Date.now()): Promise<string> {
  const token = newToken();
  await startSession({ userId, token, replaces: null, device: 'Firefox on a Mac', nowMs });
  return token;
}
