import { and, asc, eq } from 'drizzle-orm';
import type { EnteredBuild } from './enter-build';
import { measuredOn, type Miss } from './measured';
import { benchNotes } from './notes';
import { DAY_MS } from './timeline';
import type { Tx } from '../client';
import { readProofSheet } from '../queries/proofs';
import { storeReadings, unscopedBench } from '../queries/readings';
import { buildStages, entries, signOffs } from '../schema';
import { concededWords } from '@/lib/specs/proof';
import { contentHashOf } from '@/lib/specs/content-hash';

/** What came out wrong: one is still open, the other was let pass by its owner. */
const misses: Record<string, Miss & { reason?: string }> = {
  'Q-2420': { itemKey: 'last_fret_width', share: 1.8 },
  'Q-2422': {
    itemKey: 'neck_depth_12',
    share: -1.4,
    reason: 'The plane went a hair deeper than asked. Building the neck again takes six weeks; it plays as you hoped.',
  },
};

/** Readings and proof on the pages of these builds, and the concession for one that came out wrong. */
export async function enterReadings(tx: Tx, builds: EnteredBuild[], nowMs: number): Promise<void> {
  for (const build of builds) {
    await enterReadingsOf(tx, build);
    await enterConcession(tx, build, nowMs);
  }
}

async function enterReadingsOf(tx: Tx, { id: buildId, plan }: EnteredBuild): Promise<void> {
  const pages = await pagesOf(tx, buildId);
  const bench = await unscopedBench(tx, buildId);
  const orderIndex = Number(plan.orderNumber.slice(2));
  for (const { stage, note, isOnly, isLast, ...page } of pages.flatMap((one) => placed(one, pages, plan))) {
    const place = { orderIndex, stageKey: stage.key, note, isOnly };
    const readings = measuredOn(place, bench, misses[plan.orderNumber] ?? null);
    const isShown = isLast && stage.finishedAt !== null;
    const shown = bench.items.filter(({ kind, provenAt }) => isShown && kind !== 'measure' && provenAt === stage.key);
    const carried = { readings, proves: shown.map(({ key }) => key) };
    await storeReadings(tx, { viewer: { id: page.authorId }, buildId, entryId: page.id }, carried, page.datedAt);
  }
}

/** The pages that readers see, oldest first: those for the shop only measure nothing. */
function pagesOf(tx: Tx, buildId: string) {
  return tx
    .select({
      id: entries.id,
      authorId: entries.authorId,
      datedAt: entries.datedAt,
      text: entries.bodyText,
      stageKey: buildStages.key,
    })
    .from(entries)
    .innerJoin(buildStages, eq(buildStages.id, entries.stageId))
    .where(and(eq(entries.buildId, buildId), eq(entries.audience, 'buyer')))
    .orderBy(asc(entries.datedAt), asc(entries.id));
}

type Page = Awaited<ReturnType<typeof pagesOf>>[number];

/** Where a page stands among those of its stage; one of other words than the bench's notes is left out. */
function placed(page: Page, pages: Page[], { stages }: EnteredBuild['plan']) {
  const stage = stages.find(({ key }) => key === page.stageKey);
  const note = stage ? benchNotes[stage.key].indexOf(page.text) : -1;
  if (!stage || note < 0) return [];
  const ofStage = pages.filter(({ stageKey }) => stageKey === page.stageKey);
  return [{ ...page, stage, note, isOnly: ofStage.length === 1, isLast: ofStage.at(-1) === page }];
}

/** Signed by the owner some days after the value was measured. */
async function enterConcession(tx: Tx, { id: buildId, plan, owner, rep }: EnteredBuild, nowMs: number): Promise<void> {
  const miss = misses[plan.orderNumber];
  if (!miss?.reason) return;
  const { lines } = await readProofSheet(tx, { ...rep, department: null }, buildId);
  const line = lines.find(({ item }) => item.key === miss.itemKey);
  if (line?.state !== 'out_of_tolerance') return;
  const concession = { ...concededWords(line), reason: miss.reason };
  await tx.insert(signOffs).values({
    buildId,
    kind: 'concession',
    title: `${line.item.label}, as it came out`,
    message: 'I would rather tell you than hide it. Have a look, and sign if you can live with it.',
    itemKey: miss.itemKey,
    concession,
    contentHash: contentHashOf({ itemKey: miss.itemKey, ...concession }),
    dueOn: new Date(nowMs - 2 * DAY_MS).toISOString().slice(0, 10),
    state: 'signed',
    askedById: rep.id,
    askedAt: nowMs - 9 * DAY_MS,
    answeredById: owner.id,
    answeredAt: nowMs - 7 * DAY_MS,
    signedName: owner.name,
  });
}
