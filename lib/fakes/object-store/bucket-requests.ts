import { readSmallBody } from '../body';
import type { Answer } from './answer';
import { checkBody, promisedSums, readBodyPromise } from './body-promise';
import { decodeChunks } from './chunked';
import type { Claim } from './claim';
import { BodyDigest } from './digest';
import type { ObjectRecord } from './object-file';
import { Refusal } from './refusal';
import { findParameter, type StoreRequest } from './request';
import type { Store } from './store';
import { element, readElements, xmlAnswer } from './xml';

const PAGE = 1_000;
const DELETE_LIMIT_BYTES = 2 * 1_024 * 1_024;

/** CreateBucket. */
export async function createBucket(store: Store, bucket: string): Promise<Answer> {
  if (!/^[a-z0-9][a-z0-9.-]{1,61}[a-z0-9]$/.test(bucket)) {
    throw new Refusal('InvalidBucketName', 'A bucket name has 3 to 63 small letters, digits, dots and hyphens.');
  }
  if (!(await store.createBucket(bucket))) throw new Refusal('BucketAlreadyOwnedByYou', 'The bucket is there already.');
  return { status: 200, headers: { location: `/${bucket}` } };
}

function contents(record: ObjectRecord): string {
  return `<Contents>${[
    element('Key', record.key),
    element('LastModified', new Date(record.modifiedAt_ms).toISOString()),
    element('ETag', record.etag),
    element('Size', record.size_bytes),
    element('StorageClass', 'STANDARD'),
  ].join('')}</Contents>`;
}

function readPageSize(request: StoreRequest): number {
  const text = findParameter(request, 'max-keys') ?? String(PAGE);
  if (!/^\d{1,9}$/.test(text)) throw new Refusal('InvalidArgument', 'max-keys must be a whole number.');
  return Math.min(Number(text), PAGE);
}

/** ListObjectsV2; the continuation token is the last key of the page before. */
export async function listObjects(store: Store, request: StoreRequest): Promise<Answer> {
  const prefix = findParameter(request, 'prefix') ?? '';
  const token = findParameter(request, 'continuation-token');
  const after = Buffer.from(
    token === undefined ? (findParameter(request, 'start-after') ?? '') : token,
    token === undefined ? 'utf8' : 'base64url',
  );
  const size = readPageSize(request);
  const rest = (await store.list(request.bucket)).filter(
    ({ key }) => key.startsWith(prefix) && Buffer.compare(Buffer.from(key), after) > 0,
  );
  const page = rest.slice(0, size);
  const last = rest.length > page.length ? page.at(-1) : undefined;
  return xmlAnswer(
    200,
    'ListBucketResult',
    [
      element('Name', request.bucket),
      element('Prefix', prefix),
      element('MaxKeys', size),
      element('KeyCount', page.length),
      element('IsTruncated', last !== undefined),
      last ? element('NextContinuationToken', Buffer.from(last.key).toString('base64url')) : '',
      ...page.map(contents),
    ].join(''),
  );
}

async function readDeleteList(request: StoreRequest, claim: Claim): Promise<string> {
  const promise = readBodyPromise(request, claim);
  if (promise.size_bytes > DELETE_LIMIT_BYTES) throw new Refusal('MalformedXML', 'The list is too long.');
  const trailers = new Map<string, string>();
  const content = promise.isChunked ? decodeChunks(request.message, trailers) : request.message;
  const body = await readSmallBody(content, DELETE_LIMIT_BYTES);
  const digest = new BodyDigest();
  digest.update(body);
  checkBody(promise, promisedSums(promise, trailers), digest.finish());
  return body.toString('utf8');
}

/** DeleteObjects. */
export async function deleteObjects(store: Store, request: StoreRequest, claim: Claim): Promise<Answer> {
  const xml = await readDeleteList(request, claim);
  const keys = readElements(xml, 'Key');
  if (keys.length === 0 || keys.length > PAGE) throw new Refusal('MalformedXML', `Name 1 to ${PAGE} keys.`);
  for (const key of keys) await store.remove(request.bucket, key);
  const isQuiet = readElements(xml, 'Quiet').includes('true');
  const deleted = keys.map((key) => `<Deleted>${element('Key', key)}</Deleted>`);
  return xmlAnswer(200, 'DeleteResult', isQuiet ? '' : deleted.join(''));
}
