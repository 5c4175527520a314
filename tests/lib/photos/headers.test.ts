import sharp from 'sharp';
import { describe, expect, test } from 'vitest';
import { readJpegHeader, readPngHeader, readWebpHeader } from '@/lib/photos/headers.mjs';
import { inspectPhoto } from '@/lib/photos/inspect.mjs';
import { DECODER_LIMITS } from '@/lib/photos/limits';

const picture = (width: number, height: number) =>
  sharp({
    create: { width, height, channels: 3, background: '#777', noise: { type: 'gaussian', mean: 128, sigma: 30 } },
  });

const formats = [
  { format: 'JPEG', read: readJpegHeader, contentType: 'image/jpeg', make: () => picture(401, 203).jpeg() },
  {
    format: 'progressive JPEG',
    read: readJpegHeader,
    contentType: 'image/jpeg',
    make: () => picture(401, 203).jpeg({ progressive: true }),
  },
  { format: 'PNG', read: readPngHeader, contentType: 'image/png', make: () => picture(401, 203).png() },
  { format: 'WebP', read: readWebpHeader, contentType: 'image/webp', make: () => picture(401, 203).webp() },
  {
    format: 'lossless WebP',
    read: readWebpHeader,
    contentType: 'image/webp',
    make: () => picture(401, 203).webp({ lossless: true }),
  },
  {
    format: 'extended WebP',
    read: readWebpHeader,
    contentType: 'image/webp',
    make: () => picture(401, 203).ensureAlpha(0.5).webp(),
  },
];

describe.each(formats)('the header of a $format', ({ read, contentType, make }) => {
  test('gives the size a decoder finds, and where the picture ends', async () => {
    const bytes = await make().toBuffer();
    const { width, height } = await sharp(bytes).metadata();
    const behind = Buffer.concat([bytes, Buffer.from('something behind it')]);
    expect(read(behind)).toMatchObject({ widthPx: width, heightPx: height, endAt: bytes.length });
  });

  test('is answered for every cut of the file, as truncated or as a whole', async () => {
    const bytes = await make().toBuffer();
    for (let length = 12; length < bytes.length; length += length < 700 ? 1 : 997) {
      const verdict = inspectPhoto(bytes.subarray(0, length), contentType, DECODER_LIMITS);
      expect(verdict, `${length} bytes`).toMatchObject({ ok: false, code: 'truncated' });
    }
  });

  test('hands a decoder the picture and not a byte of what trails it', async () => {
    const bytes = await make().toBuffer();
    const verdict = inspectPhoto(Buffer.concat([bytes, Buffer.alloc(5000, 0xff)]), contentType, DECODER_LIMITS);
    expect(verdict.ok && verdict.picture.equals(bytes)).toBe(true);
  });
});

test('JPEG scans are counted, restart markers and stuffed bytes are not', async () => {
  const baseline = readJpegHeader(await picture(300, 200).jpeg().toBuffer());
  const progressive = readJpegHeader(await picture(300, 200).jpeg({ progressive: true }).toBuffer());
  expect(baseline.scans).toBe(1);
  expect(progressive.scans).toBeGreaterThan(5);
  expect(progressive.scans).toBeLessThan(15);
});
