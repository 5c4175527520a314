import { and, eq, isNull } from 'drizzle-orm';
import { writeLetter } from './questions';
import { db, write } from '../client';
import { assignments, buildPeople, photos, questions, users } from '../schema';
import type { Letter } from '@/lib/validation/questions';
import type { ReadyPhoto } from './photos';
import type { Viewer } from '@/lib/viewer';

/** Who has this address, with an open account. No viewer: the address is all that is known of a mail's sender. */
export async function unscopedFindByAddress(email: string): Promise<Viewer | null> {
  const { id, role, name, department, timeZone } = users;
  const [person] = await db()
    .select({ id, role, name, department, timeZone })
    .from(users)
    .where(and(eq(users.email, email), isNull(users.disabledAt)));
  return person ?? null;
}

/** Everybody who can have had mail about a question, to find whose reply address a stranger used. No viewer: never shown. */
export async function unscopedPeopleOn(questionId: string): Promise<string[]> {
  const [question] = await db()
    .select({ buildId: questions.buildId, askedById: questions.askedById, penHolderId: questions.penHolderId })
    .from(questions)
    .where(eq(questions.id, questionId));
  if (!question) return [];
  const [clients, staff] = await Promise.all([
    db().select({ id: buildPeople.userId }).from(buildPeople).where(eq(buildPeople.buildId, question.buildId)),
    db().select({ id: assignments.userId }).from(assignments).where(eq(assignments.buildId, question.buildId)),
  ]);
  const ids = [...clients, ...staff].map(({ id }) => id);
  return [...new Set([question.askedById, ...(question.penHolderId ? [question.penHolderId] : []), ...ids])];
}

type MailedLetter = { questionId: string; note: Letter['note']; emailId: string };

/**
 * Writes a letter that came by mail, once a mail, with the rights its writer has on the page.
 * @returns the letter and its build
 * @throws OutOfReach, or Denied when somebody else holds the pen or the question has been closed for too long
 */
export async function addLetterByMail(viewer: Viewer, { questionId, note, emailId }: MailedLetter, nowMs: number) {
  const letter = { note, idempotencyKey: `mail-${emailId}` };
  const { id: letterId } = await writeLetter(viewer, questionId, letter, nowMs, 'mail');
  const [question] = await db()
    .select({ buildId: questions.buildId })
    .from(questions)
    .where(eq(questions.id, questionId));
  if (!question) throw new Error('a letter of no question');
  return { letterId, buildId: question.buildId };
}

type MailedPhoto = {
  buildId: string;
  letterId: string;
  uploadKey: string;
  contentType: string;
  sizeBytes: number;
  sha256: string;
  position: number;
};

/** Whether this attachment has become a photo already, when its mail is told of again. */
export async function hasMailedPhoto(viewer: Viewer, uploadKey: string): Promise<boolean> {
  const own = and(eq(photos.uploaderId, viewer.id), eq(photos.uploadKey, uploadKey));
  const [photo] = await db().select({ id: photos.id }).from(photos).where(own);
  return photo !== undefined;
}

/** Puts a checked photo that came with a letter beside it, once. */
export function addMailedPhoto(viewer: Viewer, photo: MailedPhoto, ready: ReadyPhoto, nowMs: number): Promise<void> {
  const { outPrefix, keptKey, widthPx, heightPx, blurDataUrl, widthsPx } = ready;
  return write(async (tx) => {
    await tx
      .insert(photos)
      .values({
        ...photo,
        uploaderId: viewer.id,
        state: 'ready',
        label: 'by mail',
        originalKey: keptKey,
        outPrefix,
        widthPx,
        heightPx,
        blurDataUrl,
        variantWidthsPx: widthsPx.join(','),
        expiresAt: nowMs,
        createdAt: nowMs,
      })
      .onConflictDoNothing({ target: [photos.uploaderId, photos.uploadKey] });
  });
}
