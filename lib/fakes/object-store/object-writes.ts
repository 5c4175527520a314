import { Readable } from 'node:stream';
import { element, xmlAnswer } from './xml';
import type { Answer } from './answer';
import { checkBody, promisedSums, readBodyPromise, sumHeaders, type BodyPromise } from './body-promise';
import { decodeChunks } from './chunked';
import type { Claim } from './claim';
import { mustBeAbsent } from './conditions';
import type { Digest } from './digest';
import type { ObjectRecord } from './object-file';
import { Refusal } from './refusal';
import { readTarget, type StoreRequest } from './request';
import type { NewObject, Store } from './store';

const STORED = ['cache-control', 'content-disposition', 'content-language', 'expires'];

function storedHeaders({ headers }: StoreRequest): Record<string, string> {
  const kept = [...headers].filter(([name]) => STORED.includes(name) || name.startsWith('x-amz-meta-'));
  const encodings = (headers.get('content-encoding') ?? '').split(',').map((part) => part.trim());
  const encoding = encodings.filter((part) => part !== '' && part !== 'aws-chunked').join(',');
  return {
    ...Object.fromEntries(kept),
    'content-type': headers.get('content-type') ?? 'binary/octet-stream',
    ...(encoding !== '' && { 'content-encoding': encoding }),
  };
}

function recordOf(
  key: string,
  digest: Digest,
  now_ms: number,
): Pick<ObjectRecord, 'key' | 'size_bytes' | 'etag' | 'modifiedAt_ms'> {
  return { key, size_bytes: digest.size_bytes, etag: `"${digest.md5.toString('hex')}"`, modifiedAt_ms: now_ms };
}

async function putOrRefuse(store: Store, object: NewObject): Promise<ObjectRecord> {
  const record = await store.put(object);
  if (record === undefined) throw new Refusal('PreconditionFailed', 'There is an object with this key already.');
  return record;
}

/** PutObject. The body goes to disk as it comes; it becomes the object only once it is whole and as promised. */
export async function putObject(store: Store, request: StoreRequest, claim: Claim, now_ms: number): Promise<Answer> {
  const promise: BodyPromise = readBodyPromise(request, claim);
  const trailers = new Map<string, string>();
  const record = await putOrRefuse(store, {
    bucket: request.bucket,
    key: request.key,
    content: promise.isChunked ? decodeChunks(request.message, trailers) : request.message,
    onlyIfAbsent: mustBeAbsent(request),
    describe: (digest) => {
      const sums = promisedSums(promise, trailers);
      checkBody(promise, sums, digest);
      return { ...recordOf(request.key, digest, now_ms), headers: storedHeaders(request), sums: sumHeaders(sums) };
    },
  });
  return { status: 200, headers: { etag: record.etag, ...record.sums } };
}

function readCopySource(header: string): { bucket: string; key: string } {
  const { path, parameters } = readTarget(header.replace(/^\//, ''));
  if (parameters.length > 0) throw new Refusal('NotImplemented', 'Objects have no versions here.');
  const [bucket = '', ...key] = path.split('/');
  return { bucket, key: key.join('/') };
}

/** CopyObject. */
export async function copyObject(store: Store, request: StoreRequest, header: string, now_ms: number): Promise<Answer> {
  const from = readCopySource(header);
  if (!(await store.hasBucket(from.bucket))) throw new Refusal('NoSuchBucket', 'There is no such source bucket.');
  const source = await store.open(from.bucket, from.key);
  if (source === undefined) throw new Refusal('NoSuchKey', 'There is no source object with this key.');
  const { size_bytes, headers, sums } = source.record;
  const isReplacing = request.headers.get('x-amz-metadata-directive') === 'REPLACE';
  try {
    const record = await putOrRefuse(store, {
      bucket: request.bucket,
      key: request.key,
      content:
        size_bytes === 0
          ? Readable.from([])
          : source.handle.createReadStream({ end: size_bytes - 1, autoClose: false }),
      onlyIfAbsent: mustBeAbsent(request),
      describe: (digest) => ({
        ...recordOf(request.key, digest, now_ms),
        headers: isReplacing ? storedHeaders(request) : headers,
        sums,
      }),
    });
    const modifiedAt = new Date(record.modifiedAt_ms).toISOString();
    return xmlAnswer(200, 'CopyObjectResult', element('LastModified', modifiedAt) + element('ETag', record.etag));
  } finally {
    await source.handle.close();
  }
}
