import { beforeAll, expect, test } from 'vitest';
import { write } from '@/db/client';
import { findShell } from '@/db/queries/shell';
import { questions } from '@/db/schema';
import { openTestDatabase } from '@/tests/support/database';
import { makeBuild, makePerson, makeQuestion, openShop } from '@/tests/support/world';

await openTestDatabase();
beforeAll(openShop);

test('a question is counted for who holds its pen, and for the rep when nobody does; for nobody else', async () => {
  const [owner, builder, rep] = [await makePerson('buyer'), await makePerson('builder'), await makePerson('rep')];
  const outsider = await makePerson('rep');
  const admin = await makePerson('admin');
  const build = await makeBuild({ owner, staff: [{ person: builder }, { person: rep }] });
  await makeQuestion(build, owner);
  const counted = async () => {
    const found = [];
    for (const viewer of [owner, builder, rep, outsider, admin]) found.push((await findShell(viewer)).questions);
    return found;
  };
  await write((tx) => tx.update(questions).set({ state: 'waiting', penHolderId: builder.id }));
  expect(await counted()).toEqual([0, 1, 0, 0, 0]);
  await write((tx) => tx.update(questions).set({ penHolderId: null }));
  expect(await counted()).toEqual([0, 0, 1, 0, 0]);
  await write((tx) => tx.update(questions).set({ state: 'answered', penHolderId: rep.id }));
  expect(await counted()).toEqual([0, 0, 0, 0, 0]);
});
