import { and, asc, desc, eq, inArray, isNotNull, isNull, sql } from 'drizzle-orm';
import { touchDiary } from './builds';
import { unscopedForecastBasis, unscopedProgress, type Basis } from './forecast-basis';
import { queueMail } from './outbox';
import { listOwnerIds } from './owners';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { buildIsVisible } from '../scope';
import { builds, readyWindows, shop } from '../schema';
import { forecast, type BuildToForecast, type GivenWindow } from '@/lib/floor/forecast';
import { movedWhy, type KnownWindow } from '@/lib/floor/moved-window';
import type { Viewer } from '@/lib/viewer';

/** A move is left to settle for so long: it may be taken back for some seconds, and nobody is told of it before. */
const SETTLE_MS = 20_000;

/**
 * The builds on the floor whose window is not of today, or is older than their last move, their last sign-off, or the
 * shop's settings.
 */
async function staleBuilds(today: string, nowMs: number): Promise<string[]> {
  const rows = await db().all<{ id: string }>(sql`
    select b.id from builds b
    where b.delivered_at is null and b.ready_at is null
      and (select s.finished_at is null from build_stages s where s.build_id = b.id order by s.position desc limit 1)
      and not exists (select 1 from stage_moves m where m.build_id = b.id and m.moved_at > ${nowMs - SETTLE_MS} and m.undone_at is null)
      and not exists (
        select 1 from ready_windows w
        where w.build_id = b.id and w.given_on = ${today}
          and w.computed_at > (select coalesce(max(schedule_changed_at), 0) from shop)
          and not exists (
            select 1 from stage_moves m
            where m.build_id = b.id and max(m.moved_at, coalesce(m.undone_at, 0)) >= w.computed_at)
          and not exists (
            select 1 from sign_offs o
            where o.build_id = b.id and max(o.asked_at, coalesce(o.answered_at, 0)) >= w.computed_at))`);
  return rows.map(({ id }) => id);
}

async function buildsToForecast(ids: string[]): Promise<BuildToForecast[]> {
  const rows = await db()
    .select({ id: builds.id, routeId: builds.routeId })
    .from(builds)
    .where(inArray(builds.id, ids));
  const progress = await unscopedProgress(ids);
  return rows.flatMap((build) => {
    const found = progress.get(build.id);
    return found ? [{ ...build, ...found }] : [];
  });
}

/** Every build on the floor as the forecast reads it; only sums of it are shown to who does not reach it. */
export async function unscopedFloorBuilds(): Promise<BuildToForecast[]> {
  const rows = await db().select({ id: builds.id }).from(builds).where(isNull(builds.deliveredAt));
  return buildsToForecast(rows.map(({ id }) => id));
}

/** By build, the window its owner was told of last, or else the first one. */
async function knownWindows(tx: Tx, ids: string[]): Promise<Map<string, KnownWindow>> {
  const told = isNotNull(readyWindows.movedWhy);
  const place = sql<number>`row_number() over (partition by ${readyWindows.buildId} order by ${told} desc, case when ${told} then julianday(${readyWindows.givenOn}) else -julianday(${readyWindows.givenOn}) end desc)`;
  const ranked = tx
    .select({
      buildId: readyWindows.buildId,
      earliestOn: readyWindows.earliestOn,
      likelyOn: readyWindows.likelyOn,
      latestOn: readyWindows.latestOn,
      grounds: readyWindows.grounds,
      place: place.as('place'),
    })
    .from(readyWindows)
    .where(inArray(readyWindows.buildId, ids))
    .as('ranked');
  const rows = await tx.select().from(ranked).where(eq(ranked.place, 1));
  return new Map(rows.map((row) => [row.buildId, row]));
}

