import { unscopedForecastBasis } from './forecast-basis';
import { requireCan } from './standing';
import { firstOfEachStage, judge } from '@/lib/schedule/calibration';
import type { Viewer } from '@/lib/viewer';

/**
 * How the windows of each route held, and what is made of it, all builds of the shop together.
 * @throws OutOfReach for who is not staff
 */
export async function listCalibrations(viewer: Viewer, nowMs: number) {
  await requireCan(viewer, 'floor.read');
  const { routes, judged, measured } = await unscopedForecastBasis(nowMs);
  const routeIds = [...new Set(routes.map(({ routeId }) => routeId))];
  return routeIds.map((routeId) => {
    const stages = routes.filter((row) => row.routeId === routeId);
    const found = judge(firstOfEachStage(judged.get(routeId) ?? []));
    return {
      routeId,
      name: stages[0]?.routeName ?? '',
      ...found,
      ofRoute: measured.get(routeId)?.ofRoute ?? null,
      byStage: stages.flatMap(({ key, name }) => {
        const coverage = found.byStage.find(({ stageKey }) => stageKey === key)?.coverage;
        return coverage ? [{ key, name, coverage, adjustment: measured.get(routeId)?.byStage.get(key) ?? null }] : [];
      }),
    };
  });
}

export type RouteCalibration = Awaited<ReturnType<typeof listCalibrations>>[number];
