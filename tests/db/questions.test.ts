import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { db } from '@/db/client';
import { requireAskable } from '@/db/queries/question-form';
import { listBuildQuestions, listQueue, parsePlace } from '@/db/queries/question-lists';
import { askQuestion, requireQuestion, requireQuestionMark, writeLetter } from '@/db/queries/questions';
import { letters, outbox, questions } from '@/db/schema';
import { Denied, OutOfReach } from '@/lib/errors';
import { openTestDatabase } from '@/tests/support/database';
import { DAY_MS, makeBuild, makeEntry, makePerson, noteOf, NOW_MS, openShop } from '@/tests/support/world';
import type { TestBuild } from '@/tests/support/world';
import type { Viewer } from '@/lib/viewer';

await openTestDatabase();
beforeAll(openShop);

async function makeCast(wish: { heldUntilAt?: number } = {}) {
  const owner = await makePerson('buyer');
  const companion = await makePerson('buyer');
  const rep = await makePerson('rep', { name: 'Ruth Adeyemi' });
  const builder = await makePerson('builder', { name: 'Bo Lindgren' });
  const painter = await makePerson('builder', { department: 'finish' });
  const staff = [{ person: builder }, { person: painter }, { person: rep, cleared: true }];
  const build = await makeBuild({ owner, companions: [companion], staff, ...wish });
  return { owner, companion, rep, builder, painter, build };
}

type Wish = { topicId?: string; key?: string; atMs?: number; entryId?: string };

const ask = (
  asker: Viewer,
  build: TestBuild,
  { topicId = 'neck-work', key = randomUUID(), atMs, entryId }: Wish = {},
) =>
  askQuestion(
    asker,
    {
      orderNumber: build.orderNumber,
      entryId: entryId ?? null,
      topicId,
      subject: 'Fret wire',
      note: noteOf('Which fret wire is it?'),
      idempotencyKey: key,
    },
    atMs ?? NOW_MS,
  );

const write = (writer: Viewer, questionId: string, atMs = NOW_MS, key: string = randomUUID()) =>
  writeLetter(writer, questionId, { note: noteOf('A letter.'), idempotencyKey: key }, atMs);

const lettersOf = (questionId: string) => db().select().from(letters).where(eq(letters.questionId, questionId));

describe('asking', () => {
  test('twice with one key makes one question, one letter and one mail', async () => {
    const { owner, builder, build } = await makeCast();
    const key = randomUUID();
    const [first, second] = await Promise.all([ask(owner, build, { key }), ask(owner, build, { key })]);
    expect(second).toEqual(first);
    expect(await db().select().from(questions).where(eq(questions.buildId, build.id))).toHaveLength(1);
    expect(await lettersOf(first.id)).toHaveLength(1);
    expect(await db().select().from(outbox).where(eq(outbox.userId, builder.id))).toHaveLength(1);
  });

  test('about a build held from view gives the pen to somebody who may read it', async () => {
    const { owner, rep, build } = await makeCast({ heldUntilAt: Date.now() + DAY_MS });
    const { id } = await ask(owner, build);
    expect((await requireQuestion(owner, id)).penHolderId).toBe(rep.id);
  });

  test('the form names the very person who then holds the pen', async () => {
    const { owner, build } = await makeCast();
    const { topics } = await requireAskable(owner, build.orderNumber, null);
    for (const { id: topicId, answerer } of topics) {
      const { id } = await ask(owner, build, { topicId });
      expect((await requireQuestion(owner, id)).penHolderName).toBe(answerer?.name);
    }
  });

  test('the form quotes an entry its reader reads, and no other', async () => {
    const { owner, builder, build } = await makeCast();
    const other = await makeBuild({ owner });
    const quoted = async (entryId: string) => (await requireAskable(owner, build.orderNumber, entryId)).entry?.excerpt;
    expect(await quoted(await makeEntry(build, builder, { text: 'The nut is cut.' }))).toBe('The nut is cut.');
    expect(await quoted(await makeEntry(build, builder, { audience: 'shop' }))).toBeUndefined();
    expect(await quoted(await makeEntry(build, builder, { state: 'withdrawn' }))).toBeUndefined();
    expect(await quoted(await makeEntry(other, builder))).toBeUndefined();
  });
});

