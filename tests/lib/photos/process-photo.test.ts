import { createHash } from 'node:crypto';
import exifr from 'exifr';
import sharp from 'sharp';
import { afterAll, describe, expect, test } from 'vitest';
import type { MadePhoto } from '@/lib/photos/decoder-reply';
import { MAX_BLUR_URL_CHARS, MAX_MAIL_BYTES } from '@/lib/photos/limits';
import { processPhoto, stopDecoders } from '@/lib/photos/process-photo';
import { displayP3Jpeg, jpegWithExif, letterJpeg, readLetters } from '../../support/photo-fixtures';
import { readReference } from '../../support/reference';

const UNHURRIED = { timeLimitMs: 60_000 };

async function made(bytes: Buffer, contentType = 'image/jpeg'): Promise<MadePhoto> {
  const sha256Hex = createHash('sha256').update(bytes).digest('hex');
  const photo = await processPhoto({ bytes, contentType, sizeBytes: bytes.length, sha256Hex }, UNHURRIED);
  if (!photo.ok) throw new Error(`${photo.code}: ${photo.detail}`);
  return photo;
}

const blurBytes = (photo: MadePhoto) => Buffer.from(photo.blurDataUrl.split(',')[1] ?? '', 'base64');
const everyFile = (photo: MadePhoto) => [...photo.variants.map(({ bytes }) => bytes), photo.mailJpeg, blurBytes(photo)];

afterAll(stopDecoders);

describe('orientation', () => {
  // Source: tests/reference/10_exif_orientation.csv; CIPA DC-008 / TIFF 6.0 tag 274, shown pixels by npm sharp on a 3 x 2 picture.
  test.each(readReference('10_exif_orientation'))('$orientation is shown as $expected_displayed_rows', async (row) => {
    const photo = await made(await letterJpeg(row.stored_3x2_pixels_rows ?? '', Number(row.orientation)));
    const shown = await Promise.all([...photo.variants.map(({ bytes }) => bytes), photo.mailJpeg].map(readLetters));
    expect(new Set(shown)).toEqual(new Set([row.expected_displayed_rows]));
    expect(photo.heightPx > photo.widthPx).toBe(row.swaps_width_height === 'yes');
  });
});

describe('what a photo tells', () => {
  test('nothing of the EXIF, GPS, XMP, IPTC, comments and profile it came with is in any file made of it', async () => {
    const everything = {
      tiff: true,
      exif: true,
      gps: true,
      xmp: true,
      iptc: true,
      icc: true,
      jfif: false,
      ihdr: false,
    };
    const bytes = await jpegWithExif({
      widthPx: 2400,
      heightPx: 1600,
      orientation: 6,
      gps: true,
      cameraTime: '2026:11:03 14:05:09',
    });
    const before = await exifr.parse(bytes, everything);
    expect(before).toMatchObject({
      latitude: 47.375,
      Artist: 'Bench hand',
      SerialNumber: 'SN-0001',
      City: 'Quillhaven',
    });
    const stored = await sharp(bytes).metadata();
    expect([stored.exif, stored.xmp, stored.iptc, stored.icc].every(Boolean)).toBe(true);

    for (const file of everyFile(await made(bytes))) {
      const { exif, xmp, iptc, icc, orientation, comments } = await sharp(file).metadata();
      expect({ exif, xmp, iptc, icc, orientation, comments }).toEqual({});
      expect((await exifr.parse(file, everything).catch(() => undefined)) ?? {}).toEqual({});
      const text = Buffer.from(file).toString('latin1');
      for (const word of ['Bench hand', 'unreleased', 'Quillhaven', 'wood room', 'Exif', 'http'])
        expect(text).not.toContain(word);
    }
  });
});

describe('colour', () => {
  // Source: tests/reference/10e_srgb_display_p3.csv (web-platform-tests and colorjs.io); colours inside sRGB, 8 bits, lossy coding.
  const inside = readReference('10e_srgb_display_p3')
    .filter(({ from, to, expected_2 }) => from === 'display-p3' && to === 'srgb' && Number(expected_2) > 0)
    .filter(({ expected_1, expected_3 }) =>
      [expected_1, expected_3].every((value) => Number(value) > 0.01 && Number(value) < 1),
    );

  test('the reference has colours to try', () => expect(inside.length).toBeGreaterThanOrEqual(2));

  test.each(inside)('Display P3 $c1 $c2 $c3 is served as sRGB $expected_1 $expected_2 $expected_3', async (row) => {
    const photo = await made(await displayP3Jpeg([Number(row.c1), Number(row.c2), Number(row.c3)]));
    for (const file of [...photo.variants.map(({ bytes }) => bytes), photo.mailJpeg]) {
      const { channels } = await sharp(file).stats();
      const expected = [row.expected_1, row.expected_2, row.expected_3].map((value) => Number(value) * 255);
      channels.forEach(({ mean }, i) => expect(Math.abs(mean - (expected[i] ?? 0))).toBeLessThan(3));
    }
  });

  test('what is transparent is laid on white', async () => {
    const clear = await sharp({
      create: { width: 40, height: 30, channels: 4, background: { r: 0, g: 0, b: 0, alpha: 0 } },
    })
      .png()
      .toBuffer();
    const { channels } = await sharp((await made(clear, 'image/png')).variants[0]?.bytes).stats();
    for (const { min } of channels) expect(min).toBeGreaterThan(250);
  });
});

describe('what is made', () => {
  test.each([
    { widthPx: 3000, heightPx: 2000, widths: [320, 640, 1280, 2048] },
    { widthPx: 1500, heightPx: 1000, widths: [320, 640, 1280, 1500] },
    { widthPx: 640, heightPx: 480, widths: [320, 640] },
    { widthPx: 90, heightPx: 60, widths: [90] },
  ])('a photo $widthPx wide is served $widths wide, never enlarged', async ({ widthPx, heightPx, widths }) => {
    const photo = await made(await jpegWithExif({ widthPx, heightPx }));
    expect(photo.variants.map((variant) => variant.widthPx)).toEqual(widths);
    for (const variant of photo.variants) {
      const { format, width, height } = await sharp(variant.bytes).metadata();
      expect({ format, width, height }).toEqual({ format: 'webp', width: variant.widthPx, height: variant.heightPx });
      expect(Math.abs(variant.heightPx - (variant.widthPx * heightPx) / widthPx)).toBeLessThanOrEqual(1);
    }
    expect(photo).toMatchObject({ widthPx: photo.variants.at(-1)?.widthPx, heightPx: photo.variants.at(-1)?.heightPx });
  });

  test.each(['grain', 'noise'])('the mail picture and the placeholder stay small, even of pure %s', async (kind) => {
    const create = {
      width: 1600,
      height: 1600,
      channels: 3,
      background: '#777',
      noise: { type: 'gaussian', mean: 128, sigma: 90 },
    } as const;
    const photo = await made(
      kind === 'grain'
        ? await jpegWithExif({ widthPx: 1600, heightPx: 1600 })
        : await sharp({ create }).jpeg().toBuffer(),
    );
    const { format, width } = await sharp(photo.mailJpeg).metadata();
    expect(format).toBe('jpeg');
    expect(width).toBeGreaterThanOrEqual(kind === 'grain' ? 560 : 280);
    expect(photo.mailJpeg.length).toBeLessThanOrEqual(MAX_MAIL_BYTES);
    expect(photo.blurDataUrl.length).toBeLessThanOrEqual(MAX_BLUR_URL_CHARS);
    expect((await sharp(blurBytes(photo)).metadata()).format).toBe('webp');
  });
});
