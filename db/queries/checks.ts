import { and, asc, desc, eq, isNull, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import { recordEvent } from './audit';
import { touchDiary } from './builds';
import { isInUse, unpassedLists } from './check-gate';
import { isUnbound } from './photos';
import { moveBack } from './stages';
import { requireCan } from './standing';
import { db, write, type Db, type Tx } from '../client';
import { buildIsVisible } from '../scope';
import { builds, buildStages, checkLines, checkLists, checkMarks, checkRuns, photos, users } from '../schema';
import { can } from '@/lib/access';
import { endOf, problemsOf, type LineToMark } from '@/lib/checks/outcome';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import type { CheckEnd, MarkedLine } from '@/lib/validation/checks';
import type { Viewer } from '@/lib/viewer';

const starter = alias(users, 'starter');
const finisher = alias(users, 'finisher');
const backTo = alias(buildStages, 'back_to');

const runColumns = {
  id: checkRuns.id,
  listId: checkRuns.listId,
  listName: checkLists.name,
  stageId: checkRuns.stageId,
  stageName: buildStages.name,
  startedAt: checkRuns.startedAt,
  startedBy: starter.name,
  outcome: checkRuns.outcome,
  finishedAt: checkRuns.finishedAt,
  finishedBy: finisher.name,
  reason: checkRuns.reason,
  backToStageName: backTo.name,
  telling: checkRuns.telling,
  toldWords: checkRuns.toldWords,
};

const selectRuns = (reader: Db | Tx) =>
  reader
    .select({ ...runColumns, orderNumber: builds.orderNumber, instrument: builds.instrument })
    .from(checkRuns)
    .innerJoin(builds, eq(builds.id, checkRuns.buildId))
    .innerJoin(checkLists, eq(checkLists.id, checkRuns.listId))
    .innerJoin(buildStages, eq(buildStages.id, checkRuns.stageId))
    .innerJoin(starter, eq(starter.id, checkRuns.startedById))
    .leftJoin(finisher, eq(finisher.id, checkRuns.finishedById))
    .leftJoin(backTo, eq(backTo.id, checkRuns.backToStageId));

/** The inspection lists of a build's route in the order of its stages, and every walk through them, newest first. */
export async function listChecks(viewer: Viewer, orderNumber: string) {
  const build = await requireCan(viewer, 'check.run', orderNumber);
  const [lists, runs] = await Promise.all([
    db()
      .select({
        id: checkLists.id,
        name: checkLists.name,
        stageId: buildStages.id,
        stageKey: buildStages.key,
        stageName: buildStages.name,
        startedAt: buildStages.startedAt,
        finishedAt: buildStages.finishedAt,
      })
      .from(checkLists)
      .innerJoin(builds, eq(builds.routeId, checkLists.routeId))
      .innerJoin(buildStages, and(eq(buildStages.buildId, builds.id), eq(buildStages.key, checkLists.stageKey)))
      .where(and(eq(builds.id, build.id), isInUse))
      .orderBy(asc(buildStages.position), asc(checkLists.name)),
    selectRuns(db())
      .where(eq(checkRuns.buildId, build.id))
      .orderBy(desc(checkRuns.startedAt), desc(sql`${checkRuns}.rowid`))
      .limit(60),
  ]);
  const stages = lists.map(({ stageId: id, stageKey: key, startedAt }) => ({ id, key, startedAt }));
  const unpassed = await unpassedLists(db(), build.id, stages);
  return {
    runs,
    lists: lists.map((list) => ({ ...list, isPassed: !unpassed.some(({ id }) => id === list.id) })),
  };
}

export type BuildChecks = Awaited<ReturnType<typeof listChecks>>;
export type CheckRunRow = BuildChecks['runs'][number];

/**
 * Begins a walk through a list, or finds the one that is under way. @returns the run's id
 * @throws OutOfReach, Denied, or BadInput while the build is not in the list's stage
 */
export function startCheck(viewer: Viewer, orderNumber: string, listId: string, nowMs: number): Promise<string> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'check.run', orderNumber, tx);
    const [list] = await tx
      .select({
        stageId: buildStages.id,
        name: buildStages.name,
        startedAt: buildStages.startedAt,
        finishedAt: buildStages.finishedAt,
      })
      .from(checkLists)
      .innerJoin(builds, eq(builds.routeId, checkLists.routeId))
      .innerJoin(buildStages, and(eq(buildStages.buildId, builds.id), eq(buildStages.key, checkLists.stageKey)))
      .where(and(eq(builds.id, build.id), eq(checkLists.id, listId), isInUse));
    if (!list) throw new OutOfReach();
    const [open] = await tx
      .select({ id: checkRuns.id })
      .from(checkRuns)
      .where(and(eq(checkRuns.buildId, build.id), eq(checkRuns.listId, listId), isNull(checkRuns.outcome)));
    if (open) return open.id;
    if (list.startedAt === null || list.finishedAt !== null)
      throw new BadInput({
        listId: `This list is gone through while the build is in ${list.name}. Move it there first.`,
      });
    const run = { buildId: build.id, stageId: list.stageId, listId, startedById: viewer.id, startedAt: nowMs };
    const [started] = await tx.insert(checkRuns).values(run).returning({ id: checkRuns.id });
    if (!started) throw new Error('an insert without a row');
    return started.id;
  });
}