describe('letters', () => {
  test('alternate the state: the shop’s answers it, the owner’s makes it wait again', async () => {
    const { owner, builder, build } = await makeCast();
    const { id } = await ask(owner, build);
    const seen = [(await requireQuestion(owner, id)).state];
    await write(builder, id, NOW_MS + 1);
    seen.push((await requireQuestion(owner, id)).state);
    await write(owner, id, NOW_MS + 2);
    seen.push((await requireQuestion(owner, id)).state);
    expect(seen).toEqual(['waiting', 'answered', 'waiting']);
  });

  test('sent twice with one key arrive once', async () => {
    const { owner, builder, build } = await makeCast();
    const { id } = await ask(owner, build);
    const key = randomUUID();
    await Promise.all([write(builder, id, NOW_MS + 1, key), write(builder, id, NOW_MS + 1, key)]);
    expect(await lettersOf(id)).toHaveLength(2);
  });

  test('change the mark that an open page watches', async () => {
    const { owner, builder, build } = await makeCast();
    const { id } = await ask(owner, build);
    const before = await requireQuestionMark(owner, id);
    expect(await requireQuestionMark(owner, id)).toEqual(before);
    expect((await requireQuestion(owner, id)).mark).toBe(before.mark);
    await write(builder, id, NOW_MS + 1);
    expect(await requireQuestionMark(owner, id)).not.toEqual(before);
  });

  test('a builder without the pen is refused; a rep writes though another holds it', async () => {
    const { owner, rep, painter, build } = await makeCast();
    const { id } = await ask(owner, build);
    await expect(write(painter, id)).rejects.toBeInstanceOf(Denied);
    expect(await lettersOf(id)).toHaveLength(1);
    await write(rep, id, NOW_MS + 1);
    expect(await lettersOf(id)).toHaveLength(2);
  });
});

describe('who sees a question', () => {
  test('on a topic of the reps it does not exist for a builder', async () => {
    const { owner, rep, builder, build } = await makeCast();
    const { id } = await ask(owner, build, { topicId: 'money' });
    await expect(requireQuestion(builder, id)).rejects.toBeInstanceOf(OutOfReach);
    await expect(requireQuestionMark(builder, id)).rejects.toBeInstanceOf(OutOfReach);
    await expect(write(builder, id)).rejects.toBeInstanceOf(OutOfReach);
    expect((await listBuildQuestions(builder, build.orderNumber, null)).questions).toEqual([]);
    expect((await requireQuestion(rep, id)).id).toBe(id);
  });

  test('a companion sees none and asks none', async () => {
    const { owner, companion, build } = await makeCast();
    const { id } = await ask(owner, build);
    await expect(requireQuestion(companion, id)).rejects.toBeInstanceOf(OutOfReach);
    await expect(requireQuestionMark(companion, id)).rejects.toBeInstanceOf(OutOfReach);
    await expect(listBuildQuestions(companion, build.orderNumber, null)).rejects.toBeInstanceOf(Denied);
    await expect(requireAskable(companion, build.orderNumber, null)).rejects.toBeInstanceOf(Denied);
    await expect(ask(companion, build)).rejects.toBeInstanceOf(Denied);
    expect((await listQueue(companion, null)).questions).toEqual([]);
  });
});

describe('the queue', () => {
  test('has the longest waiting first, and writing again costs nobody their place', async () => {
    const { owner, rep, build } = await makeCast();
    const older = await ask(owner, build, { atMs: NOW_MS - 3 * DAY_MS });
    const newer = await ask(owner, build, { atMs: NOW_MS - 2 * DAY_MS });
    const answered = await ask(owner, build, { atMs: NOW_MS - 9 * DAY_MS });
    await write(rep, answered.id, NOW_MS - 8 * DAY_MS);
    await write(owner, older.id, NOW_MS - DAY_MS);
    const queue = (await listQueue(rep, null)).questions;
    expect(queue.map(({ id }) => id)).toEqual([older.id, newer.id, answered.id]);
    expect(queue[0]?.waitingSince).toBe(NOW_MS - 3 * DAY_MS);
  });

  test('in pages of 40 shows every question once', async () => {
    const { owner, rep, build } = await makeCast();
    const asked: string[] = [];
    for (let n = 0; n < 85; n++) {
      const { id } = await ask(owner, build, { atMs: NOW_MS - (n % 7) * DAY_MS });
      if (n % 3 === 0) await write(rep, id, NOW_MS - (n % 5));
      asked.push(id);
    }
    for (const list of [listQueue.bind(null, rep), listBuildQuestions.bind(null, owner, build.orderNumber)]) {
      const pages: string[][] = [];
      let next: string | null = null;
      do {
        const page: Awaited<ReturnType<typeof listQueue>> = await list(parsePlace(next));
        pages.push(page.questions.map(({ id }) => id));
        next = page.next;
      } while (next);
      expect(pages.map((page) => page.length)).toEqual([40, 40, 5]);
      expect(pages.flat().sort()).toEqual([...asked].sort());
    }
  });
});
