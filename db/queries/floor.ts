import { createHash } from 'node:crypto';
import { and, asc, eq, inArray, isNull, sql } from 'drizzle-orm';
import { waitsByBuild } from './floor-waits';
import { unscopedForecastBasis, unscopedProgress, type Basis } from './forecast-basis';
import { ownerNameOf } from './owners';
import { listDepartments } from './departments';
import { requireCan } from './standing';
import { db } from '../client';
import { correlated } from '../correlated';
import { preparedByRole } from '../prepared';
import { buildIsKnownByNumber, buildIsVisible, isOpen } from '../scope';
import { assignments, builds, entries, questions, readyWindows, shop, users } from '../schema';
import { OutOfReach } from '@/lib/errors';
import { makeRow } from '@/lib/floor/make-row';
import type { Floor, FloorFigures, FloorRoute, FloorRow } from '@/lib/floor/row';
import { screenOf, type FloorScreen } from '@/lib/floor/screen';
import { wishQuery, type FloorWish } from '@/lib/floor/wish';
import { RecentTexts } from '@/lib/recent-texts';
import { dayOf } from '@/lib/schedule/calendar';
import { judge } from '@/lib/schedule/calibration';
import { coverageOf } from '@/lib/schedule/scores';
import type { Viewer } from '@/lib/viewer';

const onTheFloor = isNull(builds.deliveredAt);

const stateOf = preparedByRole((on, reader) =>
  on
    .select({
      zone: shop.timeZone,
      settings: sql<string>`${shop.scheduleChangedAt} || ' ' || ${shop.windowsComputedAt}`,
      reached: correlated(
        sql<string>`(select group_concat(${builds.orderNumber} || ' ' || ${builds.diaryRevision}) from ${builds} where ${and(onTheFloor, buildIsVisible(reader))})`,
      ),
      known: correlated(
        sql<string>`(select group_concat(${builds.orderNumber}) from ${builds} where ${and(onTheFloor, buildIsKnownByNumber(reader))})`,
      ),
      own: correlated(
        sql<string>`(select count(*) || ' ' || coalesce(sum(${assignments}.rowid), 0) from ${assignments} where ${assignments.userId} = ${reader.id} and ${assignments.endedAt} is null)`,
      ),
      // Not of the reader's builds only: more of them would make the mark dearer, and nothing can be read out of it.
      asked: correlated(
        sql<string>`(select group_concat(${questions.id} || ' ' || coalesce(${questions.penHolderId}, '') || ' ' || coalesce(${questions.dueAt} < ${sql.placeholder('nowMs')}, '')) from ${questions} where ${questions.state} = 'waiting')`,
      ),
    })
    .from(shop)
    .prepare(),
);

/**
 * The state of the floor for this viewer, as a mark that changes with everything their page would show differently. Which
 * builds they reach is asked of the database every time.
 */
async function floorState(viewer: Viewer, nowMs: number): Promise<string> {
  const { role } = viewer;
  if (role !== 'builder' && role !== 'rep' && role !== 'admin') throw new Error('the floor is for staff');
  const state = await stateOf(role).get({ viewerId: viewer.id, nowMs });
  const today = dayOf(nowMs, state?.zone ?? 'UTC');
  const whole = JSON.stringify([viewer.id, role, viewer.department, viewer.timeZone, today, state]);
  return `"${createHash('sha1').update(whole).digest('base64url')}"`;
}

const recentFloors = new RecentTexts(48_000_000);
const recentScreens = new RecentTexts(8_000_000);

/**
 * The floor as JSON text, unless the reader holds its state already: then `text` is null.
 * @throws OutOfReach for who is not staff
 */
export async function floorAnswer(
  viewer: Viewer,
  known: string | null,
  nowMs: number,
): Promise<{ etag: string; text: string | null }> {
  await requireCan(viewer, 'floor.read');
  const etag = await floorState(viewer, nowMs);
  if (etag === known) return { etag, text: null };
  const kept = recentFloors.get(etag);
  if (kept !== undefined) return { etag, text: kept };
  const text = JSON.stringify(await makeFloor(viewer, nowMs));
  // Changed while it was made: what was read may not be what this state is of, so it is shown once and not kept.
  if ((await floorState(viewer, nowMs)) !== etag) return { etag: '"unkept"', text };
  recentFloors.set(etag, text);
  return { etag, text };
}

/** The first rows of the floor as somebody wants it, with all there is to choose from. @throws OutOfReach */
export async function floorScreen(viewer: Viewer, wish: FloorWish, nowMs: number): Promise<FloorScreen> {
  await requireCan(viewer, 'floor.read');
  const key = `${await floorState(viewer, nowMs)} ${wishQuery(wish)}`;
  const kept = recentScreens.get(key);
  if (kept !== undefined) return JSON.parse(kept);
  const { etag, text } = await floorAnswer(viewer, null, nowMs);
  const floor: Floor = JSON.parse(text ?? '');
  const screen = screenOf(floor, wish);
  if (key.startsWith(`${etag} `)) recentScreens.set(key, JSON.stringify(screen));
  return screen;
}

const ownerName = ownerNameOf(builds.id);
const repName = sql<
  string | null
>`(select ${users.name} from ${assignments} join ${users} on ${users.id} = ${assignments.userId} where ${assignments.buildId} = ${builds.id} and ${assignments.endedAt} is null and ${users.role} = 'rep' order by ${assignments.startedAt} limit 1)`;
/** When the owner last got something new to see. */
export const lastNewsAt = sql<
  number | null
