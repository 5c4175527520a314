import { and, asc, eq } from 'drizzle-orm';
import { requireReachable } from './question-reach';
import { requireCan } from './standing';
import { db, write } from '../client';
import { marginNotes, users } from '../schema';
import type { Letter } from '@/lib/validation/questions';
import type { Viewer } from '@/lib/viewer';

const MOST_NOTES = 200;

/**
 * What the shop wrote beside a question, oldest first. Only staff on the build who may read the question get it; no other
 * query reads these rows, and neither mail nor search knows them.
 * @throws OutOfReach or Denied
 */
export async function listMargin(viewer: Viewer, questionId: string) {
  const question = await requireReachable(viewer, questionId);
  await requireCan(viewer, 'margin.read', question.orderNumber);
  return db()
    .select({
      id: marginNotes.id,
      body: marginNotes.body,
      writtenAt: marginNotes.writtenAt,
      author: users.name,
      role: users.role,
      department: users.department,
    })
    .from(marginNotes)
    .innerJoin(users, eq(users.id, marginNotes.authorId))
    .where(eq(marginNotes.questionId, questionId))
    .orderBy(asc(marginNotes.writtenAt), asc(marginNotes.id))
    .limit(MOST_NOTES);
}

export type MarginRow = Awaited<ReturnType<typeof listMargin>>[number];

/** Writes a note into the margin, once. @throws OutOfReach or Denied */
export function writeMargin(
  viewer: Viewer,
  questionId: string,
  { note, idempotencyKey }: Omit<Letter, 'photos'>,
  nowMs: number,
): Promise<void> {
  return write(async (tx) => {
    const question = await requireReachable(viewer, questionId, tx);
    await requireCan(viewer, 'margin.write', question.orderNumber, tx);
    const sameKey = and(eq(marginNotes.authorId, viewer.id), eq(marginNotes.idempotencyKey, idempotencyKey));
    const [earlier] = await tx.select({ id: marginNotes.id }).from(marginNotes).where(sameKey);
    if (earlier) return;
    const words = { body: JSON.stringify(note.doc), bodyText: note.text };
    await tx
      .insert(marginNotes)
      .values({ questionId, authorId: viewer.id, ...words, idempotencyKey, writtenAt: nowMs });
  });
}
