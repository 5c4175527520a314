import { and, asc, count, eq, inArray, isNull, sql } from 'drizzle-orm';
import { recordEvent } from './audit';
import { touchDiary } from './builds';
import { storeReadings } from './readings';
import { isUnbound } from './photos';
import { askForRelease } from './release-mail';
import { startStage } from './stages';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { buildIsVisible, entryIsVisible } from '../scope';
import { buildPeople, builds, buildStages, diaryEvents, entries, mailSettings, photos, users } from '../schema';
import { can } from '@/lib/access';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import type { EditedEntry, NewEntry } from '@/lib/validation/entries';
import type { Viewer } from '@/lib/viewer';

export type PostedEntry = { id: string; state: 'held' | 'published' | 'withdrawn'; repeated: boolean };

/**
 * Posts one entry with its photos and readings, once, however often the same idempotency key arrives.
 * @throws OutOfReach, Denied, or BadInput for a stage, photo, reading or proof that does not belong here
 */
export function postEntry(viewer: Viewer, entry: NewEntry, nowMs: number): Promise<PostedEntry> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'entry.post', entry.orderNumber, tx);
    const [earlier] = await tx
      .select({ id: entries.id, state: entries.state })
      .from(entries)
      .where(and(eq(entries.authorId, viewer.id), eq(entries.idempotencyKey, entry.idempotencyKey)));
    if (earlier) return { ...earlier, repeated: true };
    await requireStage(tx, build.id, entry.stageId);
    const state = entry.audience === 'buyer' && (await mustWait(tx, viewer, build.id)) ? 'held' : 'published';
    const [posted] = await tx
      .insert(entries)
      .values({
        buildId: build.id,
        stageId: entry.stageId,
        authorId: viewer.id,
        body: JSON.stringify(entry.note.doc),
        bodyText: entry.note.text,
        audience: entry.audience,
        state,
        datedAt: nowMs,
        createdAt: nowMs,
        idempotencyKey: entry.idempotencyKey,
      })
      .returning({ id: entries.id, state: entries.state });
    if (!posted) throw new Error('an insert without a row');
    await attachPhotos(tx, viewer, build.id, posted.id, entry.photos);
    await storeReadings(tx, { viewer, buildId: build.id, entryId: posted.id }, entry, nowMs);
    if (entry.startStage) await startStage(tx, { buildId: build.id, stageId: entry.stageId, byId: viewer.id }, nowMs);
    if (state === 'held') await askForRelease(tx, { id: posted.id, buildId: build.id, revision: 1 }, nowMs);
    if (state === 'published' && entry.audience === 'buyer') await tellReaders(tx, build.id, posted.id, nowMs);
    await touchDiary(tx, build.id);
    return { ...posted, repeated: false };
  });
}

async function requireStage(tx: Tx, buildId: string, stageId: string): Promise<void> {
  const [stage] = await tx
    .select({ id: buildStages.id })
    .from(buildStages)
    .where(and(eq(buildStages.id, stageId), eq(buildStages.buildId, buildId)));
  if (!stage) throw new BadInput({ stageId: 'That stage is not on this build’s route. Choose one from the list.' });
}

/** Where a rep releases what the buyer reads, a builder's entry is held. */
async function mustWait(tx: Tx, viewer: Viewer, buildId: string): Promise<boolean> {
  if (can(viewer.role, 'assigned', 'entry.release')) return false;
  const [build] = await tx.select({ releaseNeeded: builds.releaseNeeded }).from(builds).where(eq(builds.id, buildId));
  return build?.releaseNeeded ?? true;
}

async function attachPhotos(
  tx: Tx,
  viewer: Viewer,
  buildId: string,
  entryId: string,
  chosen: NewEntry['photos'],
): Promise<void> {
  for (const [position, { id, alt }] of chosen.entries()) {
    const attached = await tx
      .update(photos)
      .set({ entryId, position, alt })
      .where(
        and(
          eq(photos.id, id),
          eq(photos.buildId, buildId),
          eq(photos.uploaderId, viewer.id),
          eq(photos.state, 'ready'),
          isNull(photos.entryId),
          isUnbound,
        ),
      )
      .returning({ id: photos.id });
    if (attached.length === 0) {
      throw new BadInput({
        photos: `Photo ${position + 1} has not arrived whole. Wait for it, send it again, or leave it out.`,
      });
    }
  }
}

/** Puts an entry on the list that digests are written from, and wakes those who want mail at once. */
export async function tellReaders(tx: Tx, buildId: string, entryId: string, nowMs: number): Promise<void> {
  await tx.insert(diaryEvents).values({ buildId, entryId, at: nowMs });
  const readers = tx.select({ id: buildPeople.userId }).from(buildPeople).where(eq(buildPeople.buildId, buildId));
  await tx
    .update(mailSettings)
    .set({ nextDigestAt: nowMs })
    .where(and(eq(mailSettings.cadence, 'at_once'), inArray(mailSettings.userId, readers)));
}

async function requireOwnEntry(tx: Tx, viewer: Viewer, entryId: string) {
  const [entry] = await tx
    .select({
      id: entries.id,
      buildId: entries.buildId,
      orderNumber: builds.orderNumber,
      authorId: entries.authorId,
      audience: entries.audience,
      state: entries.state,
      revision: entries.revision,
    })
    .from(entries)
    .innerJoin(builds, eq(builds.id, entries.buildId))
    .where(and(eq(entries.id, entryId), buildIsVisible(viewer), entryIsVisible(viewer)));
  if (!entry) throw new OutOfReach();
  await requireCan(viewer, entry.authorId === viewer.id ? 'entry.edit_own' : 'entry.edit_any', entry.orderNumber, tx);
  return entry;
}

