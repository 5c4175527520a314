import { and, desc, eq, isNotNull, isNull, sql } from 'drizzle-orm';
import type { EnteredBuild } from './enter-build';
import { DAY_MS } from './timeline';
import type { Tx } from '../client';
import { readProofSheet } from '../queries/proofs';
import { builds, buildStages, entries, proofs, signOffs } from '../schema';
import { contentHashOf } from '@/lib/specs/content-hash';
import { concededWords } from '@/lib/specs/proof';

const HOUR_MS = 3_600_000;

/** Of the builds in their final check the second has passed it, and the third is on its way. */
export async function enterReady(tx: Tx, [, ready, shipped]: EnteredBuild[], nowMs: number): Promise<void> {
  if (ready) await passed(tx, ready, nowMs - 20 * HOUR_MS, {});
  if (shipped)
    await passed(tx, shipped, nowMs - 2 * DAY_MS, {
      shippedAt: nowMs - DAY_MS,
      shippedBy: 'Harbour Freight Lines, HF 20417',
    });
}

async function passed(
  tx: Tx,
  build: EnteredBuild,
  readyAt: number,
  leaving: { shippedAt?: number; shippedBy?: string },
) {
  const { id } = build;
  await proveTheRest(tx, build, readyAt);
  await tx
    .update(builds)
    .set({ readyAt, ...leaving })
    .where(eq(builds.id, id));
  await tx
    .update(buildStages)
    .set({ finishedAt: sql`max(${readyAt}, ${buildStages.startedAt})` })
    .where(and(eq(buildStages.buildId, id), isNotNull(buildStages.startedAt), isNull(buildStages.finishedAt)));
}

/** What the last stage shows, its page of the diary shows. */
async function proveTheRest(tx: Tx, { id, rep }: EnteredBuild, atMs: number): Promise<void> {
  const [latest] = await tx
    .select({ id: entries.id })
    .from(entries)
    .where(and(eq(entries.buildId, id), eq(entries.audience, 'buyer')))
    .orderBy(desc(entries.datedAt))
    .limit(1);
  const { lines } = await readProofSheet(tx, { ...rep, department: null }, id);
  const rest = lines.filter(({ state, item }) => state === 'open' && item.kind !== 'measure');
  if (!latest || rest.length === 0) return;
  const links = rest.map(({ item: { key, label } }) => ({ itemKey: key, label }));
  await tx
    .insert(proofs)
    .values(links.map((link) => ({ ...link, buildId: id, entryId: latest.id, createdById: rep.id, createdAt: atMs })))
    .onConflictDoNothing();
}

/** The owner is asked to let pass what came out of tolerance on one build of the floor. */
export async function concessionToAsk(tx: Tx, onFloor: EnteredBuild[], nowMs: number): Promise<void> {
  const build = onFloor.find(({ plan }) => plan.orderNumber === 'Q-2420');
  if (!build) return;
  const { lines } = await readProofSheet(tx, { ...build.rep, department: null }, build.id);
  const line = lines.find(({ state }) => state === 'out_of_tolerance');
  if (!line) return;
  const concession = {
    ...concededWords(line),
    reason: 'It sits true under the strings. A new board would cost three weeks.',
  };
  const itemKey = line.item.key;
  await tx.insert(signOffs).values({
    buildId: build.id,
    kind: 'concession',
    title: `${line.item.label}, as it came out`,
    message: 'Have a look at the photo of it, and tell me whether you can live with it.',
    itemKey,
    concession,
    contentHash: contentHashOf({ itemKey, ...concession }),
    dueOn: new Date(nowMs + 5 * DAY_MS).toISOString().slice(0, 10),
    state: 'asked',
    askedById: build.rep.id,
    askedAt: nowMs - DAY_MS,
  });
}

/** Those that have gone: ready when their last stage ended; the latest say who carried them. */
export async function enterDeliveries(tx: Tx, delivered: EnteredBuild[], nowMs: number): Promise<void> {
  await tx
    .update(builds)
    .set({ readyAt: sql`${builds.deliveredAt}`, shippedAt: sql`${builds.deliveredAt}` })
    .where(isNotNull(builds.deliveredAt));
  for (const { id, plan } of delivered.filter((build) => build.plan.isFeatured)) {
    const readyAt = plan.deliveredAt ?? nowMs;
    const shippedAt = Math.min(readyAt + DAY_MS, nowMs - 2 * HOUR_MS);
    const deliveredAt = Math.min(readyAt + 3 * DAY_MS, nowMs - HOUR_MS);
    const shippedBy = `Harbour Freight Lines, HF ${plan.orderNumber.slice(2)}`;
    await tx.update(builds).set({ shippedAt, shippedBy, deliveredAt }).where(eq(builds.id, id));
  }
}
