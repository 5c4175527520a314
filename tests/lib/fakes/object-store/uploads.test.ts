import { once } from 'node:events';
import { readdir } from 'node:fs/promises';
import { connect, type Socket } from 'node:net';
import { join } from 'node:path';
import { GetObjectCommand, HeadObjectCommand } from '@aws-sdk/client-s3';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import {
  BUCKET,
  grantUpload,
  ORIGIN,
  PICTURE,
  send,
  sha256Base64,
  startTestStore,
  uploadHeaders,
  type Outgoing,
} from './fixture';

let store: Awaited<ReturnType<typeof startTestStore>>;
beforeAll(async () => {
  store = await startTestStore();
});
afterAll(() => store.stop());

function put(url: string, change: Outgoing = {}) {
  return send(url, { method: 'PUT', headers: uploadHeaders(), body: PICTURE, ...change });
}

async function storedBytes(key: string): Promise<Buffer | undefined> {
  try {
    const { Body } = await store.s3.send(new GetObjectCommand({ Bucket: BUCKET, Key: key }));
    return Buffer.from((await Body?.transformToByteArray()) ?? []);
  } catch {
    return undefined;
  }
}

/** Sends the head of an upload and leaves the body to the caller. */
function connectAndAsk(address: string, length_bytes: number): Socket {
  const { hostname, port, host, pathname, search } = new URL(address);
  const headers = { ...uploadHeaders(), host, 'content-length': length_bytes };
  const lines = Object.entries(headers).map(([name, value]) => `${name}: ${value}\r\n`);
  const socket = connect(Number(port), hostname);
  socket.write(`PUT ${pathname}${search} HTTP/1.1\r\n${lines.join('')}\r\n`);
  return socket;
}

function without(name: string): Record<string, string | number> {
  return Object.fromEntries(Object.entries(uploadHeaders()).filter(([other]) => other !== name));
}

const OTHER = Buffer.from(PICTURE);
OTHER.write('X', 100);
const LONGER = Buffer.concat([PICTURE, Buffer.from('more')]);
const SHORTER = PICTURE.subarray(0, 50);

const ALTERED: { change: string; alter: (url: string) => [string, Outgoing?] }[] = [
  { change: 'another key', alter: (url) => [url.replace('/in/', '/out/')] },
  { change: 'a longer life', alter: (url) => [url.replace('X-Amz-Expires=300', 'X-Amz-Expires=604800')] },
  { change: 'another type', alter: (url) => [url, { headers: { ...uploadHeaders(), 'content-type': 'text/html' } }] },
  {
    change: 'a longer body',
    alter: (url) => [url, { headers: { ...uploadHeaders(), 'content-length': LONGER.length }, body: LONGER }],
  },
  {
    change: 'a shorter body',
    alter: (url) => [url, { headers: { ...uploadHeaders(), 'content-length': SHORTER.length }, body: SHORTER }],
  },
  { change: 'other bytes of the same length', alter: (url) => [url, { body: OTHER }] },
  {
    change: 'other bytes with their own checksum',
    alter: (url) => [
      url,
      { headers: { ...uploadHeaders(), 'x-amz-checksum-sha256': sha256Base64(OTHER) }, body: OTHER },
    ],
  },
  { change: 'no checksum', alter: (url) => [url, { headers: without('x-amz-checksum-sha256') }] },
  { change: 'no guard against overwriting', alter: (url) => [url, { headers: without('if-none-match') }] },
  {
    change: 'metadata nobody signed',
    alter: (url) => [url, { headers: { ...uploadHeaders(), 'x-amz-meta-note': 'x' } }],
  },
];

describe('a granted upload', () => {
  test('stores exactly the promised bytes and tells their checksum', async () => {
    const reply = await put(await grantUpload(store.s3, 'in/good.jpg'), {
      headers: { ...uploadHeaders(), origin: ORIGIN },
    });
    expect(reply.status).toBe(200);
    expect(reply.headers['access-control-allow-origin']).toBe(ORIGIN);
    const head = await store.s3.send(
      new HeadObjectCommand({ Bucket: BUCKET, Key: 'in/good.jpg', ChecksumMode: 'ENABLED' }),
    );
    expect(head).toMatchObject({
      ContentLength: PICTURE.length,
      ContentType: 'image/jpeg',
      ChecksumSHA256: sha256Base64(PICTURE),
    });
    expect(await storedBytes('in/good.jpg')).toEqual(PICTURE);
  });

  test.each(ALTERED)('is refused with $change, and nothing is stored', async ({ change, alter }) => {
    const key = `in/${change.replaceAll(' ', '-')}.jpg`;
    const [url, outgoing] = alter(await grantUpload(store.s3, key));
    const reply = await put(url, outgoing);
    expect([400, 403]).toContain(reply.status);
    expect(await storedBytes(key)).toBeUndefined();
    expect(await storedBytes(key.replace('in/', 'out/'))).toBeUndefined();
  });

  test('cannot be used a second time to overwrite what it stored', async () => {
    const url = await grantUpload(store.s3, 'in/once.jpg');
    expect((await put(url)).status).toBe(200);
    const again = await put(url);
    expect(again.status).toBe(412);
    expect(again.body.toString()).toContain('<Code>PreconditionFailed</Code>');
  });

  test('lets exactly one of ten simultaneous uses through', async () => {
    const url = await grantUpload(store.s3, 'in/race.jpg');
    const replies = await Promise.all(Array.from({ length: 10 }, () => put(url)));
    expect(replies.map(({ status }) => status).sort()).toEqual([200, ...Array.from({ length: 9 }, () => 412)]);
  });

  test('leaves nothing behind when the connection breaks half way', async () => {
    const socket = connectAndAsk(await grantUpload(store.s3, 'in/cut.jpg'), PICTURE.length);
    socket.write(PICTURE.subarray(0, 5_000));
    await expect.poll(() => readdir(join(store.dataDir, '.incoming'))).toHaveLength(1);
    socket.destroy();
    await expect.poll(() => readdir(join(store.dataDir, '.incoming'))).toHaveLength(0);
    expect(await storedBytes('in/cut.jpg')).toBeUndefined();
  });

  test('that is refused still gets its answer when the sender reads only after sending everything', async () => {
    const body = Buffer.alloc(8 * 1024 * 1024, 7);
    const socket = connectAndAsk(await grantUpload(store.s3, 'in/large.jpg'), body.length);
    await new Promise<void>((sent, failed) => {
      socket.once('error', failed);
      socket.write(body, () => sent());
    });
    const [answer] = await once(socket, 'data');
    socket.destroy();
    expect(String(answer)).toMatch(/^HTTP\/1\.1 403 /);
  });
});
