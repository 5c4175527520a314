import { count, max } from 'drizzle-orm';
import { drawCheckPicture, enterChecks } from './checks';
import { planEntries } from './diary';
import { enterBuild, type EnteredBuild } from './enter-build';
import { enterQuestions } from './letters';
import { enterPeople, type Cast } from './people';
import { PhotoLibrary } from './photo-library';
import { planBuilds, WHOLE_DELIVERED } from './plan';
import { enterReadings } from './readings';
import { demoHolidays, enterCalendar, enterCapacities } from './schedule';
import { enterSignOffs, planSignOffs } from './sign-offs';
import { enterSpecs } from './specs';
import { demoRoutes, demoTopics, departmentNames, outlookOf } from './shop-floor';
import { enterWindows } from './windows';
import { database, db, write, type Tx } from '../client';
import { migrateDatabase } from '../migrate';
import { queueQuietReminders } from '../queries/quiet';
import { departments, diaryEvents, mailSettings, routes, routeStages, shop, topics } from '../schema';
import { newId } from '../schema/columns';
import { dayOf } from '@/lib/schedule/calendar';
import { addDays } from '@/lib/schedule/days';
import { wallTimeToMs } from '@/lib/schedule/digest-times';
import { stopDecoders } from '@/lib/photos/process-photo';

/** The latest delivered builds have their specs in the book; the older ones were built from paper. */
const SPECS_OF_DELIVERED = 40;

const ZONE = 'America/New_York';

/** Fills an empty database with the demo world; leaves one that has a shop in it alone. */
export async function seedDemoWorld(nowMs: number, tell: (line: string) => void): Promise<void> {
  await migrateDatabase(database());
  const [known] = await db().select({ n: count() }).from(shop);
  if (known && known.n > 0) return tell('The demo world is there already and stays as it is.');
  const library = new PhotoLibrary(Number(process.env.DEMO_PICTURE_WIDTH_PX) || 1600);
  const holidays = await demoHolidays(nowMs);
  const { cast, routeIds } = await write(async (tx) => {
    const routeIds = await enterShop(tx);
    const cast = await enterPeople(tx, nowMs);
    await enterCapacities(tx, cast);
    await enterCalendar(tx, holidays, nowMs);
    return { routeIds, cast };
  });
  const { onFloor, delivered } = await enterBuilds(cast, routeIds, library, nowMs, tell);
  const toSign = await planSignOffs(onFloor, library);
  const checkPicture = await drawCheckPicture(onFloor, library);
  await write(async (tx) => {
    await enterSpecs(tx, [...onFloor, ...delivered.slice(0, SPECS_OF_DELIVERED)], cast, nowMs);
    await enterSignOffs(tx, toSign, nowMs);
    await enterReadings(tx, [...onFloor, ...delivered.slice(0, WHOLE_DELIVERED)], nowMs);
    await enterChecks(tx, { onFloor, delivered, routeIds, cast, picture: checkPicture }, nowMs);
    await enterQuestions(tx, onFloor, cast, nowMs);
  });
  await enterWindows(
    [...onFloor, ...delivered].map(({ id }) => id),
    routeIds,
    ZONE,
    nowMs,
  );
  await write(async (tx) => {
    await tellEverythingSoFar(tx);
    // Last: a seed that was cut off leaves no shop, so the next start begins again.
    await tx.insert(shop).values({ id: 1, name: 'Quillhaven Guitar Works', timeZone: ZONE, holidayCountry: 'US' });
  });
  await queueQuietReminders(lastMorning(nowMs));
  await stopDecoders();
  tell(`${library.count} pictures drawn, ${onFloor.length} builds on the floor.`);
}

/** Nine o'clock of the shop's day before, when its reminders had gone out. */
function lastMorning(nowMs: number): number {
  return wallTimeToMs(`${addDays(dayOf(nowMs, ZONE), -1)}T09:00`, ZONE);
}

async function enterShop(tx: Tx): Promise<string[]> {
  await tx.insert(departments).values(departmentNames.map((name, position) => ({ key: name, name, position })));
  await tx.insert(topics).values(demoTopics.map((topic, position) => ({ ...topic, position })));
  const routeIds: string[] = [];
  for (const { name, stages } of demoRoutes) {
    const routeId = newId();
    await tx.insert(routes).values({ id: routeId, name });
    await tx
      .insert(routeStages)
      .values(stages.map((step, index) => ({ ...step, ...outlookOf(step), routeId, position: index + 1 })));
    routeIds.push(routeId);
  }
  return routeIds;
}

async function enterBuilds(
  cast: Cast,
  routeIds: string[],
  library: PhotoLibrary,
  nowMs: number,
  tell: (line: string) => void,
) {
  const onFloor: EnteredBuild[] = [];
  const delivered: EnteredBuild[] = [];
  for (const plan of planBuilds(nowMs)) {
    const pages = await planEntries(plan, cast, library, nowMs);
    const entered = await write((tx) =>
      enterBuild(tx, plan, routeIds[plan.instrument.route] ?? '', cast, pages, nowMs),
    );
    if (plan.deliveredAt !== null) {
      delivered.push(entered);
      continue;
    }
    onFloor.push(entered);
    if (onFloor.length % 6 === 0) tell(`${onFloor.length} builds entered, ${library.count} pictures drawn`);
  }
  return { onFloor, delivered };
}

/** What is in the diaries from the start is old news: no digest tells it. */
async function tellEverythingSoFar(tx: Tx): Promise<void> {
  const [last] = await tx.select({ seq: max(diaryEvents.seq) }).from(diaryEvents);
  await tx.update(mailSettings).set({ toldSeq: last?.seq ?? 0 });
}