async function requireRun(reader: Db | Tx, buildId: string, runId: string) {
  const [run] = await selectRuns(reader).where(and(eq(checkRuns.id, runId), eq(checkRuns.buildId, buildId)));
  if (!run) throw new OutOfReach();
  return run;
}

type Run = Awaited<ReturnType<typeof requireRun>>;

/** The lines of a run: while it is open those in use, afterwards those that were marked. */
function linesOf(reader: Db | Tx, run: Pick<Run, 'id' | 'listId' | 'outcome'>) {
  const shown = run.outcome === null ? isNull(checkLines.retiredAt) : sql`${checkMarks.mark} is not null`;
  return reader
    .select({
      id: checkLines.id,
      text: checkLines.text,
      photoNeeded: checkLines.photoNeeded,
      mark: checkMarks.mark,
      note: checkMarks.note,
      photoId: checkMarks.photoId,
      markedBy: users.name,
      markedAt: checkMarks.markedAt,
    })
    .from(checkLines)
    .leftJoin(checkMarks, and(eq(checkMarks.lineId, checkLines.id), eq(checkMarks.runId, run.id)))
    .leftJoin(users, eq(users.id, checkMarks.markedById))
    .where(and(eq(checkLines.listId, run.listId), shown))
    .orderBy(asc(checkLines.position));
}

/** One walk through a list with its lines. @throws OutOfReach, Denied */
export async function requireCheckRun(viewer: Viewer, orderNumber: string, runId: string) {
  const build = await requireCan(viewer, 'check.run', orderNumber);
  const run = await requireRun(db(), build.id, runId);
  return { ...run, lines: await linesOf(db(), run) };
}

export type CheckRun = Awaited<ReturnType<typeof requireCheckRun>>;
export type CheckRunLine = CheckRun['lines'][number];

/**
 * Marks one line; marking it again replaces the mark.
 * @throws OutOfReach, Denied once the run is finished, or BadInput for a photo that has not arrived
 */
export function markLine(
  viewer: Viewer,
  orderNumber: string,
  runId: string,
  { lineId, ...marked }: MarkedLine,
  nowMs: number,
): Promise<void> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'check.run', orderNumber, tx);
    const run = await requireRun(tx, build.id, runId);
    if (run.outcome !== null)
      throw new Denied('conflict', 'This list is finished. What it says stays; go through it again for a new one.');
    const line = (await linesOf(tx, run)).find(({ id }) => id === lineId);
    if (!line) throw new OutOfReach();
    if (marked.photoId !== null && marked.photoId !== line.photoId)
      await requireLoosePhoto(tx, viewer, build.id, marked.photoId);
    const mark = { ...marked, markedById: viewer.id, markedAt: nowMs };
    await tx
      .insert(checkMarks)
      .values({ runId, lineId, ...mark })
      .onConflictDoUpdate({ target: [checkMarks.runId, checkMarks.lineId], set: mark });
  });
}

