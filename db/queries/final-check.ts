import { and, asc, desc, eq, inArray } from 'drizzle-orm';
import { recordEvent } from './audit';
import { touchDiary } from './builds';
import { unpassedLists } from './check-gate';
import { queueMail } from './outbox';
import { listOwnerIds } from './owners';
import { readProofSheet } from './proofs';
import { askForSignOff } from './sign-off-asking';
import { requireCan } from './standing';
import { db, write, type Db, type Tx } from '../client';
import { builds, buildStages, signOffs } from '../schema';
import { BadInput, Denied } from '@/lib/errors';
import { concededWords, openLines } from '@/lib/specs/proof';
import { contentHashOf } from '@/lib/specs/content-hash';
import type { ConcessionWish, Shipment } from '@/lib/validation/checks';
import type { Viewer } from '@/lib/viewer';

const facts = {
  readyAt: builds.readyAt,
  shippedAt: builds.shippedAt,
  shippedBy: builds.shippedBy,
  deliveredAt: builds.deliveredAt,
};

async function readFacts(reader: Db | Tx, buildId: string) {
  const [build] = await reader.select(facts).from(builds).where(eq(builds.id, buildId));
  if (!build) throw new Error('a reached build without a row');
  return build;
}

async function lastStageOf(reader: Db | Tx, buildId: string) {
  const [stage] = await reader
    .select({
      id: buildStages.id,
      key: buildStages.key,
      name: buildStages.name,
      startedAt: buildStages.startedAt,
      finishedAt: buildStages.finishedAt,
    })
    .from(buildStages)
    .where(eq(buildStages.buildId, buildId))
    .orderBy(desc(buildStages.position))
    .limit(1);
  return stage ?? null;
}

/** A newer version or a change that the owner has not answered: what would be checked is not what will be signed. */
async function pendingSpec(reader: Db | Tx, buildId: string): Promise<string | null> {
  const [pending] = await reader
    .select({ title: signOffs.title })
    .from(signOffs)
    .where(
      and(
        eq(signOffs.buildId, buildId),
        inArray(signOffs.kind, ['spec', 'change']),
        inArray(signOffs.state, ['asked', 'change_asked']),
      ),
    )
    .orderBy(asc(signOffs.askedAt))
    .limit(1);
  return pending?.title ?? null;
}

/** What keeps the final check from passing, each as a sentence, in the order in which it is mended. */
async function obstaclesOf(reader: Db | Tx, viewer: Viewer, buildId: string) {
  const [sheet, stage, pending] = await Promise.all([
    readProofSheet(reader, viewer, buildId),
    lastStageOf(reader, buildId),
    pendingSpec(reader, buildId),
  ]);
  const lists = stage ? await unpassedLists(reader, buildId, [stage]) : [];
  const open = openLines(sheet.lines).length;
  const obstacles = [
    !sheet.version && 'No version of the spec is signed yet. A rep sends one to the owner.',
    pending && `“${pending}” waits for the owner. It is signed, or taken back, first.`,
    open > 0 && `${open === 1 ? 'One signed item is' : `${open} signed items are`} still open.`,
    ...lists.map(({ name }) => `The list “${name}” is not passed yet.`),
    stage && stage.startedAt === null && `The build has not come to ${stage.name} yet.`,
  ].filter((sentence) => typeof sentence === 'string');
  return { sheet, stage, obstacles };
}

/** The final check of a build as staff see it: every signed item, what is in the way, and where it has got to since. */
export async function readFinalCheck(viewer: Viewer, orderNumber: string) {
  const build = await requireCan(viewer, 'build.finish', orderNumber);
  const [found, since] = await Promise.all([obstaclesOf(db(), viewer, build.id), readFacts(db(), build.id)]);
  return { ...found, ...since };
}

export type FinalCheck = Awaited<ReturnType<typeof readFinalCheck>>;

/**
 * Passes the final check: the build is ready, its last stage ends, its owner is told. Passing twice is passing once.
 * @throws OutOfReach, Denied, or BadInput with what is in the way
 */
