import { asc } from 'drizzle-orm';
import { db, type Db, type Tx } from '../client';
import { closures, shop, workingHours } from '../schema';
import { dayOf, type WorkingCalendar } from '@/lib/schedule/calendar';

/** The zone of the shop's clocks; UTC until it has said where it is. */
export async function shopZone(reader: Db | Tx = db()): Promise<string> {
  const [row] = await reader.select({ zone: shop.timeZone }).from(shop);
  return row?.zone ?? 'UTC';
}

/** The shop's own day, yyyy-mm-dd: what a day to sign by is compared with. */
export async function shopDay(nowMs: number, reader: Db | Tx = db()): Promise<string> {
  return dayOf(nowMs, await shopZone(reader));
}

let kept: { text: string; calendar: WorkingCalendar } | null = null;

/**
 * When the shop works. Everybody's dates rest on it, so it belongs to no viewer. The same object comes back until
 * something changes, because counting in it is quick only the second time.
 */
export async function unscopedCalendar(reader: Db | Tx = db()): Promise<WorkingCalendar> {
  const hours = await reader
    .select({
      weekday: workingHours.weekday,
      opensAtMin: workingHours.opensAtMin,
      closesAtMin: workingHours.closesAtMin,
    })
    .from(workingHours)
    .orderBy(asc(workingHours.weekday), asc(workingHours.opensAtMin));
  const closed = await reader
    .select({
      startsOn: closures.startsOn,
      endsOn: closures.endsOn,
      name: closures.name,
      closesAtMin: closures.closesAtMin,
    })
    .from(closures)
    .orderBy(asc(closures.startsOn), asc(closures.id));
  const calendar = { zone: await shopZone(reader), hours: hours.length > 0 ? hours : officeHours, closures: closed };
  const text = JSON.stringify(calendar);
  if (kept?.text !== text) kept = { text, calendar };
  return kept.calendar;
}

/** Until the shop has said when it works: Monday to Friday, 9:00 to 17:00. */
const officeHours = [1, 2, 3, 4, 5].map((weekday) => ({ weekday, opensAtMin: 9 * 60, closesAtMin: 17 * 60 }));
