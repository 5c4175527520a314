import { createHmac, timingSafeEqual } from 'node:crypto';
import { canonicalRequest, sha256Hex, type CanonicalParts } from './canonical';

export const ALGORITHM = 'AWS4-HMAC-SHA256';

export interface Scope {
  /** Eight digits, UTC. */
  date: string;
  region: string;
  service: string;
}

function hmac(key: string | Buffer, text: string): Buffer {
  return createHmac('sha256', key).update(text).digest();
}

/** The key of one day, region and service, derived from a secret: AWS general reference, Signature Version 4. */
export function signingKey(secretAccessKey: string, { date, region, service }: Scope): Buffer {
  const start = hmac(`AWS4${secretAccessKey}`, date);
  return [region, service, 'aws4_request'].reduce((key, part) => hmac(key, part), start);
}

/** The signature of a request in hex; `amzDate` as in `20130524T000000Z`. */
export function signatureOf(parts: CanonicalParts, amzDate: string, scope: Scope, secretAccessKey: string): string {
  const scopeText = `${scope.date}/${scope.region}/${scope.service}/aws4_request`;
  const text = [ALGORITHM, amzDate, scopeText, sha256Hex(canonicalRequest(parts))].join('\n');
  return hmac(signingKey(secretAccessKey, scope), text).toString('hex');
}

/** Compares two signatures in a time that does not depend on where they differ. */
export function isSameSignature(given: string, expected: string): boolean {
  const [a, b] = [Buffer.from(given), Buffer.from(expected)];
  return a.length === b.length && timingSafeEqual(a, b);
}
