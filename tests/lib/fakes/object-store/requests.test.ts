import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import {
  CopyObjectCommand,
  GetObjectCommand,
  HeadBucketCommand,
  ListObjectsV2Command,
  PutObjectCommand,
} from '@aws-sdk/client-s3';
import { getSignedUrl } from '@aws-sdk/s3-request-presigner';
import { readTarget } from '@/lib/fakes/object-store/request';
import { signatureOf } from '@/lib/fakes/object-store/signature';
import { BUCKET, CREDENTIALS, ORIGIN, REGION, send, startTestStore } from './fixture';

const NOW_MS = Date.now();
let store: Awaited<ReturnType<typeof startTestStore>>;
beforeAll(async () => {
  store = await startTestStore({ now: () => NOW_MS });
  await store.s3.send(
    new PutObjectCommand({ Bucket: BUCKET, Key: 'top.txt', Body: 'spruce top', CacheControl: 'no-store' }),
  );
});
afterAll(() => store.stop());

interface Terms {
  age_s?: number;
  expires?: string;
  region?: string;
  service?: string;
  signedHeaders?: string[];
  query?: string;
  method?: string;
  key?: string;
}

/** A presigned address with any terms, sensible or not; its signature is always right for them. */
function presign(terms: Terms = {}): string {
  const amzDate = new Date(NOW_MS - (terms.age_s ?? 0) * 1_000).toISOString().replace(/[-:]|\.\d+/g, '');
  const scope = { date: amzDate.slice(0, 8), region: terms.region ?? REGION, service: terms.service ?? 's3' };
  const signedHeaders = terms.signedHeaders ?? ['host'];
  const credential = [CREDENTIALS.accessKeyId, ...Object.values(scope), 'aws4_request'].join('/');
  const query = [
    'X-Amz-Algorithm=AWS4-HMAC-SHA256',
    `X-Amz-Credential=${encodeURIComponent(credential)}`,
    `X-Amz-Date=${amzDate}`,
    `X-Amz-Expires=${terms.expires ?? '300'}`,
    `X-Amz-SignedHeaders=${signedHeaders.join('%3B')}`,
    ...(terms.query === undefined ? [] : [terms.query]),
  ].join('&');
  const target = `/${BUCKET}/${terms.key ?? 'top.txt'}?${query}`;
  const signature = signatureOf(
    {
      ...readTarget(target),
      method: terms.method ?? 'GET',
      headers: new Map([['host', new URL(store.url).host]]),
      signedHeaders,
      payloadHash: 'UNSIGNED-PAYLOAD',
    },
    amzDate,
    scope,
    CREDENTIALS.secretAccessKey,
  );
  return `${store.url}${target}&X-Amz-Signature=${signature}`;
}

describe('a presigned address', () => {
  test.each<{ terms: Terms; status: number; why: string }>([
    { why: 'in its time', terms: {}, status: 200 },
    { why: 'in its last second', terms: { age_s: 299 }, status: 200 },
    { why: 'after its time', terms: { age_s: 302 }, status: 403 },
    { why: 'from a clock 14 minutes ahead', terms: { age_s: -14 * 60 }, status: 200 },
    { why: 'from a clock 16 minutes ahead', terms: { age_s: -16 * 60 }, status: 403 },
    { why: 'for a week', terms: { expires: '604800' }, status: 200 },
    { why: 'for a second more than a week', terms: { expires: '604801' }, status: 400 },
    { why: 'for no time', terms: { expires: '0' }, status: 400 },
    { why: 'for a negative time', terms: { expires: '-5' }, status: 400 },
    { why: 'for a time that is no number', terms: { expires: '3e2' }, status: 400 },
    { why: 'for another region', terms: { region: 'us-east-1' }, status: 400 },
    { why: 'for another service', terms: { service: 'iam' }, status: 400 },
    { why: 'that leaves the host unsigned', terms: { signedHeaders: [] }, status: 403 },
    { why: 'for a sub-resource', terms: { query: 'acl=' }, status: 501 },
  ])('$why answers $status', async ({ terms, status }) => {
    expect((await send(presign(terms))).status).toBe(status);
  });

  test('does not work with an x-amz header that was not signed', async () => {
    const reply = await send(presign(), { headers: { 'x-amz-meta-note': 'x' } });
    expect(reply.status).toBe(403);
    expect(reply.body.toString()).toContain('<Code>AccessDenied</Code>');
  });

  test('sets the headers of the answer, the caching among them', async () => {
    const command = new GetObjectCommand({
      Bucket: BUCKET,
      Key: 'top.txt',
      ResponseCacheControl: 'private, max-age=300',
      ResponseContentType: 'text/plain',
      ResponseContentDisposition: 'inline',
    });
    const reply = await send(await getSignedUrl(store.s3, command, { signingDate: new Date(NOW_MS) }));
    expect(reply.headers).toMatchObject({
      'cache-control': 'private, max-age=300',
      'content-type': 'text/plain',
      'content-disposition': 'inline',
    });
  });

  test('cannot smuggle a second header line into the answer', async () => {
    const reply = await send(presign({ query: 'response-content-type=a%0D%0Ab' }));
    expect(reply.status).toBe(400);
  });

  test('uploads the promised length only: a body without one is refused', async () => {
    const reply = await send(presign({ method: 'PUT', key: 'chunked.txt' }), {
      method: 'PUT',
      headers: { 'transfer-encoding': 'chunked' },
      body: Buffer.from('x'),
    });
    expect(reply.status).toBe(411);
  });
});

