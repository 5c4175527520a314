import { randomUUID } from 'node:crypto';
import { beforeAll, describe, expect, test } from 'vitest';
import { db } from '@/db/client';
import { diaryPage } from '@/db/queries/diary';
import { listMargin, writeMargin } from '@/db/queries/margin';
import { listBuildQuestions } from '@/db/queries/question-lists';
import { requireQuestion, requireQuestionMark } from '@/db/queries/questions';
import { searchAll } from '@/db/queries/search';
import { outbox } from '@/db/schema';
import { Denied, OutOfReach } from '@/lib/errors';
import { openTestDatabase } from '@/tests/support/database';
import { askOn, openThread } from '@/tests/support/question-world';
import { makePerson, noteOf, NOW_MS, openShop } from '@/tests/support/world';

await openTestDatabase();
beforeAll(openShop);

const SECRET = 'Quincunx: nobody tells the owner.';
const noteIn = (text = SECRET, key: string = randomUUID()) => ({ note: noteOf(text), idempotencyKey: key });

describe('the shop margin', () => {
  test('is read and written by every one of the staff on the build, once a key', async () => {
    const { owner, builder, painter, rep, build } = await openThread();
    const { id } = await askOn(build, owner);
    const key = randomUUID();
    await writeMargin(rep, id, noteIn('Is the nut done?', key), NOW_MS);
    await writeMargin(rep, id, noteIn('Is the nut done?', key), NOW_MS);
    await writeMargin(painter, id, noteIn('Not yet.'), NOW_MS + 1);
    for (const reader of [builder, painter, rep])
      expect((await listMargin(reader, id)).map(({ author }) => author)).toEqual(['Ruth Adeyemi', 'Tove Järvi']);
  });

  test('on a topic of the reps it does not exist for a builder', async () => {
    const { owner, builder, rep, build } = await openThread();
    const { id } = await askOn(build, owner, { topicId: 'money' });
    await writeMargin(rep, id, noteIn(), NOW_MS);
    await expect(listMargin(builder, id)).rejects.toBeInstanceOf(OutOfReach);
    await expect(writeMargin(builder, id, noteIn(), NOW_MS)).rejects.toBeInstanceOf(OutOfReach);
    expect(await listMargin(rep, id)).toHaveLength(1);
  });

  test('is refused to the owner, and does not exist for companions, strangers and admins', async () => {
    const { owner, companion, rep, build } = await openThread();
    const { id } = await askOn(build, owner);
    await writeMargin(rep, id, noteIn(), NOW_MS);
    await expect(listMargin(owner, id)).rejects.toBeInstanceOf(Denied);
    await expect(writeMargin(owner, id, noteIn(), NOW_MS)).rejects.toBeInstanceOf(Denied);
    for (const other of [companion, await makePerson('buyer'), await makePerson('rep'), await makePerson('admin')])
      await expect(listMargin(other, id)).rejects.toBeInstanceOf(OutOfReach);
  });

  test('reaches the owner by no query, mail, search or mark', async () => {
    const { owner, rep, build } = await openThread();
    const { id } = await askOn(build, owner);
    const before = await requireQuestionMark(owner, id);
    const shopBefore = await requireQuestionMark(rep, id);
    await writeMargin(rep, id, noteIn(), NOW_MS);
    expect(await requireQuestionMark(owner, id)).toEqual(before);
    expect(await requireQuestionMark(rep, id)).not.toEqual(shopBefore);
    const told = [
      await requireQuestion(owner, id),
      await listBuildQuestions(owner, build.orderNumber, null),
      await diaryPage(owner, build.id, null),
      (await searchAll(owner, 'Quincunx', null)).hits,
      (await searchAll(rep, 'Quincunx', null)).hits,
      await db().select().from(outbox),
    ];
    expect(JSON.stringify(told)).not.toMatch(/quincunx/i);
  });
});
