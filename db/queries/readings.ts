import { and, asc, desc, eq, inArray, sql } from 'drizzle-orm';
import { unscopedSignedVersion } from './proofs';
import { requireCan } from './standing';
import { db, type Db, type Tx } from '../client';
import { entryIsVisible } from '../scope';
import { builds, buildStages, entries, materials, proofs, readings, specVersions, users } from '../schema';
import { movementOf, type Movement } from '@/lib/craft/materials';
import { BadInput } from '@/lib/errors';
import { boardsOf, type Board } from '@/lib/readings/board-movement';
import { judgeReading } from '@/lib/readings/judge';
import { benchItemOf, type BenchBuild } from '@/lib/readings/plan';
import type { NewReading } from '@/lib/readings/reading';
import type { SpecDocument } from '@/lib/specs/document';
import type { Viewer } from '@/lib/viewer';

type Reader = Db | Tx;

/** The spec a build is made to: the version signed last, else the one sent last; null before that. The caller has asked. */
async function unscopedSpec(reader: Reader, buildId: string): Promise<SpecDocument | null> {
  const signed = await unscopedSignedVersion(reader, buildId);
  if (signed) return signed.document;
  const [sent] = await reader
    .select({ document: specVersions.document })
    .from(specVersions)
    .where(eq(specVersions.buildId, buildId))
    .orderBy(desc(specVersions.number))
    .limit(1);
  return sent?.document ?? null;
}

/** No viewer: the caller has asked. */
export async function unscopedBench(reader: Reader, buildId: string): Promise<BenchBuild> {
  const [build] = await reader
    .select({ scaleLengthIn: builds.scaleLengthIn })
    .from(builds)
    .where(eq(builds.id, buildId));
  if (!build) throw new Error('a reached build without a row');
  const document = await unscopedSpec(reader, buildId);
  return { ...build, items: document?.items.map(benchItemOf) ?? [], ...(await coatsOf(reader, buildId)) };
}

async function coatsOf(reader: Reader, buildId: string): Promise<Pick<BenchBuild, 'coats' | 'lastCoatAtMs'>> {
  const rows = await reader
    .select({ value: readings.value, takenAt: entries.datedAt })
    .from(readings)
    .innerJoin(entries, eq(entries.id, readings.entryId))
    .where(
      and(
        eq(readings.buildId, buildId),
        sql`${readings.value} ->> 'kind' = 'coat'`,
        sql`${entries.state} <> 'withdrawn'`,
      ),
    )
    .orderBy(asc(entries.datedAt), asc(readings.position));
  const coats = rows.flatMap(({ value }) => (value.kind === 'coat' ? [value] : []));
  return { coats, lastCoatAtMs: rows.at(-1)?.takenAt ?? null };
}

/** What the bench's form measures a build against. @throws OutOfReach, or Denied for who does not post */
export async function findBench(viewer: Viewer, orderNumber: string): Promise<BenchBuild> {
  const build = await requireCan(viewer, 'entry.post', orderNumber);
  return unscopedBench(db(), build.id);
}

type Carrying = { viewer: Pick<Viewer, 'id'>; buildId: string; entryId: string };
type Carried = { readings: NewReading[]; proves: string[] };

/**
 * Stores what an entry carries, in the transaction of the entry. An item that was measured is shown by its entry too.
 * @throws BadInput for a reading that cannot be meant, or an item that the spec does not have
 */
export async function storeReadings(tx: Tx, at: Carrying, carried: Carried, nowMs: number): Promise<void> {
  if (carried.readings.length === 0 && carried.proves.length === 0) return;
  const build = await unscopedBench(tx, at.buildId);
  const rows = carried.readings.map((reading, position) => {
    const row = readingRow(at, reading, position, build);
    // Two coats of one entry lie on each other.
    if (row.value.kind === 'coat') build.coats.push(row.value);
    return row;
  });
  if (rows.length > 0) await tx.insert(readings).values(rows);
  const keys = new Set([...carried.proves, ...carried.readings.flatMap(({ itemKey }) => itemKey ?? [])]);
  const links = [...keys].map((itemKey) => proofRow(at, itemKey, build, nowMs));
  if (links.length > 0) await tx.insert(proofs).values(links).onConflictDoNothing();
}

function readingRow({ buildId, entryId }: Carrying, reading: NewReading, position: number, build: BenchBuild) {
  const { value, itemKey } = reading;
  const judged = judgeReading(reading, build);
  if (!judged.ok) throw new BadInput({ [`readings.${position}`]: judged.message });
  const { shown } = judged;
  const named = value.kind === 'measure' ? { ...value, name: shown.label } : value;
  return { buildId, entryId, position, itemKey, value: named, shown };
}

function proofRow({ viewer, buildId, entryId }: Carrying, itemKey: string, { items }: BenchBuild, nowMs: number) {
  const item = items.find(({ key }) => key === itemKey);
  if (!item)
    throw new BadInput({
      proves:
        'The spec has changed since this was written: an item you ticked is no longer in it. Reload the page, and post again.',
    });
  return { buildId, entryId, itemKey, label: item.label, createdById: viewer.id, createdAt: nowMs };
}

/** Most readings of one build that are drawn; a build comes to a few dozen. */
const MOST_READINGS = 1000;

/** The readings of the entries this viewer may read, oldest first. @throws OutOfReach */
export async function listReadings(viewer: Viewer, orderNumber: string) {
  const build = await requireCan(viewer, 'diary.read', orderNumber);
  return db()
    .select({
      id: readings.id,
      entryId: readings.entryId,
      takenAt: entries.datedAt,
      stage: buildStages.name,
      author: users.name,
      value: readings.value,
      shown: readings.shown,
      itemKey: readings.itemKey,
    })
    .from(readings)
    .innerJoin(entries, eq(entries.id, readings.entryId))
    .innerJoin(buildStages, eq(buildStages.id, entries.stageId))
    .innerJoin(users, eq(users.id, entries.authorId))
    .where(and(eq(readings.buildId, build.id), entryIsVisible(viewer)))
    .orderBy(asc(entries.datedAt), asc(entries.id), asc(readings.position))
    .limit(MOST_READINGS);
}

export type ReadingRow = Awaited<ReturnType<typeof listReadings>>[number];

export type MovingBoard = Board & { movement: Movement | null };

/** The boards of the spec whose wood and width are named, and how that wood moves. @throws OutOfReach, or Denied for companions */
export async function listBoards(viewer: Viewer, orderNumber: string): Promise<MovingBoard[]> {
  const build = await requireCan(viewer, 'spec.read', orderNumber);
  const spec = await unscopedSpec(db(), build.id);
  const boards = spec ? boardsOf(spec) : [];
  if (boards.length === 0) return [];
  const rows = await db()
    .select({
      key: materials.key,
      radialCoefficient: materials.radialCoefficient,
      tangentialCoefficient: materials.tangentialCoefficient,
    })
    .from(materials)
    .where(
      inArray(
        materials.key,
        boards.map(({ materialKey }) => materialKey),
      ),
    );
  return boards.map((board) => {
    const row = rows.find(({ key }) => key === board.materialKey);
    return { ...board, movement: row ? movementOf(row) : null };
  });
}
