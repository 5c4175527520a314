import { and, asc, desc, eq, inArray, isNotNull, isNull, max, min, ne, sql } from 'drizzle-orm';
import { unscopedCalendar } from './calendar';
import { db } from '../client';
import { builds, buildStages, readyWindows, routes, routeStages, shop, signOffs, stageMoves } from '../schema';
import type { ForecastBasis } from '@/lib/floor/forecast';
import { routeOutlook, type RouteOutlook } from '@/lib/floor/outlook';
import { pastByStage, type PastBuild } from '@/lib/floor/past';
import { waitedDaysAfter, waitsOf, type BackMove, type BlockingSignOff, type FloorStage } from '@/lib/floor/waits';
import { dayOf, type WorkingCalendar } from '@/lib/schedule/calendar';
import {
  adjustmentFor,
  measureAdjustments,
  type JudgedWindow,
  type MeasuredAdjustments,
} from '@/lib/schedule/calibration';

/** Builds that are looked back on; recent ones weigh more, and older ones next to nothing. */
const REMEMBERED = 1200;

const recentlyDelivered = () =>
  db()
    .select({ id: builds.id })
    .from(builds)
    .where(isNotNull(builds.deliveredAt))
    .orderBy(desc(builds.deliveredAt))
    .limit(REMEMBERED);

type Ids = string[] | ReturnType<typeof recentlyDelivered>;

function gather<Row extends { buildId: string }>(rows: Row[]): Map<string, Row[]> {
  const byBuild = new Map<string, Row[]>();
  for (const row of rows) {
    const list = byBuild.get(row.buildId);
    if (list) list.push(row);
    else byBuild.set(row.buildId, [row]);
  }
  return byBuild;
}

function stagesOf(ids: Ids) {
  return db()
    .select({
      id: buildStages.id,
      buildId: buildStages.buildId,
      key: buildStages.key,
      name: buildStages.name,
      department: buildStages.department,
      position: buildStages.position,
      startedAt: buildStages.startedAt,
      finishedAt: buildStages.finishedAt,
    })
    .from(buildStages)
    .where(inArray(buildStages.buildId, ids))
    .orderBy(asc(buildStages.buildId), asc(buildStages.position));
}

function backMovesOf(ids: Ids) {
  return db()
    .select({
      buildId: stageMoves.buildId,
      toStageId: stageMoves.toStageId,
      before: stageMoves.before,
      movedAt: stageMoves.movedAt,
    })
    .from(stageMoves)
    .where(and(inArray(stageMoves.buildId, ids), isNotNull(stageMoves.reason), isNull(stageMoves.undoneAt)))
    .orderBy(asc(stageMoves.movedAt));
}

/** Those that were asked and answered, or are open; what the shop took back was no wait. */
function blockingOf(ids: Ids) {
  return db()
    .select({
      buildId: signOffs.buildId,
      kind: signOffs.kind,
      blocksStageKey: signOffs.blocksStageKey,
      fromMs: signOffs.askedAt,
      toMs: sql<number | null>`case ${signOffs.state} when 'asked' then null else ${signOffs.answeredAt} end`,
    })
    .from(signOffs)
    .where(and(inArray(signOffs.buildId, ids), isNotNull(signOffs.blocksStageKey), ne(signOffs.state, 'withdrawn')))
    .orderBy(asc(signOffs.askedAt));
}

type StageRow = Awaited<ReturnType<typeof stagesOf>>[number];
type MoveRow = Awaited<ReturnType<typeof backMovesOf>>[number];

function backMove({ movedAt, toStageId, before }: MoveRow, stages: readonly StageRow[]): BackMove[] {
  const byId = new Map(stages.map((stage) => [stage.id, stage]));
  const target = byId.get(toStageId);
  if (!target) return [];
  const then = before.flatMap(({ id, startedAt, finishedAt }): FloorStage[] => {
    const stage = byId.get(id);
    return stage ? [{ ...stage, startedAt, finishedAt }] : [];
  });
  return [{ movedAt, toPosition: target.position, before: then }];
}

/** How the stages of builds went, with their moves back and their waits; a few queries for all of them. */
export async function unscopedProgress(ids: Ids) {
  const [stages, moves, signOffRows] = await Promise.all([stagesOf(ids), backMovesOf(ids), blockingOf(ids)]);
  const [movesOf, signOffsOf] = [gather(moves), gather<BlockingSignOff & { buildId: string }>(signOffRows)];
  return new Map(
    [...gather(stages)].map(([buildId, own]) => [
      buildId,
      {
        stages: own,
        moves: (movesOf.get(buildId) ?? []).flatMap((move) => backMove(move, own)),
        signOffs: signOffsOf.get(buildId) ?? [],
      },
    ]),
  );
}

async function pastBuilds(): Promise<PastBuild[]> {
  const ids = recentlyDelivered();
  const rows = await db()
    .select({ id: builds.id, routeId: builds.routeId, rack: builds.rack })
    .from(builds)
    .where(inArray(builds.id, ids));
  const progress = await unscopedProgress(ids);
  return rows.flatMap((build) => {
    const found = progress.get(build.id);
    return found ? [{ ...build, ...found }] : [];
  });
}

