import { artists } from './cast';
import { mulberry32 } from './pictures/random';
import { demoRoutes, finishes, instruments, outlookOf, type DemoStage } from './shop-floor';
import { DAY_MS, travelWith, walkDelivered, walkStages, type Random, type TimedStage } from './timeline';

export type PlannedBuild = {
  orderNumber: string;
  instrument: (typeof instruments)[number];
  finish: (typeof finishes)[number];
  /** Place of the owner among all buyers, the named ones first, or among the artists when `isArtist`. */
  owner: number;
  isArtist: boolean;
  rack: string | null;
  stages: TimedStage[];
  deliveredAt: number | null;
  heldUntilAt: number | null;
  /** Since when its owner has seen nothing; null where pages go on as usual. */
  silentSinceAt: number | null;
  /** Told at length, with pictures on every page. */
  isFeatured: boolean;
};

export const FLOOR_BUILDS = 42;
export const DELIVERED_BUILDS = 200;
/** So many of those delivered last have every page, reading and photo. */
export const WHOLE_DELIVERED = 3;

/** Stages that the builds of one rack pass together. */
const GLUED = 7;
/** Builds on the floor that have been in their stage for far too long. */
const STUCK = [12, 16, 35];
/**
 * Builds that have gone quiet, with their silence as a multiple of the longest that their stage allows: of the first the
 * holder of the stage was told, of the second the rep as well.
 */
const QUIET = new Map([
  [24, 1.4],
  [29, 2.4],
]);
/** Work went on in a quiet build's stage for so long before its last page. */
const BEFORE_SILENCE_DAYS = 3;

function pick<T>(list: readonly T[], index: number): T {
  const found = list[index % list.length];
  if (found === undefined) throw new RangeError('nothing to pick from');
  return found;
}

/** Every build of the demo world as of `nowMs`: those on the floor, spread over the stages, and those delivered before. */
export function planBuilds(nowMs: number): PlannedBuild[] {
  const random = mulberry32(2417);
  const floor = Array.from({ length: FLOOR_BUILDS }, (_, index) => planFloorBuild(index, nowMs, random));
  const delivered = Array.from({ length: DELIVERED_BUILDS }, (_, index) => planDelivered(index, nowMs, random));
  return [...floor, ...delivered.map((build, index) => onOneRack(build, delivered[index - 1], index, nowMs))];
}

/** Every fifth delivered build went with the one before on one rack, where they are of one kind. */
function onOneRack(build: PlannedBuild, other: PlannedBuild | undefined, index: number, nowMs: number): PlannedBuild {
  const isBatch = index % 5 === 2 && index > WHOLE_DELIVERED && other?.instrument.route === build.instrument.route;
  const isMate = index % 5 === 1 && index >= WHOLE_DELIVERED;
  const rack = `rack ${1 + (Math.floor(index / 5) % 12)}`;
  if (!isBatch || !other) return isMate ? { ...build, rack } : build;
  const stages = travelWith(other.stages, build.stages, GLUED);
  const deliveredAt = stages.at(-1)?.finishedAt ?? null;
  return deliveredAt === null || deliveredAt > nowMs - DAY_MS ? build : { ...build, rack, stages, deliveredAt };
}

/** For how many days the owner of the build at this place has seen nothing new; null where that is no matter. */
function silenceOf(index: number, stage: DemoStage | undefined): number | null {
  const periods = QUIET.get(index);
  return periods === undefined || !stage ? null : Math.ceil(periods * outlookOf(stage).silenceDays);
}

function planFloorBuild(index: number, nowMs: number, random: Random): PlannedBuild {
  const isArtist = index === 1 || index === 9;
  const instrument = pick(instruments, index);
  const { stages } = pick(demoRoutes, instrument.route);
  // The first is in the finish room, so that whoever opens the demo finds a diary with a story.
  const position = index === 0 ? 8 : index === 1 ? 10 : Math.floor(random() * stages.length);
  const usually = stages[position]?.usualDays ?? 4;
  const share = random();
  const silentDays = silenceOf(index, stages[position]);
  const usualDaysIn = STUCK.includes(index) ? Math.round(usually * 1.9) + 5 : Math.floor(share * usually);
  const daysIn = silentDays === null ? usualDaysIn : silentDays + BEFORE_SILENCE_DAYS;
  return {
    orderNumber: `Q-${2417 + index}`,
    instrument,
    finish: pick(finishes, index * 3),
    owner: isArtist ? (index === 1 ? 0 : 1) : index,
    isArtist,
    rack: `rack ${1 + (position % 12)}`,
    stages: walkStages(stages, position, daysIn, nowMs, random),
    deliveredAt: null,
    heldUntilAt: index === 1 ? nowMs + 45 * DAY_MS : null,
    silentSinceAt: silentDays === null ? null : nowMs - silentDays * DAY_MS,
    isFeatured: index < 6 || index === 9 || position === stages.length - 1,
  };
}

/** The whole ones wear finishes that the floor has pictures of. */
function finishOfDelivered(index: number, random: Random) {
  const drawn = Math.floor(random() * finishes.length);
  return pick(finishes, index < WHOLE_DELIVERED ? index * 3 : drawn);
}

function planDelivered(index: number, nowMs: number, random: Random): PlannedBuild {
  const instrument = pick(instruments, index + Math.floor(random() * 3));
  const { stages } = pick(demoRoutes, instrument.route);
  const deliveredAt = nowMs - Math.floor((index + 1) * 3.2 + random() * 6) * DAY_MS;
  const isArtist = index % 40 === 7;
  return {
    orderNumber: `Q-${2416 - index}`,
    instrument,
    finish: finishOfDelivered(index, random),
    // Some come back for another; Maren, the first, has just the one.
    owner: isArtist ? index % artists.length : 3 + Math.floor(random() * 120),
    isArtist,
    rack: null,
    stages: walkDelivered(stages, deliveredAt, random),
    deliveredAt,
    heldUntilAt: null,
    silentSinceAt: null,
    isFeatured: index < WHOLE_DELIVERED,
  };
}
