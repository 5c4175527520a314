import { createHash } from 'node:crypto';
import { describe, expect, test } from 'vitest';
import { createUploader } from '@/lib/photos/upload';
import type { Answer } from '@/lib/photos/upload-answer';
import type { UploadState } from '@/lib/photos/upload-state';
import type { Checked, Grant, UploadLink } from '@/lib/photos/upload-steps';
import type { UploadFile, UploadTransport } from '@/lib/photos/upload-walk';

const status = (code: number, over: object = {}): Answer<never> => ({ kind: 'status', status: code, ...over });
const noSignal: Answer<never> = { kind: 'no-signal' };
const done: Answer<null> = { kind: 'ok', body: null };

/** The shop's and the store's side of an upload, kept in memory; `say` puts answers before the honest ones. */
function makeShop() {
  const photos = new Map<string, { id: string; link: string; isThere: boolean; state: string }>();
  const odd = { ask: [] as Answer<Grant>[], send: [] as Answer<null>[], check: [] as Answer<Checked>[] };
  const calls: string[] = [];
  const held: (() => void)[] = [];
  let isHolding = false;
  let links = 0;

  const transport: UploadTransport = {
    async measure(blob) {
      return createHash('sha256')
        .update(new Uint8Array(await blob.arrayBuffer()))
        .digest('base64');
    },
    async ask({ uploadKey }) {
      calls.push(`ask ${uploadKey}`);
      const answer = odd.ask.shift();
      if (answer) return answer;
      const photo = photos.get(uploadKey) ?? { id: `id-${uploadKey}`, link: '', isThere: false, state: 'granted' };
      photos.set(uploadKey, photo);
      if (photo.state === 'ready') return { kind: 'ok', body: { state: 'ready', id: photo.id } };
      if (photo.state === 'uploaded') return { kind: 'ok', body: { state: 'uploaded', id: photo.id } };
      photo.link = `link-${(links += 1)}`;
      return { kind: 'ok', body: { state: 'granted', id: photo.id, upload: { url: photo.link, headers: {} } } };
    },
    async send({ url }: UploadLink, _blob, onShare, signal) {
      calls.push(`send ${url}`);
      if (isHolding)
        await new Promise<void>((resolve) => (held.push(resolve), signal.addEventListener('abort', () => resolve())));
      if (signal.aborted) return noSignal;
      const answer = odd.send.shift();
      if (answer) return answer;
      const photo = [...photos.values()].find(({ link }) => link === url);
      if (!photo) return status(403);
      if (photo.isThere) return status(412);
      onShare(1);
      photo.isThere = true;
      return done;
    },
    async check(photoId) {
      calls.push(`check ${photoId}`);
      const answer = odd.check.shift();
      if (answer) return answer;
      const photo = [...photos.values()].find(({ id }) => id === photoId);
      if (!photo) return status(404);
      photo.state = photo.isThere ? 'ready' : 'uploaded';
      return { kind: 'ok', body: { state: photo.isThere ? 'ready' : 'missing' } };
    },
    async discard(photoId) {
      calls.push(`discard ${photoId}`);
      for (const [key, { id }] of photos) if (id === photoId) photos.delete(key);
      return { kind: 'ok', body: {} };
    },
  };
  return {
    transport,
    photos,
    calls,
    odd,
    hold: () => void (isHolding = true),
    release() {
      isHolding = false;
      for (const go of held.splice(0)) go();
    },
    heldCount: () => held.length,
  };
}