/** An entry as its editor opens it. @throws OutOfReach or Denied */
export async function requireEditableEntry(viewer: Viewer, entryId: string) {
  const [entry] = await db()
    .select({
      id: entries.id,
      orderNumber: builds.orderNumber,
      instrument: builds.instrument,
      finishHex: builds.finishHex,
      body: entries.body,
      audience: entries.audience,
      state: entries.state,
      revision: entries.revision,
      authorId: entries.authorId,
      authorName: users.name,
      stageName: buildStages.name,
    })
    .from(entries)
    .innerJoin(builds, eq(builds.id, entries.buildId))
    .innerJoin(buildStages, eq(buildStages.id, entries.stageId))
    .innerJoin(users, eq(users.id, entries.authorId))
    .where(and(eq(entries.id, entryId), buildIsVisible(viewer), entryIsVisible(viewer)));
  if (!entry) throw new OutOfReach();
  await requireCan(viewer, entry.authorId === viewer.id ? 'entry.edit_own' : 'entry.edit_any', entry.orderNumber);
  return entry;
}

/**
 * Saves an edit made on top of `revision`.
 * @throws Denied 'conflict' when somebody saved in between: theirs stays, and the editor keeps what was typed
 */
export function editEntry(
  viewer: Viewer,
  entryId: string,
  edit: EditedEntry,
  nowMs: number,
): Promise<{ revision: number }> {
  return write(async (tx) => {
    const entry = await requireOwnEntry(tx, viewer, entryId);
    // What a rep released were other words: these wait for a release of their own.
    const waits = entry.audience === 'buyer' && (await mustWait(tx, viewer, entry.buildId));
    const [saved] = await tx
      .update(entries)
      .set({
        state: waits ? 'held' : entry.state,
        body: JSON.stringify(edit.note.doc),
        bodyText: edit.note.text,
        editedAt: nowMs,
        revision: sql`${entries.revision} + 1`,
      })
      .where(and(eq(entries.id, entry.id), eq(entries.revision, edit.revision)))
      .returning({ revision: entries.revision });
    if (!saved) {
      throw new Denied(
        'conflict',
        'Somebody saved this entry while you were writing. Their words are kept, and yours are still here: copy them, reload, and put them in again.',
      );
    }
    if (waits) await askForRelease(tx, { id: entry.id, buildId: entry.buildId, revision: saved.revision }, nowMs);
    await touchDiary(tx, entry.buildId);
    return saved;
  });
}

/** Takes an entry out of every diary; it stays in the record. */
export function withdrawEntry(viewer: Viewer, entryId: string, nowMs: number): Promise<string> {
  return write(async (tx) => {
    const entry = await requireOwnEntry(tx, viewer, entryId);
    await tx.update(entries).set({ state: 'withdrawn', editedAt: nowMs }).where(eq(entries.id, entry.id));
    await touchDiary(tx, entry.buildId);
    return entry.orderNumber;
  });
}

/** Lets a held entry go to the buyer, dated now. Releasing twice is releasing once. */
export function releaseEntry(viewer: Viewer, entryId: string, nowMs: number): Promise<string> {
  return write(async (tx) => {
    const [entry] = await tx
      .select({ id: entries.id, buildId: entries.buildId, orderNumber: builds.orderNumber })
      .from(entries)
      .innerJoin(builds, eq(builds.id, entries.buildId))
      .where(and(eq(entries.id, entryId), buildIsVisible(viewer), entryIsVisible(viewer)));
    if (!entry) throw new OutOfReach();
    await requireCan(viewer, 'entry.release', entry.orderNumber, tx);
    const released = await tx
      .update(entries)
      .set({ state: 'published', datedAt: nowMs })
      .where(and(eq(entries.id, entry.id), eq(entries.state, 'held')))
      .returning({ id: entries.id });
    if (released.length === 0) return entry.orderNumber;
    await tellReaders(tx, entry.buildId, entry.id, nowMs);
    await touchDiary(tx, entry.buildId);
    const event = {
      actorId: viewer.id,
      action: 'entry_released',
      buildId: entry.buildId,
      subjectId: entry.id,
    } as const;
    await recordEvent(tx, event, nowMs);
    return entry.orderNumber;
  });
}

/** The entries that wait for the viewer to release them, the oldest first. */
export async function listHeldEntries(viewer: Viewer) {
  if (!can(viewer.role, 'assigned', 'entry.release')) return [];
  return db()
    .select({
      id: entries.id,
      orderNumber: builds.orderNumber,
      instrument: builds.instrument,
      author: users.name,
      datedAt: entries.datedAt,
      text: entries.bodyText,
    })
    .from(entries)
    .innerJoin(builds, eq(builds.id, entries.buildId))
    .innerJoin(users, eq(users.id, entries.authorId))
    .where(and(eq(entries.state, 'held'), buildIsVisible(viewer)))
    .orderBy(asc(entries.datedAt), asc(entries.id))
    .limit(20);
}

/** How many entries wait for the viewer to release them. */
export async function countHeldEntries(viewer: Viewer): Promise<number> {
  if (!can(viewer.role, 'assigned', 'entry.release')) return 0;
  const [row] = await db()
    .select({ n: count() })
    .from(entries)
    .innerJoin(builds, eq(builds.id, entries.buildId))
    .where(and(eq(entries.state, 'held'), buildIsVisible(viewer)));
  return row?.n ?? 0;
}
