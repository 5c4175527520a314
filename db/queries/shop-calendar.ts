import { and, asc, eq, gte } from 'drizzle-orm';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { closures, departments, routes, routeStages, shop, workingHours } from '../schema';
import { BadInput, OutOfReach } from '@/lib/errors';
import { addDays } from '@/lib/schedule/days';
import { dayOf } from '@/lib/schedule/calendar';
import type { Holiday } from '@/lib/schedule/holidays';
import type { Hours } from '@/lib/schedule/week-form';
import type { Capacity, NewClosure, StageEstimate } from '@/lib/validation/calendar';
import type { Viewer } from '@/lib/viewer';

/** Whatever dates rest on has changed: windows from before are reckoned anew. */
async function touchSchedule(tx: Tx, nowMs: number): Promise<void> {
  await tx.update(shop).set({ scheduleChangedAt: nowMs });
}

function change(viewer: Viewer, nowMs: number, work: (tx: Tx) => Promise<void>): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'shop.set_up');
    await work(tx);
    await touchSchedule(tx, nowMs);
  });
}

const LOOK_BACK_DAYS = 31;

/** The calendar as it is set up, with the days off that are not long past. @throws OutOfReach */
export async function requireShopCalendar(viewer: Viewer, nowMs: number) {
  await requireCan(viewer, 'shop.set_up');
  const [owner] = await db()
    .select({ zone: shop.timeZone, country: shop.holidayCountry, region: shop.holidayRegion })
    .from(shop);
  const { zone = 'UTC', country = null, region = null } = owner ?? {};
  const [hours, days] = await Promise.all([
    db().select().from(workingHours).orderBy(asc(workingHours.weekday), asc(workingHours.opensAtMin)),
    db()
      .select()
      .from(closures)
      .where(gte(closures.endsOn, addDays(dayOf(nowMs, zone), -LOOK_BACK_DAYS)))
      .orderBy(asc(closures.startsOn), asc(closures.id)),
  ]);
  return { zone, country, region, hours, closures: days };
}

export type ShopCalendar = Awaited<ReturnType<typeof requireShopCalendar>>;

/** Replaces the working week. */
export function saveHours(viewer: Viewer, hours: Hours[], nowMs: number): Promise<void> {
  return change(viewer, nowMs, async (tx) => {
    await tx.delete(workingHours);
    await tx.insert(workingHours).values(hours);
  });
}

export function saveShopZone(viewer: Viewer, zone: string, nowMs: number): Promise<void> {
  return change(viewer, nowMs, async (tx) => {
    await tx.update(shop).set({ timeZone: zone });
  });
}

type Place = { country: string | null; region: string | null };

/** Keeps the country, and puts its holidays from `fromOn` on in the place of those that were listed before. */
export function saveHolidays(
  viewer: Viewer,
  { country, region }: Place,
  holidays: Holiday[],
  fromOn: string,
  nowMs: number,
): Promise<void> {
  return change(viewer, nowMs, async (tx) => {
    await tx.update(shop).set({ holidayCountry: country, holidayRegion: region });
    await tx.delete(closures).where(and(eq(closures.isHoliday, true), gte(closures.startsOn, fromOn)));
    if (holidays.length === 0) return;
    await tx
      .insert(closures)
      .values(holidays.map(({ on, name }) => ({ startsOn: on, endsOn: on, name, isHoliday: true })));
  });
}

export function addClosure(viewer: Viewer, closure: NewClosure, nowMs: number): Promise<void> {
  return change(viewer, nowMs, async (tx) => {
    await tx.insert(closures).values(closure);
  });
}

/** Twice is once. */
export function removeClosure(viewer: Viewer, closureId: string, nowMs: number): Promise<void> {
  return change(viewer, nowMs, async (tx) => {
    await tx.delete(closures).where(eq(closures.id, closureId));
  });
}

/** Every route with its stages as they are set up, and what each department can take. @throws OutOfReach */
export async function requireStageSettings(viewer: Viewer) {
  await requireCan(viewer, 'shop.set_up');
  const [stages, rooms] = await Promise.all([
    db()
      .select({
        routeId: routes.id,
        routeName: routes.name,
        key: routeStages.key,
        name: routeStages.name,
        bestDays: routeStages.bestDays,
        likelyDays: routeStages.likelyDays,
        worstDays: routeStages.worstDays,
        minimumWaitDays: routeStages.minimumWaitDays,
        silenceDays: routeStages.silenceDays,
      })
      .from(routes)
      .innerJoin(routeStages, eq(routeStages.routeId, routes.id))
      .orderBy(asc(routes.name), asc(routeStages.position)),
    db()
      .select({ key: departments.key, name: departments.name, capacityPerWeek: departments.capacityPerWeek })
      .from(departments)
      .orderBy(asc(departments.position)),
  ]);
  return { stages, departments: rooms };
}

export type StageSetting = Awaited<ReturnType<typeof requireStageSettings>>['stages'][number];
export type DepartmentSetting = Awaited<ReturnType<typeof requireStageSettings>>['departments'][number];

/** @throws OutOfReach for a stage that is not on the route */
export function saveStage(
  viewer: Viewer,
  { routeId, stageKey, ...estimate }: StageEstimate,
  nowMs: number,
): Promise<void> {
  return change(viewer, nowMs, async (tx) => {
    const saved = await tx
      .update(routeStages)
      .set(estimate)
      .where(and(eq(routeStages.routeId, routeId), eq(routeStages.key, stageKey)))
      .returning({ id: routeStages.id });
    if (saved.length === 0) throw new OutOfReach();
  });
}

/** @throws BadInput for a department that there is not */
export function saveCapacity(viewer: Viewer, { department, capacityPerWeek }: Capacity, nowMs: number): Promise<void> {
  return change(viewer, nowMs, async (tx) => {
    const saved = await tx
      .update(departments)
      .set({ capacityPerWeek })
      .where(eq(departments.key, department))
      .returning({ key: departments.key });
    if (saved.length === 0)
      throw new BadInput({ capacityPerWeek: 'There is no such department any more. Reload the page.' });
  });
}
