import { and, asc, eq, isNull, max } from 'drizzle-orm';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { checkLines, checkLists, checkMarks, routes, routeStages } from '../schema';
import { BadInput, OutOfReach } from '@/lib/errors';
import type { Viewer } from '@/lib/viewer';

/** Every route with its stages and the inspection lists in use, for the shop's set-up. */
export async function listCheckLists(viewer: Viewer) {
  await requireCan(viewer, 'shop.set_up');
  const [allRoutes, stages, lists, lines] = await Promise.all([
    db().select({ id: routes.id, name: routes.name }).from(routes).orderBy(asc(routes.name)),
    db()
      .select({ routeId: routeStages.routeId, key: routeStages.key, name: routeStages.name })
      .from(routeStages)
      .orderBy(asc(routeStages.position)),
    db()
      .select({ id: checkLists.id, routeId: checkLists.routeId, stageKey: checkLists.stageKey, name: checkLists.name })
      .from(checkLists)
      .where(isNull(checkLists.retiredAt))
      .orderBy(asc(checkLists.name)),
    db()
      .select({
        id: checkLines.id,
        listId: checkLines.listId,
        text: checkLines.text,
        photoNeeded: checkLines.photoNeeded,
      })
      .from(checkLines)
      .where(isNull(checkLines.retiredAt))
      .orderBy(asc(checkLines.position)),
  ]);
  return allRoutes.map((route) => {
    const ofRoute = stages.filter(({ routeId }) => routeId === route.id);
    return {
      ...route,
      stages: ofRoute.map(({ key, name }) => ({ key, name })),
      lists: lists
        .filter(({ routeId }) => routeId === route.id)
        .map((list) => ({
          ...list,
          stageName: ofRoute.find(({ key }) => key === list.stageKey)?.name ?? list.stageKey,
          lines: lines.filter(({ listId }) => listId === list.id),
        })),
    };
  });
}

export type RouteLists = Awaited<ReturnType<typeof listCheckLists>>[number];

type NewList = { routeId: string; stageKey: string; name: string };

/** @throws BadInput for a stage that is not on the route, or a name that another of its lists has */
export function addCheckList(viewer: Viewer, list: NewList): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'shop.set_up');
    const [stage] = await tx
      .select({ key: routeStages.key })
      .from(routeStages)
      .where(and(eq(routeStages.routeId, list.routeId), eq(routeStages.key, list.stageKey)));
    if (!stage) throw new BadInput({ stageKey: 'That stage is not on this route. Choose one from the list.' });
    const [known] = await tx
      .select({ id: checkLists.id })
      .from(checkLists)
      .where(and(eq(checkLists.routeId, list.routeId), eq(checkLists.name, list.name), isNull(checkLists.retiredAt)));
    if (known) throw new BadInput({ name: 'This route has a list of that name. Add lines to it, or choose another.' });
    await tx.insert(checkLists).values(list);
  });
}

/** Takes a list out of use; inspections that were made by it stay readable. */
export function retireCheckList(viewer: Viewer, listId: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'shop.set_up');
    await tx
      .update(checkLists)
      .set({ retiredAt: nowMs })
      .where(and(eq(checkLists.id, listId), isNull(checkLists.retiredAt)));
  });
}

type NewLine = { listId: string; text: string; photoNeeded: boolean };

/** Adds a line at the end. @throws OutOfReach for a list that is not in use */
export function addCheckLine(viewer: Viewer, line: NewLine): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'shop.set_up');
    const [list] = await tx
      .select({ id: checkLists.id })
      .from(checkLists)
      .where(and(eq(checkLists.id, line.listId), isNull(checkLists.retiredAt)));
    if (!list) throw new OutOfReach();
    const [last] = await tx
      .select({ position: max(checkLines.position) })
      .from(checkLines)
      .where(eq(checkLines.listId, line.listId));
    await tx.insert(checkLines).values({ ...line, position: (last?.position ?? 0) + 1 });
  });
}

async function requireLine(tx: Tx, lineId: string) {
  const [line] = await tx
    .select({ id: checkLines.id, listId: checkLines.listId, position: checkLines.position })
    .from(checkLines)
    .where(and(eq(checkLines.id, lineId), isNull(checkLines.retiredAt)));
  if (!line) throw new OutOfReach();
  return line;
}

/** A line that was marked keeps its words for those marks; others go for good. */
async function retireLine(tx: Tx, lineId: string, nowMs: number): Promise<void> {
  const [marked] = await tx
    .select({ lineId: checkMarks.lineId })
    .from(checkMarks)
    .where(eq(checkMarks.lineId, lineId))
    .limit(1);
  if (marked) await tx.update(checkLines).set({ retiredAt: nowMs }).where(eq(checkLines.id, lineId));
  else await tx.delete(checkLines).where(eq(checkLines.id, lineId));
}

type ChangedLine = { lineId: string; text: string; photoNeeded: boolean };

/** Rewords a line: from the next inspection on it reads so. @throws OutOfReach for a line that is gone */
export function changeCheckLine(viewer: Viewer, { lineId, ...words }: ChangedLine, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'shop.set_up');
    const { listId, position } = await requireLine(tx, lineId);
    await retireLine(tx, lineId, nowMs);
    await tx.insert(checkLines).values({ listId, position, ...words });
  });
}

/** @throws OutOfReach for a line that is gone */
export function removeCheckLine(viewer: Viewer, lineId: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'shop.set_up');
    await requireLine(tx, lineId);
    await retireLine(tx, lineId, nowMs);
  });
}
