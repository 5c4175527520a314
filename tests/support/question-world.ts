import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { db } from '@/db/client';
import { askQuestion, requireQuestion, writeLetter } from '@/db/queries/questions';
import { outbox, questions } from '@/db/schema';
import type { Viewer } from '@/lib/viewer';
import { makeBuild, makePerson, noteOf, NOW_MS, type TestBuild } from './world';

/** A build with its owner and companion, a neck builder, a painter and a rep. */
export async function openThread(wish: { heldUntilAt?: number } = {}) {
  const people = {
    owner: await makePerson('buyer', { name: 'Maren Oyelaran' }),
    companion: await makePerson('buyer'),
    rep: await makePerson('rep', { name: 'Ruth Adeyemi' }),
    builder: await makePerson('builder', { name: 'Bo Lindgren' }),
    painter: await makePerson('builder', { name: 'Tove Järvi', department: 'finish' }),
  };
  const { owner, companion, rep, builder, painter } = people;
  const staff = [{ person: builder }, { person: painter }, { person: rep, cleared: true }];
  return { ...people, build: await makeBuild({ owner, companions: [companion], staff, ...wish }) };
}

type Wish = { topicId?: string; text?: string; atMs?: number };

export const askOn = (build: TestBuild, asker: Viewer, { topicId = 'neck-work', text, atMs = NOW_MS }: Wish = {}) =>
  askQuestion(
    asker,
    {
      orderNumber: build.orderNumber,
      entryId: null,
      topicId,
      subject: 'Fret wire',
      note: noteOf(text ?? 'Which fret wire is it?'),
      idempotencyKey: randomUUID(),
    },
    atMs,
  );

export const writeOn = (writer: Viewer, questionId: string, atMs = NOW_MS, text = 'A letter.') =>
  writeLetter(writer, questionId, { note: noteOf(text), idempotencyKey: randomUUID() }, atMs);

export async function rowOf(questionId: string) {
  const [row] = await db().select().from(questions).where(eq(questions.id, questionId));
  if (!row) throw new Error('no such question');
  return row;
}

export const holderOf = async (viewer: Viewer, questionId: string) =>
  (await requireQuestion(viewer, questionId)).penHolderName;

/** The kinds of mail that wait for somebody, in the order in which they were written. */
export async function mailKindsFor(person: Viewer): Promise<string[]> {
  const rows = await db()
    .select({ kind: outbox.kind })
    .from(outbox)
    .where(eq(outbox.userId, person.id))
    .orderBy(outbox.createdAt, outbox.dedupeKey);
  return rows.map(({ kind }) => kind);
}
