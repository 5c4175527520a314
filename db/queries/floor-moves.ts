import { and, asc, desc, eq, isNull, notInArray, sql } from 'drizzle-orm';
import { touchDiary } from './builds';
import { moveBack, startStage, undoMove } from './stages';
import { requireCan } from './standing';
import { write, type Tx } from '../client';
import { builds, buildStages, stageMoves } from '../schema';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import type { Moves, TakenBack } from '@/lib/validation/floor';
import type { Viewer } from '@/lib/viewer';

export type MovedBuild = { orderNumber: string; moveId: string; stageName: string };
export type LeftBuild = { orderNumber: string; why: string };
export type MoveOutcome = { moved: MovedBuild[]; left: LeftBuild[] };

const NOT_ON_IT = 'You are not on this build. Ask whoever is to move it.';

/** A sentence for what people can mend; anything else is thrown on. */
function sentenceOf(error: unknown): string {
  if (error instanceof OutOfReach) return NOT_ON_IT;
  if (error instanceof Denied) return error.message;
  if (error instanceof BadInput) return Object.values(error.fields)[0] ?? 'It cannot be moved.';
  throw error;
}

async function requireStage(tx: Tx, buildId: string, key: string) {
  const [stage] = await tx
    .select({ id: buildStages.id, name: buildStages.name })
    .from(buildStages)
    .where(and(eq(buildStages.buildId, buildId), eq(buildStages.key, key)));
  if (!stage) throw new BadInput({ stage: 'Its route has changed and does not have that stage. Reload the floor.' });
  return stage;
}

/** The mover's own move into a stage that had begun before: the same request came twice. */
async function moveBefore(tx: Tx, buildId: string, stageId: string, byId: string): Promise<string> {
  const [latest] = await tx
    .select({ id: stageMoves.id, toStageId: stageMoves.toStageId, movedById: stageMoves.movedById })
    .from(stageMoves)
    .where(and(eq(stageMoves.buildId, buildId), isNull(stageMoves.undoneAt)))
    .orderBy(desc(stageMoves.movedAt), desc(sql`${stageMoves}.rowid`))
    .limit(1);
  if (latest?.toStageId !== stageId || latest.movedById !== byId)
    throw new Denied('conflict', 'Somebody has moved it there already.');
  return latest.id;
}

async function moveOne(
  tx: Tx,
  viewer: Viewer,
  wish: { orderNumber: string; toStageKey: string },
  reason: string | null,
  nowMs: number,
): Promise<MovedBuild> {
  const build = await requireCan(viewer, 'stage.move', wish.orderNumber, tx);
  const stage = await requireStage(tx, build.id, wish.toStageKey);
  const move = { buildId: build.id, stageId: stage.id, byId: viewer.id };
  const moveId =
    reason === null
      ? ((await startStage(tx, move, nowMs)) ?? (await moveBefore(tx, build.id, stage.id, viewer.id)))
      : await moveBack(tx, move, reason, nowMs);
  await touchDiary(tx, build.id);
  return { orderNumber: build.orderNumber, moveId, stageName: stage.name };
}

/** What else stands on a rack: known by number, and left where it is. */
async function othersOnRack(tx: Tx, rack: string, asked: string[]): Promise<LeftBuild[]> {
  const rows = await tx
    .select({ orderNumber: builds.orderNumber })
    .from(builds)
    .where(and(eq(builds.rack, rack), isNull(builds.deliveredAt), notInArray(builds.orderNumber, asked)))
    .orderBy(asc(builds.orderNumber))
    .limit(100);
  return rows.map(({ orderNumber }) => ({ orderNumber, why: NOT_ON_IT }));
}

/**
 * Moves builds, each to the stage that is named for it: on, or back with a reason. What cannot be moved stays and is named
 * with a sentence; of a whole rack, those too that the mover is not on. Sent twice, it is done once.
 */
export function moveBuilds(viewer: Viewer, { moves, rack, reason }: Moves, nowMs: number): Promise<MoveOutcome> {
  return write(async (tx) => {
    await requireCan(viewer, 'floor.read');
    const outcome: MoveOutcome = { moved: [], left: [] };
    for (const wish of moves) {
      try {
        outcome.moved.push(await moveOne(tx, viewer, wish, reason, nowMs));
      } catch (error) {
        outcome.left.push({ orderNumber: wish.orderNumber, why: sentenceOf(error) });
      }
    }
    if (rack === null) return outcome;
    const others = await othersOnRack(
      tx,
      rack,
      moves.map(({ orderNumber }) => orderNumber),
    );
    return { ...outcome, left: [...outcome.left, ...others] };
  });
}

/** Takes moves back, each while it is the mover's own and the build's last. Twice is once. */
export function undoMoves(viewer: Viewer, { moves }: TakenBack, nowMs: number): Promise<{ left: LeftBuild[] }> {
  return write(async (tx) => {
    await requireCan(viewer, 'floor.read');
    const left: LeftBuild[] = [];
    for (const { orderNumber, moveId } of moves) {
      try {
        const build = await requireCan(viewer, 'stage.move', orderNumber, tx);
        await undoMove(tx, build.id, moveId, viewer.id, nowMs);
        await touchDiary(tx, build.id);
      } catch (error) {
        left.push({ orderNumber, why: sentenceOf(error) });
      }
    }
    return { left };
  });
}
