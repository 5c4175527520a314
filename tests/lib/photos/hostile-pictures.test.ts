import { readdirSync } from 'node:fs';
import { afterAll, expect, test } from 'vitest';
import { peakMemoryBytes } from '@/lib/photos/decoder-run';
import { DECODER_MEMORY_BYTES } from '@/lib/photos/limits';
import { processPhoto, stopDecoders } from '@/lib/photos/process-photo';
import { PHOTO_REFUSALS } from '@/lib/photos/refusals';
import { decoderPids } from '../../support/decoder-pids';
import { hostilePictures } from '../../support/hostile-pictures';

afterAll(stopDecoders);

test(
  'every hostile picture, eight at a time, ends as it must: no crash, no child over its memory',
  { timeout: 300_000 },
  async () => {
    const pictures = await hostilePictures();
    expect(new Set(pictures.map(({ name, contentType }) => contentType + name)).size).toBe(pictures.length);
    expect(pictures.length).toBeGreaterThanOrEqual(40);

    let peakBytes = 0;
    const watch = setInterval(() => {
      for (const pid of decoderPids()) peakBytes = Math.max(peakBytes, peakMemoryBytes(pid));
    }, 10);
    // The machine that runs tests is shared: the time limit has a test of its own.
    const rules = { concurrency: 8, timeLimitMs: 120_000 };
    const ends = await Promise.all(
      pictures.map(async ({ name, bytes, contentType, promised }) => {
        const photo = await processPhoto({ bytes, contentType, sizeBytes: bytes.length, ...promised }, rules);
        if (photo.ok) return { name, outcome: 'taken' };
        expect(photo.message).toBe(PHOTO_REFUSALS[photo.code]);
        expect(photo.detail, name).not.toMatch(/decoder ended|unreadable reply/);
        return { name, outcome: photo.code };
      }),
    );
    clearInterval(watch);

    expect(ends).toEqual(pictures.map(({ name, outcome }) => ({ name, outcome })));
    if (readdirSync('/').includes('proc')) expect(peakBytes).toBeGreaterThan(0);
    expect(peakBytes).toBeLessThan(DECODER_MEMORY_BYTES);
  },
);