/** An uploader whose waits are written down and pass at once, unless they are to last until somebody wakes it. */
function makeBench(shop: ReturnType<typeof makeShop>, { waits = 'pass' }: { waits?: 'pass' | 'last' } = {}) {
  const states = new Map<string, UploadState[]>();
  const pausesMs: number[] = [];
  const uploader = createUploader({
    transport: shop.transport,
    onChange: (uploadKey, upload) => states.set(uploadKey, [...(states.get(uploadKey) ?? []), upload]),
    pause: (ms, signal) => {
      pausesMs.push(ms);
      if (waits === 'pass') return Promise.resolve();
      return new Promise((resolve) => signal.addEventListener('abort', () => resolve(), { once: true }));
    },
    random: () => 0,
  });
  const last = (uploadKey: string) => states.get(uploadKey)?.at(-1);
  const reaches = (uploadKey: string, step: UploadState['step']) =>
    expect.poll(() => last(uploadKey)?.step, { interval: 2 }).toBe(step);
  return { uploader, states, pausesMs, last, reaches };
}

const file = (uploadKey: string, over: Partial<UploadFile> = {}): UploadFile => ({
  uploadKey,
  name: `${uploadKey}.jpg`,
  contentType: 'image/jpeg',
  blob: new Blob([uploadKey]),
  ...over,
});

describe('an upload', () => {
  test('goes from its turn through every step to ready, with real shares in between', async () => {
    const shop = makeShop();
    const { uploader, states, reaches, last } = makeBench(shop);
    uploader.add(file('a'));
    await reaches('a', 'ready');
    expect(last('a')).toEqual({ step: 'ready', photoId: 'id-a' });
    expect(states.get('a')?.map(({ step }) => step)).toEqual([
      'queued',
      'measuring',
      'asking',
      'sending',
      'sending',
      'checking',
      'ready',
    ]);
  });

  test('never has more than three photos in hand, and takes the others in their turn', async () => {
    const shop = makeShop();
    const { uploader, reaches, last } = makeBench(shop);
    shop.hold();
    for (const key of ['a', 'b', 'c', 'd', 'e']) uploader.add(file(key));
    await expect.poll(() => shop.heldCount()).toBe(3);
    expect([last('d')?.step, last('e')?.step]).toEqual(['queued', 'queued']);
    shop.release();
    for (const key of ['a', 'b', 'c', 'd', 'e']) await reaches(key, 'ready');
  });

  test('added twice is carried once', async () => {
    const shop = makeShop();
    const { uploader, reaches } = makeBench(shop);
    uploader.add(file('a'));
    uploader.add(file('a'));
    await reaches('a', 'ready');
    expect(shop.calls.filter((call) => call.startsWith('send'))).toHaveLength(1);
  });

  test('kept from an earlier run and in the shop already is not sent again', async () => {
    const shop = makeShop();
    shop.photos.set('a', { id: 'id-a', link: '', isThere: true, state: 'ready' });
    const { uploader, reaches } = makeBench(shop);
    uploader.add(file('a', { photoId: 'id-a' }));
    await reaches('a', 'ready');
    expect(shop.calls).toEqual(['check id-a']);
  });

  test('kept for so long that the shop has swept it away starts afresh', async () => {
    const shop = makeShop();
    const { uploader, reaches } = makeBench(shop);
    uploader.add(file('a', { photoId: 'id-gone' }));
    await reaches('a', 'ready');
    expect(shop.calls).toEqual(['check id-gone', 'ask a', 'send link-1', 'check id-a']);
  });
});