async function requireLoosePhoto(tx: Tx, viewer: Viewer, buildId: string, photoId: string): Promise<void> {
  const own = and(eq(photos.uploaderId, viewer.id), eq(photos.buildId, buildId), eq(photos.state, 'ready'));
  const [photo] = await tx
    .select({ id: photos.id })
    .from(photos)
    .where(and(eq(photos.id, photoId), own, isNull(photos.entryId), isUnbound));
  if (!photo) throw new BadInput({ photoId: 'That photo has not arrived whole. Wait for it, or take it again.' });
}

export type CheckOutcome = 'passed' | 'failed';

/**
 * Ends a walk: passed when no line fails; a fail sends the build back to a stage with a reason, and what the player is told
 * waits for a rep. Ending it twice is ending it once.
 * @throws OutOfReach, Denied, or BadInput with what is still missing
 */
export function finishCheck(viewer: Viewer, end: CheckEnd, nowMs: number): Promise<CheckOutcome> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'check.run', end.orderNumber, tx);
    const run = await requireRun(tx, build.id, end.runId);
    if (run.outcome !== null) return run.outcome;
    const lines: LineToMark[] = await linesOf(tx, run);
    const problems = problemsOf(lines, end);
    if (problems) throw new BadInput(problems);
    const outcome = endOf(lines);
    const ended = { outcome, finishedById: viewer.id, finishedAt: nowMs };
    if (outcome === 'failed') await sendBack(tx, viewer, build.id, run, end, nowMs);
    const failure = { backToStageId: end.backToStageId, reason: end.reason, telling: 'undecided' } as const;
    await tx
      .update(checkRuns)
      .set(outcome === 'failed' ? { ...ended, ...failure } : ended)
      .where(eq(checkRuns.id, run.id));
    const action = outcome === 'failed' ? 'check_failed' : 'check_passed';
    await recordEvent(
      tx,
      { actorId: viewer.id, action, buildId: build.id, subjectId: run.id, reason: run.listName },
      nowMs,
    );
    await touchDiary(tx, build.id);
    return outcome;
  });
}

async function sendBack(tx: Tx, viewer: Viewer, buildId: string, run: Run, end: CheckEnd, nowMs: number) {
  const [target] = await tx
    .select({ id: buildStages.id })
    .from(buildStages)
    .where(and(eq(buildStages.id, end.backToStageId ?? ''), eq(buildStages.buildId, buildId), isBefore(run.stageId)));
  if (!target) throw new BadInput({ backToStageId: 'Choose an earlier stage of this build to send it back to.' });
  await moveBack(tx, { buildId, stageId: target.id, byId: viewer.id }, end.reason, nowMs);
}

const isBefore = (stageId: string) =>
  sql`${buildStages.position} < (select here.position from ${buildStages} here where here.id = ${stageId})`;

/** Failed inspections of which no rep has decided what the player is told, oldest first. None for who may not decide. */
export function listUndecidedChecks(viewer: Viewer, orderNumber?: string): Promise<CheckRunRow[]> {
  if (!can(viewer.role, 'assigned', 'check.tell')) return Promise.resolve([]);
  return selectRuns(db())
    .where(
      and(
        eq(checkRuns.telling, 'undecided'),
        buildIsVisible(viewer),
        orderNumber === undefined ? undefined : eq(builds.orderNumber, orderNumber),
      ),
    )
    .orderBy(asc(checkRuns.finishedAt))
    .limit(50);
}
