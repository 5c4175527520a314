import { and, asc, desc, eq, inArray, sql } from 'drizzle-orm';
import { db } from '../client';
import { buildIsVisible, photoIsVisible } from '../scope';
import { builds, letters, photos, questionReads, users } from '../schema';
import { isStaffRole } from '@/lib/access';
import type { Viewer } from '@/lib/viewer';

/** The letters of a question whose reader is known to read it, the latest 200, oldest first, with their photos. */
export async function listLetters(viewer: Viewer, questionId: string) {
  const thread = await db()
    .select({
      id: letters.id,
      body: letters.body,
      side: letters.side,
      writtenAt: letters.writtenAt,
      correctableUntilAt: letters.correctableUntilAt,
      correctedAt: letters.correctedAt,
      arrivedBy: letters.arrivedBy,
      authorId: letters.authorId,
      author: users.name,
      role: users.role,
      department: users.department,
    })
    .from(letters)
    .innerJoin(users, eq(users.id, letters.authorId))
    .where(eq(letters.questionId, questionId))
    .orderBy(desc(letters.writtenAt), desc(letters.id))
    .limit(200);
  const pictures = await listLetterPhotos(
    viewer,
    thread.map(({ id }) => id),
  );
  return thread
    .reverse()
    .map((letter) => ({ ...letter, photos: pictures.filter(({ letterId }) => letterId === letter.id) }));
}

function listLetterPhotos(viewer: Viewer, letterIds: string[]) {
  return db()
    .select({
      id: photos.id,
      letterId: photos.letterId,
      alt: photos.alt,
      widthPx: sql<number>`coalesce(${photos.widthPx}, 1)`,
      heightPx: sql<number>`coalesce(${photos.heightPx}, 1)`,
      blur: sql<string>`coalesce(${photos.blurDataUrl}, '')`,
      widthsPx: sql<string>`coalesce(${photos.variantWidthsPx}, '640')`,
    })
    .from(photos)
    .innerJoin(builds, eq(builds.id, photos.buildId))
    .where(and(inArray(photos.letterId, letterIds), buildIsVisible(viewer), photoIsVisible(viewer)))
    .orderBy(asc(photos.position));
}

/** Who has read how far: names and sides, as both sides may see them. */
export async function listReaders(questionId: string) {
  const rows = await db()
    .select({ id: users.id, name: users.name, role: users.role, readAt: questionReads.readAt })
    .from(questionReads)
    .innerJoin(users, eq(users.id, questionReads.userId))
    .where(eq(questionReads.questionId, questionId))
    .orderBy(asc(questionReads.readAt))
    .limit(50);
  return rows.map(({ role, ...reader }) => ({ ...reader, side: isStaffRole(role) ? 'shop' : 'client' }) as const);
}
