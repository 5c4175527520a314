import type { Adjustment } from '../../lib/schedule/adjustment';
import { addWorkingDays, countWorkingDays } from '../../lib/schedule/calendar';
import {
  adjustmentFor,
  measureAdjustments,
  type JudgedWindow,
  type MeasuredAdjustments,
} from '../../lib/schedule/calibration';
import { mondayOf } from '../../lib/schedule/days';
import { stageDurations, type PastStage, type StageDurations } from '../../lib/schedule/distribution';
import { readyWindow } from '../../lib/schedule/ready-window';
import type { StageAhead } from '../../lib/schedule/walk';
import { estimateOf, madeCalendar, madeRoutes, makeBuilds, seeded, type MadeBuild } from './made-history';

type Asked = { build: MadeBuild; position: number; today: string; isFirst: boolean };

/** What the product reads of a route: the windows of its last builds. */
const RECENT_WINDOWS = 1500;

/** Everything the shop knows in a week: nothing that happened later. */
class Knowledge {
  private delivered: MadeBuild[] = [];
  private readonly judged: JudgedWindow[][] = madeRoutes.map(() => []);
  private readonly given = new Map<string, JudgedWindow[]>();
  private readonly durations = new Map<string, StageDurations | null>();
  private readonly adjustments = new Map<number, MeasuredAdjustments>();
  private readonly estimates;

  constructor(
    private readonly leaving: MadeBuild[],
    random: () => number,
  ) {
    this.estimates = madeRoutes.map((stages) => stages.map((stage) => estimateOf(stage, random)));
  }

  /** The night before `today`: what was delivered is known from now on. */
  learnUntil(today: string): void {
    for (let next = this.leaving[0]; next && next.readyOn < today; next = this.leaving[0]) {
      this.leaving.shift();
      this.delivered.push(next);
      this.judged[next.route]?.push(...(this.given.get(next.id) ?? []));
    }
    this.durations.clear();
    this.adjustments.clear();
  }

  keep(window: JudgedWindow): void {
    this.given.set(window.buildId, [...(this.given.get(window.buildId) ?? []), window]);
  }

  ahead(route: number, position: number, today: string): StageAhead {
    const stage = madeRoutes[route]?.[position];
    if (!stage) throw new RangeError('no such stage');
    const key = `${route} ${stage.key}`;
    let durations = this.durations.get(key);
    if (durations === undefined) {
      durations = stageDurations(this.past(route, position), this.estimates[route]?.[position] ?? null, today);
      this.durations.set(key, durations);
    }
    return { key: stage.key, name: stage.key, durations, minimumWaitDays: stage.minimumWaitDays };
  }

  private past(route: number, position: number): PastStage[] {
    return this.delivered
      .filter((build) => build.route === route)
      .flatMap(({ rack, visits }) => {
        const visit = visits[position];
        if (!visit) return [];
        const { startedOn, finishedOn } = visit;
        return [{ days: countWorkingDays(madeCalendar, startedOn, finishedOn), startedOn, finishedOn, rack }];
      });
  }

  adjustment(route: number, stageKey: string, today: string): Adjustment | null {
    let measured = this.adjustments.get(route);
    if (measured === undefined) {
      measured = measureAdjustments((this.judged[route] ?? []).slice(-RECENT_WINDOWS), today);
      this.adjustments.set(route, measured);
    }
    return adjustmentFor(measured, stageKey);
  }
}

/** A window is asked for on the day a stage begins and on one day within it. */
function askedOf(build: MadeBuild, random: () => number): Asked[] {
  return build.visits.flatMap(({ startedOn, finishedOn }, position) => {
    const days = countWorkingDays(madeCalendar, startedOn, finishedOn);
    const within = addWorkingDays(madeCalendar, startedOn, Math.floor(random() * days));
    return [
      { build, position, today: startedOn, isFirst: true },
      { build, position, today: within, isFirst: false },
    ];
  });
}

function answer(knowledge: Knowledge, { build, position, today }: Asked): JudgedWindow | null {
  const visit = build.visits[position];
  if (!visit) return null;
  const now = { ...knowledge.ahead(build.route, position, today), startedOn: visit.startedOn, stoppedDays: 0 };
  const ahead = build.visits.slice(position + 1).map((_, i) => knowledge.ahead(build.route, position + 1 + i, today));
  const adjustment = knowledge.adjustment(build.route, visit.key, today);
  const window = readyWindow({ today, calendar: madeCalendar, now, ahead, waitingOn: null, adjustment });
  if (window.kind !== 'window') return null;
  const { earliestOn, likelyOn, latestOn, curve, raw } = window;
  return {
    buildId: build.id,
    stageKey: visit.key,
    givenOn: today,
    earliestOn,
    likelyOn,
    latestOn,
    rawEarliestOn: raw.earliestOn,
    rawLatestOn: raw.latestOn,
    yardstickDays: raw.yardstickDays,
    curve,
    readyOn: build.readyOn,
    waitedDays: 0,
  };
}

export type Backtest = { windows: JudgedWindow[]; unsayable: number };

/** Gives every window with what was known on its day, week by week, and judges it by the day the build was ready. */
export function backtest(seed: number): Backtest {
  const random = seeded(seed);
  const builds = makeBuilds(random);
  const leaving = [...builds].sort((one, other) => (one.readyOn < other.readyOn ? -1 : 1));
  const knowledge = new Knowledge(leaving, random);
  const asked = builds.flatMap((build) => askedOf(build, random));
  asked.sort((one, other) => (one.today < other.today ? -1 : 1));
  const windows: JudgedWindow[] = [];
  let week = '';
  for (const each of asked) {
    const monday = mondayOf(each.today);
    if (monday !== week) knowledge.learnUntil(monday);
    week = monday;
    const window = answer(knowledge, each);
    if (window === null) continue;
    windows.push(window);
    if (each.isFirst) knowledge.keep(window);
  }
  return { windows, unsayable: asked.length - windows.length };
}