describe('reading', () => {
  test.each([
    { range: 'bytes=0-5', status: 206, text: 'spruce' },
    { range: 'bytes=7-', status: 206, text: 'top' },
    { range: 'bytes=-3', status: 206, text: 'top' },
    { range: 'bytes=7-900', status: 206, text: 'top' },
    { range: 'bytes=5-2', status: 200, text: 'spruce top' },
    { range: 'lines=1-2', status: 200, text: 'spruce top' },
  ])('$range gives $status "$text"', async ({ range, status, text }) => {
    const reply = await send(presign(), { headers: { range } });
    expect(reply.status).toBe(status);
    expect(reply.body.toString()).toBe(text);
    expect(reply.headers['content-length']).toBe(String(text.length));
  });

  test.each(['bytes=10-', 'bytes=-0'])('%s is outside the object', async (range) => {
    expect((await send(presign(), { headers: { range } })).status).toBe(416);
  });

  test('conditions are weighed against tag and time', async () => {
    const { headers } = await send(presign());
    const { etag = '', 'last-modified': modified = '' } = headers;
    const ask = async (conditions: Record<string, string>) => (await send(presign(), { headers: conditions })).status;
    expect(await ask({ 'if-none-match': etag })).toBe(304);
    expect(await ask({ 'if-modified-since': modified })).toBe(304);
    expect(await ask({ 'if-none-match': '"other"', 'if-modified-since': modified })).toBe(200);
    expect(await ask({ 'if-match': '"other"' })).toBe(412);
    expect(await ask({ 'if-unmodified-since': new Date(NOW_MS - 86_400_000).toUTCString() })).toBe(412);
  });

  test('only a page of an allowed origin may read across origins, and caches are told so', async () => {
    const allowed = await send(presign(), { headers: { origin: ORIGIN } });
    const stranger = await send(presign(), { headers: { origin: 'https://elsewhere.example' } });
    expect(allowed.headers['access-control-allow-origin']).toBe(ORIGIN);
    expect(stranger.headers['access-control-allow-origin']).toBeUndefined();
    expect([allowed, stranger].map(({ headers }) => headers.vary)).toEqual([
      expect.stringContaining('Origin'),
      expect.stringContaining('Origin'),
    ]);
  });
});

describe('a bucket', () => {
  test('lists its objects page by page, in order, each once', async () => {
    const keys = Array.from({ length: 7 }, (_, i) => `list/${i} <&> ü.txt`);
    for (const Key of [...keys].reverse())
      await store.s3.send(new PutObjectCommand({ Bucket: BUCKET, Key, Body: 'x' }));
    const seen: string[] = [];
    let token: string | undefined;
    do {
      const page = await store.s3.send(
        new ListObjectsV2Command({ Bucket: BUCKET, Prefix: 'list/', MaxKeys: 3, ContinuationToken: token }),
      );
      seen.push(...(page.Contents ?? []).map(({ Key = '' }) => Key));
      token = page.NextContinuationToken;
    } while (token !== undefined);
    expect(seen).toEqual(keys);
  });

  test('copies an object with its headers', async () => {
    await store.s3.send(new CopyObjectCommand({ Bucket: BUCKET, Key: 'copy.txt', CopySource: `${BUCKET}/top.txt` }));
    const copy = await store.s3.send(new GetObjectCommand({ Bucket: BUCKET, Key: 'copy.txt' }));
    expect(await copy.Body?.transformToString()).toBe('spruce top');
    expect(copy.CacheControl).toBe('no-store');
  });

  test('is told apart from one that is not there', async () => {
    await expect(store.s3.send(new HeadBucketCommand({ Bucket: BUCKET }))).resolves.toBeDefined();
    await expect(store.s3.send(new HeadBucketCommand({ Bucket: 'other' }))).rejects.toMatchObject({ name: 'NotFound' });
  });

  test('keeps empty objects', async () => {
    await store.s3.send(new PutObjectCommand({ Bucket: BUCKET, Key: 'empty', Body: new Uint8Array() }));
    const empty = await store.s3.send(new GetObjectCommand({ Bucket: BUCKET, Key: 'empty' }));
    expect(await empty.Body?.transformToString()).toBe('');
  });
});

describe('the fault switch', () => {
  test('fails as often as it was told, and then works again', async () => {
    await send(`${store.url}/_fail`, { method: 'POST', body: Buffer.from('{"status":503,"times":2}') });
    const statuses = [];
    for (let i = 0; i < 3; i++) statuses.push((await send(presign())).status);
    expect(statuses).toEqual([503, 503, 200]);
  });

  test('can be cleared, and refuses nonsense', async () => {
    await send(`${store.url}/_fail`, { method: 'POST', body: Buffer.from('{"status":503,"times":9}') });
    await send(`${store.url}/_fail`, { method: 'DELETE' });
    expect((await send(presign())).status).toBe(200);
    const nonsense = await send(`${store.url}/_fail`, { method: 'POST', body: Buffer.from('{"status":200}') });
    expect(nonsense.status).toBe(400);
  });
});
