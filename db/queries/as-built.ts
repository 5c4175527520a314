import { and, asc, eq, inArray, isNotNull, sql } from 'drizzle-orm';
import { listDrawings } from './documents';
import { ownerNameOf } from './owners';
import { mailJpegKey } from './photos';
import { readProofSheet } from './proofs';
import { requireCan } from './standing';
import { db } from '../client';
import { buildIsVisible, entryIsVisible, photoIsVisible } from '../scope';
import { builds, buildStages, entries, materials, photos, readings, shop, users } from '../schema';
import type { AsBuiltFacts, AsBuiltPhoto, SetUpTaken } from '@/lib/as-built/sheet';
import type { ProofLine } from '@/lib/specs/proof';
import type { Viewer } from '@/lib/viewer';

/** Photos one sheet shows at most: more would be no sheet but the diary. */
const MAX_PHOTOS = 400;

/**
 * Everything the as-built sheet of a build says, as this viewer may read it; null while no version of its spec is signed.
 * @throws OutOfReach, or Denied for companions
 */
export async function readAsBuilt(viewer: Viewer, orderNumber: string): Promise<AsBuiltFacts | null> {
  const build = await requireCan(viewer, 'spec.read', orderNumber);
  const { version, lines } = await readProofSheet(db(), viewer, build.id);
  if (!version) return null;
  const [facts, drawings, setUp, papers, shown] = await Promise.all([
    readFacts(build.id),
    listDrawings(viewer, orderNumber),
    listSetUp(viewer, build.id),
    listPapers(lines),
    listPhotos(viewer, build.id),
  ]);
  return { ...facts, version, lines, drawings, setUp, papers, photos: shown };
}

async function readFacts(buildId: string) {
  const [row] = await db()
    .select({
      shopName: shop.name,
      orderNumber: builds.orderNumber,
      instrument: builds.instrument,
      finishName: builds.finishName,
      finishHex: builds.finishHex,
      ownerName: ownerNameOf(builds.id),
      readyAt: builds.readyAt,
      shippedAt: builds.shippedAt,
      shippedBy: builds.shippedBy,
      deliveredAt: builds.deliveredAt,
    })
    .from(builds)
    .innerJoin(shop, eq(shop.id, 1))
    .where(eq(builds.id, buildId));
  if (!row) throw new Error('a reached build without a row');
  return row;
}

/** The lines of the set-up sheet that no spec item stands for, each as it was taken last. */
async function listSetUp(viewer: Viewer, buildId: string): Promise<SetUpTaken[]> {
  const rows = await db()
    .select({
      value: readings.value,
      shown: readings.shown,
      itemKey: readings.itemKey,
      datedAt: entries.datedAt,
      authorName: users.name,
    })
    .from(readings)
    .innerJoin(entries, eq(entries.id, readings.entryId))
    .innerJoin(users, eq(users.id, entries.authorId))
    .where(
      and(
        eq(readings.buildId, buildId),
        isNotNull(sql`${readings.value} ->> 'setupLine'`),
        isNotNull(readings.shown),
        entryIsVisible(viewer),
      ),
    )
    .orderBy(asc(entries.datedAt), asc(readings.position));
  const latest = new Map<string, SetUpTaken>();
  for (const { value, shown, itemKey, datedAt, authorName } of rows) {
    if (value.kind !== 'measure' || !value.setupLine || !shown || itemKey !== null) continue;
    const { label, figures, words } = shown;
    latest.set(value.setupLine, { key: value.setupLine, label, figures, words, datedAt, authorName });
  }
  return [...latest.values()];
}

async function listPapers(lines: ProofLine[]): Promise<string[]> {
  const keys = lines.flatMap(({ item }) => (item.kind === 'material' && item.materialKey ? [item.materialKey] : []));
  if (keys.length === 0) return [];
  const marked = await db()
    .select({ name: materials.name })
    .from(materials)
    .where(and(inArray(materials.key, keys), eq(materials.papersMayBeNeeded, true)))
    .orderBy(asc(materials.name));
  return marked.map(({ name }) => name);
}

/** Every photo of the diary that this viewer sees, oldest first. */
async function listPhotos(viewer: Viewer, buildId: string): Promise<AsBuiltPhoto[]> {
  const rows = await db()
    .select({
      id: photos.id,
      entryId: entries.id,
      outPrefix: photos.outPrefix,
      alt: photos.alt,
      widthPx: photos.widthPx,
      heightPx: photos.heightPx,
      datedAt: entries.datedAt,
      stageName: buildStages.name,
    })
    .from(photos)
    .innerJoin(builds, eq(builds.id, photos.buildId))
    .innerJoin(entries, eq(entries.id, photos.entryId))
    .innerJoin(buildStages, eq(buildStages.id, entries.stageId))
    .where(and(eq(photos.buildId, buildId), buildIsVisible(viewer), photoIsVisible(viewer)))
    .orderBy(asc(entries.datedAt), asc(entries.id), asc(photos.position))
    .limit(MAX_PHOTOS);
  return rows.flatMap(({ outPrefix, widthPx, heightPx, ...photo }) =>
    outPrefix === null
      ? []
      : [{ ...photo, jpegKey: mailJpegKey(outPrefix), widthPx: widthPx ?? 4, heightPx: heightPx ?? 3 }],
  );
}
