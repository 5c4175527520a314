import { composeDigest } from './compose-digest';
import { listUntold } from '@/db/queries/digests';
import { findMailReader } from '@/db/queries/mail-content';
import { findCursor } from '@/db/queries/mail-settings';
import { unscopedUntoldNews } from '@/db/queries/news';
import type { Viewer } from '@/lib/viewer';

export type PreviewedDigest = { subject: string; text: string; photoCount: number };

/** What the viewer's next digest would say now, in its text part; null when there is nothing to tell. Changes nothing. */
export async function previewDigest(viewer: Viewer, nowMs: number): Promise<PreviewedDigest | null> {
  const [reader, cursor, news] = await Promise.all([
    findMailReader(viewer.id),
    findCursor(viewer),
    unscopedUntoldNews([viewer.id], nowMs),
  ]);
  if (!reader) return null;
  const untold = await listUntold({ viewer, ...cursor });
  const about = { entryIds: untold.map(({ entryId }) => entryId), newsIds: news.get(viewer.id) ?? [] };
  const digest = await composeDigest(reader, about, nowMs);
  return digest && { subject: digest.subject, text: digest.text, photoCount: digest.photos.length };
}
