import { eq } from 'drizzle-orm';
import { expect, test } from 'vitest';
import { write } from '@/db/client';
import { listUnreachableOwners } from '@/db/queries/contacts';
import { users } from '@/db/schema';
import { Denied, OutOfReach } from '@/lib/errors';
import { openTestDatabase } from '../support/database';
import { makeBuild, makePerson, NOW_MS, openShop, type Person } from '../support/world';

await openTestDatabase();
await openShop();

const bounce = ({ id }: Person) =>
  write((tx) =>
    tx.update(users).set({ unreachableWhy: 'bounced', unreachableSinceAt: NOW_MS }).where(eq(users.id, id)),
  );

async function openScene() {
  const [owner, companion] = [
    await makePerson('buyer', { name: 'Maren Oyelaran' }),
    await makePerson('buyer', { name: 'Ilse Oyelaran' }),
  ];
  const [rep, builder] = [await makePerson('rep'), await makePerson('builder')];
  const staff = [{ person: rep }, { person: builder }];
  return { owner, companion, rep, builder, build: await makeBuild({ owner, companions: [companion], staff }) };
}

test('a rep is told of an owner whom mail does not reach, and of nobody else', async () => {
  const { owner, companion, rep, build } = await openScene();
  await bounce(companion);
  expect(await listUnreachableOwners(rep, build.orderNumber)).toEqual([]);
  await bounce(owner);
  expect(await listUnreachableOwners(rep, build.orderNumber)).toEqual([
    { id: owner.id, name: 'Maren Oyelaran', why: 'bounced' },
  ]);
});

test('nobody else on the build is told, and nobody of another build', async () => {
  const { owner, companion, builder, build } = await openScene();
  await bounce(owner);
  for (const viewer of [owner, companion, builder])
    await expect(listUnreachableOwners(viewer, build.orderNumber)).rejects.toThrow(Denied);
  await expect(listUnreachableOwners(await makePerson('rep'), build.orderNumber)).rejects.toThrow(OutOfReach);
});
