import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { db } from '@/db/client';
import { requireAskable } from '@/db/queries/question-form';
import { countQueue, listBuildQuestions, listQueue, medianFirstAnswer, parsePlace } from '@/db/queries/question-lists';
import { correctLetter, sendLetterNow } from '@/db/queries/letters';
import { discardPhoto, requirePhotoObject, sweepUnfinishedPhotos } from '@/db/queries/photos';
import { endQuestion, reopenQuestion } from '@/db/queries/question-ends';
import {
  askQuestion,
  markRead,
  mayWrite,
  requireQuestion,
  requireQuestionMark,
  writeLetter,
} from '@/db/queries/questions';
import { takeOne } from '@/db/queries/rate-limits';
import { letters, outbox, questions } from '@/db/schema';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import { tendQuestions } from '@/lib/jobs/question-clock';
import { limits } from '@/lib/rate-limits';
import { openTestDatabase } from '@/tests/support/database';
import { mailKindsFor, rowOf } from '@/tests/support/question-world';
import { DAY_MS, makeBuild, makeEntry, makePerson, makePhoto, noteOf, NOW_MS, openShop } from '@/tests/support/world';
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

test('of 100 questions a minute from one person most are refused, with the time to wait; another person is not', async () => {
  const [eager, calm] = [await makePerson('buyer'), await makePerson('buyer')];
  const waits: number[] = [];
  for (let n = 0; n < 100; n++) waits.push(await takeOne('question', eager.id, NOW_MS + n * 600));
  expect(waits.filter((seconds) => seconds === 0)).toHaveLength(limits.question.capacity);
  for (const seconds of waits.slice(limits.question.capacity)) expect(seconds).toBeGreaterThan(0);
  expect(await takeOne('question', calm.id, NOW_MS + 60_000)).toBe(0);
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

describe('the clock of a question', () => {
  // Tuesday 1 December 2026, 09:00 in Lisbon; the shop works from 9 to 17, and an answer is due in 8 working hours.
  const HOUR_MS = 3_600_000;
  const DUE_MS = NOW_MS + 8 * HOUR_MS;

  test('starts with the client’s letter, stands after the shop’s, and starts anew with the next', async () => {
    const { owner, builder, build } = await makeCast();
    const { id } = await ask(owner, build);
    expect(await rowOf(id)).toMatchObject({ dueAt: DUE_MS, firstAnsweredAt: null });
    await write(owner, id, NOW_MS + HOUR_MS);
    expect((await rowOf(id)).dueAt).toBe(DUE_MS);
    await write(builder, id, NOW_MS + 2 * HOUR_MS);
    expect(await rowOf(id)).toMatchObject({ dueAt: null, firstAnsweredAt: NOW_MS + 2 * HOUR_MS });
    await write(owner, id, NOW_MS + 4 * HOUR_MS);
    expect((await rowOf(id)).dueAt).toBe(NOW_MS + DAY_MS + 4 * HOUR_MS);
    await write(builder, id, NOW_MS + 5 * HOUR_MS);
    expect((await rowOf(id)).firstAnsweredAt).toBe(NOW_MS + 2 * HOUR_MS);
  });

  test('reminds the holder before and when it is due, and tells the rep after, once each however often it is looked at', async () => {
    const { owner, builder, rep, build } = await makeCast();
    await ask(owner, build);
    const look = async (atMs: number) => {
      for (let n = 0; n < 3; n++) await tendQuestions(atMs);
      return [await mailKindsFor(builder), await mailKindsFor(rep)];
    };
    const asked = ['question'];
    expect(await look(DUE_MS - HOUR_MS - 1)).toEqual([asked, []]);
    expect(await look(DUE_MS - HOUR_MS)).toEqual([[...asked, 'question_due'], []]);
    expect(await look(DUE_MS)).toEqual([[...asked, 'question_due', 'question_due'], []]);
    const overdue = [[...asked, 'question_due', 'question_due'], ['question_overdue']];
    expect(await look(NOW_MS + DAY_MS + HOUR_MS / 2)).toEqual(overdue);
    expect(await look(NOW_MS + 20 * DAY_MS)).toEqual(overdue);
  });

  test('says nothing of what is answered, closed or needs no answer', async () => {
    const { owner, builder, rep, build } = await makeCast();
    const [answered, closed, needless] = [await ask(owner, build), await ask(owner, build), await ask(owner, build)];
    await write(builder, answered.id, NOW_MS + 1);
    await endQuestion(owner, closed.id, 'closed', NOW_MS + 1);
    await endQuestion(rep, needless.id, 'no_answer_needed', NOW_MS + 1);
    await tendQuestions(NOW_MS + 3 * DAY_MS);
    expect([...(await mailKindsFor(builder)), ...(await mailKindsFor(rep))].filter((kind) => /_/.test(kind))).toEqual(
      [],
    );
  });
});

describe('the end of a question', () => {
  test('is set by its owner and the reps, not by a builder, though they hold the pen', async () => {
    const { owner, builder, rep, companion, build } = await makeCast();
    const { id } = await ask(owner, build);
    await expect(endQuestion(builder, id, 'closed', NOW_MS)).rejects.toBeInstanceOf(Denied);
    await expect(endQuestion(companion, id, 'closed', NOW_MS)).rejects.toBeInstanceOf(OutOfReach);
    await endQuestion(rep, id, 'no_answer_needed', NOW_MS + 5);
    expect(await rowOf(id)).toMatchObject({ state: 'closed', closedHow: 'no_answer_needed', closedAt: NOW_MS + 5 });
  });

  test('a letter within 30 days takes it up again; later one is asked to write a new question', async () => {
    const { owner, rep, build } = await makeCast();
    const { id } = await ask(owner, build);
    await endQuestion(rep, id, 'closed', NOW_MS);
    expect(mayWrite(owner, await rowOf(id), NOW_MS + 30 * DAY_MS)).toBe(false);
    const late = write(owner, id, NOW_MS + 30 * DAY_MS);
    await expect(late).rejects.toThrow('Please ask a new one.');
    await expect(reopenQuestion(rep, id, NOW_MS + 30 * DAY_MS)).rejects.toThrow('Please ask a new one.');
    await write(owner, id, NOW_MS + 30 * DAY_MS - 1);
    expect(await rowOf(id)).toMatchObject({ state: 'waiting', closedAt: null, closedHow: null });
  });

  test('taken back, it waits on whom the last letter waits on', async () => {
    const { owner, builder, rep, build } = await makeCast();
    const [open, answered] = [await ask(owner, build), await ask(owner, build)];
    await write(builder, answered.id, NOW_MS + 1);
    for (const { id } of [open, answered]) {
      await endQuestion(owner, id, 'closed', NOW_MS + 2);
      await reopenQuestion(rep, id, NOW_MS + 3);
    }
    expect((await rowOf(open.id)).state).toBe('waiting');
    expect((await rowOf(open.id)).dueAt).toBeGreaterThan(NOW_MS);
    expect(await rowOf(answered.id)).toMatchObject({ state: 'answered', dueAt: null });
  });
});

describe('a letter', () => {
  const words = { note: noteOf('What I meant to say.') };

  async function fresh() {
    const cast = await makeCast();
    const { id } = await ask(cast.owner, cast.build, { atMs: NOW_MS - 1 });
    const letter = await write(cast.builder, id, NOW_MS);
    const textOf = async () => (await requireQuestion(cast.owner, id)).letters.at(-1);
    return { ...cast, id, letter, textOf };
  }

  test('can be corrected by its writer for two minutes, and its mail waits for that', async () => {
    const { owner, builder, rep, letter, textOf } = await fresh();
    const mailAt = async () =>
      (await db().select().from(outbox).where(eq(outbox.userId, owner.id))).map(({ nextAttemptAt }) => nextAttemptAt);
    expect(await mailAt()).toEqual([NOW_MS + 120_000]);
    await expect(correctLetter(rep, letter.id, words, NOW_MS)).rejects.toBeInstanceOf(OutOfReach);
    await correctLetter(builder, letter.id, words, NOW_MS + 119_999);
    expect((await textOf())?.body).toContain('What I meant to say.');
    expect((await textOf())?.correctedAt).toBe(NOW_MS + 119_999);
    await expect(correctLetter(builder, letter.id, words, NOW_MS + 120_000)).rejects.toThrow('Two minutes have passed');
  });

  test('sent now is mailed now, and no longer corrected', async () => {
    const { owner, builder, letter } = await fresh();
    await sendLetterNow(builder, letter.id, NOW_MS + 5);
    const [mail] = await db().select().from(outbox).where(eq(outbox.userId, owner.id));
    expect(mail?.nextAttemptAt).toBe(NOW_MS + 5);
    await expect(correctLetter(builder, letter.id, words, NOW_MS + 5)).rejects.toBeInstanceOf(Denied);
  });

  test('that arrived by mail goes on at once and is not corrected', async () => {
    const { owner, builder, id } = await fresh();
    const reply = { note: noteOf('By mail.'), idempotencyKey: randomUUID() };
    const first = await writeLetter(owner, id, reply, NOW_MS + 1, 'mail');
    expect(await writeLetter(owner, id, reply, NOW_MS + 2, 'mail')).toEqual({ id: first.id, repeated: true });
    const mails = await db().select().from(outbox).where(eq(outbox.userId, builder.id));
    expect(mails.map(({ nextAttemptAt }) => nextAttemptAt)).toContain(NOW_MS + 1);
    await expect(correctLetter(owner, first.id, words, NOW_MS + 1)).rejects.toBeInstanceOf(Denied);
  });

  test('carries its writer’s own photos of this build, which both sides then see and a companion does not', async () => {
    const { owner, companion, builder, id, build } = await fresh();
    const [own, foreign] = [await makePhoto(build, owner), await makePhoto(build, builder)];
    const withPhoto = (photoId: string) => ({
      note: noteOf('See here.'),
      photos: [{ id: photoId, alt: 'The scratch' }],
      idempotencyKey: randomUUID(),
    });
    await expect(writeLetter(owner, id, withPhoto(foreign), NOW_MS)).rejects.toBeInstanceOf(BadInput);
    await writeLetter(owner, id, withPhoto(own), NOW_MS + 1);
    await expect(writeLetter(owner, id, withPhoto(own), NOW_MS + 2)).rejects.toBeInstanceOf(BadInput);
    expect((await requireQuestion(builder, id)).letters.at(-1)?.photos).toMatchObject([
      { id: own, alt: 'The scratch' },
    ]);
    for (const reader of [owner, builder]) expect(await requirePhotoObject(reader, own, 640)).toContain(own);
    await expect(requirePhotoObject(companion, own, 640)).rejects.toBeInstanceOf(OutOfReach);
    await discardPhoto(owner, own, NOW_MS);
    while ((await sweepUnfinishedPhotos(NOW_MS + 9 * DAY_MS)) > 0);
    expect(await requirePhotoObject(owner, own, 640)).toContain(own);
  });

  test('a photo in a letter about money is seen by no builder', async () => {
    const { owner, builder, rep, build } = await makeCast();
    const { id } = await ask(owner, build, { topicId: 'money' });
    const photoId = await makePhoto(build, owner);
    const photos = [{ id: photoId, alt: '' }];
    await writeLetter(owner, id, { note: noteOf('The bill.'), photos, idempotencyKey: randomUUID() }, NOW_MS);
    expect(await requirePhotoObject(rep, photoId, 640)).toContain(photoId);
    await expect(requirePhotoObject(builder, photoId, 640)).rejects.toBeInstanceOf(OutOfReach);
  });

  test('is marked as read at the moment it was first seen', async () => {
    const { owner, builder, id } = await fresh();
    const readAt = async () =>
      (await requireQuestion(builder, id)).readBy.find(({ side }) => side === 'client')?.readAt;
    await markRead(owner, id, NOW_MS + 10);
    await markRead(owner, id, NOW_MS + 99);
    expect(await readAt()).toBe(NOW_MS + 10);
    await write(builder, id, NOW_MS + 200);
    await markRead(owner, id, NOW_MS + 300);
    expect(await readAt()).toBe(NOW_MS + 300);
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

  test('can be narrowed to what is mine and what is late, and says how many wait in each', async () => {
    const { owner, builder, rep, build } = await makeCast();
    const late = await ask(owner, build, { atMs: NOW_MS - 5 * DAY_MS });
    const mine = await ask(owner, build, { topicId: 'shipping' });
    const answered = await ask(owner, build, { atMs: NOW_MS - 4 * DAY_MS });
    await write(builder, answered.id, NOW_MS);
    const ids = async (viewer: Viewer, filter: 'all' | 'mine' | 'late') =>
      (await listQueue(viewer, null, { filter, nowMs: NOW_MS })).questions.map(({ id }) => id);
    expect(await ids(rep, 'all')).toEqual([late.id, mine.id, answered.id]);
    expect(await ids(rep, 'mine')).toEqual([mine.id]);
    expect(await ids(rep, 'late')).toEqual([late.id]);
    expect(await ids(builder, 'all')).toEqual([late.id, answered.id]);
    expect(await countQueue(rep, NOW_MS)).toEqual({ all: 2, mine: 1, late: 1 });
    expect(await countQueue(builder, NOW_MS)).toEqual({ all: 1, mine: 1, late: 1 });
    // Asked on Friday 27 November at 9, answered on Tuesday at 9: Friday's and Monday's eight hours.
    expect(await medianFirstAnswer(rep, NOW_MS)).toBe(16 * 60);
    expect(await medianFirstAnswer(await makePerson('rep'), NOW_MS)).toBeNull();
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
