import sharp from 'sharp';
import { describe, expect, test } from 'vitest';
import { MAX_PHOTO_BYTES, MAX_PHOTOS_PER_ENTRY } from '@/lib/photos/limits';
import { retryAfter } from '@/lib/photos/upload-answer';
import { choiceRefusal, photoTypeOf, roomRefusal } from '@/lib/photos/upload-check';
import { pause, retryDelay } from '@/lib/photos/upload-delay';

const dot = sharp({ create: { width: 2, height: 2, channels: 3, background: '#333' } });
const ftyp = (brand: string) => Uint8Array.from(Buffer.from(`\0\0\0\x18ftyp${brand}\0\0\0\0`, 'latin1'));

describe('the first bytes of a file', () => {
  test.each([
    { type: 'image/jpeg', bytes: () => dot.clone().jpeg().toBuffer() },
    { type: 'image/png', bytes: () => dot.clone().png().toBuffer() },
    { type: 'image/webp', bytes: () => dot.clone().webp().toBuffer() },
    { type: null, bytes: () => dot.clone().gif().toBuffer() },
    { type: null, bytes: () => Promise.resolve(Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"/>')) },
    { type: null, bytes: () => Promise.resolve(Buffer.alloc(0)) },
  ])('tell $type, whatever the name says', async ({ type, bytes }) => {
    expect(photoTypeOf(new Uint8Array(await bytes()))).toBe(type);
  });
});

describe('before anything is sent', () => {
  test.each(['heic', 'heix', 'mif1', 'hevc'])('HEIC of brand %s is named, with the setting to change', (brand) => {
    expect(choiceRefusal(ftyp(brand), 1000)).toBe(
      'This phone saves HEIC; set the camera to Most compatible or choose a JPEG.',
    );
  });

  test('a film from the same phone is not called HEIC', () => {
    expect(choiceRefusal(ftyp('qt  '), 1000)).toMatch(/^This is not a photo/);
  });

  test('an empty file and one over the limit are refused; the limit itself passes', async () => {
    const jpeg = new Uint8Array(await dot.clone().jpeg().toBuffer());
    expect(choiceRefusal(new Uint8Array(), 0)).toMatch(/empty/);
    expect(choiceRefusal(jpeg, MAX_PHOTO_BYTES + 1)).toMatch(/over 25 MB/);
    expect(choiceRefusal(jpeg, MAX_PHOTO_BYTES)).toBeNull();
  });

  test.each([
    { kept: 0, chosen: MAX_PHOTOS_PER_ENTRY, says: null },
    { kept: 11, chosen: 2, says: /The last one was left out/ },
    { kept: 12, chosen: 3, says: /The last 3 were left out/ },
  ])('$chosen photos more on top of $kept', ({ kept, chosen, says }) => {
    const sentence = roomRefusal(kept, chosen);
    if (says) expect(sentence).toMatch(says);
    else expect(sentence).toBeNull();
  });
});

describe('the wait before another try', () => {
  test('doubles from half a second and stays between half a minute and half of that', () => {
    expect([0, 1, 2, 3].map((tries) => retryDelay(tries, 0))).toEqual([500, 1000, 2000, 4000]);
    expect(retryDelay(40, 0)).toBe(15_000);
    expect(retryDelay(40, 0.9999)).toBeLessThan(30_000);
  });

  test('differs with chance, so that many phones do not come back at once', () => {
    expect(retryDelay(3, 0.9)).toBeGreaterThan(retryDelay(3, 0.1));
  });

  test('reads Retry-After in seconds and leaves anything else alone', () => {
    expect(['30', '0', null, 'soon', '-1', '1e3'].map(retryAfter)).toEqual([
      30_000,
      0,
      undefined,
      undefined,
      undefined,
      undefined,
    ]);
  });

  test('ends at once when it is called off, before or during', async () => {
    const leaving = new AbortController();
    const during = pause(60_000, leaving.signal);
    leaving.abort();
    await during;
    await pause(60_000, leaving.signal);
  });
});
