import { createHash } from 'node:crypto';
import { storePhoto } from './photo-pipeline';
import { addMailedPhoto, hasMailedPhoto } from '@/db/queries/inbound';
import { fetchAttachment, type ReceivedAttachment } from '@/lib/mail/received';
import { MAX_PHOTO_BYTES } from '@/lib/photos/limits';
import { processPhoto } from '@/lib/photos/process-photo';
import type { Viewer } from '@/lib/viewer';

const MOST_PHOTOS = 6;
/** Smaller pictures inside a mail are the logos of signatures. */
const LOGO_BYTES = 20_000;
const TYPES = /^image\/(?:jpeg|png|webp|heic|heif)$/i;

type Mailed = { letterId: string; buildId: string; emailId: string; attachments: ReceivedAttachment[] };

const isLogo = ({ content_disposition: disposition, size }: ReceivedAttachment) =>
  disposition === 'inline' && size < LOGO_BYTES;

/**
 * Makes photos of a letter of what a mail carried, through the same checks as an upload.
 * @returns a sentence when not all of it could be kept
 * @throws Error when the provider or the store cannot be reached
 */
export async function attachMailedPhotos(viewer: Viewer, mailed: Mailed, nowMs: number): Promise<string | null> {
  const carried = mailed.attachments.filter((attachment) => !isLogo(attachment));
  const pictures = carried.filter(({ content_type: type }) => TYPES.test(type)).slice(0, MOST_PHOTOS);
  let kept = 0;
  for (const [position, picture] of pictures.entries())
    if (await keepPhoto(viewer, mailed, picture, position, nowMs)) kept += 1;
  if (kept === carried.length) return null;
  return `Its letter was kept, ${carried.length - kept} of its ${carried.length} attachments were not: photos only, at most ${MOST_PHOTOS}.`;
}

async function keepPhoto(
  viewer: Viewer,
  { letterId, buildId, emailId }: Mailed,
  { id, content_type: contentType }: ReceivedAttachment,
  position: number,
  nowMs: number,
): Promise<boolean> {
  const uploadKey = `mail-${emailId}-${id}`;
  if (await hasMailedPhoto(viewer, uploadKey)) return true;
  const bytes = await fetchAttachment(emailId, id, MAX_PHOTO_BYTES);
  if (!bytes) return false;
  const made = await processPhoto({ bytes, contentType: contentType.toLowerCase(), sizeBytes: bytes.length });
  if (!made.ok) return false;
  const ready = await storePhoto(bytes, contentType, made);
  const sha256 = createHash('sha256').update(bytes).digest('base64');
  const photo = { letterId, buildId, uploadKey, contentType, sizeBytes: bytes.length, sha256, position };
  await addMailedPhoto(viewer, photo, ready, nowMs);
  return true;
}
