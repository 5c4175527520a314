import { and, asc, desc, eq, exists, inArray, isNull, sql } from 'drizzle-orm';
import { QueryBuilder } from 'drizzle-orm/sqlite-core';
import type { Db, Tx } from '../client';
import { builds, checkLines, checkLists, checkRuns, stageMoves } from '../schema';

const from = new QueryBuilder();

/** In use, and with something to look at. */
export const isInUse = and(
  isNull(checkLists.retiredAt),
  exists(
    from
      .select({ one: sql`1` })
      .from(checkLines)
      .where(and(eq(checkLines.listId, checkLists.id), isNull(checkLines.retiredAt))),
  ),
);

type StageOfBuild = { id: string; key: string; startedAt: number | null };

/**
 * The inspection lists of these stages that the build has not passed since it came into the stage; a pass before it was
 * sent back counts for nothing. The caller has asked who the viewer is.
 */
export async function unpassedLists(reader: Db | Tx, buildId: string, stages: StageOfBuild[]) {
  if (stages.length === 0) return [];
  const keys = stages.map(({ key }) => key);
  const lists = await reader
    .select({ id: checkLists.id, name: checkLists.name, stageKey: checkLists.stageKey })
    .from(checkLists)
    .innerJoin(builds, eq(builds.routeId, checkLists.routeId))
    .where(and(eq(builds.id, buildId), inArray(checkLists.stageKey, keys), isInUse))
    .orderBy(asc(checkLists.name));
  if (lists.length === 0) return [];
  const runs = await reader
    .select({
      listId: checkRuns.listId,
      stageId: checkRuns.stageId,
      startedAt: checkRuns.startedAt,
      outcome: checkRuns.outcome,
    })
    .from(checkRuns)
    .where(eq(checkRuns.buildId, buildId))
    .orderBy(desc(checkRuns.startedAt), desc(sql`${checkRuns}.rowid`));
  const arrivals = await reader
    .select({ stageId: stageMoves.toStageId, movedAt: stageMoves.movedAt })
    .from(stageMoves)
    .where(and(eq(stageMoves.buildId, buildId), isNull(stageMoves.undoneAt)));
  return lists.filter(({ id, stageKey }) => {
    const stage = stages.find(({ key }) => key === stageKey);
    const latest = runs.find((run) => run.listId === id && run.stageId === stage?.id);
    if (!stage || !latest || stage.startedAt === null || latest.outcome !== 'passed') return true;
    const arrivedAt = arrivals.filter(({ stageId }) => stageId === stage.id).map(({ movedAt }) => movedAt);
    return latest.startedAt < Math.max(stage.startedAt, ...arrivedAt);
  });
}
