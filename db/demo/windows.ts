import { inArray } from 'drizzle-orm';
import { unscopedCalendar } from '../queries/calendar';
import { unscopedProgress } from '../queries/forecast-basis';
import { windowRow, type WindowRow } from '../queries/ready-windows';
import { db, write } from '../client';
import { builds, readyWindows } from '../schema';
import { demoRoutes, outlookOf } from './shop-floor';
import { DAY_MS } from './timeline';
import { forecast, type BuildToForecast, type ForecastBasis } from '@/lib/floor/forecast';
import { movedWhy, type KnownWindow } from '@/lib/floor/moved-window';
import { routeOutlook, type RouteOutlook } from '@/lib/floor/outlook';
import { pastByStage, type PastBuild } from '@/lib/floor/past';
import type { FloorStage } from '@/lib/floor/waits';
import { dayOf, type WorkingCalendar } from '@/lib/schedule/calendar';

/** The shop learns from what it delivered four times a year: near enough for windows of the past. */
const LEARN_EVERY_MS = 91 * DAY_MS;
const AT_ONCE = 100;

type Whole = PastBuild & { deliveredAt: number | null };

async function wholeBuilds(ids: string[]): Promise<Whole[]> {
  const rows = await db()
    .select({ id: builds.id, routeId: builds.routeId, rack: builds.rack, deliveredAt: builds.deliveredAt })
    .from(builds)
    .where(inArray(builds.id, ids));
  const progress = await unscopedProgress(ids);
  return rows.flatMap((row) => {
    const found = progress.get(row.id);
    return found ? [{ ...row, ...found }] : [];
  });
}

/** What was known at a moment: the builds delivered before it, and the shop's estimates. */
function basisAt(atMs: number, all: Whole[], routeIds: string[], calendar: WorkingCalendar): ForecastBasis {
  const today = dayOf(atMs, calendar.zone);
  const known = all.filter(({ deliveredAt }) => deliveredAt !== null && deliveredAt < atMs);
  const outlooks = demoRoutes.map(({ stages }, index): [string, RouteOutlook] => {
    const routeId = routeIds[index] ?? '';
    const own = known.filter((build) => build.routeId === routeId);
    const settings = stages.map((stage) => ({ ...stage, ...outlookOf(stage) }));
    return [routeId, routeOutlook(settings, pastByStage(own, calendar, today, atMs), today)];
  });
  return {
    calendar,
    today,
    nowMs: atMs,
    routeNames: new Map(demoRoutes.map(({ name }, index) => [routeIds[index] ?? '', name])),
    outlooks: new Map(outlooks),
    adjustmentFor: () => null,
  };
}

/** The build as it stood at a moment. */
function asOf(build: Whole, atMs: number): BuildToForecast {
  const until = (ms: number | null) => (ms !== null && ms <= atMs ? ms : null);
  const stage = (each: FloorStage) => ({
    ...each,
    startedAt: until(each.startedAt),
    finishedAt: until(each.finishedAt),
  });
  const asked = build.signOffs
    .filter(({ fromMs }) => fromMs <= atMs)
    .map((each) => ({ ...each, toMs: until(each.toMs) }));
  return { ...build, stages: build.stages.map(stage), signOffs: asked, moves: [] };
}

/** A build's windows on the days its stages began, and today's while it is on the floor, each beside the one before. */
function windowsOf(build: Whole, basisFor: (atMs: number) => ForecastBasis, nowMs: number): WindowRow[] {
  const starts = build.stages.flatMap(({ startedAt }) => startedAt ?? []);
  const moments = build.deliveredAt === null ? [...starts, nowMs] : starts;
  const rows = new Map<string, WindowRow>();
  let known: KnownWindow | null = null;
  for (const atMs of moments) {
    const { calendar, ...learnt } = basisFor(atMs);
    const today = dayOf(atMs, calendar.zone);
    const window = forecast(asOf(build, atMs), { ...learnt, calendar, today, nowMs: atMs });
    if (!window) continue;
    const why: string | null = known && movedWhy(known, window, calendar, today);
    const row: WindowRow = { ...windowRow(window, today, atMs), movedWhy: why };
    if (known === null || why !== null) known = row;
    rows.set(today, row);
  }
  return [...rows.values()];
}

/** The windows that were given for every build of the demo world, those on the floor and those delivered before. */
export async function enterWindows(buildIds: string[], routeIds: string[], zone: string, nowMs: number): Promise<void> {
  const calendar = { ...(await unscopedCalendar()), zone };
  const all = await wholeBuilds(buildIds);
  const bases = new Map<number, ForecastBasis>();
  const basisFor = (atMs: number) => {
    const quarter = atMs === nowMs ? nowMs : Math.floor(atMs / LEARN_EVERY_MS) * LEARN_EVERY_MS;
    const basis = bases.get(quarter) ?? basisAt(quarter, all, routeIds, calendar);
    bases.set(quarter, basis);
    return basis;
  };
  const rows = all.flatMap((build) => windowsOf(build, basisFor, nowMs));
  await write(async (tx) => {
    for (let from = 0; from < rows.length; from += AT_ONCE)
      await tx.insert(readyWindows).values(rows.slice(from, from + AT_ONCE));
  });
}
