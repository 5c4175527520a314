import { expect, test } from 'vitest';
import { listBuildsByNumber } from '@/db/queries/builds';
import { listPeople } from '@/db/queries/people';
import { DAY_MS, makeBuild, makePerson, makeSession, openShop } from '../support/world';
import { openTestDatabase } from '../support/database';

await openTestDatabase();
await openShop();

test('an admin reads of each person how many live sessions and builds they have, of nobody else’s', async () => {
  const [admin, builder, owner] = [await makePerson('admin'), await makePerson('builder'), await makePerson('buyer')];
  const staff = [{ person: builder }];
  await makeBuild({ owner, companions: [await makePerson('buyer')], staff });
  await makeBuild({ owner, staff });
  await makeBuild({ owner, staff: [{ person: builder, endedAt: 1 }] });
  await makeSession(builder.id);
  await makeSession(builder.id, Date.now() - 30 * DAY_MS);
  const people = await listPeople(admin, '');
  const counts = (id: string) => people.filter((row) => row.id === id).map((row) => [row.sessionCount, row.buildCount]);
  expect({ builder: counts(builder.id), owner: counts(owner.id), admin: counts(admin.id) }).toEqual({
    builder: [[1, 2]],
    owner: [[0, 3]],
    admin: [[0, 0]],
  });
});

test('an admin who has not stepped in reads of a build its number and who is on it, and nothing else of it', async () => {
  const [admin, builder, rep] = [await makePerson('admin'), await makePerson('builder'), await makePerson('rep')];
  const staff = [{ person: builder }, { person: rep, cleared: true }, { person: await makePerson('rep'), endedAt: 1 }];
  const build = await makeBuild({ staff, heldUntilAt: Date.now() + DAY_MS, instrument: 'A secret one' });
  const row = (await listBuildsByNumber(admin, '')).find(({ orderNumber }) => orderNumber === build.orderNumber);
  expect(Object.keys(row ?? {}).sort()).toEqual(['deliveredAt', 'held', 'orderNumber', 'staff']);
  expect(row).toMatchObject({ held: true, deliveredAt: null });
  const named = row?.staff.map(({ name, cleared }) => ({ name, cleared }));
  expect(named).toHaveLength(2);
  expect(named).toEqual(
    expect.arrayContaining([
      { name: builder.name, cleared: false },
      { name: rep.name, cleared: true },
    ]),
  );
});