/** The first window that every remembered build was given in each of its stages. */
function firstWindows() {
  return db()
    .select({
      buildId: readyWindows.buildId,
      stageKey: readyWindows.stageKey,
      givenOn: sql<string>`${min(readyWindows.givenOn)}`,
      earliestOn: readyWindows.earliestOn,
      likelyOn: readyWindows.likelyOn,
      latestOn: readyWindows.latestOn,
      rawEarliestOn: readyWindows.rawEarliestOn,
      rawLatestOn: readyWindows.rawLatestOn,
      yardstickDays: readyWindows.yardstickDays,
      curve: readyWindows.curve,
    })
    .from(readyWindows)
    .where(and(inArray(readyWindows.buildId, recentlyDelivered()), eq(readyWindows.kind, 'window')))
    .groupBy(readyWindows.buildId, readyWindows.stageKey);
}

const readyDay = ({ stages }: PastBuild, zone: string) => {
  const last = stages.at(-1)?.finishedAt;
  return last == null ? null : dayOf(last, zone);
};

async function judgedByRoute(past: PastBuild[], zone: string, nowMs: number): Promise<Map<string, JudgedWindow[]>> {
  const byId = new Map(past.map((build) => [build.id, build]));
  const judged = new Map<string, JudgedWindow[]>();
  for (const {
    rawEarliestOn,
    rawLatestOn,
    earliestOn,
    likelyOn,
    latestOn,
    yardstickDays,
    ...row
  } of await firstWindows()) {
    const build = byId.get(row.buildId);
    const readyOn = build && readyDay(build, zone);
    if (!build || !readyOn || !earliestOn || !likelyOn || !latestOn) continue;
    const waits = waitsOf(build.stages, build.signOffs, zone, nowMs);
    const waitedDays = waitedDaysAfter(waits, row.givenOn);
    const raw = { rawEarliestOn: rawEarliestOn ?? earliestOn, rawLatestOn: rawLatestOn ?? latestOn };
    const list = judged.get(build.routeId) ?? [];
    const dates = { earliestOn, likelyOn, latestOn, ...raw, yardstickDays: yardstickDays ?? 1 };
    list.push({ ...row, ...dates, readyOn, waitedDays });
    judged.set(build.routeId, list);
  }
  return judged;
}

function listRoutes() {
  return db()
    .select({
      routeId: routes.id,
      routeName: routes.name,
      key: routeStages.key,
      name: routeStages.name,
      department: routeStages.department,
      bestDays: routeStages.bestDays,
      likelyDays: routeStages.likelyDays,
      worstDays: routeStages.worstDays,
      minimumWaitDays: routeStages.minimumWaitDays,
      silenceDays: routeStages.silenceDays,
    })
    .from(routes)
    .innerJoin(routeStages, eq(routeStages.routeId, routes.id))
    .orderBy(asc(routes.name), asc(routeStages.position));
}

export type RouteRow = Awaited<ReturnType<typeof listRoutes>>[number];

export type Basis = ForecastBasis & {
  routes: RouteRow[];
  judged: ReadonlyMap<string, readonly JudgedWindow[]>;
  measured: ReadonlyMap<string, MeasuredAdjustments>;
};

async function makeBasis(calendar: WorkingCalendar, today: string, nowMs: number): Promise<Basis> {
  const [past, rows] = await Promise.all([pastBuilds(), listRoutes()]);
  const judged = await judgedByRoute(past, calendar.zone, nowMs);
  const routeIds = [...new Set(rows.map(({ routeId }) => routeId))];
  const outlooks = new Map(
    routeIds.map((routeId): [string, RouteOutlook] => {
      const own = past.filter((build) => build.routeId === routeId);
      const stages = rows.filter((row) => row.routeId === routeId);
      return [routeId, routeOutlook(stages, pastByStage(own, calendar, today, nowMs), today)];
    }),
  );
  const measured = new Map(routeIds.map((routeId) => [routeId, measureAdjustments(judged.get(routeId) ?? [], today)]));
  const routeNames = new Map(rows.map(({ routeId, routeName }) => [routeId, routeName]));
  return {
    calendar,
    today,
    nowMs,
    routes: rows,
    routeNames,
    outlooks,
    judged,
    measured,
    adjustmentFor: (routeId, stageKey) => {
      const ofRoute = measured.get(routeId);
      return ofRoute ? adjustmentFor(ofRoute, stageKey) : null;
    },
  };
}

let kept: { state: string; calendar: WorkingCalendar; basis: Basis } | null = null;

/**
 * What every forecast of a day rests on: the calendar, what each route's past builds took, and how past windows held.
 * Nobody's in particular: it is shown in sums only. Made anew when a build was delivered, the shop's settings changed, or
 * a day has passed.
 */
export async function unscopedForecastBasis(nowMs: number): Promise<Basis> {
  const [calendar, [delivered], [owner]] = await Promise.all([
    unscopedCalendar(),
    db()
      .select({ newest: max(builds.deliveredAt), n: sql<number>`count(*)` })
      .from(builds)
      .where(isNotNull(builds.deliveredAt)),
    db().select({ changedAt: shop.scheduleChangedAt }).from(shop),
  ]);
  const today = dayOf(nowMs, calendar.zone);
  const state = `${today} ${delivered?.n} ${delivered?.newest} ${owner?.changedAt}`;
  if (kept?.state === state && kept.calendar === calendar) return { ...kept.basis, nowMs };
  const basis = await makeBasis(calendar, today, nowMs);
  kept = { state, calendar, basis };
  return basis;
}
