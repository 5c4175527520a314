import { standOf, stageNowOf, type BuildToForecast, type ForecastBasis } from './forecast';
import { stageOutlook } from './outlook';
import type { FloorStage } from './waits';
import type { LoadBuild } from '../schedule/load';

/** A build as the load of the departments counts it. */
export function loadBuildOf(build: BuildToForecast, basis: ForecastBasis): LoadBuild {
  const { now, ahead } = standOf(build.stages);
  const stageAhead = ({ key, name, department }: FloorStage) => {
    const { durations, minimumWaitDays } = stageOutlook(basis.outlooks, build.routeId, key);
    return { key, name, department, durations, minimumWaitDays };
  };
  return {
    now: now && { ...stageNowOf(build, now, basis), department: now.department },
    ahead: ahead.map(stageAhead),
  };
}
