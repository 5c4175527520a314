import sharp from 'sharp';
import { riffChunk, webpFile } from './picture-bytes';
import { SCRIPT, WEBP, noise, overwritten, rowsAs, type HostilePicture } from './hostile-rows';

export async function hostileWebps(): Promise<HostilePicture[]> {
  const good = await noise(300, 200).webp().toBuffer();
  const frames = Buffer.concat(await Promise.all([1, 2, 3].map(() => noise(40, 40).raw().toBuffer())));
  const animated = await sharp(frames, { raw: { width: 40, height: 120, channels: 3, pageHeight: 40 } })
    .webp({ loop: 0 })
    .toBuffer();
  const lossless = (packed: number) => {
    const data = Buffer.alloc(18);
    data.writeUInt8(0x2f, 0);
    data.writeUInt32LE(packed, 1);
    return webpFile(riffChunk('VP8L', data));
  };
  const canvas = Buffer.from([0, 0, 0, 0, 0xff, 0xff, 0xff, 0xff, 0xff, 0xff]);
  const smallCanvas = Buffer.from([0, 0, 0, 0, 9, 0, 0, 9, 0, 0]);
  return rowsAs(WEBP, [
    ['only its first 12 bytes', good.subarray(0, 12), 'truncated'],
    ['268 megapixels in 38 bytes', lossless(0x0fffffff), 'too_many_pixels'],
    ['49 megapixels in 38 bytes', lossless(6999 | (6999 << 14)), 'failed'],
    ['a canvas of 16 777 216 a side', webpFile(riffChunk('VP8X', canvas), good.subarray(12)), 'too_many_pixels'],
    ['a canvas smaller than its frame', webpFile(riffChunk('VP8X', smallCanvas), good.subarray(12)), 'failed'],
    ['no frame at all', webpFile(riffChunk('EXIF', Buffer.alloc(40))), 'failed'],
    ['cut in half', good.subarray(0, good.length / 2), 'truncated'],
    ['declared shorter than its frame', overwritten(good, 4, [100, 0, 0, 0]), 'failed'],
    [
      'its frame overwritten',
      overwritten(
        good,
        60,
        Array.from({ length: 200 }, () => 0xff),
      ),
      'taken',
    ],
    ['animated', animated, 'taken'],
    ['transparent', await noise(60, 40).ensureAlpha(0).webp().toBuffer(), 'taken'],
    ['a page behind it', Buffer.concat([good, Buffer.from(SCRIPT)]), 'taken'],
  ]);
}
