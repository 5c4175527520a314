import type { Answer } from './answer';
import { createBucket, deleteObjects, listObjects } from './bucket-requests';
import type { Claim } from './claim';
import { readObject } from './object-reads';
import { copyObject, putObject } from './object-writes';
import { Refusal } from './refusal';
import { findParameter, type StoreRequest } from './request';
import type { Store } from './store';

const UNDERSTOOD =
  /^(x-amz-.*|x-id|response-.*|list-type|prefix|max-keys|continuation-token|start-after|fetch-owner|delete)$/i;

/** A sub-resource such as `acl` that was overlooked would turn its request into a plain write of the object. */
function checkParameters(request: StoreRequest): void {
  const other = request.parameters.find(([name]) => !UNDERSTOOD.test(name));
  if (other !== undefined) throw new Refusal('NotImplemented', `The parameter ${other[0]} is not supported.`);
}

async function requireBucket(store: Store, bucket: string): Promise<void> {
  if (bucket === '' || bucket.startsWith('.') || !(await store.hasBucket(bucket))) {
    throw new Refusal('NoSuchBucket', 'There is no such bucket.');
  }
}

async function runOnBucket(store: Store, request: StoreRequest, claim: Claim): Promise<Answer> {
  if (request.method === 'PUT') return createBucket(store, request.bucket);
  await requireBucket(store, request.bucket);
  if (request.method === 'HEAD') return { status: 200 };
  if (request.method === 'GET' && findParameter(request, 'list-type') === '2') return listObjects(store, request);
  if (request.method === 'POST' && findParameter(request, 'delete') !== undefined) {
    return deleteObjects(store, request, claim);
  }
  throw new Refusal('NotImplemented', 'This request on a bucket is not supported.');
}

async function runOnObject(store: Store, request: StoreRequest, claim: Claim, now_ms: number): Promise<Answer> {
  await requireBucket(store, request.bucket);
  if (request.method === 'GET' || request.method === 'HEAD') return readObject(store, request);
  if (request.method === 'DELETE') {
    await store.remove(request.bucket, request.key);
    return { status: 204 };
  }
  if (request.method !== 'PUT') throw new Refusal('MethodNotAllowed', 'This method is not supported on an object.');
  const source = request.headers.get('x-amz-copy-source');
  if (source !== undefined) return copyObject(store, request, source, now_ms);
  return putObject(store, request, claim, now_ms);
}

/** Carries out one signed request. */
export async function runOperation(store: Store, request: StoreRequest, claim: Claim, now_ms: number): Promise<Answer> {
  checkParameters(request);
  return request.key === '' ? runOnBucket(store, request, claim) : runOnObject(store, request, claim, now_ms);
}
