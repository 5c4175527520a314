import { createHash, randomBytes } from 'node:crypto';
import { drawDrawing } from './drawings';
import type { EnteredBuild } from './enter-build';
import type { LibraryPhoto, PhotoLibrary } from './photo-library';
import { signOffStory, type Asked } from './sign-off-stories';
import { DAY_MS } from './timeline';
import type { Tx } from '../client';
import { variantKey } from '../queries/photos';
import { documents, photos, signOffs } from '../schema';
import { newId } from '../schema/columns';
import { PDF_TYPE } from '@/lib/documents/limits';
import { dayOf } from '@/lib/schedule/calendar';
import { addDays } from '@/lib/schedule/days';
import { readObject, storeObject } from '@/lib/storage';

/** What is signed lies in the store before its rows are entered: nothing but the database is touched in a write. */
type Stored = { sha256: string; pdf?: { key: string; sizeBytes: number }; photo?: LibraryPhoto };
export type PlannedSignOff = { build: EnteredBuild; asked: Asked; stored: Stored };

const ZONE = 'America/New_York';
const HOUR_MS = 3_600_000;
const sha256Of = (bytes: Buffer) => createHash('sha256').update(bytes).digest('hex');

/** Draws everything that builds of the floor were sent to be signed. */
export async function planSignOffs(builds: EnteredBuild[], library: PhotoLibrary): Promise<PlannedSignOff[]> {
  const planned: PlannedSignOff[] = [];
  for (const [index, build] of builds.entries()) {
    const story = signOffStory(build.plan, index);
    for (const asked of story) planned.push({ build, asked, stored: await store(build, asked, library) });
  }
  return planned;
}

async function store({ plan }: EnteredBuild, { thing, title }: Asked, library: PhotoLibrary): Promise<Stored> {
  if (thing === 'sample') {
    const look = { finish: plan.finish, body: plan.instrument.body };
    const [photo] = await library.ofStage('colour-clear', look, 1, 1);
    if (!photo) throw new RangeError('no picture of a colour');
    const widest = photo.widthsPx.at(-1) ?? photo.widthPx;
    return { sha256: sha256Of(await readObject(variantKey(photo.outPrefix, widest))), photo };
  }
  const revision = Number(/\d+$/.exec(title)?.[0] ?? 1);
  const { orderNumber, instrument } = plan;
  const bytes = drawDrawing(thing, revision, { orderNumber, title, instrument: instrument.name });
  const key = `document/${randomBytes(24).toString('base64url')}`;
  await storeObject(key, bytes, PDF_TYPE);
  return { sha256: sha256Of(bytes), pdf: { key, sizeBytes: bytes.length } };
}

/** Enters drawings and samples with what their owners said. Spec versions are entered with their specs. */
export async function enterSignOffs(tx: Tx, planned: PlannedSignOff[], nowMs: number): Promise<void> {
  let earlier: { buildId: string; id: string } | null = null;
  for (const { build, asked, stored } of planned) {
    const documentId = await enterDocument(tx, build, asked, stored, nowMs);
    const replacesId: string | null = asked.replaces && earlier?.buildId === build.id ? earlier.id : null;
    const id = await enterSignOff(tx, build, asked, { documentId, sha256: stored.sha256, replacesId }, nowMs);
    earlier = { buildId: build.id, id };
  }
}

async function enterDocument(tx: Tx, build: EnteredBuild, asked: Asked, stored: Stored, nowMs: number) {
  const id = newId();
  const createdAt = nowMs + asked.askedDay * DAY_MS;
  await tx.insert(documents).values({
    id,
    buildId: build.id,
    kind: asked.thing === 'sample' ? 'sample' : 'drawing',
    title: asked.title,
    itemKey: asked.itemKey,
    photoId: stored.photo ? await enterPhoto(tx, build, stored.photo, createdAt) : null,
    objectKey: stored.pdf?.key ?? null,
    sizeBytes: stored.pdf?.sizeBytes ?? null,
    sha256: stored.sha256,
    state: 'ready',
    uploaderId: build.rep.id,
    uploadKey: `demo-${id}`,
    expiresAt: createdAt,
    createdAt,
  });
  return id;
}

async function enterPhoto(tx: Tx, build: EnteredBuild, photo: LibraryPhoto, createdAt: number): Promise<string> {
  const id = newId();
  await tx.insert(photos).values({
    id,
    buildId: build.id,
    uploaderId: build.rep.id,
    uploadKey: `demo-${id}`,
    state: 'ready',
    label: 'sample.jpg',
    contentType: 'image/jpeg',
    sizeBytes: photo.sizeBytes,
    sha256: '',
    originalKey: photo.keptKey,
    outPrefix: photo.outPrefix,
    widthPx: photo.widthPx,
    heightPx: photo.heightPx,
    blurDataUrl: photo.blurDataUrl,
    variantWidthsPx: photo.widthsPx.join(','),
    alt: photo.alt,
    expiresAt: createdAt,
    createdAt,
  });
  return id;
}

type Link = { documentId: string; sha256: string; replacesId: string | null };

async function enterSignOff(tx: Tx, build: EnteredBuild, asked: Asked, link: Link, nowMs: number): Promise<string> {
  const id = newId();
  // Nothing was sent before it was ordered.
  const orderedAt = build.plan.stages[0]?.startedAt ?? 0;
  const askedAt = Math.max(orderedAt + HOUR_MS, nowMs + asked.askedDay * DAY_MS - 2 * HOUR_MS);
  const answerAt = asked.answerDay === undefined ? null : nowMs + asked.answerDay * DAY_MS - HOUR_MS;
  const answered = answerAt === null ? null : Math.max(askedAt + HOUR_MS, answerAt);
  const ahead = build.plan.stages.find(({ startedAt }) => startedAt === null);
  await tx.insert(signOffs).values({
    id,
    buildId: build.id,
    kind: asked.thing === 'sample' ? 'sample' : 'drawing',
    title: asked.title,
    message: asked.message,
    documentId: link.documentId,
    itemKey: asked.itemKey,
    contentHash: link.sha256,
    replacesId: link.replacesId,
    dueOn: addDays(dayOf(nowMs, ZONE), asked.dueDay),
    blocksStageKey: asked.blocks ? (ahead?.key ?? null) : null,
    state: asked.state,
    askedById: build.rep.id,
    askedAt,
    answeredById: answered === null ? null : build.owner.id,
    answeredAt: answered,
    signedName: asked.state === 'signed' ? build.owner.name : null,
    answer: asked.answer ?? null,
    remindedAt: asked.state === 'asked' && asked.dueDay <= 2 ? nowMs + (asked.dueDay - 2) * DAY_MS : null,
  });
  return id;
}