describe('a passing trouble', () => {
  test.each([
    { trouble: 'no signal', answer: noSignal },
    { trouble: 'a fault of the store', answer: status(503) },
    { trouble: 'two tries that met in the store', answer: status(409) },
  ])('$trouble: the same link is used again, without asking for another', async ({ answer }) => {
    const shop = makeShop();
    shop.odd.send.push(answer, answer);
    const { uploader, reaches, pausesMs } = makeBench(shop);
    uploader.add(file('a'));
    await reaches('a', 'ready');
    expect(shop.calls).toEqual(['ask a', 'send link-1', 'send link-1', 'send link-1', 'check id-a']);
    expect(pausesMs).toEqual([500, 1000]);
  });

  test('a store that stays away leaves the photo waiting; a press sends it', async () => {
    const shop = makeShop();
    shop.odd.send.push(noSignal);
    const { uploader, reaches, last } = makeBench(shop, { waits: 'last' });
    uploader.add(file('a'));
    await reaches('a', 'waiting');
    expect(last('a')).toEqual({ step: 'waiting', message: expect.stringMatching(/by itself/) });
    uploader.tryNow('a');
    await reaches('a', 'ready');
  });

  test('photos that wait leave their places to others', async () => {
    const shop = makeShop();
    shop.odd.send.push(noSignal, noSignal, noSignal);
    const { uploader, reaches } = makeBench(shop, { waits: 'last' });
    for (const key of ['a', 'b', 'c']) uploader.add(file(key));
    for (const key of ['a', 'b', 'c']) await reaches(key, 'waiting');
    uploader.add(file('d'));
    await reaches('d', 'ready');
  });

  test('a retry that gets no further shows nothing but the wait', async () => {
    const shop = makeShop();
    shop.odd.ask.push(noSignal, noSignal);
    const { uploader, states, reaches } = makeBench(shop, { waits: 'last' });
    uploader.add(file('a'));
    await reaches('a', 'waiting');
    const before = states.get('a')?.length ?? 0;
    uploader.wake();
    await expect.poll(() => shop.calls.length).toBe(2);
    await expect.poll(() => states.get('a')?.length).toBe(before + 1);
    expect(states.get('a')?.at(-1)?.step).toBe('waiting');
  });

  test('Retry-After is waited out, however short the own wait would be', async () => {
    const shop = makeShop();
    shop.odd.ask.push(status(429, { retryAfterMs: 90_000 }));
    const { uploader, reaches, pausesMs } = makeBench(shop);
    uploader.add(file('a'));
    await reaches('a', 'ready');
    expect(pausesMs).toEqual([90_000]);
  });

  test('that comes after some way was made begins with a short wait again', async () => {
    const shop = makeShop();
    shop.odd.ask.push(noSignal, noSignal);
    shop.odd.send.push(noSignal, noSignal);
    const { uploader, reaches, pausesMs } = makeBench(shop);
    uploader.add(file('a'));
    await reaches('a', 'ready');
    expect(pausesMs).toEqual([500, 1000, 500, 1000]);
  });

  test('signed out: the photo waits, and goes on after signing in', async () => {
    const shop = makeShop();
    shop.odd.check.push(status(401));
    const { uploader, reaches } = makeBench(shop, { waits: 'last' });
    uploader.add(file('a'));
    await reaches('a', 'waiting');
    uploader.wake();
    await reaches('a', 'ready');
    expect(shop.calls.filter((call) => call.startsWith('send'))).toHaveLength(1);
  });
});

describe('a link', () => {
  test('too old is asked for anew', async () => {
    const shop = makeShop();
    shop.odd.send.push(status(403));
    const { uploader, reaches } = makeBench(shop);
    uploader.add(file('a'));
    await reaches('a', 'ready');
    expect(shop.calls).toEqual(['ask a', 'send link-1', 'ask a', 'send link-2', 'check id-a']);
  });

  test('that the store never takes ends in a sentence and not in a loop', async () => {
    const shop = makeShop();
    shop.odd.send.push(...Array.from({ length: 20 }, () => status(403)));
    const { uploader, reaches, last } = makeBench(shop);
    uploader.add(file('a'));
    await reaches('a', 'failed');
    expect(last('a')).toEqual({ step: 'failed', message: expect.stringMatching(/\w+.*\.$/) });
    expect(shop.calls.length).toBeLessThan(12);
    shop.odd.send.length = 0;
    uploader.tryNow('a');
    await reaches('a', 'ready');
  });

  test('whose bytes arrived although the answer was lost is not sent a third time', async () => {
    const shop = makeShop();
    shop.odd.send.push(status(412));
    shop.odd.check.push({ kind: 'ok', body: { state: 'ready' } });
    const { uploader, reaches } = makeBench(shop);
    uploader.add(file('a'));
    await reaches('a', 'ready');
    expect(shop.calls).toEqual(['ask a', 'send link-1', 'check id-a']);
  });
});

