import { count, max } from 'drizzle-orm';
import { planEntries } from './diary';
import { enterBuild, type EnteredBuild } from './enter-build';
import { enterQuestions } from './letters';
import { enterPeople, type Cast } from './people';
import { PhotoLibrary } from './photo-library';
import { planBuilds } from './plan';
import { demoHolidays, enterCalendar, enterCapacities } from './schedule';
import { demoRoutes, demoTopics, departmentNames, outlookOf } from './shop-floor';
import { database, db, write, type Tx } from '../client';
import { migrateDatabase } from '../migrate';
import { departments, diaryEvents, mailSettings, routes, routeStages, shop, topics } from '../schema';
import { newId } from '../schema/columns';
import { stopDecoders } from '@/lib/photos/process-photo';

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
  const onFloor = await enterBuilds(cast, routeIds, library, nowMs, tell);
  await write(async (tx) => {
    await enterQuestions(tx, onFloor, cast, nowMs);
    await tellEverythingSoFar(tx);
    // Last: a seed that was cut off leaves no shop, so the next start begins again.
    await tx
      .insert(shop)
      .values({ id: 1, name: 'Quillhaven Guitar Works', timeZone: 'America/New_York', holidayCountry: 'US' });
  });
  await stopDecoders();
  tell(`${library.count} pictures drawn, ${onFloor.length} builds on the floor.`);
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
  for (const plan of planBuilds(nowMs)) {
    const pages = await planEntries(plan, cast, library, nowMs);
    const entered = await write((tx) =>
      enterBuild(tx, plan, routeIds[plan.instrument.route] ?? '', cast, pages, nowMs),
    );
    if (plan.deliveredAt !== null) continue;
    onFloor.push(entered);
    if (onFloor.length % 6 === 0) tell(`${onFloor.length} builds entered, ${library.count} pictures drawn`);
  }
  return onFloor;
}

/** What is in the diaries from the start is old news: no digest tells it. */
async function tellEverythingSoFar(tx: Tx): Promise<void> {
  const [last] = await tx.select({ seq: max(diaryEvents.seq) }).from(diaryEvents);
  await tx.update(mailSettings).set({ toldSeq: last?.seq ?? 0 });
}
