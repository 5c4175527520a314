import { eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { db } from '@/db/client';
import { postEntry } from '@/db/queries/entries';
import { claimDueReaders, listUntold } from '@/db/queries/digests';
import { adoptTimeZone, findMailSettings, saveMailSettings, unsubscribe } from '@/db/queries/mail-settings';
import { mailSettings, users } from '@/db/schema';
import { openTestDatabase } from '../support/database';
import { DAY_MS, entryFor, makeBuild, makePerson, NOW_MS, openShop, type Person } from '../support/world';

await openTestDatabase();
await openShop();

const daily = { cadence: 'daily', hourLocal: 8, weekday: 1 } as const;
const zoneOf = async ({ id }: Person) => (await db().select().from(users).where(eq(users.id, id)))[0]?.timeZone;

async function openDiary() {
  const [owner, builder] = [await makePerson('buyer'), await makePerson('builder')];
  return { owner, builder, build: await makeBuild({ owner, staff: [{ person: builder }] }) };
}

type Diary = Awaited<ReturnType<typeof openDiary>>;
const post = async ({ build, builder }: Diary) => (await postEntry(builder, entryFor(build), NOW_MS)).id;

/** What the next digest of this reader would tell. */
async function untoldTo(reader: Person): Promise<string[]> {
  for (;;) {
    const [due] = await claimDueReaders('test', NOW_MS + 30 * DAY_MS, 1000, 1);
    if (!due) throw new Error('nobody is due');
    if (due.viewer.id === reader.id) return (await listUntold(due)).map(({ entryId }) => entryId);
  }
}

describe('what a reader wants', () => {
  test('is kept, and the next digest falls on their own clock', async () => {
    const { owner } = await openDiary();
    await saveMailSettings(owner, { cadence: 'weekly', hourLocal: 18, weekday: 5 }, 'America/New_York', NOW_MS);
    // Friday 4 December 2026, 18:00 in New York, which is 23:00 UTC.
    expect(await findMailSettings(owner)).toEqual({
      cadence: 'weekly',
      hourLocal: 18,
      weekday: 5,
      quietFromHour: null,
      quietToHour: null,
      nextDigestAt: Date.UTC(2026, 11, 4, 23),
    });
    expect(await zoneOf(owner)).toBe('America/New_York');
  });

  test('changed from none to daily tells nothing that happened while they wanted none', async () => {
    const diary = await openDiary();
    await post(diary);
    await saveMailSettings(diary.owner, daily, 'UTC', NOW_MS);
    const later = await post(diary);
    expect(await untoldTo(diary.owner)).toEqual([later]);
  });

  test('changed from daily to weekly loses nothing that was not told yet', async () => {
    const diary = await openDiary();
    await saveMailSettings(diary.owner, daily, 'UTC', NOW_MS);
    const untold = await post(diary);
    await saveMailSettings(diary.owner, { ...daily, cadence: 'weekly' }, 'UTC', NOW_MS + 1);
    expect(await untoldTo(diary.owner)).toEqual([untold]);
  });

  test('saved by one person changes nobody else’s', async () => {
    const [one, other] = [await makePerson('buyer'), await makePerson('buyer')];
    const before = await findMailSettings(other);
    await saveMailSettings(one, daily, 'Asia/Tokyo', NOW_MS);
    await unsubscribe(one.id);
    expect(await findMailSettings(other)).toEqual(before);
    expect(await zoneOf(other)).toBe('UTC');
  });
});

describe('the zone of the browser', () => {
  test('is taken once and moves the next digest to that clock; a later one changes nothing', async () => {
    const owner = await makePerson('buyer');
    await db().update(mailSettings).set({ cadence: 'daily', hourLocal: 8 }).where(eq(mailSettings.userId, owner.id));
    await adoptTimeZone(owner, 'Asia/Tokyo', NOW_MS);
    // 08:00 on 2 December in Tokyo is 23:00 on the 1st in UTC.
    expect((await findMailSettings(owner)).nextDigestAt).toBe(Date.UTC(2026, 11, 1, 23));
    await adoptTimeZone(owner, 'America/New_York', NOW_MS);
    expect(await zoneOf(owner)).toBe('Asia/Tokyo');
  });

  test('does not overrule one that its person chose, nor start mails that they do not want', async () => {
    const [chooser, silent] = [await makePerson('buyer'), await makePerson('buyer')];
    await saveMailSettings(chooser, daily, 'Europe/Lisbon', NOW_MS);
    await adoptTimeZone(chooser, 'Asia/Tokyo', NOW_MS);
    expect(await zoneOf(chooser)).toBe('Europe/Lisbon');
    await adoptTimeZone(silent, 'Asia/Tokyo', NOW_MS);
    expect((await findMailSettings(silent)).nextDigestAt).toBeNull();
  });
});

test('a reader who is due is taken by one of many workers, and by the next when the lease is over', async () => {
  const owner = await makePerson('buyer');
  await saveMailSettings(owner, daily, 'UTC', NOW_MS);
  const at = NOW_MS + 90 * DAY_MS;
  const takenBy = async (workers: string[], nowMs: number) => {
    const taken = await Promise.all(
      workers.flatMap((worker) => Array.from({ length: 20 }, () => claimDueReaders(worker, nowMs, 60_000, 1))),
    );
    return taken.flat().filter(({ viewer }) => viewer.id === owner.id).length;
  };
  expect(await takenBy(['one', 'two', 'three'], at)).toBe(1);
  expect(await takenBy(['four'], at + 60_000)).toBe(0);
  expect(await takenBy(['four'], at + 60_001)).toBe(1);
});
