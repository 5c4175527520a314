import { execFile, fork, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { readFileSync } from 'node:fs';
import { setTimeout as after } from 'node:timers/promises';
import { promisify } from 'node:util';
import sharp from 'sharp';
import { afterEach, beforeAll, describe, expect, test, vi } from 'vitest';
import { decodeIn } from '@/lib/photos/decoder-run';
import { DECODER_LIMITS } from '@/lib/photos/limits';
import { processPhoto, stopDecoders } from '@/lib/photos/process-photo';
import { decoderPids } from '../../support/decoder-pids';
import { handMadePng } from '../../support/picture-bytes';

const run = promisify(execFile);
const jobOf = (bytes: Buffer, contentType: string) => ({ bytes, contentType, sizeBytes: bytes.length });
const slow = jobOf(handMadePng({ widthPx: 7000, heightPx: 7000 }, Buffer.alloc(21_001 * 7000)), 'image/png');
let quick: ReturnType<typeof jobOf>;

beforeAll(async () => {
  quick = jobOf(
    await sharp({ create: { width: 64, height: 48, channels: 3, background: '#8a5a2b' } })
      .jpeg()
      .toBuffer(),
    'image/jpeg',
  );
});
afterEach(stopDecoders);

/** Waits until a decoder runs and has begun, and answers its pid. */
async function workingDecoder(): Promise<number> {
  for (;;) {
    const [pid] = decoderPids();
    if (pid !== undefined) return pid;
    await after(5);
  }
}

describe('a decoder', () => {
  test('over its time is killed, its photo refused, and the next photo is untouched', async () => {
    const [first, next] = await Promise.all([processPhoto(slow, { timeLimitMs: 250 }), processPhoto(quick)]);
    expect(first).toMatchObject({ ok: false, code: 'too_slow', detail: 'over 250 ms' });
    expect(next.ok).toBe(true);
    expect(decoderPids()).toHaveLength(1);
  });

  test('over its memory is killed, its photo refused, and the next photo is untouched', async () => {
    const [first, next] = await Promise.all([
      processPhoto(slow, { memoryLimitBytes: 60 * 1024 * 1024 }),
      processPhoto(quick),
    ]);
    expect(first).toMatchObject({ ok: false, code: 'too_slow' });
    expect(next.ok).toBe(true);
  });

  test('that dies by itself fails only the photo it had', async () => {
    const photos = Promise.all([processPhoto(slow), processPhoto(quick), processPhoto(quick)]);
    process.kill(await workingDecoder(), 'SIGSEGV');
    const [first, ...others] = await photos;
    expect(first).toMatchObject({ ok: false, code: 'failed', detail: 'decoder ended: SIGSEGV' });
    expect(others.map(({ ok }) => ok)).toEqual([true, true]);
  });

  test('killed while it waits is replaced without a photo noticing', async () => {
    await processPhoto(quick);
    const pid = await workingDecoder();
    process.kill(pid, 'SIGKILL');
    while (decoderPids().includes(pid)) await after(5);
    await after(50);
    expect((await processPhoto(quick)).ok).toBe(true);
  });

  test('serves one photo after another while it is healthy', async () => {
    await processPhoto(quick);
    const pid = await workingDecoder();
    for (let i = 0; i < 12; i++) expect((await processPhoto(quick)).ok).toBe(true);
    expect(decoderPids()).toEqual([pid]);
  });

  test('that one photo has swollen is not kept for the next', async () => {
    // A decoder at rest has taken about 70 MB: more than half of this, less than what ends it.
    await processPhoto(quick, { memoryLimitBytes: 100 * 1024 * 1024 });
    while (decoderPids().length > 0) await after(5);
    expect((await processPhoto(quick)).ok).toBe(true);
  });

  test('inherits no variable of the app but two', async () => {
    process.env.FLITCHBOOK_TEST_SECRET = 'canary';
    await processPhoto(quick);
    const variables = readFileSync(`/proc/${await workingDecoder()}/environ`, 'latin1')
      .split('\0')
      .filter(Boolean);
    delete process.env.FLITCHBOOK_TEST_SECRET;
    const names = variables.map((variable) => variable.split('=')[0] ?? '').sort();
    expect(names.filter((name) => !name.startsWith('NODE_CHANNEL_'))).toEqual(['NODE_ENV', 'PATH']);
  });

  test('that answers something else than a photo fails it', async () => {
    const answering = (reply: string): ChildProcess =>
      fork('-e', [`process.on('message', () => process.send(${reply}))`], {
        serialization: 'advanced',
        execPath: process.execPath,
        execArgv: [],
      });
    for (const reply of ['null', '{ ok: true }', '{ ok: false, code: "made_up", detail: "" }']) {
      const child = answering(reply);
      const rules = { concurrency: 1, timeLimitMs: 20_000, memoryLimitBytes: Infinity };
      const photo = await decodeIn(child, { ...quick, limits: DECODER_LIMITS }, rules);
      const exit = once(child, 'exit');
      child.kill('SIGKILL');
      await exit;
      expect(photo).toMatchObject({ ok: false, code: 'failed' });
      expect(photo).toHaveProperty('detail', expect.stringContaining('unreadable reply'));
    }
  });
});

describe('the line of photos', () => {
  test('gives each photo its own answer, two at once on decoders used before', async () => {
    const widths = [30, 40, 50, 60, 70, 80];
    const jobs = await Promise.all(
      widths.map(async (width) => {
        const picture = sharp({ create: { width, height: 20, channels: 3, background: '#8a5a2b' } });
        return jobOf(await picture.png().toBuffer(), 'image/png');
      }),
    );
    await processPhoto(quick);
    const photos = await Promise.all(jobs.map((job) => processPhoto(job, { concurrency: 2 })));
    expect(photos.map((photo) => photo.ok && photo.widthPx)).toEqual(widths);
  });

  test.each([1, 2])('has at most %i decoders at once, and is served in the order it came', async (concurrency) => {
    let most = 0;
    const watch = setInterval(() => (most = Math.max(most, decoderPids().length)), 5);
    const order: number[] = [];
    await Promise.all([0, 1, 2, 3, 4, 5].map((i) => processPhoto(quick, { concurrency }).then(() => order.push(i))));
    clearInterval(watch);
    expect(most).toBeLessThanOrEqual(concurrency);
    if (concurrency === 1) expect(order).toEqual([0, 1, 2, 3, 4, 5]);
  });

  test('is answered when the decoders are stopped, and starts again after', async () => {
    const photos = Promise.all([processPhoto(slow), processPhoto(quick)]);
    await workingDecoder();
    await stopDecoders();
    expect((await photos).map((photo) => photo.ok)).toEqual([false, false]);
    expect(decoderPids()).toEqual([]);
    expect((await processPhoto(quick)).ok).toBe(true);
  });

  test('is one a process, however often the module is loaded', async () => {
    await processPhoto(quick);
    const before = decoderPids();
    vi.resetModules();
    const again = await import('@/lib/photos/process-photo');
    expect(again.processPhoto).not.toBe(processPhoto);
    expect((await again.processPhoto(quick)).ok).toBe(true);
    expect(decoderPids()).toEqual(before);
  });
});

const script = (then: string) => `
  import sharp from 'sharp';
  import { processPhoto } from './lib/photos/process-photo';
  import { decoderPids } from './tests/support/decoder-pids';
  import { handMadePng } from './tests/support/picture-bytes';
  const bytes = await sharp({ create: { width: 64, height: 48, channels: 3, background: '#8a5a2b' } }).jpeg().toBuffer();
  const photo = await processPhoto({ bytes, contentType: 'image/jpeg', sizeBytes: bytes.length });
  console.log(photo.ok, decoderPids().join());
  ${then}`;

const KILLED_AT_WORK = `
  const hard = handMadePng({ widthPx: 7000, heightPx: 7000, bitDepth: 16, colourType: 6 }, Buffer.alloc(56_001 * 7000));
  void processPhoto({ bytes: hard, contentType: 'image/png', sizeBytes: hard.length });
  setTimeout(() => process.kill(process.pid, 'SIGKILL'), 300);`;

describe('the app', () => {
  test.each([
    { how: 'by itself while a decoder waits', then: '' },
    { how: 'killed while a decoder waits', then: `process.kill(process.pid, 'SIGKILL');` },
    { how: 'killed while a decoder works', then: KILLED_AT_WORK },
  ])('ends $how, and the decoder ends with it', async ({ then }) => {
    const node = ['--import', 'tsx', '--input-type=module', '-e', script(then)];
    const timeout = 25_000;
    const { stdout, killed } = await run(process.execPath, node, { timeout }).then(
      ({ stdout }) => ({ stdout, killed: false }),
      (error: { stdout: string; killed: boolean }) => error,
    );
    expect(killed, 'ended before its time was up').toBe(false);
    const [ok, pid] = stdout.trim().split(' ');
    expect(ok).toBe('true');
    await expect.poll(() => isAlive(Number(pid)), { timeout: 1500 }).toBe(false);
  });
});

function isAlive(pid: number): boolean {
  try {
    return !readFileSync(`/proc/${pid}/status`, 'latin1').includes('State:\tZ');
  } catch {
    return false;
  }
}
