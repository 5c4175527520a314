import type { Answer } from './answer';
import { isNotModified } from './conditions';
import type { ObjectRecord, OpenObject } from './object-file';
import { readRange, type ByteRange } from './range';
import { Refusal } from './refusal';
import { findParameter, type StoreRequest } from './request';
import type { Store } from './store';

const OVERRIDABLE = [
  'cache-control',
  'content-disposition',
  'content-encoding',
  'content-language',
  'content-type',
  'expires',
];

function overrides(request: StoreRequest): Record<string, string> {
  const chosen: Record<string, string> = {};
  for (const name of OVERRIDABLE) {
    const value = findParameter(request, `response-${name}`);
    if (value === undefined) continue;
    if (!/^[\t\x20-\x7e\xa0-\xff]*$/.test(value))
      throw new Refusal('InvalidArgument', `response-${name} is not a header.`);
    chosen[name] = value;
  }
  return chosen;
}

/** Sums are of the whole object, so a part of it is sent without them. */
function sumsAsked(request: StoreRequest, record: ObjectRecord, range: ByteRange | undefined): Record<string, string> {
  const mode = request.headers.get('x-amz-checksum-mode') ?? findParameter(request, 'x-amz-checksum-mode');
  if (mode !== 'ENABLED' || range !== undefined || Object.keys(record.sums).length === 0) return {};
  return { ...record.sums, 'x-amz-checksum-type': 'FULL_OBJECT' };
}

function headersOf(request: StoreRequest, record: ObjectRecord, range: ByteRange | undefined): Record<string, string> {
  const length = range === undefined ? record.size_bytes : range.end - range.start + 1;
  return {
    ...record.headers,
    ...overrides(request),
    ...sumsAsked(request, record, range),
    ...(range && { 'content-range': `bytes ${range.start}-${range.end}/${record.size_bytes}` }),
    'accept-ranges': 'bytes',
    'content-length': String(length),
    etag: record.etag,
    'last-modified': new Date(record.modifiedAt_ms).toUTCString(),
  };
}

function answerFor(request: StoreRequest, { record, handle }: OpenObject): Answer {
  if (isNotModified(request, record)) return { status: 304, headers: { etag: record.etag } };
  const range = readRange(request.headers.get('range'), record.size_bytes);
  const head: Answer = { status: range === undefined ? 200 : 206, headers: headersOf(request, record, range) };
  if (request.method === 'HEAD' || record.size_bytes === 0) return head;
  return { ...head, body: handle.createReadStream(range ?? { start: 0, end: record.size_bytes - 1 }) };
}

/** GetObject and HeadObject. */
export async function readObject(store: Store, request: StoreRequest): Promise<Answer> {
  const object = await store.open(request.bucket, request.key);
  if (object === undefined) throw new Refusal('NoSuchKey', 'There is no object with this key.');
  let answer: Answer | undefined;
  try {
    answer = answerFor(request, object);
    return answer;
  } finally {
    if (answer?.body === undefined) await object.handle.close();
  }
}
