// Does an object store behave as S3 does, refusals included? usage: node s3-conform.mjs <endpoint> <accessKey> <secret> <bucket>
import { createHash } from 'node:crypto';
import http from 'node:http';
import { Readable } from 'node:stream';
import {
  S3Client,
  S3ServiceException,
  CreateBucketCommand,
  PutObjectCommand,
  GetObjectCommand,
  HeadObjectCommand,
  DeleteObjectCommand,
  ListObjectsV2Command,
  CopyObjectCommand,
  DeleteObjectsCommand,
} from '@aws-sdk/client-s3';
import { getSignedUrl } from '@aws-sdk/s3-request-presigner';

const [endpoint, ak, sk, Bucket] = process.argv.slice(2);
if (!endpoint || !ak || !sk || !Bucket)
  throw new Error('usage: node s3-conform.mjs <endpoint> <accessKey> <secret> <bucket>');
const s3 = new S3Client({
  endpoint,
  region: 'us-east-1',
  forcePathStyle: true,
  credentials: { accessKeyId: ak, secretAccessKey: sk },
  requestChecksumCalculation: 'WHEN_REQUIRED',
  responseChecksumValidation: 'WHEN_REQUIRED',
  maxAttempts: 1,
});
const s3def = new S3Client({
  endpoint,
  region: 'us-east-1',
  forcePathStyle: true,
  credentials: { accessKeyId: ak, secretAccessKey: sk },
  maxAttempts: 1,
});
const bad = new S3Client({
  endpoint,
  region: 'us-east-1',
  forcePathStyle: true,
  credentials: { accessKeyId: ak, secretAccessKey: 'wrong-secret' },
  requestChecksumCalculation: 'WHEN_REQUIRED',
  maxAttempts: 1,
});
let pass = 0;
let fail = 0;
/** @type {[string, string, unknown][]} */
const rows = [];
/** @param {unknown} e */
const nameOf = (e) => (e instanceof Error ? e.name : '');
/** @param {unknown} e */
const statusOf = (e) => (e instanceof S3ServiceException ? e.$metadata.httpStatusCode : undefined);
/**
 * @param {string} name
 * @param {() => unknown} fn
 */
async function t(name, fn) {
  try {
    const r = await fn();
    pass++;
    rows.push(['PASS', name, r ?? '']);
  } catch (e) {
    fail++;
    rows.push(['FAIL', name, String(e).slice(0, 140)]);
  }
}
/**
 * @param {unknown} c
 * @param {unknown} [m]
 */
const ok = (c, m) => {
  if (!c) throw new Error(String(m));
};
/** @param {Buffer} b */
const sha = (b) => createHash('sha256').update(b).digest('base64');
/**
 * @param {string} url
 * @param {{ method?: string, headers?: Record<string, string | number>, body?: Buffer }} [request]
 * @returns {Promise<{ status: number | undefined, headers: http.IncomingHttpHeaders, body: Buffer }>}
 */
const send = (url, { method = 'GET', headers = {}, body } = {}) =>
  new Promise((res, rej) => {
    const u = new URL(url);
    const h = { ...headers };
    if (body && h['content-length'] === undefined) h['content-length'] = Buffer.byteLength(body);
    const r = http.request({ host: u.hostname, port: u.port, path: u.pathname + u.search, method, headers: h }, (x) => {
      /** @type {Buffer[]} */ const c = [];
      x.on('data', (d) => c.push(d));
      x.on('end', () => res({ status: x.statusCode, headers: x.headers, body: Buffer.concat(c) }));
    });
    r.setTimeout(4000, () => r.destroy(new Error('timeout')));
    r.on('error', rej);
    r.end(body);
  });
const body = Buffer.from('hello guitar '.repeat(100));
/** @param {{ client?: S3Client, Key?: string, expiresIn?: number, date?: Date }} [o] */
const putUrl = (o = {}) =>
  getSignedUrl(
    o.client ?? s3,
    new PutObjectCommand({
      Bucket,
      Key: o.Key ?? 'a/b.jpg',
      ContentType: 'image/jpeg',
      ContentLength: body.length,
      ChecksumSHA256: sha(body),
    }),
    {
      expiresIn: o.expiresIn ?? 60,
      signableHeaders: new Set(['content-type', 'content-length']),
      unhoistableHeaders: new Set(['x-amz-checksum-sha256']),
      ...(o.date ? { signingDate: o.date } : {}),
    },
  );
