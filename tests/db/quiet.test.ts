import { eq } from 'drizzle-orm';
import { expect, test } from 'vitest';
import { db, write } from '@/db/client';
import { queueQuietReminders } from '@/db/queries/quiet';
import { departments, newsItems } from '@/db/schema';
import type { Viewer } from '@/lib/viewer';
import { openTestDatabase } from '../support/database';
import { DAY_MS, makeBuild, makeEntry, makePerson, NOW_MS, openShop } from '../support/world';

await openTestDatabase();
await openShop();

/** The stages of these tests allow two weeks of silence, as a new stage does. */
const ALLOWED_DAYS = 14;

const remindedOf = async ({ id }: Viewer) =>
  (
    await db().select({ kind: newsItems.kind, about: newsItems.about }).from(newsItems).where(eq(newsItems.userId, id))
  ).map(({ kind, about }) => ({ kind, buildId: about.buildId }));

async function quietBuild(days: number, over: Parameters<typeof makeBuild>[0] = {}) {
  const [holder, colleague, rep] = [
    await makePerson('builder', { department: 'wood' }),
    await makePerson('builder', { department: 'neck' }),
    await makePerson('rep'),
  ];
  const build = await makeBuild({ staff: [{ person: colleague }, { person: holder }, { person: rep }], ...over });
  await makeEntry(build, holder, { datedAt: NOW_MS - days * DAY_MS });
  return { build, holder, colleague, rep };
}

test('within what its stage allows nobody is reminded', async () => {
  const { holder, rep } = await quietBuild(ALLOWED_DAYS);
  await queueQuietReminders(NOW_MS);
  expect([await remindedOf(holder), await remindedOf(rep)]).toEqual([[], []]);
});

test('over it the builder of the stage’s department is reminded, once a silence', async () => {
  const { build, holder, colleague, rep } = await quietBuild(ALLOWED_DAYS + 1);
  await queueQuietReminders(NOW_MS);
  await queueQuietReminders(NOW_MS + 3_600_000);
  await queueQuietReminders(NOW_MS + DAY_MS);
  expect(await remindedOf(holder)).toEqual([{ kind: 'quiet_build', buildId: build.id }]);
  expect([await remindedOf(colleague), await remindedOf(rep)]).toEqual([[], []]);
});

test('after a second period the rep is, once; a new silence begins anew', async () => {
  const { build, holder, rep } = await quietBuild(2 * ALLOWED_DAYS + 1);
  await queueQuietReminders(NOW_MS);
  await queueQuietReminders(NOW_MS + DAY_MS);
  expect(await remindedOf(rep)).toEqual([{ kind: 'quiet_build', buildId: build.id }]);
  await makeEntry(build, holder, { datedAt: NOW_MS + DAY_MS });
  await queueQuietReminders(NOW_MS + (2 + ALLOWED_DAYS) * DAY_MS);
  expect([(await remindedOf(holder)).length, (await remindedOf(rep)).length]).toEqual([2, 1]);
});

test('with no builder of that department on the build its lead is reminded', async () => {
  const lead = await makePerson('builder', { department: 'wood' });
  await write((tx) => tx.update(departments).set({ leadId: lead.id }).where(eq(departments.key, 'wood')));
  const { build } = await quietBuild(ALLOWED_DAYS + 1, { staff: [] });
  await queueQuietReminders(NOW_MS);
  expect(await remindedOf(lead)).toEqual([{ kind: 'quiet_build', buildId: build.id }]);
});

test('a page that only the shop may read does not end a silence', async () => {
  const { build, holder } = await quietBuild(ALLOWED_DAYS + 1);
  await makeEntry(build, holder, { datedAt: NOW_MS, audience: 'shop' });
  await queueQuietReminders(NOW_MS);
  expect((await remindedOf(holder)).length).toBe(1);
});

test('nobody is reminded before the shop’s morning', async () => {
  const { holder } = await quietBuild(ALLOWED_DAYS + 1);
  await queueQuietReminders(Date.UTC(2026, 11, 2, 5));
  expect(await remindedOf(holder)).toEqual([]);
});
