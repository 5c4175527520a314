import type { ObjectRecord } from './object-file';
import { Refusal } from './refusal';
import type { StoreRequest } from './request';

function matches(header: string, etag: string): boolean {
  const tags = header.split(',').map((tag) => tag.trim().replace(/^W\//, ''));
  return tags.includes('*') || tags.includes(etag) || tags.includes(etag.replaceAll('"', ''));
}

/** HTTP dates have whole seconds, so an object's time is cut to them before it is compared. */
function isModifiedSince(record: ObjectRecord, date: string): boolean | undefined {
  const instant = Date.parse(date);
  return Number.isNaN(instant) ? undefined : Math.floor(record.modifiedAt_ms / 1_000) * 1_000 > instant;
}

/**
 * Weighs a read's conditions in the order of RFC 9110, section 13.2.2; true when the reader's copy is still good (304).
 * @throws Refusal PreconditionFailed
 */
export function isNotModified(request: StoreRequest, record: ObjectRecord): boolean {
  const failed = () => new Refusal('PreconditionFailed', 'The object is not in the state that was asked for.');
  const ifMatch = request.headers.get('if-match');
  const ifUnmodifiedSince = request.headers.get('if-unmodified-since');
  if (ifMatch !== undefined && !matches(ifMatch, record.etag)) throw failed();
  if (ifMatch === undefined && ifUnmodifiedSince !== undefined && isModifiedSince(record, ifUnmodifiedSince))
    throw failed();
  const ifNoneMatch = request.headers.get('if-none-match');
  if (ifNoneMatch !== undefined) return matches(ifNoneMatch, record.etag);
  const ifModifiedSince = request.headers.get('if-modified-since');
  return ifModifiedSince !== undefined && isModifiedSince(record, ifModifiedSince) === false;
}

/** True when a write asks that nothing stands at its key yet. */
export function mustBeAbsent(request: StoreRequest): boolean {
  const ifNoneMatch = request.headers.get('if-none-match');
  const isOther = ifNoneMatch !== undefined && ifNoneMatch !== '*';
  if (isOther || request.headers.has('if-match')) {
    throw new Refusal('NotImplemented', 'The only condition for a write is If-None-Match: *.');
  }
  return ifNoneMatch === '*';
}
