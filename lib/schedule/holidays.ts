import { dateOfDay, dayNumber, weekdayOfDay } from './days';

export type Holiday = {
  /** YYYY-MM-DD */
  on: string;
  name: string;
};

const DAY_MS = 86_400_000;
const NOON_MS = DAY_MS / 2;

/** Loaded when first asked for: the rules of all countries are 30 MB on disk and a fifth of a second to read. */
async function loadRules() {
  return (await import('date-holidays')).default;
}

type Found = { date: string; start: Date; end: Date; name: string; type: string };

/** A holiday takes every day whose noon it covers: some begin at sunset, some last for days. */
function daysOf({ date, start, end }: Found): number[] {
  const startMs = Date.parse(`${date.slice(0, 19).replace(' ', 'T')}Z`);
  const endMs = startMs + end.getTime() - start.getTime();
  const days: number[] = [];
  for (let day = Math.ceil((startMs - NOON_MS) / DAY_MS); day * DAY_MS + NOON_MS < endMs; day++) days.push(day);
  return days;
}

/**
 * date-holidays 3.37 knows Veterans Day but not its observance on a weekday: 5 U.S.C. 6103(b) has Friday for a Saturday,
 * Executive Order 11582 Monday for a Sunday.
 */
function veteransDayObserved(year: number): Holiday[] {
  const day = dayNumber(`${year}-11-11`);
  const moved = { 6: day - 1, 7: day + 1 }[weekdayOfDay(day)];
  return moved === undefined ? [] : [{ on: dateOfDay(moved), name: 'Veterans Day (substitute day)' }];
}

function requirePlace(country: string, known: Record<string, string> | undefined, what: string): void {
  if (!known || !Object.hasOwn(known, country))
    throw new RangeError(`There are no holidays for the ${what} ${country}.`);
}

/**
 * The public holidays of a country (ISO 3166-1 alpha-2) and region (null for those of the whole country) in one year, by
 * date, with the weekdays on which those of a weekend are observed. The rules know that 1 January can be observed in the
 * year before; a holiday of several days that began in the year before is looked for here.
 * @throws RangeError for a country or region that the rules do not know
 */
export async function listHolidays(country: string, region: string | null, year: number): Promise<Holiday[]> {
  const Rules = await loadRules();
  const all = new Rules();
  requirePlace(country, all.getCountries('en'), 'country');
  if (region !== null) requirePlace(region, all.getStates(country, 'en'), 'region');
  const rules = region === null ? new Rules(country) : new Rules(country, region);
  const found = [year - 1, year]
    .flatMap((each) => rules.getHolidays(each, 'en'))
    .filter(({ type }) => type === 'public')
    .flatMap((holiday) => daysOf(holiday).map((day) => ({ on: dateOfDay(day), name: holiday.name })));
  const listed = country === 'US' ? [...found, ...veteransDayObserved(year)] : found;
  const byDate = new Map(listed.filter(({ on }) => on.startsWith(`${year}-`)).map((each) => [each.on, each]));
  return [...byDate.values()].sort((one, other) => (one.on < other.on ? -1 : 1));
}

/** Countries with known holidays, by their English name. */
export async function listHolidayCountries(): Promise<{ code: string; name: string }[]> {
  const Rules = await loadRules();
  return byName(new Rules().getCountries('en'));
}

/** Regions of a country that have holidays of their own; empty where there are none. */
export async function listHolidayRegions(country: string): Promise<{ code: string; name: string }[]> {
  const Rules = await loadRules();
  return byName(new Rules().getStates(country, 'en') ?? {});
}

function byName(names: Record<string, string>): { code: string; name: string }[] {
  const rows = Object.entries(names).map(([code, name]) => ({ code, name }));
  return rows.sort((one, other) => one.name.localeCompare(other.name, 'en'));
}