/** A window as it is kept for the shop's day `today`. */
export function windowRow(
  { buildId, stageKey, window, grounds, widenedBy }: GivenWindow,
  today: string,
  nowMs: number,
) {
  const row = { buildId, givenOn: today, stageKey, kind: window.kind, widenedBy, grounds, computedAt: nowMs };
  if (window.kind === 'unsayable') {
    const none = { earliestOn: null, likelyOn: null, latestOn: null, rawEarliestOn: null, rawLatestOn: null };
    return { ...row, ...none, words: window.why, yardstickDays: null, curve: null };
  }
  const { earliestOn, likelyOn, latestOn, raw, curve } = window;
  return {
    ...row,
    words: window.kind === 'waiting' ? window.onWhat : null,
    earliestOn,
    likelyOn,
    latestOn,
    rawEarliestOn: raw.earliestOn,
    rawLatestOn: raw.latestOn,
    yardstickDays: raw.yardstickDays,
    curve: curve.map(({ on, probability }) => ({ on, probability: Number(probability.toFixed(4)) })),
  };
}

export type WindowRow = ReturnType<typeof windowRow> & { movedWhy: string | null };

const given = (column: { name: string }) => sql.raw(`excluded.${column.name}`);

/** One row a build and day: a window computed again on the same day takes its place, and keeps what was told that day. */
async function storeRows(tx: Tx, rows: WindowRow[]): Promise<void> {
  const t = readyWindows;
  await tx
    .insert(t)
    .values(rows)
    .onConflictDoUpdate({
      target: [t.buildId, t.givenOn],
      set: {
        stageKey: given(t.stageKey),
        kind: given(t.kind),
        earliestOn: given(t.earliestOn),
        likelyOn: given(t.likelyOn),
        latestOn: given(t.latestOn),
        words: given(t.words),
        widenedBy: given(t.widenedBy),
        rawEarliestOn: given(t.rawEarliestOn),
        rawLatestOn: given(t.rawLatestOn),
        yardstickDays: given(t.yardstickDays),
        curve: given(t.curve),
        grounds: given(t.grounds),
        movedWhy: sql`coalesce(excluded.moved_why, ${t.movedWhy})`,
        computedAt: given(t.computedAt),
      },
    });
}

/** Curves are long, and only the latest and the first of each stage are read again. */
async function dropOldCurves(tx: Tx, ids: string[], today: string): Promise<void> {
  await tx.run(sql`
    update ready_windows set curve = null
    where curve is not null and given_on < ${today} and build_id in (select value from json_each(${JSON.stringify(ids)}))
      and exists (select 1 from ready_windows p where p.build_id = ready_windows.build_id
        and p.stage_key = ready_windows.stage_key and p.given_on < ready_windows.given_on)`);
}

async function tellOwner(tx: Tx, buildId: string, givenOn: string, nowMs: number): Promise<void> {
  await touchDiary(tx, buildId);
  for (const userId of await listOwnerIds(tx, buildId)) {
    const mail = { kind: 'window_moved', userId, about: { buildId, givenOn } } as const;
    await queueMail(tx, { ...mail, dedupeKey: `window_moved/${buildId}/${givenOn}/${userId}` }, nowMs);
  }
}

const AT_ONCE = 100;

/** Keeps a day's windows, with a sentence where one moved; its owner is told in the same transaction. */
async function keepWindows(windows: GivenWindow[], { calendar, today }: Basis, nowMs: number): Promise<void> {
  for (let from = 0; from < windows.length; from += AT_ONCE) {
    const part = windows.slice(from, from + AT_ONCE);
    const ids = part.map(({ buildId }) => buildId);
    await write(async (tx) => {
      const known = await knownWindows(tx, ids);
      const rows = part.map((window): WindowRow => {
        const before = known.get(window.buildId);
        const why = before ? movedWhy(before, window, calendar, today) : null;
        return { ...windowRow(window, today, nowMs), movedWhy: why };
      });
      await storeRows(tx, rows);
      await dropOldCurves(tx, ids, today);
      for (const row of rows) if (row.movedWhy !== null) await tellOwner(tx, row.buildId, today, nowMs);
      await tx.update(shop).set({ windowsComputedAt: nowMs });
    });
  }
}

