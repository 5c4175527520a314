import { beforeAll, describe, expect, test } from 'vitest';
import { sql } from 'drizzle-orm';
import { db, write } from '@/db/client';
import { listAccessEvents } from '@/db/queries/audit';
import { listClients, recordVisit, requireBuild } from '@/db/queries/builds';
import { diaryState } from '@/db/queries/diary';
import { editEntry, postEntry, releaseEntry, requireEditableEntry, withdrawEntry } from '@/db/queries/entries';
import { addCompanion, removeCompanion } from '@/db/queries/companions';
import { holdBuild } from '@/db/queries/holds';
import { grantPhoto, requireOwnPhoto, requirePhotoObject } from '@/db/queries/photos';
import { grantDocument, requireDocumentFile, requireOwnDocument } from '@/db/queries/documents';
import { askForChange, signSignOff, withdrawSignOff } from '@/db/queries/sign-off-answers';
import { listBuildSignOffs, requireSignOff } from '@/db/queries/sign-offs';
import { listBuildQuestions } from '@/db/queries/question-lists';
import { listMargin, writeMargin } from '@/db/queries/margin';
import { listPenPasses, listPenTakers, passPen } from '@/db/queries/pen';
import { findPhraseValues } from '@/db/queries/phrases';
import { endQuestion, reopenQuestion } from '@/db/queries/question-ends';
import { askQuestion, markRead, requireQuestion, requireQuestionMark, writeLetter } from '@/db/queries/questions';
import { listChangeRequests, requestChange } from '@/db/queries/change-requests';
import { listMaterials } from '@/db/queries/materials';
import { findDraft, listTemplates, saveDraft, startDraft } from '@/db/queries/spec-drafts';
import { requireFreezeGround } from '@/db/queries/spec-freeze';
import { findShownSpec } from '@/db/queries/spec-shown';
import { findVersion, listVersions, requireComparison, sendVersion } from '@/db/queries/spec-versions';
import { OutOfReach } from '@/lib/errors';
import { assignments } from '@/db/schema';
import { newId } from '@/db/schema/columns';
import type { Viewer } from '@/lib/viewer';
import { openTestDatabase } from '../support/database';
import { askDrawing, makeDocument } from '../support/sign-off-world';
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

const file = { uploadKey: 'one-upload', label: 'Logo', sizeBytes: 1000, sha256: 'A'.repeat(43) + '=' };
const inSession = (viewer: Viewer) => ({ ...viewer, sessionId: 'a-session', email: '', timeZoneAskedAt: null });

const byOrderNumber: Record<string, (viewer: Viewer, orderNumber: string) => Promise<unknown>> = {
  requireBuild,
  diaryState,
  listClients,
  listAccessEvents,
  listBuildSignOffs,
  grantDocument: (viewer, orderNumber) => grantDocument(viewer, { orderNumber, ...file }, NOW_MS),
  listBuildQuestions: (viewer, orderNumber) => listBuildQuestions(viewer, orderNumber, null),
  findDraft,
  findShownSpec,
  listChangeRequests,
  listMaterials,
  listTemplates,
  listVersions,
  requireFreezeGround,
  findVersion: (viewer, orderNumber) => findVersion(viewer, orderNumber, 1),
  requireComparison: (viewer, orderNumber) => requireComparison(viewer, orderNumber, 1, 'draft'),
  startDraft: (viewer, orderNumber) => startDraft(viewer, orderNumber, 'a-template', NOW_MS),
  saveDraft: (viewer, orderNumber) => saveDraft(viewer, { orderNumber, revision: 1, document: { items: [] } }, NOW_MS),
  sendVersion: (viewer, orderNumber) =>
    sendVersion(viewer, { orderNumber, revision: 1, message: '', dueOn: '2026-12-20', blocksStageKey: null }, NOW_MS),
  requestChange: (viewer, orderNumber) =>
    requestChange(viewer, { orderNumber, itemKey: 'nut_width', wish: 'Wider.' }, NOW_MS),
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
  requireQuestionMark,
  markRead: (viewer, id) => markRead(viewer, id, NOW_MS),
  listMargin,
  writeMargin: (viewer, id) => writeMargin(viewer, id, letter, NOW_MS),
  listPenPasses,
  listPenTakers: (viewer, id) => listPenTakers(viewer, id, NOW_MS),
  passPen: (viewer, id) => passPen(viewer, id, { toId: viewer.id, reason: 'Mine' }, NOW_MS),
  endQuestion: (viewer, id) => endQuestion(viewer, id, 'closed', NOW_MS),
  reopenQuestion: (viewer, id) => reopenQuestion(viewer, id, NOW_MS),
  findPhraseValues: (viewer, id) => findPhraseValues(viewer, id, NOW_MS),
};

const bySignOff: Record<string, (viewer: Viewer, signOffId: string) => Promise<unknown>> = {
  requireSignOff,
  signSignOff: async (viewer, signOffId) => signSignOff(inSession(viewer), { signOffId, name: viewer.name }, NOW_MS),
  askForChange: async (viewer, signOffId) => askForChange(inSession(viewer), { signOffId, words: 'Wider' }, NOW_MS),
  withdrawSignOff: (viewer, id) => withdrawSignOff(viewer, id, NOW_MS),
};

const byDocument: Record<string, (viewer: Viewer, documentId: string) => Promise<unknown>> = {
  requireDocumentFile,
  requireOwnDocument,
};

async function openScene() {
  const [owner, author] = [await makePerson('buyer'), await makePerson('builder')];
  const build = await makeBuild({ owner, staff: [{ person: author, cleared: true }] });
  const entryId = await makeEntry(build, author);
  const rep = await makePerson('rep');
  await write((tx) => tx.insert(assignments).values({ buildId: build.id, userId: rep.id, startedAt: NOW_MS }));
  const documentId = await makeDocument(build, rep);
  return {
    build,
    ids: {
      document: documentId,
      signOff: await askDrawing(build, rep, { documentId }),
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
  const ofBuild = (
    table: 'entries' | 'photos' | 'questions' | 'build_people' | 'diary_visits' | 'sign_offs' | 'documents',
  ) => db().all(sql`select * from ${sql.identifier(table)} where build_id = ${scene.build.id}`);
  return [
    await db().all(sql`select * from builds where id = ${scene.build.id}`),
    await ofBuild('entries'),
    await ofBuild('photos'),
    await ofBuild('questions'),
    await ofBuild('build_people'),
    await ofBuild('diary_visits'),
    await ofBuild('sign_offs'),
    await ofBuild('documents'),
    await db().all(sql`select * from letters where question_id = ${scene.ids.question}`),
    await db().all(sql`select * from margin_notes where question_id = ${scene.ids.question}`),
    await db().all(sql`select * from question_reads where question_id = ${scene.ids.question}`),
    await db().all(sql`select email from users where email = 'friend@people.example'`),
  ];
}

describe.each(['buyer', 'artist', 'builder', 'rep', 'admin'] as const)('for a %s of other builds', (role) => {
  const doors = [
    ...Object.entries(byOrderNumber).map(([name, open]) => ({ name, open, kind: 'order' as const })),
    ...Object.entries(byEntry).map(([name, open]) => ({ name, open, kind: 'entry' as const })),
    ...Object.entries(byPhoto).map(([name, open]) => ({ name, open, kind: 'photo' as const })),
    ...Object.entries(bySignOff).map(([name, open]) => ({ name, open, kind: 'signOff' as const })),
    ...Object.entries(byDocument).map(([name, open]) => ({ name, open, kind: 'document' as const })),
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
