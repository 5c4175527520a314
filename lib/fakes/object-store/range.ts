import { Refusal } from './refusal';

export interface ByteRange {
  start: number;
  /** The last byte, included. */
  end: number;
}

/**
 * Reads a Range header of one range against a size in bytes. Undefined means the whole: no header, or one to be ignored.
 * Source: RFC 9110, section 14.
 * @throws Refusal InvalidRange when no byte of it exists
 */
export function readRange(header: string | undefined, size_bytes: number): ByteRange | undefined {
  const match = /^bytes=(\d*)-(\d*)$/.exec(header ?? '');
  const [, first = '', last = ''] = match ?? [];
  if (first === '' && last === '') return undefined;
  const isSuffix = first === '';
  const start = isSuffix ? Math.max(0, size_bytes - Number(last)) : Number(first);
  const end = isSuffix || last === '' ? size_bytes - 1 : Math.min(Number(last), size_bytes - 1);
  if (!isSuffix && last !== '' && Number(last) < start) return undefined;
  if (start > end) throw new Refusal('InvalidRange', 'The object has no such bytes.');
  return { start, end };
}
