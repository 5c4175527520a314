import type { Claim } from './claim';
import type { Digest } from './digest';
import { Refusal } from './refusal';
import { findParameter, type StoreRequest } from './request';

const SUM_BYTES = { sha256: 32, crc32: 4 } as const;
const UNSUPPORTED = ['x-amz-checksum-sha1', 'x-amz-checksum-crc32c', 'x-amz-checksum-crc64nvme'];

type SumName = keyof typeof SUM_BYTES;
const SUM_NAMES: readonly SumName[] = ['sha256', 'crc32'];

/** All that a request says about the body that follows it. */
export interface BodyPromise {
  isChunked: boolean;
  size_bytes: number;
  payloadSha256?: Buffer;
  md5?: Buffer;
  sums: Partial<Record<SumName, Buffer>>;
  /** A sum that comes after the body. */
  trailingSum?: SumName;
}

function readBase64(text: string | undefined, size_bytes: number): Buffer | undefined {
  if (text === undefined) return undefined;
  const sum = Buffer.from(text, 'base64');
  if (sum.length !== size_bytes || sum.toString('base64') !== text) {
    throw new Refusal('InvalidDigest', 'A checksum is not the base64 form of its kind.');
  }
  return sum;
}

function readSize(request: StoreRequest, isChunked: boolean): number {
  const text = request.headers.get(isChunked ? 'x-amz-decoded-content-length' : 'content-length');
  if (text === undefined || !/^\d{1,15}$/.test(text))
    throw new Refusal('MissingContentLength', 'The length is missing.');
  return Number(text);
}

function readPayload(payloadHash: string): Pick<BodyPromise, 'isChunked' | 'payloadSha256'> {
  if (payloadHash === 'UNSIGNED-PAYLOAD') return { isChunked: false };
  if (payloadHash === 'STREAMING-UNSIGNED-PAYLOAD-TRAILER') return { isChunked: true };
  if (/^[0-9a-f]{64}$/.test(payloadHash)) return { isChunked: false, payloadSha256: Buffer.from(payloadHash, 'hex') };
  throw new Refusal('NotImplemented', 'This kind of payload signature is not supported.');
}

function readTrailingSum(request: StoreRequest): Pick<BodyPromise, 'trailingSum'> {
  const announced = request.headers.get('x-amz-trailer')?.toLowerCase();
  if (announced === undefined) return {};
  const trailingSum = SUM_NAMES.find((name) => announced === `x-amz-checksum-${name}`);
  if (trailingSum === undefined) throw new Refusal('NotImplemented', 'This trailer is not supported.');
  return { trailingSum };
}

/**
 * Reads what must hold for the body. A CRC32 in a presigned address binds (the signer put the sum of an empty body there);
 * a SHA-256 in the address does not, because hosted stores are known to overlook it: it has to be a header.
 */
export function readBodyPromise(request: StoreRequest, claim: Claim): BodyPromise {
  if (UNSUPPORTED.some((name) => request.headers.has(name))) {
    throw new Refusal('NotImplemented', 'Use a SHA-256 or CRC32 checksum.');
  }
  const payload = readPayload(claim.payloadHash);
  const crc32 = request.headers.get('x-amz-checksum-crc32') ?? findParameter(request, 'x-amz-checksum-crc32');
  return {
    ...payload,
    ...readTrailingSum(request),
    size_bytes: readSize(request, payload.isChunked),
    md5: readBase64(request.headers.get('content-md5'), 16),
    sums: {
      sha256: readBase64(request.headers.get('x-amz-checksum-sha256'), SUM_BYTES.sha256),
      crc32: readBase64(crc32, SUM_BYTES.crc32),
    },
  };
}

/** The sums a body was promised with, its trailer's included. */
export function promisedSums(promise: BodyPromise, trailers: ReadonlyMap<string, string>): BodyPromise['sums'] {
  const { trailingSum, sums } = promise;
  if (trailingSum === undefined) return sums;
  const sum = readBase64(trailers.get(`x-amz-checksum-${trailingSum}`), SUM_BYTES[trailingSum]);
  if (sum === undefined) throw new Refusal('MalformedTrailerError', 'The announced trailer did not come.');
  return { ...sums, [trailingSum]: sum };
}

/** @throws Refusal when the body that came is not the one that was promised */
export function checkBody(promise: BodyPromise, sums: BodyPromise['sums'], digest: Digest): void {
  if (digest.size_bytes !== promise.size_bytes) throw new Refusal('IncompleteBody', 'The body has another length.');
  if (promise.payloadSha256 && !promise.payloadSha256.equals(digest.sha256)) {
    throw new Refusal('XAmzContentSHA256Mismatch', 'The body does not have the signed hash.');
  }
  const isSame = (sum: Buffer | undefined, found: Buffer) => sum === undefined || sum.equals(found);
  const isGood = isSame(promise.md5, digest.md5) && SUM_NAMES.every((name) => isSame(sums[name], digest[name]));
  if (!isGood) throw new Refusal('BadDigest', 'The body does not have the checksum that was sent.');
}

/** Sums as response headers show them. */
export function sumHeaders(sums: BodyPromise['sums']): Record<string, string> {
  const named = SUM_NAMES.flatMap((name) => {
    const sum = sums[name];
    return sum === undefined ? [] : [[`x-amz-checksum-${name}`, sum.toString('base64')] as const];
  });
  return Object.fromEntries(named);
}