test('bytes that the shop does not find are promised and sent anew', async () => {
  const shop = makeShop();
  shop.photos.set('a', { id: 'id-a', link: '', isThere: false, state: 'uploaded' });
  const { uploader, reaches } = makeBench(shop);
  uploader.add(file('a'));
  await reaches('a', 'ready');
  expect(shop.calls).toEqual(['ask a', 'check id-a', 'discard id-a', 'ask a', 'send link-1', 'check id-a']);
});

describe('a refusal', () => {
  test('of the promise shows the sentence of its field', async () => {
    const shop = makeShop();
    shop.odd.ask.push(status(422, { message: 'Look again.', fields: { sizeBytes: 'That photo is too large.' } }));
    const { uploader, reaches, last } = makeBench(shop);
    uploader.add(file('a'));
    await reaches('a', 'refused');
    expect(last('a')).toEqual({ step: 'refused', message: 'That photo is too large.' });
  });

  test('after the check shows the shop’s sentence, and nothing is tried again', async () => {
    const shop = makeShop();
    shop.odd.check.push({ kind: 'ok', body: { state: 'refused', message: 'Part of this photo is missing.' } });
    const { uploader, reaches, last, pausesMs } = makeBench(shop);
    uploader.add(file('a'));
    await reaches('a', 'refused');
    expect(last('a')).toEqual({ step: 'refused', message: 'Part of this photo is missing.' });
    expect(pausesMs).toEqual([]);
  });

  test('of one photo leaves the others alone', async () => {
    const shop = makeShop();
    shop.odd.ask.push(status(404, { message: 'There is nothing here for you.' }));
    const { uploader, reaches } = makeBench(shop);
    uploader.add(file('a'));
    uploader.add(file('b'));
    await reaches('a', 'failed');
    await reaches('b', 'ready');
  });

  test('to be read by the phone itself is said so', async () => {
    const shop = makeShop();
    shop.transport.measure = () => Promise.reject(new DOMException('gone', 'NotReadableError'));
    const { uploader, reaches, last } = makeBench(shop);
    uploader.add(file('a'));
    await reaches('a', 'failed');
    expect(last('a')).toEqual({ step: 'failed', message: expect.stringMatching(/could not be read/) });
    expect(shop.calls).toEqual([]);
  });
});

describe('leaving', () => {
  test('a removed photo stops at once, is thrown away in the shop, and says nothing more', async () => {
    const shop = makeShop();
    const { uploader, states, reaches } = makeBench(shop);
    shop.hold();
    uploader.add(file('a'));
    await reaches('a', 'sending');
    const before = states.get('a')?.length;
    await uploader.remove('a');
    await expect.poll(() => shop.calls).toEqual(['ask a', 'send link-1', 'discard id-a']);
    expect(shop.photos.size).toBe(0);
    expect(states.get('a')).toHaveLength(before ?? -1);
  });

  test('a removed photo gives its place to the next', async () => {
    const shop = makeShop();
    const { uploader, reaches } = makeBench(shop);
    shop.hold();
    for (const key of ['a', 'b', 'c', 'd']) uploader.add(file(key));
    await expect.poll(() => shop.heldCount()).toBe(3);
    await uploader.remove('b');
    await reaches('d', 'sending');
    shop.release();
    await reaches('d', 'ready');
  });

  test('the page stops the transfers and throws nothing away; opened again, they end well', async () => {
    const shop = makeShop();
    const { uploader, reaches } = makeBench(shop);
    shop.hold();
    uploader.add(file('a'));
    await reaches('a', 'sending');
    uploader.stop();
    shop.release();
    const again = makeBench(shop);
    again.uploader.add(file('a'));
    await again.reaches('a', 'ready');
    expect(shop.calls.some((call) => call.startsWith('discard'))).toBe(false);
    expect(shop.photos.size).toBe(1);
  });
});
