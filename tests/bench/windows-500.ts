import { addWorkingDays, countWorkingDays } from '../../lib/schedule/calendar';
import { stageDurations, type PastStage } from '../../lib/schedule/distribution';
import { readyWindow } from '../../lib/schedule/ready-window';
import type { StageAhead } from '../../lib/schedule/walk';
import { madeCalendar, madeRoutes, makeBuilds, seeded, type MadeBuild } from './made-history';
import { median, valueBelow, type Bench } from './row';

const TODAY = '2026-12-01';
const BUILDS = 500;
const ROUNDS = 7;

type OnFloor = { route: number; position: number; startedOn: string };

/** What each stage of each route took, out of a thousand builds delivered in the years before. */
function pastStages(builds: MadeBuild[]): PastStage[][][] {
  return madeRoutes.map((stages, route) =>
    stages.map((_, position) =>
      builds
        .filter((build) => build.route === route)
        .flatMap(({ rack, visits }) => visits.slice(position, position + 1).map((visit) => ({ ...visit, rack })))
        .map(({ startedOn, finishedOn, rack }) => ({
          days: countWorkingDays(madeCalendar, startedOn, finishedOn),
          startedOn,
          finishedOn,
          rack,
        })),
    ),
  );
}

function putOnFloor(random: () => number): OnFloor[] {
  return Array.from({ length: BUILDS }, () => ({
    route: Math.floor(random() * madeRoutes.length),
    position: Math.floor(random() * (madeRoutes[0]?.length ?? 0)),
    startedOn: addWorkingDays(madeCalendar, TODAY, -Math.floor(random() * 4)),
  }));
}

function stagesAhead(past: PastStage[][][]): StageAhead[][] {
  return madeRoutes.map((stages, route) =>
    stages.map(({ key, minimumWaitDays }, position) => {
      const durations = stageDurations(past[route]?.[position] ?? [], null, TODAY);
      return { key, name: key, durations, minimumWaitDays };
    }),
  );
}

/** As every night: the distributions of every route anew, then every build's window. */
function recompute(past: PastStage[][][], floor: OnFloor[]): number {
  const routes = stagesAhead(past);
  let given = 0;
  for (const { route, position, startedOn } of floor) {
    const [stage, ...ahead] = (routes[route] ?? []).slice(position);
    if (!stage) continue;
    const now = { ...stage, startedOn, stoppedDays: 0 };
    const window = readyWindow({ today: TODAY, calendar: madeCalendar, now, ahead, waitingOn: null, adjustment: null });
    if (window.kind === 'window') given++;
  }
  return given;
}

function convolvePlainly(one: number[], other: number[]): number[] {
  const sum: number[] = new Array<number>(one.length + other.length - 1).fill(0);
  for (let i = 0; i < one.length; i++) {
    for (let j = 0; j < other.length; j++) sum[i + j] = (sum[i + j] ?? 0) + (one[i] ?? 0) * (other[j] ?? 0);
  }
  return sum;
}

/** The same sums as plain loops over plain arrays: no calendar, no waits, no words. */
function addUp(routes: number[][][], floor: OnFloor[]): number {
  let mass = 0;
  for (const { route, position } of floor) {
    const total = (routes[route] ?? []).slice(position).reduce(convolvePlainly, [1]);
    mass += total.reduce((sum, share) => sum + share, 0);
  }
  return mass;
}

function medianMs(work: () => number, expected: number): number {
  const times: number[] = [];
  for (let round = 0; round < ROUNDS; round++) {
    const startMs = performance.now();
    const result = work();
    times.push(performance.now() - startMs);
    if (Math.abs(result - expected) > 1e-6) throw new Error(`${result} windows of ${expected}`);
  }
  return median(times);
}

export const windows500: Bench = {
  name: 'windows-500',
  run: async () => {
    const random = seeded(500);
    const past = pastStages(makeBuilds(random));
    const floor = putOnFloor(random);
    const plain = stagesAhead(past).map((stages) => stages.map(({ durations }) => Array.from(durations?.pmf ?? [1])));
    const value = medianMs(() => recompute(past, floor), BUILDS);
    return [
      valueBelow(1000, { name: 'windows-500', value, floor: medianMs(() => addUp(plain, floor), BUILDS), unit: 'ms' }),
    ];
  },
};
