import { createHash } from 'node:crypto';
import sharp from 'sharp';
import { VARIANT_WIDTHS_PX } from '@/lib/photos/limits';
import { processPhoto, stopDecoders, type PhotoJob } from '@/lib/photos/process-photo';
import { jpegWithExif } from '../support/photo-fixtures';
import { median, ratioAtMost, type Bench } from './row';

const ROUNDS = 9;

async function secondsOf(work: () => Promise<unknown>): Promise<number> {
  const start = performance.now();
  await work();
  return (performance.now() - start) / 1000;
}

/** The same decode and encodes by sharp alone: no child, no checks, no hash. */
async function sharpAlone(bytes: Buffer): Promise<void> {
  const { data, info } = await sharp(bytes, { failOn: 'warning', pages: 1 })
    .autoOrient()
    .resize({ width: 2048, withoutEnlargement: true })
    .flatten({ background: '#fff' })
    .toColourspace('srgb')
    .raw()
    .toBuffer({ resolveWithObject: true });
  const decoded = () => sharp(data, { raw: { width: info.width, height: info.height, channels: 3 } });
  for (const width of VARIANT_WIDTHS_PX) await decoded().resize({ width }).webp({ quality: 80, effort: 2 }).toBuffer();
  await decoded().resize({ width: 560 }).jpeg({ quality: 80 }).toBuffer();
  await decoded().resize({ width: 16, height: 16, fit: 'inside' }).webp({ quality: 30, effort: 2 }).toBuffer();
}

async function photoJob(widthPx: number, heightPx: number): Promise<PhotoJob> {
  const bytes = await jpegWithExif({ widthPx, heightPx, orientation: 6, gps: true });
  const sha256Hex = createHash('sha256').update(bytes).digest('hex');
  return { bytes, contentType: 'image/jpeg', sizeBytes: bytes.length, sha256Hex };
}

/** Seconds a photo through the pipeline and by sharp alone: medians of interleaved rounds on a warm decoder. */
export async function timePhoto(
  widthPx: number,
  heightPx: number,
): Promise<{ value: number; floor: number; ratio: number }> {
  const job = await photoJob(widthPx, heightPx);
  const rounds: { value: number; floor: number }[] = [];
  for (let round = -1; round < ROUNDS; round++) {
    const value = await secondsOf(() => processPhoto(job));
    const floor = await secondsOf(() => sharpAlone(job.bytes));
    if (round >= 0) rounds.push({ value, floor });
  }
  const value = median(rounds.map((round) => round.value));
  const floor = median(rounds.map((round) => round.floor));
  return { value, floor, ratio: value / floor };
}

/** Bytes this process grows by at most while twelve photos of 24 megapixels wait in line; the files themselves not counted. */
export async function growthWhileQueued(): Promise<number> {
  const job = await photoJob(6000, 4000);
  const copies = Array.from({ length: 12 }, () => ({ ...job, bytes: Buffer.from(job.bytes) }));
  const before = process.memoryUsage.rss();
  let most = before;
  const watch = setInterval(() => (most = Math.max(most, process.memoryUsage.rss())), 20);
  await Promise.all(copies.map((copy) => processPhoto(copy)));
  clearInterval(watch);
  return most - before;
}

/** A 12-megapixel photo, file to served files, against sharp alone in this process. */
export const photoPipeline: Bench = {
  name: 'photo-pipeline',
  run: async () => {
    try {
      const { value, floor } = await timePhoto(4000, 3000);
      return [ratioAtMost(1.25, { name: 'photo-pipeline', value, floor, unit: 's/photo' })];
    } finally {
      await stopDecoders();
    }
  },
};
