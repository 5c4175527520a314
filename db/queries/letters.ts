import { and, eq, gt, isNull } from 'drizzle-orm';
import { hastenMail, queueMail } from './outbox';
import { isUnbound } from './photos';
import { requireReachable } from './question-reach';
import { write, type Tx } from '../client';
import { letters, photos } from '../schema';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import { CORRECTABLE_MS, type Side } from '@/lib/questions/thread-rules';
import type { Letter } from '@/lib/validation/questions';
import type { Viewer } from '@/lib/viewer';

type Added = {
  question: { id: string; buildId: string };
  viewer: Viewer;
  side: Side;
  letter: Letter;
  arrivedBy: 'page' | 'mail';
  /** Who is told by mail, and of what. */
  to: string | null;
  kind: 'question' | 'letter';
};

const mailKeyOf = (letterId: string) => `letter/${letterId}`;

/** Writes a letter with its photos, and the mail about it, which waits until the letter can no longer be corrected. */
export async function addLetter(tx: Tx, added: Added, nowMs: number): Promise<string> {
  const { question, viewer, side, letter, arrivedBy, to, kind } = added;
  const correctableUntilAt = arrivedBy === 'page' ? nowMs + CORRECTABLE_MS : null;
  const [written] = await tx
    .insert(letters)
    .values({
      questionId: question.id,
      authorId: viewer.id,
      side,
      body: JSON.stringify(letter.note.doc),
      bodyText: letter.note.text,
      idempotencyKey: letter.idempotencyKey,
      writtenAt: nowMs,
      correctableUntilAt,
      arrivedBy,
    })
    .returning({ id: letters.id });
  if (!written) throw new Error('an insert without a row');
  await attachPhotos(tx, viewer, question.buildId, written.id, letter.photos ?? []);
  if (to === null) return written.id;
  const about = { questionId: question.id, letterId: written.id };
  const mail = { kind, userId: to, about, dedupeKey: mailKeyOf(written.id), notBeforeAt: correctableUntilAt ?? nowMs };
  await queueMail(tx, mail, nowMs);
  return written.id;
}

async function attachPhotos(
  tx: Tx,
  viewer: Viewer,
  buildId: string,
  letterId: string,
  chosen: NonNullable<Letter['photos']>,
): Promise<void> {
  for (const [position, { id, alt }] of chosen.entries()) {
    const own = and(eq(photos.uploaderId, viewer.id), eq(photos.buildId, buildId), eq(photos.state, 'ready'));
    const attached = await tx
      .update(photos)
      .set({ letterId, position, alt })
      .where(and(eq(photos.id, id), own, isNull(photos.entryId), isUnbound))
      .returning({ id: photos.id });
    if (attached.length > 0) continue;
    throw new BadInput({
      photos: `Photo ${position + 1} has not arrived whole. Wait for it, send it again, or leave it out.`,
    });
  }
}

const NO_LONGER =
  'Two minutes have passed, and this letter is on its way by mail. Write another one to say what has changed.';

async function requireOwnFresh(tx: Tx, viewer: Viewer, letterId: string, nowMs: number) {
  const [letter] = await tx
    .select({ questionId: letters.questionId, correctableUntilAt: letters.correctableUntilAt })
    .from(letters)
    .where(and(eq(letters.id, letterId), eq(letters.authorId, viewer.id)));
  if (!letter) throw new OutOfReach();
  await requireReachable(viewer, letter.questionId, tx);
  if (letter.correctableUntilAt === null || letter.correctableUntilAt <= nowMs) throw new Denied('conflict', NO_LONGER);
}

/**
 * Puts other words into the viewer's own letter before it is mailed.
 * @throws OutOfReach, or Denied 'conflict' when its two minutes are over
 */
export function correctLetter(
  viewer: Viewer,
  letterId: string,
  { note }: Pick<Letter, 'note'>,
  nowMs: number,
): Promise<void> {
  return write(async (tx) => {
    await requireOwnFresh(tx, viewer, letterId, nowMs);
    await tx
      .update(letters)
      .set({ body: JSON.stringify(note.doc), bodyText: note.text, correctedAt: nowMs })
      .where(eq(letters.id, letterId));
  });
}

/** Lets the viewer's own letter go by mail at once; it can then no longer be corrected. @throws OutOfReach or Denied */
export function sendLetterNow(viewer: Viewer, letterId: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await requireOwnFresh(tx, viewer, letterId, nowMs);
    await tx
      .update(letters)
      .set({ correctableUntilAt: nowMs })
      .where(and(eq(letters.id, letterId), gt(letters.correctableUntilAt, nowMs)));
    await hastenMail(tx, mailKeyOf(letterId), nowMs);
  });
}
