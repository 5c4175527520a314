import { daysBetween } from './days';
import { normalShare } from './normal';
import { blend, meanOf, normalise, varianceOf, type Pmf } from './pmf';
import { pertPmf, type ThreePoint } from './three-point';

/** One build's time in one stage. */
export type PastStage = {
  /** whole working days, waits for the owner left out */
  readonly days: number;
  /** YYYY-MM-DD */
  readonly startedOn: string;
  readonly finishedOn: string;
  /** The rack it travelled on: builds of one rack that started and finished together count once. */
  readonly rack: string | null;
};

/** How long a stage takes, as far as it is known. */
export type StageDurations = {
  readonly pmf: Pmf;
  /** The longest that was seen or estimated; a build that is in the stage for longer cannot be forecast. */
  readonly longestDays: number;
  /** Builds behind it, a batch counted once. */
  readonly buildCount: number;
  readonly basis: 'history' | 'blend' | 'estimate';
};

/** With fewer builds than this the shop's estimate is mixed in. */
export const ENOUGH_BUILDS = 8;
/** Fewer than this say nothing without an estimate. */
const FEWEST_BUILDS = 3;
/** A build counts half as much as one that finished this many days later. */
const HALF_LIFE_DAYS = 180;
/**
 * What is not known of the spread with few builds: a forecast from n draws needs about 1 + 2.6 / (n - 1) times their
 * variance to hold 8 in 10 (from Student's t: (1 + 1/n) (t.9 / 1.2816)^2 is 1.37 at 8 and 1.08 at 30). Over several
 * stages in a row errors of the spread even out, so less is taken; tests/bench/window-coverage.ts is the measure.
 */
const SPREAD_DOUBT = 1.6;
/** However alike they were, the next can differ by this much (standard deviation). */
const LEAST_SPREAD_DAYS = 0.5;

/**
 * PERT takes an estimate's ends for three standard deviations; people name the worst they remember, about one in twenty.
 * An estimate's variance is taken this many times.
 */
const ESTIMATE_DOUBT = 2.5;

type Weighted = { days: number; weight: number };

function withoutTwins(past: readonly PastStage[]): PastStage[] {
  const batches = new Map<string, PastStage>();
  past.forEach((stage, i) => {
    const key = stage.rack === null ? `alone ${i}` : `${stage.rack} ${stage.startedOn} ${stage.finishedOn}`;
    const known = batches.get(key);
    if (!known || stage.days > known.days) batches.set(key, stage);
  });
  return [...batches.values()];
}

function weigh(past: readonly PastStage[], today: string): Weighted[] {
  return past.map(({ days, finishedOn }) => {
    if (!Number.isInteger(days) || days < 0) throw new RangeError(`Not a number of whole days: ${days}.`);
    return { days, weight: 0.5 ** (Math.max(0, daysBetween(finishedOn, today)) / HALF_LIFE_DAYS) };
  });
}

/** Weighted variance without bias, and how many equal weights these are worth (Kish). */
function spreadOf(rows: readonly Weighted[]): { variance: number; worth: number } {
  const sum = rows.reduce((total, { weight }) => total + weight, 0);
  const squares = rows.reduce((total, { weight }) => total + weight * weight, 0);
  const mean = rows.reduce((total, { days, weight }) => total + weight * days, 0) / sum;
  const around = rows.reduce((total, { days, weight }) => total + weight * (days - mean) ** 2, 0);
  const worth = (sum * sum) / squares;
  return { variance: worth > 1 ? (around / sum) * (worth / (worth - 1)) : 0, worth };
}

/** Each duration spread over the days around it, normally with this standard deviation. */
function smooth(rows: readonly Weighted[], bandwidthDays: number): Pmf {
  const reach = Math.ceil(3 * bandwidthDays);
  const kernel = Array.from(
    { length: 2 * reach + 1 },
    (_, i) => normalShare((i - reach + 0.5) / bandwidthDays) - normalShare((i - reach - 0.5) / bandwidthDays),
  );
  const shortest = Math.min(1, ...rows.map(({ days }) => days));
  const pmf = new Float64Array(Math.max(...rows.map(({ days }) => days)) + reach + 1);
  for (const { days, weight } of rows) {
    kernel.forEach((share, i) => {
      const at = Math.max(shortest, days + i - reach);
      pmf[at] = (pmf[at] ?? 0) + weight * share;
    });
  }
  return normalise(pmf);
}

function fromEstimate(estimate: ThreePoint): { pmf: Pmf; longestDays: number } {
  const named = pertPmf(estimate);
  const rows = Array.from(named, (weight, days) => ({ days, weight })).filter(({ weight }) => weight > 0);
  const doubt = Math.max(LEAST_SPREAD_DAYS ** 2, (ESTIMATE_DOUBT - 1) * varianceOf(named));
  return { pmf: smooth(rows, Math.sqrt(doubt)), longestDays: named.length - 1 };
}

function fromHistory(rows: readonly Weighted[], estimated: Pmf | null): Pmf {
  const { variance, worth } = spreadOf(rows);
  const known = Math.min(1, rows.length / ENOUGH_BUILDS);
  const guessed = estimated === null ? variance : varianceOf(estimated);
  const spread = Math.max(LEAST_SPREAD_DAYS ** 2, known * variance + (1 - known) * guessed);
  return smooth(rows, Math.sqrt((spread * SPREAD_DOUBT) / Math.max(1, worth - 1)));
}

/**
 * How long a stage takes as of `today`: what past builds took, recent ones weighing more, and with fewer than eight of
 * them the shop's estimate in their place. Null when there is too little of both.
 * @throws RangeError for durations that are not whole days, bad dates, or an estimate out of order
 */
export function stageDurations(
  past: readonly PastStage[],
  estimate: ThreePoint | null,
  today: string,
): StageDurations | null {
  const rows = weigh(withoutTwins(past), today);
  const buildCount = rows.length;
  const estimated = estimate === null || buildCount >= ENOUGH_BUILDS ? null : fromEstimate(estimate);
  if (estimated === null && buildCount < FEWEST_BUILDS) return null;
  const longestSeen = Math.max(0, ...rows.map(({ days }) => days));
  if (estimated === null) {
    return { pmf: fromHistory(rows, null), longestDays: longestSeen, buildCount, basis: 'history' };
  }
  const longestDays = Math.max(longestSeen, estimated.longestDays);
  if (buildCount === 0) return { pmf: estimated.pmf, longestDays, buildCount, basis: 'estimate' };
  const pmf = blend(fromHistory(rows, estimated.pmf), estimated.pmf, buildCount / ENOUGH_BUILDS);
  return { pmf, longestDays, buildCount, basis: 'blend' };
}

/** Mean days in a stage. */
export function expectedDays({ pmf }: StageDurations): number {
  return meanOf(pmf);
}