/**
 * Computes the windows that are missing or out of date, all in one pass, and tells the owners of those that moved.
 * @returns how many were computed
 */
export async function refreshWindows(nowMs: number): Promise<number> {
  const basis = await unscopedForecastBasis(nowMs);
  const ids = await staleBuilds(basis.today, nowMs);
  if (ids.length === 0) return 0;
  const windows = (await buildsToForecast(ids)).flatMap((build) => forecast(build, basis) ?? []);
  await keepWindows(windows, basis, nowMs);
  return windows.length;
}

const shown = {
  givenOn: readyWindows.givenOn,
  stageKey: readyWindows.stageKey,
  kind: readyWindows.kind,
  earliestOn: readyWindows.earliestOn,
  likelyOn: readyWindows.likelyOn,
  latestOn: readyWindows.latestOn,
  words: readyWindows.words,
  widenedBy: readyWindows.widenedBy,
  movedWhy: readyWindows.movedWhy,
};

/** The window of a build as it was last given, with the last sentence of a move; null when there is none yet. */
export async function findWindow(viewer: Viewer, buildId: string) {
  const [latest] = await db()
    .select({ ...shown, curve: readyWindows.curve })
    .from(readyWindows)
    .innerJoin(builds, eq(builds.id, readyWindows.buildId))
    .where(
      and(
        eq(readyWindows.buildId, buildId),
        isNull(builds.deliveredAt),
        isNull(builds.readyAt),
        buildIsVisible(viewer),
      ),
    )
    .orderBy(desc(readyWindows.givenOn))
    .limit(1);
  if (!latest) return null;
  const [moved] = await listWindowMoves(viewer, buildId, 1);
  return { ...latest, lastMove: moved ?? null };
}

export type ShownWindow = NonNullable<Awaited<ReturnType<typeof findWindow>>>;

/** The windows of several builds as they were last given, those that the reader reaches. */
export function listLatestWindows(reader: Viewer, buildIds: string[]) {
  return db()
    .select({ orderNumber: builds.orderNumber, ...shown })
    .from(readyWindows)
    .innerJoin(builds, eq(builds.id, readyWindows.buildId))
    .where(
      and(
        inArray(readyWindows.buildId, buildIds),
        sql`${readyWindows.givenOn} = (select max(w.given_on) from ready_windows w where w.build_id = ${readyWindows.buildId})`,
        isNull(builds.deliveredAt),
        isNull(builds.readyAt),
        buildIsVisible(reader),
      ),
    );
}

const MOST_MOVES = 60;

/** The windows that moved by more than a few days, newest first, each with its sentence. */
export function listWindowMoves(viewer: Viewer, buildId: string, limit = MOST_MOVES) {
  return db()
    .select(shown)
    .from(readyWindows)
    .innerJoin(builds, eq(builds.id, readyWindows.buildId))
    .where(and(eq(readyWindows.buildId, buildId), isNotNull(readyWindows.movedWhy), buildIsVisible(viewer)))
    .orderBy(desc(readyWindows.givenOn))
    .limit(limit);
}

export type WindowMove = Awaited<ReturnType<typeof listWindowMoves>>[number];

/** The window page of a build: its window of today, the first that was given, and every move in between. @throws OutOfReach */
export async function windowStory(viewer: Viewer, orderNumber: string) {
  const build = await requireCan(viewer, 'diary.read', orderNumber);
  const [window, moves, [first]] = await Promise.all([
    findWindow(viewer, build.id),
    listWindowMoves(viewer, build.id),
    db()
      .select(shown)
      .from(readyWindows)
      .innerJoin(builds, eq(builds.id, readyWindows.buildId))
      .where(and(eq(readyWindows.buildId, build.id), buildIsVisible(viewer)))
      .orderBy(asc(readyWindows.givenOn))
      .limit(1),
  ]);
  return { window, moves, first: first ?? null };
}
