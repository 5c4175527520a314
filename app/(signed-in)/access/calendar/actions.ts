'use server';

import { revalidatePath } from 'next/cache';
import { addClosure, removeClosure, saveHolidays, saveHours, saveShopZone } from '@/db/queries/shop-calendar';
import { action } from '@/lib/action';
import { BadInput } from '@/lib/errors';
import { listHolidays } from '@/lib/schedule/holidays';
import { closureForm, closureRef, holidayForm, hoursForm, zoneForm } from '@/lib/validation/calendar';

const TOLD = 'The ready windows are reckoned anew within a minute.';
const YEARS_AHEAD = 2;

const done = (words: string) => {
  revalidatePath('/access/calendar');
  return `${words} ${TOLD}`;
};

export const saveWeek = action(hoursForm, async (viewer, hours) => {
  await saveHours(viewer, hours, Date.now());
  return done('The working week is saved.');
});

export const saveZone = action(zoneForm, async (viewer, { zone }) => {
  await saveShopZone(viewer, zone, Date.now());
  return done(`The shop’s clock is that of ${zone}.`);
});

/** The holidays of this year and the next ones. @throws BadInput for a place that has none */
async function holidaysOf(country: string, region: string | null, year: number) {
  const years = Array.from({ length: YEARS_AHEAD + 1 }, (_, ahead) => year + ahead);
  try {
    return (await Promise.all(years.map((each) => listHolidays(country, region, each)))).flat();
  } catch (error) {
    if (error instanceof RangeError) throw new BadInput({ country: 'Choose a country and region from the list.' });
    throw error;
  }
}

export const saveCountry = action(holidayForm, async (viewer, { country, region }) => {
  const nowMs = Date.now();
  const year = new Date(nowMs).getUTCFullYear();
  const holidays = country === '' ? [] : await holidaysOf(country, region, year);
  const place = { country: country || null, region: country === '' ? null : region };
  await saveHolidays(viewer, place, holidays, `${year}-01-01`, nowMs);
  return done(country === '' ? 'No holidays are kept.' : `${holidays.length} holidays are in the calendar.`);
});

export const close = action(closureForm, async (viewer, closure) => {
  await addClosure(viewer, closure, Date.now());
  return done(`${closure.name} is in the calendar.`);
});

export const open = action(closureRef, async (viewer, { closureId }) => {
  await removeClosure(viewer, closureId, Date.now());
  revalidatePath('/access/calendar');
});