const H = { 'content-type': 'image/jpeg', 'x-amz-checksum-sha256': sha(body) };
await t('CreateBucket', async () => {
  try {
    await s3.send(new CreateBucketCommand({ Bucket }));
  } catch (e) {
    if (!/BucketAlready|Exists/.test(nameOf(e))) throw e;
  }
});
await t('SDK PutObject (no checksum)', () =>
  s3
    .send(
      new PutObjectCommand({ Bucket, Key: 'x.txt', Body: 'abc', ContentType: 'text/plain', Metadata: { foo: 'bar' } }),
    )
    .then((r) => 'etag ' + r.ETag),
);
await t('SDK PutObject default (crc32 WHEN_SUPPORTED)', () =>
  s3def.send(new PutObjectCommand({ Bucket, Key: 'y.txt', Body: 'abc' })).then(() => ''),
);
await t('SDK PutObject default stream body (aws-chunked trailer)', async () => {
  await s3def.send(
    new PutObjectCommand({
      Bucket,
      Key: 'z.txt',
      Body: Readable.from([Buffer.from('abc'), Buffer.from('def')]),
      ContentLength: 6,
    }),
  );
  const r = await s3.send(new GetObjectCommand({ Bucket, Key: 'z.txt' }));
  const s = await r.Body?.transformToString();
  ok(s === 'abcdef', 'stored ' + JSON.stringify(s?.slice(0, 60)));
});
await t('SDK GetObject', async () => {
  const r = await s3.send(new GetObjectCommand({ Bucket, Key: 'x.txt' }));
  ok((await r.Body?.transformToString()) === 'abc', 'body');
  ok(r.ContentType === 'text/plain', 'type');
  ok(r.Metadata?.foo === 'bar', 'meta');
});
await t('SDK HeadObject', async () => {
  const r = await s3.send(new HeadObjectCommand({ Bucket, Key: 'x.txt' }));
  ok(r.ContentLength === 3, 'len ' + r.ContentLength);
});
await t('SDK HeadObject missing -> NotFound', async () => {
  try {
    await s3.send(new HeadObjectCommand({ Bucket, Key: 'nope' }));
  } catch (e) {
    ok(nameOf(e) === 'NotFound', nameOf(e));
    return;
  }
  ok(false, 'no error');
});
await t('SDK GetObject missing -> NoSuchKey', async () => {
  try {
    await s3.send(new GetObjectCommand({ Bucket, Key: 'nope' }));
  } catch (e) {
    ok(nameOf(e) === 'NoSuchKey', nameOf(e));
    return;
  }
  ok(false, 'no error');
});
await t('SDK ListObjectsV2 prefix', async () => {
  const r = await s3.send(new ListObjectsV2Command({ Bucket, Prefix: 'x' }));
  ok(r.KeyCount === 1 && r.Contents?.[0]?.Key === 'x.txt', JSON.stringify(r.Contents));
});
await t('SDK CopyObject', async () => {
  await s3.send(new CopyObjectCommand({ Bucket, Key: 'copy.txt', CopySource: `${Bucket}/x.txt` }));
});
await t('SDK Range get', async () => {
  const r = await s3.send(new GetObjectCommand({ Bucket, Key: 'x.txt', Range: 'bytes=1-1' }));
  ok((await r.Body?.transformToString()) === 'b', 'body');
});
await t('SDK wrong secret rejected', async () => {
  try {
    await bad.send(new PutObjectCommand({ Bucket, Key: 'bad.txt', Body: 'x' }));
  } catch (e) {
    ok(/SignatureDoesNotMatch/.test(nameOf(e)), nameOf(e));
    return;
  }
  ok(false, 'accepted');
});
await t('presigned PUT ok', async () => {
  const r = await send(await putUrl(), { method: 'PUT', headers: H, body });
  ok(r.status === 200, r.status + ' ' + r.body.toString().slice(0, 100));
  ok(r.headers.etag, 'no etag');
});
await t('HEAD after PUT: type,length', async () => {
  const r = await s3.send(new HeadObjectCommand({ Bucket, Key: 'a/b.jpg', ChecksumMode: 'ENABLED' }));
  ok(
    r.ContentType === 'image/jpeg' && r.ContentLength === body.length,
    JSON.stringify([r.ContentType, r.ContentLength]),
  );
  return 'ChecksumSHA256 back: ' + (r.ChecksumSHA256 === sha(body));
});
await t('presigned PUT default client (crc32 of empty body trap) works', async () => {
  const u = await getSignedUrl(s3def, new PutObjectCommand({ Bucket, Key: 'def.bin' }));
  const r = await send(u, { method: 'PUT', body });
  return r.status + ' ' + (/x-amz-checksum-crc32=[^&]*/.exec(u)?.[0] ?? 'no crc in url');
});
/**
 * @param {string} name
 * @param {number[]} codes
 * @param {() => ReturnType<typeof send>} fn
 */
