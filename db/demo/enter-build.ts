import type { PlannedEntry } from './diary';
import type { Cast, Person } from './people';
import type { LibraryPhoto } from './photo-library';
import type { PlannedBuild } from './plan';
import { DAY_MS } from './timeline';
import type { Tx } from '../client';
import { assignments, buildPeople, builds, buildStages, diaryEvents, diaryVisits, entries, photos } from '../schema';
import { newId } from '../schema/columns';

/** How long ago an owner last looked in. */
const SINCE_VISIT_MS = 6 * DAY_MS;

export type EnteredBuild = { id: string; plan: PlannedBuild; owner: Person; rep: Person; entryIds: string[] };

/** Enters one build with its stages, people and pages. */
export async function enterBuild(
  tx: Tx,
  plan: PlannedBuild,
  routeId: string,
  cast: Cast,
  pages: PlannedEntry[],
  nowMs: number,
): Promise<EnteredBuild> {
  const id = newId();
  const orderedAt = plan.stages[0]?.startedAt ?? 0;
  await tx.insert(builds).values({
    id,
    orderNumber: plan.orderNumber,
    instrument: plan.isArtist && plan.heldUntilAt ? 'Roe signature' : plan.instrument.name,
    finishName: plan.finish.name,
    finishHex: plan.finish.hex,
    scaleLengthIn: plan.instrument.scaleLengthIn,
    rack: plan.rack,
    routeId,
    releaseNeeded: plan.isArtist,
    heldUntilAt: plan.heldUntilAt,
    orderedAt,
    deliveredAt: plan.deliveredAt,
    diaryRevision: pages.length,
    createdAt: orderedAt,
  });
  const stageIds = await enterStages(tx, id, plan);
  const { owner, rep } = await enterStanding(tx, id, plan, cast, orderedAt);
  await tx.insert(diaryVisits).values({ buildId: id, userId: owner.id, visitedAt: nowMs - SINCE_VISIT_MS });
  const entryIds: string[] = [];
  for (const page of pages) entryIds.push(await enterPage(tx, id, stageIds[page.stagePosition] ?? '', page));
  return { id, plan, owner, rep, entryIds };
}

async function enterStages(tx: Tx, buildId: string, plan: PlannedBuild): Promise<string[]> {
  const rows = plan.stages.map((stage, index) => ({ id: newId(), buildId, position: index + 1, ...stage }));
  await tx.insert(buildStages).values(rows);
  return rows.map((row) => row.id);
}

async function enterStanding(tx: Tx, buildId: string, plan: PlannedBuild, cast: Cast, startedAt: number) {
  const owner = (plan.isArtist ? cast.artists : [...cast.buyers, ...cast.furtherBuyers])[plan.owner] ?? cast.companion;
  const orderIndex = Number(plan.orderNumber.slice(2));
  const rep = cast.reps[plan.isArtist ? 0 : orderIndex % cast.reps.length] ?? cast.admin;
  await tx.insert(buildPeople).values({ buildId, userId: owner.id, standing: 'owner' });
  if (plan.orderNumber === 'Q-2417')
    await tx.insert(buildPeople).values({ buildId, userId: cast.companion.id, standing: 'companion' });
  if (plan.deliveredAt !== null) return { owner, rep };
  const cleared = plan.isArtist;
  const crew = cast.builders.filter((_, index) => index < 8 || orderIndex % 2 === 0);
  const team = cleared ? crew.slice(0, 6) : crew;
  const rows = [rep, ...team].map((person, index) => ({
    buildId,
    userId: person.id,
    cleared,
    startedAt: startedAt + index,
  }));
  await tx.insert(assignments).values(rows);
  return { owner, rep };
}

async function enterPage(tx: Tx, buildId: string, stageId: string, page: PlannedEntry): Promise<string> {
  const id = newId();
  await tx.insert(entries).values({
    id,
    buildId,
    stageId,
    authorId: page.author.id,
    body: page.body,
    bodyText: page.text,
    audience: page.audience,
    state: 'published',
    datedAt: page.datedAt,
    idempotencyKey: `demo-${id}`,
    createdAt: page.datedAt,
  });
  if (page.audience === 'buyer') await tx.insert(diaryEvents).values({ buildId, entryId: id, at: page.datedAt });
  for (const [position, photo] of page.photos.entries()) await enterPhoto(tx, buildId, id, page, photo, position);
  return id;
}

async function enterPhoto(
  tx: Tx,
  buildId: string,
  entryId: string,
  page: PlannedEntry,
  photo: LibraryPhoto,
  position: number,
) {
  const id = newId();
  await tx.insert(photos).values({
    id,
    buildId,
    entryId,
    position,
    uploaderId: page.author.id,
    uploadKey: `demo-${id}`,
    state: 'ready',
    label: 'bench.jpg',
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
    expiresAt: page.datedAt,
    createdAt: page.datedAt,
  });
}
