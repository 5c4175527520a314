import { beforeAll, describe, expect, test } from 'vitest';
import { sql } from 'drizzle-orm';
import { db } from '@/db/client';
import { listAccessEvents } from '@/db/queries/audit';
import { listClients, recordVisit, requireBuild } from '@/db/queries/builds';
import { diaryState } from '@/db/queries/diary';
import { editEntry, postEntry, releaseEntry, requireEditableEntry, withdrawEntry } from '@/db/queries/entries';
import { addCompanion, holdBuild, removeCompanion } from '@/db/queries/people';
import { grantPhoto, requireOwnPhoto, requirePhotoObject } from '@/db/queries/photos';
import { listBuildQuestions } from '@/db/queries/question-lists';
import { askQuestion, requireQuestion, writeLetter } from '@/db/queries/questions';
import { OutOfReach } from '@/lib/errors';
import { newId } from '@/db/schema/columns';
import type { Viewer } from '@/lib/viewer';
import { openTestDatabase } from '../support/database';
import {
  entryFor,
  makeBuild,
  makeEntry,
  makePerson,
  makePhoto,
  makeQuestion,
  noteOf,
  NOW_MS,
  openShop,
} from '../support/world';

await openTestDatabase();
await openShop();

const letter = { note: noteOf('Thank you.'), idempotencyKey: 'a-letter-sent-once' };
const photo = {
  uploadKey: 'one-upload',
  label: 'bench.jpg',
  contentType: 'image/jpeg' as const,
  sizeBytes: 1000,
  sha256: 'A'.repeat(43) + '=',
};

const byOrderNumber: Record<string, (viewer: Viewer, orderNumber: string) => Promise<unknown>> = {
  requireBuild,
  diaryState,
  listClients,
  listAccessEvents,
  listBuildQuestions: (viewer, orderNumber) => listBuildQuestions(viewer, orderNumber, null),
  recordVisit: (viewer, orderNumber) => recordVisit(viewer, orderNumber, NOW_MS),
  postEntry: (viewer, orderNumber) => postEntry(viewer, entryFor(scene.build, { orderNumber }), NOW_MS),
  grantPhoto: (viewer, orderNumber) => grantPhoto(viewer, orderNumber, photo, NOW_MS),
  holdBuild: (viewer, orderNumber) => holdBuild(viewer, orderNumber, NOW_MS + 1000, NOW_MS),
  addCompanion: (viewer, orderNumber) =>
    addCompanion(viewer, orderNumber, { name: 'A Friend', email: 'friend@people.example' }, NOW_MS),
  removeCompanion: (viewer, orderNumber) => removeCompanion(viewer, orderNumber, 'somebody', NOW_MS),
  askQuestion: (viewer, orderNumber) =>
    askQuestion(viewer, { orderNumber, entryId: null, topicId: 'shipping', subject: 'When', ...letter }, NOW_MS),
};

const byEntry: Record<string, (viewer: Viewer, entryId: string) => Promise<unknown>> = {
  requireEditableEntry,
  editEntry: (viewer, id) => editEntry(viewer, id, { revision: 1, note: noteOf('Rewritten.') }, NOW_MS),
  withdrawEntry: (viewer, id) => withdrawEntry(viewer, id, NOW_MS),
  releaseEntry: (viewer, id) => releaseEntry(viewer, id, NOW_MS),
};

const byPhoto: Record<string, (viewer: Viewer, photoId: string) => Promise<unknown>> = {
  requirePhotoObject: (viewer, id) => requirePhotoObject(viewer, id, 640),
  requireOwnPhoto,
};

const byQuestion: Record<string, (viewer: Viewer, questionId: string) => Promise<unknown>> = {
  requireQuestion,
  writeLetter: (viewer, id) => writeLetter(viewer, id, letter, NOW_MS),
};

async function openScene() {
  const [owner, author] = [await makePerson('buyer'), await makePerson('builder')];
  const build = await makeBuild({ owner, staff: [{ person: author, cleared: true }] });
  const entryId = await makeEntry(build, author);
  return {
    build,
    ids: {
      order: build.orderNumber,
      entry: entryId,
      photo: await makePhoto(build, author, { entryId }),
      question: await makeQuestion(build, owner),
    },
  };
}

type Scene = Awaited<ReturnType<typeof openScene>>;
let scene: Scene;
beforeAll(async () => {
  scene = await openScene();
});

/** Everything about the foreign build that one of these doors could have changed. */
async function traces() {
  const ofBuild = (table: 'entries' | 'photos' | 'questions' | 'build_people' | 'diary_visits') =>
    db().all(sql`select * from ${sql.identifier(table)} where build_id = ${scene.build.id}`);
  return [
    await db().all(sql`select * from builds where id = ${scene.build.id}`),
    await ofBuild('entries'),
    await ofBuild('photos'),
    await ofBuild('questions'),
    await ofBuild('build_people'),
    await ofBuild('diary_visits'),
    await db().all(sql`select * from letters where question_id = ${scene.ids.question}`),
    await db().all(sql`select email from users where email = 'friend@people.example'`),
  ];
}

describe.each(['buyer', 'artist', 'builder', 'rep', 'admin'] as const)('for a %s of other builds', (role) => {
  const doors = [
    ...Object.entries(byOrderNumber).map(([name, open]) => ({ name, open, kind: 'order' as const })),
    ...Object.entries(byEntry).map(([name, open]) => ({ name, open, kind: 'entry' as const })),
    ...Object.entries(byPhoto).map(([name, open]) => ({ name, open, kind: 'photo' as const })),
    ...Object.entries(byQuestion).map(([name, open]) => ({ name, open, kind: 'question' as const })),
  ];

  test.each(doors)('$name says the same of a foreign $kind as of none, and does nothing', async ({ open, kind }) => {
    const [viewer, before] = [await makePerson(role), await traces()];
    const foreign = await open(viewer, scene.ids[kind]).catch((error: unknown) => error);
    const unknown = await open(viewer, kind === 'order' ? 'Q-9999999' : newId()).catch((error: unknown) => error);
    expect(foreign).toBeInstanceOf(OutOfReach);
    expect(unknown).toBeInstanceOf(OutOfReach);
    expect(await traces()).toEqual(before);
  });
});