export function passFinalCheck(viewer: Viewer, orderNumber: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'build.finish', orderNumber, tx);
    if ((await readFacts(tx, build.id)).readyAt !== null) return;
    const { stage, obstacles } = await obstaclesOf(tx, viewer, build.id);
    if (!stage || obstacles.length > 0) throw new BadInput({ check: obstacles.join(' ') });
    await tx.update(builds).set({ readyAt: nowMs }).where(eq(builds.id, build.id));
    await tx.update(buildStages).set({ finishedAt: nowMs }).where(eq(buildStages.id, stage.id));
    await recordEvent(tx, { actorId: viewer.id, action: 'final_check_passed', buildId: build.id }, nowMs);
    await tellOwners(tx, 'ready', build.id, nowMs);
    await touchDiary(tx, build.id);
  });
}

async function tellOwners(tx: Tx, kind: 'ready' | 'shipped', buildId: string, nowMs: number): Promise<void> {
  for (const userId of await listOwnerIds(tx, buildId))
    await queueMail(
      tx,
      { kind, userId, about: { buildId }, dedupeKey: `${kind}/${buildId}/${userId}/${nowMs}` },
      nowMs,
    );
}

/** The carrier and the number as the owner reads them. */
const shippedWords = ({ carrier, number }: Pick<Shipment, 'carrier' | 'number'>) =>
  [carrier, number].filter(Boolean).join(', ');

/**
 * Writes down who carries the build; the first time it tells the owner, later it corrects the words.
 * @throws OutOfReach, Denied, also while the final check has not passed
 */
export function shipBuild(viewer: Viewer, { orderNumber, ...by }: Shipment, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'build.ship', orderNumber, tx);
    const { readyAt, shippedAt } = await readFacts(tx, build.id);
    if (readyAt === null)
      throw new Denied('conflict', 'The final check comes first: nothing is shipped before it passes.');
    const shippedBy = shippedWords(by);
    await tx
      .update(builds)
      .set({ shippedBy, shippedAt: shippedAt ?? nowMs })
      .where(eq(builds.id, build.id));
    await recordEvent(tx, { actorId: viewer.id, action: 'shipped', buildId: build.id, reason: shippedBy }, nowMs);
    if (shippedAt === null) await tellOwners(tx, 'shipped', build.id, nowMs);
    await touchDiary(tx, build.id);
  });
}

/** The build has arrived. Marking it twice is marking it once. @throws OutOfReach, Denied, also before it was shipped */
export function deliverBuild(viewer: Viewer, orderNumber: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'build.ship', orderNumber, tx);
    const { shippedAt, deliveredAt } = await readFacts(tx, build.id);
    if (deliveredAt !== null) return;
    if (shippedAt === null) throw new Denied('conflict', 'Write down how it was shipped first.');
    await tx.update(builds).set({ deliveredAt: nowMs }).where(eq(builds.id, build.id));
    await recordEvent(tx, { actorId: viewer.id, action: 'delivered', buildId: build.id }, nowMs);
    await touchDiary(tx, build.id);
  });
}

/**
 * Asks the owner to let one item pass as it came out, with what was signed and measured word for word.
 * @returns the sign-off's id
 * @throws OutOfReach, Denied, or BadInput for an item that needs none
 */
export function askConcession(viewer: Viewer, wish: ConcessionWish, nowMs: number): Promise<string> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'sign_off.ask', wish.orderNumber, tx);
    const { lines } = await readProofSheet(tx, viewer, build.id);
    const line = lines.find(({ item }) => item.key === wish.itemKey);
    if (!line)
      throw new BadInput({ itemKey: 'That item is not in the version the owner signed. Choose one from the list.' });
    if (openLines([line]).length === 0)
      throw new BadInput({ itemKey: 'That item needs no concession: it is proven, or the owner has let it pass.' });
    const concession = { ...concededWords(line), reason: wish.reason };
    const subject = { kind: 'concession', itemKey: wish.itemKey, concession } as const;
    const asked = {
      ...subject,
      title: `${line.item.label}, as it came out`,
      message: '',
      dueOn: wish.dueOn,
      blocksStageKey: null,
      contentHash: contentHashOf({ itemKey: wish.itemKey, ...concession }),
    };
    return askForSignOff(tx, viewer, build, asked, nowMs);
  });
}
