import { describe, expect, test } from 'vitest';
import { canonicalRequest, sha256Hex } from '@/lib/fakes/object-store/canonical';
import { readTarget } from '@/lib/fakes/object-store/request';
import { isSameSignature, signatureOf, signingKey } from '@/lib/fakes/object-store/signature';
import { readReference } from '@/tests/support/reference';

// AWS's published examples with AWS's own fictitious secret, which its pages print in two spellings.
const SECRETS: Record<string, string> = {
  S: 'wJalrXUtnFEMI/K7MDENG/bPxRfiCYEXAMPLEKEY',
  P: 'wJalrXUtnFEMI/K7MDENG+bPxRfiCYEXAMPLEKEY',
};

function cell(row: Record<string, string>, name: string): string {
  const value = row[name];
  if (value === undefined) throw new Error(`The table has no column ${name}.`);
  return value;
}

function partsOf(row: Record<string, string>) {
  const headers = new Map<string, string>(Object.entries(JSON.parse(cell(row, 'signed_headers_json'))));
  return {
    ...readTarget(`${cell(row, 'canonical_path')}?${cell(row, 'canonical_query_without_signature')}`),
    method: cell(row, 'method'),
    headers,
    signedHeaders: [...headers.keys()],
    payloadHash: cell(row, 'payload_hash'),
  };
}

describe('Signature Version 4', () => {
  // 11e_sigv4: AWS S3 API reference, AWS general reference and test suite; three rows by the SDK's own presigner.
  test.each(readReference('11e_sigv4'))('canonical request and signature: $case', (row) => {
    const parts = partsOf(row);
    const scope = {
      date: cell(row, 'amz_date').slice(0, 8),
      region: cell(row, 'region'),
      service: cell(row, 'service'),
    };
    const secret = cell(SECRETS, cell(row, 'secret_key_variant'));
    expect(sha256Hex(canonicalRequest(parts))).toBe(row.expected_canonical_request_sha256);
    expect(signatureOf(parts, cell(row, 'amz_date'), scope, secret)).toBe(row.expected_signature);
  });

  // 11f_sigv4_keys: AWS general reference and AWS S3 API reference, deriving the signing key.
  test.each(readReference('11f_sigv4_keys'))('signing key of $date, $region, $service', (row) => {
    const scope = { date: cell(row, 'date'), region: cell(row, 'region'), service: cell(row, 'service') };
    expect(signingKey(cell(row, 'secret_key'), scope).toString('hex')).toBe(row.expected_signing_key_hex);
  });

  test('the signature parameter itself takes no part in what is signed', () => {
    const parts = { method: 'GET', headers: new Map(), signedHeaders: [], payloadHash: 'UNSIGNED-PAYLOAD' };
    const plain = canonicalRequest({ ...parts, ...readTarget('/a?b=1') });
    expect(canonicalRequest({ ...parts, ...readTarget('/a?X-Amz-Signature=ff&b=1') })).toBe(plain);
  });

  test('spaces inside a header value are folded and those around it dropped', () => {
    const parts = { ...readTarget('/'), method: 'GET', signedHeaders: ['a'], payloadHash: '' };
    expect(canonicalRequest({ ...parts, headers: new Map([['a', '  b   c ']]) })).toContain('\na:b c\n');
  });

  test('signatures of different length or content are not the same', () => {
    expect(isSameSignature('abc', 'abc')).toBe(true);
    expect(isSameSignature('abd', 'abc')).toBe(false);
    expect(isSameSignature('ab', 'abc')).toBe(false);
  });
});
