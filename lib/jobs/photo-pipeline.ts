import { randomBytes } from 'node:crypto';
import {
  mailJpegKey,
  settleMissing,
  settleReady,
  settleRefused,
  unscopedUploadedPhotos,
  variantKey,
  type ReadyPhoto,
} from '@/db/queries/photos';
import { logFault } from '@/lib/log';
import type { MadePhoto } from '@/lib/photos/decoder-reply';
import { processPhoto } from '@/lib/photos/process-photo';
import { deleteObject, findObject, readObject, storeObject } from '@/lib/storage';

type Uploaded = { id: string; originalKey: string; contentType: string; sizeBytes: number; sha256: string };
export type PhotoOutcome = { state: 'ready' } | { state: 'refused'; message: string } | { state: 'missing' };

const NOT_AS_PROMISED = 'What arrived is not the photo that was chosen. Choose it again and send it once more.';

/** Photos are read into memory one at a time, however many arrive at once. */
let line: Promise<unknown> = Promise.resolve();
const underWay = new Map<string, Promise<PhotoOutcome>>();

/** Checks one uploaded photo and makes its sizes; asked twice at once, it is done once. */
export function developPhoto(photo: Uploaded): Promise<PhotoOutcome> {
  const running = underWay.get(photo.id);
  if (running) return running;
  const turn = line.then(() => develop(photo));
  line = turn.catch(() => undefined);
  const outcome = turn.finally(() => underWay.delete(photo.id));
  underWay.set(photo.id, outcome);
  return outcome;
}

async function develop(photo: Uploaded): Promise<PhotoOutcome> {
  const stored = await findObject(photo.originalKey);
  if (!stored) {
    await settleMissing(photo.id);
    return { state: 'missing' };
  }
  if (stored.sizeBytes !== photo.sizeBytes || stored.sha256 !== photo.sha256) return refuse(photo, NOT_AS_PROMISED);
  const bytes = await readObject(photo.originalKey);
  const made = await processPhoto({ ...photo, bytes, sha256Hex: Buffer.from(photo.sha256, 'base64').toString('hex') });
  if (!made.ok) return refuse(photo, made.message);
  await settleReady(photo.id, await storePhoto(bytes, photo.contentType, made), Date.now());
  return { state: 'ready' };
}

/** Puts a photo's kept original and everything made of it into the store. @returns where it lies, and its sizes in px */
export async function storePhoto(bytes: Buffer, contentType: string, made: MadePhoto): Promise<ReadyPhoto> {
  const outPrefix = `out/${randomBytes(24).toString('base64url')}`;
  const keptKey = `original/${randomBytes(24).toString('base64url')}`;
  await storeObject(keptKey, bytes, contentType);
  await storeObject(mailJpegKey(outPrefix), made.mailJpeg, 'image/jpeg');
  for (const { widthPx, bytes: webp } of made.variants)
    await storeObject(variantKey(outPrefix, widthPx), webp, 'image/webp');
  const { widthPx, heightPx, blurDataUrl } = made;
  return {
    outPrefix,
    keptKey,
    widthPx,
    heightPx,
    blurDataUrl,
    widthsPx: made.variants.map((variant) => variant.widthPx),
  };
}

/** Not a photo: the bytes go at once, not only with the next sweep. */
async function refuse(photo: Uploaded, message: string): Promise<PhotoOutcome> {
  await settleRefused(photo.id, message, Date.now());
  await deleteObject(photo.originalKey).catch(() => undefined);
  return { state: 'refused', message };
}

/** Takes up what a restart cut off. A photo that cannot be taken up yet holds up none of the others. */
export async function developLeftovers(): Promise<void> {
  for (const photo of await unscopedUploadedPhotos(20)) {
    await developPhoto(photo).catch((error: unknown) => logFault(error, { photo: photo.id }));
  }
}
