import { addWorkingDays, type Closure, type WorkingCalendar } from '../../lib/schedule/calendar';
import { addDays } from '../../lib/schedule/days';
import type { ThreePoint } from '../../lib/schedule/three-point';

/** A shop whose distributions are known, because they were made up here. */
export type MadeStage = {
  key: string;
  /** Median and spread of a lognormal duration in working days. */
  medianDays: number;
  spread: number;
  minimumWaitDays: number;
  /** How much longer it takes from the change on. */
  afterChange: number;
};

export type MadeVisit = { key: string; startedOn: string; finishedOn: string; days: number };
export type MadeBuild = { id: string; route: number; rack: string; visits: MadeVisit[]; readyOn: string };

const BUILDS = 1000;
const FIRST_DAY = '2020-01-06';
/** The finish room loses a booth, and a second machine comes: from here on every stage takes `afterChange` of its time. */
export const CHANGE_ON = '2023-03-01';
const TOGETHER_UNTIL = 7;

const stage = (key: string, medianDays: number, spread: number, afterChange = 1, minimumWaitDays = 0): MadeStage => ({
  key,
  medianDays,
  spread,
  afterChange,
  minimumWaitDays,
});

const solid = [
  stage('lumber', 5, 0.5),
  stage('wood-room', 22, 0.2, 1, 28),
  stage('blanks', 6, 0.4),
  stage('machining', 10, 0.4, 0.75),
  stage('neck-board', 11, 0.35),
  stage('frets', 6, 0.45),
  stage('body-joint', 8, 0.4),
  stage('pre-paint', 4, 0.6),
  stage('colour-clear', 17, 0.3, 1.35, 14),
  stage('sand-buff', 6, 0.45, 1.2),
  stage('hardware-setup', 6, 0.5),
  stage('final-check', 4, 0.6),
];

const slower = (factor: number) => solid.map((each) => ({ ...each, medianDays: each.medianDays * factor }));
export const madeRoutes: MadeStage[][] = [solid, slower(1.3), slower(1.1)];

/** A generator of numbers from 0 to 1 that gives the same ones every time (mulberry32). */
export function seeded(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296;
  };
}

const gauss = (random: () => number) => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());

function closuresOf(year: number): Closure[] {
  const closed = (startsOn: string, endsOn: string, name: string) => ({ startsOn, endsOn, name, closesAtMin: null });
  return [
    closed(`${year}-12-24`, `${year + 1}-01-01`, 'Year end'),
    closed(`${year}-08-03`, `${year}-08-14`, 'Summer'),
    closed(`${year}-07-03`, `${year}-07-04`, 'Independence Day'),
  ];
}

export const madeCalendar: WorkingCalendar = {
  zone: 'America/Chicago',
  hours: [1, 2, 3, 4, 5].map((weekday) => ({ weekday, opensAtMin: 480, closesAtMin: 1020 })),
  closures: Array.from({ length: 12 }, (_, i) => closuresOf(2019 + i)).flat(),
};

/** What a foreman would say: near the truth, up to a tenth off, and never told of the change. */
export function estimateOf({ medianDays, spread }: MadeStage, random: () => number): ThreePoint {
  const likelyDays = medianDays * (0.95 + 0.2 * random());
  return {
    optimisticDays: likelyDays * Math.exp(-2 * spread),
    likelyDays,
    pessimisticDays: likelyDays * Math.exp(2.2 * spread),
  };
}

function visit(
  { key, medianDays, spread, afterChange, minimumWaitDays }: MadeStage,
  startedOn: string,
  z: number,
): MadeVisit {
  const slowed = startedOn >= CHANGE_ON ? afterChange : 1;
  const worked = Math.max(1, Math.round(medianDays * slowed * Math.exp(spread * z)));
  const byWork = addWorkingDays(madeCalendar, startedOn, worked);
  const byWait = addWorkingDays(madeCalendar, addDays(startedOn, minimumWaitDays), 0);
  return { key, startedOn, finishedOn: byWork > byWait ? byWork : byWait, days: worked };
}

/** The builds of a rack travel together until they are glued, then each at its own pace. */
function makeRack(route: number, rack: string, size: number, startOn: string, random: () => number): MadeBuild[] {
  const stages = madeRoutes[route] ?? [];
  const shared = stages.map(() => gauss(random));
  return Array.from({ length: size }, (_, i) => {
    let at = startOn;
    const visits = stages.map((each, position) => {
      const made = visit(each, at, position < TOGETHER_UNTIL ? (shared[position] ?? 0) : gauss(random));
      at = made.finishedOn;
      return made;
    });
    return { id: `${rack}.${i}`, route, rack, visits, readyOn: at };
  });
}

/** A thousand builds, in the order in which they were begun. */
export function makeBuilds(random: () => number): MadeBuild[] {
  const builds: MadeBuild[] = [];
  let on = addWorkingDays(madeCalendar, FIRST_DAY, 0);
  for (let rack = 0; builds.length < BUILDS; rack++) {
    const size = Math.min(BUILDS - builds.length, 1 + Math.floor(random() * 4));
    builds.push(...makeRack(Math.floor(random() * 3), `R${rack}`, size, on, random));
    on = addWorkingDays(madeCalendar, on, 1 + Math.floor(random() * 4));
  }
  return builds;
}
