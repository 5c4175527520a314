import { randomUUID } from 'node:crypto';
import { makeBuild, makePerson, makeSession, NOW_MS, type TestBuild } from './world';
import { write } from '@/db/client';
import { findSessionViewer, type SessionViewer } from '@/db/queries/sessions';
import { askForSignOff, type SignOffWish } from '@/db/queries/sign-off-asking';
import * as tables from '@/db/schema';
import { newId } from '@/db/schema/columns';
import type { Viewer } from '@/lib/viewer';

/** A person with a browser that is signed in. */
export async function signedIn(person: Pick<Viewer, 'id'>): Promise<SessionViewer> {
  const viewer = await findSessionViewer(await makeSession(person.id), Date.now());
  if (!viewer) throw new Error('a session that was made is not there');
  return viewer;
}

/** A build with its owner, a companion and the staff on it, and another buyer. */
export async function signOffCast(wish: { heldUntilAt?: number; stageKey?: string } = {}) {
  const owner = await signedIn(await makePerson('buyer', { name: 'Maren Oduya' }));
  const companion = await signedIn(await makePerson('buyer', { name: 'Ilse Oduya' }));
  const stranger = await signedIn(await makePerson('buyer', { name: 'Maren Oduya' }));
  const rep = await signedIn(await makePerson('rep', { name: 'Ruth Adeyemi' }));
  const builder = await signedIn(await makePerson('builder', { name: 'Bo Lindgren' }));
  const admin = await signedIn(await makePerson('admin', { name: 'Ada Farrow' }));
  const staff = [
    { person: builder, cleared: true },
    { person: rep, cleared: true },
  ];
  const build = await makeBuild({ owner, companions: [companion], staff, ...wish });
  return { owner, companion, stranger, rep, builder, admin, build };
}

/** A checked PDF of a build; no object lies behind it. */
export async function makeDocument(build: TestBuild, uploader: Viewer, title = 'Headstock logo'): Promise<string> {
  const id = newId();
  await write((tx) =>
    tx.insert(tables.documents).values({
      id,
      buildId: build.id,
      kind: 'drawing',
      title,
      objectKey: `document/${id}`,
      sizeBytes: 1000,
      sha256: id.padEnd(64, '0'),
      state: 'ready',
      uploaderId: uploader.id,
      uploadKey: randomUUID(),
      expiresAt: NOW_MS,
      createdAt: NOW_MS,
    }),
  );
  return id;
}

/** A drawing put before the owner, to be signed in eleven days; nothing waits for it unless told otherwise. */
export async function askDrawing(build: TestBuild, rep: Viewer, over: Partial<SignOffWish> = {}, atMs = NOW_MS) {
  const documentId = over.documentId ?? (await makeDocument(build, rep));
  const wish: SignOffWish = {
    kind: 'drawing',
    documentId,
    title: 'Headstock logo, drawing 1',
    message: 'Please look at the letters.',
    dueOn: '2026-12-12',
    blocksStageKey: null,
    contentHash: documentId.padEnd(64, '0'),
    ...over,
  };
  return write((tx) => askForSignOff(tx, rep, build, wish, atMs));
}
