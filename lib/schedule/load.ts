import type { WorkingCalendar } from './calendar-check';
import { indexOf, workingDaysUpTo } from './calendar-index';
import { addDays, dayNumber, mondayOf } from './days';
import { endNextStage, endStageNow, startToday, type Ending, type StageAhead, type StageNow } from './walk';

export type LoadStage<Stage extends StageAhead = StageAhead> = Stage & { readonly department: string };

/** A build on the floor. One that waits for its owner is taken as answered today. */
export type LoadBuild = {
  /** Null between two stages. */
  readonly now: LoadStage<StageNow> | null;
  readonly ahead: readonly LoadStage[];
};

export type Department = {
  readonly key: string;
  /** Builds it can take in per week; null when nobody said. */
  readonly capacityPerWeek: number | null;
};

export type WeekLoad = {
  /** A Monday, YYYY-MM-DD; the first is that of today's week. */
  weekStartsOn: string;
  /** Builds expected to come in from another department in that week (in the first: from today on). */
  arriving: number;
  /** Builds expected to be there when the week ends. */
  present: number;
  isOverCapacity: boolean;
};

export type DepartmentLoad = {
  key: string;
  capacityPerWeek: number | null;
  /** Builds that are there today. */
  presentNow: number;
  /** Of those, builds longer in their stage than any before: where they go is not counted. */
  unsayable: number;
  weeks: WeekLoad[];
};

const WEEKS = 8;

type Tally = { arriving: Float64Array; present: Float64Array; presentNow: number; unsayable: number };

/** Share that has ended by the last day of each week, given as numbers of working days. */
function endedBy({ first, pmf }: Ending, weekEnds: readonly number[]): number[] {
  let share = 0;
  let i = 0;
  return weekEnds.map((end) => {
    for (; i < pmf.length && first + i <= end; i++) share += pmf[i] ?? 0;
    return share;
  });
}

const NEVER = Array.from({ length: WEEKS }, () => 0);
const ALWAYS = Array.from({ length: WEEKS }, () => 1);

function tallyStage(tally: Tally, begun: readonly number[], ended: readonly number[], comesIn: boolean): void {
  for (let week = 0; week < WEEKS; week++) {
    const arrived = (begun[week] ?? 0) - (week === 0 ? 0 : (begun[week - 1] ?? 0));
    if (comesIn) tally.arriving[week] = (tally.arriving[week] ?? 0) + arrived;
    tally.present[week] = (tally.present[week] ?? 0) + (begun[week] ?? 0) - (ended[week] ?? 0);
  }
}

type Walk = { calendar: WorkingCalendar; today: string; weekEnds: readonly number[]; tallyOf: (key: string) => Tally };

function tallyBuild({ calendar, today, weekEnds, tallyOf }: Walk, { now, ahead }: LoadBuild): void {
  let ending = now === null ? startToday(calendar, today) : endStageNow(calendar, now, today);
  let begun = ending ? endedBy(ending, weekEnds) : NEVER;
  if (now !== null) {
    const tally = tallyOf(now.department);
    tally.presentNow++;
    if (ending === null) tally.unsayable++;
    tallyStage(tally, ALWAYS, begun, false);
  }
  let department = now?.department ?? null;
  for (const stage of ahead) {
    if (ending === null) return;
    ending = endNextStage(calendar, ending, stage);
    const ended = ending ? endedBy(ending, weekEnds) : NEVER;
    tallyStage(tallyOf(stage.department), begun, ended, stage.department !== department);
    department = stage.department;
    begun = ended;
  }
}

function weekEndsFrom(calendar: WorkingCalendar, today: string): number[] {
  const index = indexOf(calendar);
  const monday = dayNumber(mondayOf(today));
  return Array.from({ length: WEEKS }, (_, week) => workingDaysUpTo(index, monday + 7 * week + 6));
}

function weeksOf({ arriving, present }: Tally, monday: string, capacityPerWeek: number | null): WeekLoad[] {
  return Array.from({ length: WEEKS }, (_, week) => ({
    weekStartsOn: addDays(monday, 7 * week),
    arriving: arriving[week] ?? 0,
    present: present[week] ?? 0,
    isOverCapacity: capacityPerWeek !== null && (arriving[week] ?? 0) > capacityPerWeek,
  }));
}

/**
 * What comes to each department in this week and the seven after it: for every build the probability of each of its
 * stages beginning and ending by the end of a week, summed. The same distributions as the ready windows'.
 * @throws RangeError for a calendar that cannot be used, a bad date, or a stage of a department that is not listed
 */
export function departmentLoads(
  calendar: WorkingCalendar,
  today: string,
  builds: readonly LoadBuild[],
  departments: readonly Department[],
): DepartmentLoad[] {
  const tallies = new Map<string, Tally>(
    departments.map(({ key }) => [
      key,
      { arriving: new Float64Array(WEEKS), present: new Float64Array(WEEKS), presentNow: 0, unsayable: 0 },
    ]),
  );
  const tallyOf = (key: string) => {
    const tally = tallies.get(key);
    if (!tally) throw new RangeError(`There is no department ${key}.`);
    return tally;
  };
  const walk = { calendar, today, weekEnds: weekEndsFrom(calendar, today), tallyOf };
  for (const build of builds) tallyBuild(walk, build);
  return departments.map(({ key, capacityPerWeek }) => {
    const tally = tallyOf(key);
    const { presentNow, unsayable } = tally;
    return { key, capacityPerWeek, presentNow, unsayable, weeks: weeksOf(tally, mondayOf(today), capacityPerWeek) };
  });
}
