import { eq } from 'drizzle-orm';
import type { Cast } from './people';
import type { Tx } from '../client';
import { closures, departments, topics, workingHours } from '../schema';
import { dayOf } from '@/lib/schedule/calendar';
import { listHolidays } from '@/lib/schedule/holidays';

const at = (hour: number, minute = 0) => hour * 60 + minute;

/** Early starts, and Friday afternoon off. */
const week = [1, 2, 3, 4, 5].map((weekday) => ({
  weekday,
  opensAtMin: at(7, 30),
  closesAtMin: weekday === 5 ? at(14) : at(16, 30),
}));

/** Builds a week that each department can finish. */
const capacities: Record<string, number> = {
  'wood room': 8,
  'design & machining': 6,
  'neck & frets': 6,
  'body & sanding': 6,
  finish: 4,
  buffing: 6,
  'set-up': 6,
  inspection: 10,
};

const dueHours: Record<string, number> = { spec: 9, wood: 9, finish: 9, setup: 9, schedule: 6, money: 6, artist: 4 };

/** When the shop of the demo world works: its week, the holidays around `nowMs`, and its own shutdowns. */
export async function enterCalendar(tx: Tx, holidays: { on: string; name: string }[], nowMs: number): Promise<void> {
  await tx.insert(workingHours).values(week);
  await tx
    .insert(closures)
    .values(holidays.map(({ on, name }) => ({ startsOn: on, endsOn: on, name, isHoliday: true })));
  const thisYear = Number(dayOf(nowMs, 'America/New_York').slice(0, 4));
  for (const year of [thisYear - 2, thisYear - 1, thisYear, thisYear + 1]) {
    await tx.insert(closures).values([
      { startsOn: `${year}-12-24`, endsOn: `${year + 1}-01-01`, name: 'Winter shutdown' },
      { startsOn: `${year}-07-06`, endsOn: `${year}-07-10`, name: 'Summer shutdown' },
      { startsOn: `${year}-12-23`, endsOn: `${year}-12-23`, name: 'Half day, the crew’s dinner', closesAtMin: at(12) },
    ]);
  }
}

/** The country's days off, from two years ago to the next. */
export async function demoHolidays(nowMs: number): Promise<{ on: string; name: string }[]> {
  const thisYear = new Date(nowMs).getUTCFullYear();
  const years = [thisYear - 2, thisYear - 1, thisYear, thisYear + 1];
  return (await Promise.all(years.map((year) => listHolidays('US', null, year)))).flat();
}

/** What each department can do in a week, who leads it, and how soon questions are answered. */
export async function enterCapacities(tx: Tx, cast: Cast): Promise<void> {
  for (const [key, capacityPerWeek] of Object.entries(capacities)) {
    const lead = cast.builders.find(({ department }) => department === key);
    await tx.update(departments).set({ capacityPerWeek, leadId: lead?.id }).where(eq(departments.key, key));
  }
  for (const [id, hours] of Object.entries(dueHours))
    await tx.update(topics).set({ dueHours: hours }).where(eq(topics.id, id));
}
