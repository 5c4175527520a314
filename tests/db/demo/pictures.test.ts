import sharp from 'sharp';
import { beforeAll, describe, expect, test } from 'vitest';
import { drawPicture, pictureKinds, type PictureOrder } from '@/db/demo/pictures';

const order = (seed: number, widthPx = 48): PictureOrder => ({
  finish: { hex: '#1a8a8c', edgeHex: '#0a3040' },
  woodTone: 'maple',
  body: 'solid',
  seed,
  widthPx,
});

/** What the eye keeps of a picture: 16 x 16 grey values. */
async function impression(jpeg: Buffer): Promise<string> {
  const grey = await sharp(jpeg).resize(16, 16, { fit: 'fill' }).greyscale().raw().toBuffer();
  return grey.toString('hex');
}

const drawn = new Map<string, Buffer>();

beforeAll(async () => {
  for (const { kind } of pictureKinds)
    for (const seed of [3, 8]) drawn.set(`${kind} ${seed}`, await drawPicture(kind, order(seed)));
}, 180_000);

describe('the demo world photographs', () => {
  test('every kind is named once and covers every stage', () => {
    expect(new Set(pictureKinds.map(({ kind }) => kind)).size).toBe(pictureKinds.length);
    expect(pictureKinds.length).toBeGreaterThanOrEqual(28);
    expect(new Set(pictureKinds.map(({ stage }) => stage)).size).toBe(12);
  });

  test('no two pictures look the same, whatever the kind or the seed', async () => {
    const impressions = await Promise.all([...drawn.values()].map(impression));
    expect(new Set(impressions).size).toBe(pictureKinds.length * 2);
  });

  test('every picture shows something: it has both dark and light in it', async () => {
    for (const [name, jpeg] of drawn) {
      const { channels } = await sharp(jpeg).greyscale().stats();
      const { stdev, mean } = channels[0] ?? { stdev: 0, mean: 0 };
      expect(stdev, name).toBeGreaterThan(12);
      expect(mean, name).toBeGreaterThan(25);
    }
  });

  test('the same seed gives the same bytes', async () => {
    for (const { kind } of pictureKinds.slice(0, 12))
      expect((await drawPicture(kind, order(3))).equals(drawn.get(`${kind} 3`) ?? Buffer.alloc(0)), kind).toBe(true);
  });

  test('a picture follows the finish of its build', async () => {
    const red = await drawPicture('body-in-colour', { ...order(3), finish: { hex: '#b01020' } });
    const [teal, crimson] = await Promise.all(
      [drawn.get('body-in-colour 3') ?? red, red].map(async (jpeg) => (await sharp(jpeg).stats()).channels),
    );
    const lean = (channels = teal) => (channels?.[0]?.mean ?? 0) - (channels?.[2]?.mean ?? 0);
    expect(lean(crimson)).toBeGreaterThan(lean(teal) + 10);
  });

  test('the file is a 4:3 JPEG that says nothing about where it came from', async () => {
    for (const [name, jpeg] of drawn) {
      const { format, width, height, exif, icc, iptc, xmp } = await sharp(jpeg).metadata();
      expect({ name, format, long: Math.max(width, height), short: Math.min(width, height) }).toEqual({
        name,
        format: 'jpeg',
        long: 48,
        short: 36,
      });
      expect([exif, icc, iptc, xmp]).toEqual([undefined, undefined, undefined, undefined]);
    }
  });

  test('a kind nobody knows is refused', async () => {
    await expect(drawPicture('no-such-picture', order(1))).rejects.toThrow(RangeError);
  });
});