>`(select max(${entries.datedAt}) from ${entries} where ${entries.buildId} = ${builds.id} and ${entries.audience} = 'buyer' and ${entries.state} = 'published')`;
const isOwn = (viewer: Viewer) =>
  sql<number>`exists (select 1 from ${assignments} where ${assignments.buildId} = ${builds.id} and ${assignments.userId} = ${viewer.id} and ${assignments.endedAt} is null)`;

function reachedBuilds(viewer: Viewer) {
  return db()
    .select({
      id: builds.id,
      routeId: builds.routeId,
      orderNumber: builds.orderNumber,
      instrument: builds.instrument,
      finishHex: builds.finishHex,
      rack: builds.rack,
      orderedAt: builds.orderedAt,
      readyAt: builds.readyAt,
      isHeld: sql<number>`not ${isOpen}`,
      ownerName: correlated(ownerName),
      repName: correlated(repName),
      lastNewsAt: correlated(lastNewsAt),
      isOwn: correlated(isOwn(viewer)),
    })
    .from(builds)
    .where(and(onTheFloor, buildIsVisible(viewer)))
    .orderBy(asc(builds.orderNumber));
}

async function latestWindows(ids: string[]) {
  const rows = await db()
    .select({
      buildId: readyWindows.buildId,
      kind: readyWindows.kind,
      earliestOn: readyWindows.earliestOn,
      latestOn: readyWindows.latestOn,
    })
    .from(readyWindows)
    .where(
      and(
        inArray(readyWindows.buildId, ids),
        sql`${readyWindows.givenOn} = (select max(w.given_on) from ready_windows w where w.build_id = ${readyWindows.buildId})`,
      ),
    );
  return new Map(rows.map((row) => [row.buildId, row]));
}

function routesOf({ routes }: Basis): FloorRoute[] {
  const ids = [...new Set(routes.map(({ routeId }) => routeId))];
  return ids.map((id) => {
    const stages = routes.filter(({ routeId }) => routeId === id);
    return { id, name: stages[0]?.routeName ?? '', stages: stages.map(({ key, name }) => ({ key, name })) };
  });
}

/** How often the shop's past windows held, all routes together; 0 to 1. */
function shareHeld({ judged }: Basis): number | null {
  const all = [...judged.values()].flatMap((windows) => judge(windows).all ?? []);
  const of = all.reduce((sum, each) => sum + each.of, 0);
  return of === 0
    ? null
    : coverageOf(
        all.reduce((sum, each) => sum + each.held, 0),
        of,
      ).share;
}

function figuresOf(rows: readonly FloorRow[], held: number | null): FloorFigures {
  return {
    onFloor: rows.length,
    quiet: rows.filter(({ quiet }) => quiet > 0).length,
    longestSilenceDays: Math.max(0, ...rows.map(({ silentDays }) => silentDays)),
    late: rows.filter(({ isLate }) => isLate).length,
    waiting: rows.filter(({ isStopped }) => isStopped).length,
    held,
  };
}

async function makeFloor(viewer: Viewer, nowMs: number): Promise<Floor> {
  const [basis, found, numbersOnly, departments] = await Promise.all([
    unscopedForecastBasis(nowMs),
    reachedBuilds(viewer),
    listNumbersOnly(viewer),
    listDepartments(),
  ]);
  const ids = found.map(({ id }) => id);
  const [progress, windows, waits] = await Promise.all([
    unscopedProgress(ids),
    latestWindows(ids),
    waitsByBuild(viewer, basis.today, nowMs),
  ]);
  const routes = routesOf(basis);
  const rows = found.flatMap(({ id, routeId, isHeld, isOwn: own, ...build }) => {
    const stages = progress.get(id);
    if (!stages) return [];
    const source = {
      ...build,
      isHeld: Boolean(isHeld),
      isOwn: Boolean(own),
      window: windows.get(id) ?? null,
      waits: waits.get(id) ?? [],
    };
    return [makeRow(source, { id, routeId, ...stages }, basis, routes, viewer)];
  });
  return { figures: figuresOf(rows, shareHeld(basis)), routes, departments, numbersOnly, rows };
}

async function listNumbersOnly(viewer: Viewer): Promise<string[]> {
  const rows = await db()
    .select({ orderNumber: builds.orderNumber })
    .from(builds)
    .where(and(onTheFloor, buildIsKnownByNumber(viewer)))
    .orderBy(asc(builds.orderNumber));
  return rows.map(({ orderNumber }) => orderNumber);
}

/** The builds of one rack that the viewer reaches, and how many others stand on it. @throws OutOfReach */
export async function listRack(viewer: Viewer, rack: string, nowMs: number) {
  const { text } = await floorAnswer(viewer, null, nowMs);
  const floor: Floor = JSON.parse(text ?? '');
  const others = await db()
    .select({ orderNumber: builds.orderNumber })
    .from(builds)
    .where(and(onTheFloor, eq(builds.rack, rack), sql`not ${buildIsVisible(viewer)}`))
    .orderBy(asc(builds.orderNumber));
  const rows = floor.rows.filter((row) => row.rack === rack);
  if (rows.length === 0 && (others.length === 0 || viewer.role !== 'admin')) throw new OutOfReach();
  return { rows, routes: floor.routes, others: others.map(({ orderNumber }) => orderNumber) };
}
