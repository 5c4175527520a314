import { and, asc, desc, eq, gt, inArray, isNull, lt, sql } from 'drizzle-orm';
import { unpassedLists } from './check-gate';
import type { Tx } from '../client';
import { builds, buildStages, signOffs, stageMoves } from '../schema';
import { BadInput, Denied } from '@/lib/errors';

type Move = { buildId: string; stageId: string; byId: string };
type Stage = Awaited<ReturnType<typeof stagesOf>>[number];

/** How long a move can be taken back, the slow phone included that asks at the last second. */
const UNDO_MS = 15_000;

function stagesOf(tx: Tx, buildId: string) {
  return tx
    .select({
      id: buildStages.id,
      key: buildStages.key,
      name: buildStages.name,
      position: buildStages.position,
      startedAt: buildStages.startedAt,
      finishedAt: buildStages.finishedAt,
    })
    .from(buildStages)
    .where(eq(buildStages.buildId, buildId))
    .orderBy(asc(buildStages.position));
}

const isNow = ({ startedAt, finishedAt }: Stage) => startedAt !== null && finishedAt === null;

function requireOnRoute(stages: Stage[], stageId: string): Stage {
  const stage = stages.find(({ id }) => id === stageId);
  if (!stage) throw new BadInput({ stageId: 'That stage is not on this build’s route. Choose one from the list.' });
  return stage;
}

/**
 * Ends the stage of now and starts another; stages that were passed over end with it. Starting it twice is starting it
 * once. @returns the move, or null when the stage had begun before
 * @throws BadInput for a stage of another route, or when a sign-off that blocks it is not signed, or an inspection before it not passed
 */
export async function startStage(tx: Tx, move: Move, nowMs: number): Promise<string | null> {
  const stages = await stagesOf(tx, move.buildId);
  const next = requireOnRoute(stages, move.stageId);
  if (next.startedAt !== null) return null;
  await requireUnblocked(tx, move.buildId, stages, next);
  await requireInspected(tx, move.buildId, stages, next);
  const moveId = await keepMove(tx, stages, move, null, nowMs);
  await tx
    .update(buildStages)
    .set({ finishedAt: nowMs, startedAt: sql`coalesce(${buildStages.startedAt}, ${nowMs})` })
    .where(
      and(
        eq(buildStages.buildId, move.buildId),
        lt(buildStages.position, next.position),
        isNull(buildStages.finishedAt),
      ),
    );
  await tx.update(buildStages).set({ startedAt: nowMs }).where(eq(buildStages.id, next.id));
  return moveId;
}

/** A stage on the way to `next` may be the one that waits for the owner. */
async function requireUnblocked(tx: Tx, buildId: string, stages: Stage[], next: Stage): Promise<void> {
  const ahead = stages.filter(({ position, startedAt }) => position <= next.position && startedAt === null);
  const [block] = await tx
    .select({ title: signOffs.title, stageKey: signOffs.blocksStageKey })
    .from(signOffs)
    .where(
      and(
        eq(signOffs.buildId, buildId),
        inArray(signOffs.state, ['asked', 'change_asked']),
        inArray(
          signOffs.blocksStageKey,
          ahead.map(({ key }) => key),
        ),
      ),
    )
    .limit(1);
  if (!block) return;
  const name = stages.find(({ key }) => key === block.stageKey)?.name ?? next.name;
  throw new BadInput({
    stageId: `${name} waits for the owner to sign “${block.title}”. It can start as soon as that is signed; ask the rep.`,
  });
}

/** Where a route has an inspection list for a stage, the build leaves that stage only when the list is passed. */
async function requireInspected(tx: Tx, buildId: string, stages: Stage[], next: Stage): Promise<void> {
  const left = stages.filter(({ position, finishedAt }) => position < next.position && finishedAt === null);
  const [list] = await unpassedLists(tx, buildId, left);
  if (!list) return;
  throw new BadInput({
    stageId: `${next.name} can start when the list “${list.name}” is passed. Go through it on this build’s page of checks.`,
  });
}

/**
 * Takes a build back to an earlier stage: that one is open again, and the later ones are as if they had not begun.
 * @throws BadInput when there is no reason, or the stage does not lie behind
 */
export async function moveBack(tx: Tx, move: Move, reason: string, nowMs: number): Promise<string> {
  const stages = await stagesOf(tx, move.buildId);
  const target = requireOnRoute(stages, move.stageId);
  const now = stages.findLast(({ startedAt }) => startedAt !== null);
  if (!now || target.position > now.position)
    throw new BadInput({ stageId: 'A build can only go back to a stage it has been in. Choose an earlier one.' });
  if (reason.trim() === '') throw new BadInput({ reason: 'Say why it goes back, so that the next hands know.' });
  const moveId = await keepMove(tx, stages, move, reason, nowMs);
  await tx.update(buildStages).set({ finishedAt: null }).where(eq(buildStages.id, target.id));
  await tx
    .update(buildStages)
    .set({ startedAt: null, finishedAt: null })
    .where(and(eq(buildStages.buildId, move.buildId), gt(buildStages.position, target.position)));
  // What passed the final check passed as it was then.
  await tx.update(builds).set({ readyAt: null }).where(eq(builds.id, move.buildId));
  return moveId;
}

async function keepMove(tx: Tx, stages: Stage[], move: Move, reason: string | null, nowMs: number): Promise<string> {
  const [kept] = await tx
    .insert(stageMoves)
    .values({
      buildId: move.buildId,
      fromStageId: stages.find(isNow)?.id ?? null,
      toStageId: move.stageId,
      reason,
      before: stages.map(({ id, startedAt, finishedAt }) => ({ id, startedAt, finishedAt })),
      movedById: move.byId,
      movedAt: nowMs,
    })
    .returning({ id: stageMoves.id });
  if (!kept) throw new Error('an insert without a row');
  return kept.id;
}

/**
 * Puts the stages back as they were before the mover's own, latest move. Undoing twice is undoing once.
 * @throws Denied when it is too late, or somebody has moved the build since
 */
export async function undoMove(tx: Tx, buildId: string, moveId: string, byId: string, nowMs: number): Promise<void> {
  const [latest] = await tx
    .select({
      id: stageMoves.id,
      before: stageMoves.before,
      movedById: stageMoves.movedById,
      movedAt: stageMoves.movedAt,
      undoneAt: stageMoves.undoneAt,
    })
    .from(stageMoves)
    .where(eq(stageMoves.buildId, buildId))
    .orderBy(desc(stageMoves.movedAt), desc(sql`${stageMoves}.rowid`))
    .limit(1);
  if (latest?.id === moveId && latest.undoneAt !== null) return;
  if (latest?.id !== moveId || latest.movedById !== byId || nowMs - latest.movedAt > UNDO_MS)
    throw new Denied('conflict', 'It is too late to take that back. Move the build again instead.');
  for (const { id, startedAt, finishedAt } of latest.before)
    await tx.update(buildStages).set({ startedAt, finishedAt }).where(eq(buildStages.id, id));
  await tx.update(stageMoves).set({ undoneAt: nowMs }).where(eq(stageMoves.id, moveId));
}