const rej = (name, codes, fn) =>
  t(name, async () => {
    const r = await fn();
    ok(
      codes.includes(r.status ?? 0),
      'status ' +
        r.status +
        ' ' +
        r.body
          .toString()
          .replace(/<\?xml[^>]*>/, '')
          .slice(0, 80),
    );
    return r.status + ' ' + (/<Code>(\w+)/.exec(r.body.toString())?.[1] ?? '');
  });
await rej('reject tampered signature', [403], async () => {
  const u = new URL(await putUrl());
  const s = u.searchParams.get('X-Amz-Signature') ?? '';
  u.searchParams.set('X-Amz-Signature', (s[0] === 'a' ? 'b' : 'a') + s.slice(1));
  return send(u.href, { method: 'PUT', headers: H, body });
});
await rej('reject expired url', [403], async () =>
  send(await putUrl({ expiresIn: 5, date: new Date(Date.now() - 60000) }), { method: 'PUT', headers: H, body }),
);
await rej('reject changed key', [403], async () =>
  send((await putUrl()).replace('a/b.jpg', 'a/c.jpg'), { method: 'PUT', headers: H, body }),
);
await rej('reject changed expiry', [403], async () =>
  send((await putUrl()).replace('X-Amz-Expires=60', 'X-Amz-Expires=6000'), { method: 'PUT', headers: H, body }),
);
await rej('reject wrong length (longer body)', [403, 400], async () => {
  const b = Buffer.concat([body, body]);
  return send(await putUrl(), { method: 'PUT', headers: H, body: b });
});
await rej('reject wrong content-type', [403], async () =>
  send(await putUrl(), { method: 'PUT', headers: { ...H, 'content-type': 'text/html' }, body }),
);
await rej('reject other checksum header', [403, 400], async () => {
  const b = Buffer.from(body);
  b[0] = 90;
  return send(await putUrl(), { method: 'PUT', headers: { ...H, 'x-amz-checksum-sha256': sha(b) }, body: b });
});
await rej('reject body not matching signed checksum', [400], async () => {
  const b = Buffer.from(body);
  b[0] = 90;
  return send(await putUrl(), { method: 'PUT', headers: H, body: b });
});
await rej('reject missing signed header', [403], async () =>
  send(await putUrl(), { method: 'PUT', headers: { 'content-type': 'image/jpeg' }, body }),
);
await rej('reject PUT url used for GET', [403], async () =>
  send(await putUrl(), { method: 'GET', headers: { ...H, 'content-length': body.length } }),
);
await rej('reject no auth GET', [403], async () => send(`${endpoint}/${Bucket}/x.txt`));
await rej('reject no auth PUT', [403], async () => send(`${endpoint}/${Bucket}/q.txt`, { method: 'PUT', body }));
await rej('reject unknown access key', [403], async () =>
  send((await putUrl()).replace(ak, 'AKIDUNKNOWN'), { method: 'PUT', headers: H, body }),
);
await t('presigned GET + response-content-disposition', async () => {
  const r = await send(
    await getSignedUrl(
      s3,
      new GetObjectCommand({
        Bucket,
        Key: 'a/b.jpg',
        ResponseContentDisposition: 'attachment; filename="x.jpg"',
        ResponseContentType: 'image/jpeg',
      }),
      { expiresIn: 60 },
    ),
  );
  ok(r.status === 200 && r.body.equals(body), 'status ' + r.status);
  ok(/attachment/.test(r.headers['content-disposition'] ?? ''), 'no disposition');
});
await rej('reject tampered GET', [403], async () =>
  send(
    (await getSignedUrl(s3, new GetObjectCommand({ Bucket, Key: 'a/b.jpg' }), { expiresIn: 60 })).replace(
      'b.jpg',
      'x.jpg',
    ),
  ),
);
await rej('reject expired GET', [403], async () =>
  send(
    await getSignedUrl(s3, new GetObjectCommand({ Bucket, Key: 'a/b.jpg' }), {
      expiresIn: 5,
      signingDate: new Date(Date.now() - 60000),
    }),
  ),
);
await t('presigned HEAD', async () => {
  const r = await send(await getSignedUrl(s3, new HeadObjectCommand({ Bucket, Key: 'a/b.jpg' }), { expiresIn: 60 }), {
    method: 'HEAD',
  });
  ok(r.status === 200, r.status);
});
await t('presigned GET conditional If-None-Match 304', async () => {
  const u = await getSignedUrl(s3, new GetObjectCommand({ Bucket, Key: 'a/b.jpg' }), { expiresIn: 60 });
  const r1 = await send(u);
  const r = await send(u, { headers: { 'if-none-match': r1.headers.etag ?? '' } });
  ok(r.status === 304, r.status);
});
await t('odd key (space + ü % #)', async () => {
  const Key = "ord 1/top+back ü 100% #2 (a)'!.jpg";
  const r = await send(await putUrl({ Key }), { method: 'PUT', headers: H, body });
  ok(r.status === 200, 'put ' + r.status + r.body.toString().slice(0, 80));
  const h = await s3.send(new HeadObjectCommand({ Bucket, Key }));
  ok(h.ContentLength === body.length, 'head');
});
await t('If-None-Match:* PUT conflict -> 412', async () => {
  try {
    await s3.send(new PutObjectCommand({ Bucket, Key: 'x.txt', Body: 'n', IfNoneMatch: '*' }));
  } catch (e) {
    ok(statusOf(e) === 412, nameOf(e));
    return;
  }
  ok(false, 'overwrote');
});
await t('CORS preflight PUT from allowed origin', async () => {
  const r = await send(await putUrl(), {
    method: 'OPTIONS',
    headers: {
      origin: 'http://127.0.0.1:3000',
      'access-control-request-method': 'PUT',
      'access-control-request-headers': 'content-type,x-amz-checksum-sha256',
    },
  });
  ok([200, 204].includes(r.status ?? 0), 'status ' + r.status + r.body.toString().slice(0, 90));
  ok(r.headers['access-control-allow-origin'], 'no ACAO');
  ok(
    /PUT/.test(r.headers['access-control-allow-methods'] ?? ''),
    'methods ' + r.headers['access-control-allow-methods'],
  );
  ok(
    /checksum|\*/i.test(r.headers['access-control-allow-headers'] ?? ''),
    'headers ' + r.headers['access-control-allow-headers'],
  );
  return r.headers['access-control-allow-origin'];
});
await t('CORS headers on PUT + expose ETag', async () => {
  const r = await send(await putUrl(), { method: 'PUT', headers: { ...H, origin: 'http://127.0.0.1:3000' }, body });
  ok(r.headers['access-control-allow-origin'], 'no ACAO');
  return 'expose: ' + r.headers['access-control-expose-headers'];
});
await t('CORS refuses other origin', async () => {
  const r = await send(await putUrl(), {
    method: 'OPTIONS',
    headers: { origin: 'http://evil.example', 'access-control-request-method': 'PUT' },
  });
  ok(!r.headers['access-control-allow-origin'], 'ACAO ' + r.headers['access-control-allow-origin']);
});
await t('path traversal key stays inside', async () => {
  const r = await s3.send(new PutObjectCommand({ Bucket, Key: '../../escape.txt', Body: 'x' })).then(
    () => 'accepted',
    (e) => 'rejected ' + nameOf(e),
  );
  return r;
});
await t('DeleteObject then 404', async () => {
  await s3.send(new DeleteObjectCommand({ Bucket, Key: 'a/b.jpg' }));
  const r = await s3.send(new HeadObjectCommand({ Bucket, Key: 'a/b.jpg' })).then(() => 200, statusOf);
  ok(r === 404, r);
});
await t('DeleteObjects (batch)', async () => {
  await s3.send(new DeleteObjectsCommand({ Bucket, Delete: { Objects: [{ Key: 'x.txt' }, { Key: 'y.txt' }] } }));
});
for (const r of rows) console.log(r[0].padEnd(5), r[1].padEnd(58), r[2]);
console.log(`${pass} passed, ${fail} failed`);
process.exit(fail ? 1 : 0);
