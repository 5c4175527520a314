import { asc } from 'drizzle-orm';
import { unscopedForecastBasis, type Basis } from './forecast-basis';
import { unscopedFloorBuilds } from './ready-windows';
import { requireCan } from './standing';
import { db } from '../client';
import { departments, shop } from '../schema';
import { standOf } from '@/lib/floor/forecast';
import { loadBuildOf } from '@/lib/floor/load-build';
import { departmentLoads } from '@/lib/schedule/load';
import type { Viewer } from '@/lib/viewer';

function listCapacities() {
  return db()
    .select({ key: departments.key, name: departments.name, capacityPerWeek: departments.capacityPerWeek })
    .from(departments)
    .orderBy(asc(departments.position));
}

/** How many builds stand in each stage today, in the order in which stages are passed. */
function countByStage(stands: ReturnType<typeof standOf>[]) {
  const counts = new Map<string, { name: string; department: string; position: number; count: number }>();
  for (const { now } of stands) {
    if (!now) continue;
    const { key, name, department, position } = now;
    const known = counts.get(key) ?? { name, department, position, count: 0 };
    counts.set(key, { ...known, count: known.count + 1 });
  }
  return [...counts.values()].sort((one, other) => one.position - other.position);
}

async function makeLoad(basis: Basis) {
  const [listed, floor] = await Promise.all([listCapacities(), unscopedFloorBuilds()]);
  const loads = departmentLoads(
    basis.calendar,
    basis.today,
    floor.map((build) => loadBuildOf(build, basis)),
    listed,
  );
  const stages = countByStage(floor.map((build) => standOf(build.stages)));
  return loads.map((load) => ({
    ...load,
    name: listed.find(({ key }) => key === load.key)?.name ?? load.key,
    stages: stages.filter(({ department }) => department === load.key),
  }));
}

export type DepartmentLoadRow = Awaited<ReturnType<typeof makeLoad>>[number];

let kept: { state: string; loads: DepartmentLoadRow[] } | null = null;

/**
 * What stands at each department today and what comes to it in the next eight weeks, all builds of the shop together: no
 * build can be told from the sums. As of the last time windows were reckoned.
 * @throws OutOfReach for who is not staff
 */
export async function listLoads(viewer: Viewer, nowMs: number): Promise<DepartmentLoadRow[]> {
  await requireCan(viewer, 'floor.read');
  const basis = await unscopedForecastBasis(nowMs);
  const [owner] = await db().select({ changed: shop.scheduleChangedAt, computed: shop.windowsComputedAt }).from(shop);
  const state = `${basis.today} ${owner?.changed} ${owner?.computed}`;
  if (kept?.state === state) return kept.loads;
  const loads = await makeLoad(basis);
  kept = { state, loads };
  return loads;
}
