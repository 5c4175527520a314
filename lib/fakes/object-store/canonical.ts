import { createHash } from 'node:crypto';
import type { Target } from './request';

export interface CanonicalParts extends Target {
  method: string;
  headers: ReadonlyMap<string, string>;
  /** Lower-case names, in any order. */
  signedHeaders: readonly string[];
  payloadHash: string;
}

export function sha256Hex(data: string | Uint8Array): string {
  return createHash('sha256').update(data).digest('hex');
}

/** Percent-encodes all but the unreserved characters of RFC 3986, section 2.3. */
export function encodeStrictly(text: string): string {
  return encodeURIComponent(text).replace(/[!'()*]/g, (char) => `%${char.charCodeAt(0).toString(16).toUpperCase()}`);
}

export function canonicalPath(path: string): string {
  return path.split('/').map(encodeStrictly).join('/');
}

function byCodeUnits(a: string, b: string): number {
  if (a === b) return 0;
  return a < b ? -1 : 1;
}

/** Every parameter but the signature itself, encoded and sorted by name, then by value. */
export function canonicalQuery(parameters: Target['parameters']): string {
  return parameters
    .filter(([name]) => name !== 'X-Amz-Signature')
    .map(([name, value]) => [encodeStrictly(name), encodeStrictly(value)] as const)
    .sort((a, b) => byCodeUnits(a[0], b[0]) || byCodeUnits(a[1], b[1]))
    .map((pair) => pair.join('='))
    .join('&');
}

/** The text whose hash is signed: AWS S3 API reference, Signature Version 4, "canonical request". */
export function canonicalRequest(parts: CanonicalParts): string {
  const signedHeaders = [...parts.signedHeaders].sort();
  const headers = signedHeaders.map((name) => {
    const value = parts.headers.get(name) ?? '';
    return `${name}:${value.trim().replace(/ +/g, ' ')}\n`;
  });
  return [
    parts.method,
    canonicalPath(parts.path),
    canonicalQuery(parts.parameters),
    headers.join(''),
    signedHeaders.join(';'),
    parts.payloadHash,
  ].join('\n');
}
