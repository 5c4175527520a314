import { readClaim, type Claim } from './claim';
import { Refusal } from './refusal';
import type { StoreRequest } from './request';
import { isSameSignature, signatureOf } from './signature';

const CLOCK_SKEW_MS = 15 * 60_000;

export interface Account {
  region: string;
  credentials: { accessKeyId: string; secretAccessKey: string };
}

function checkScope({ scope, amzDate, expiresIn_s }: Claim, region: string): void {
  if (scope.date === amzDate.slice(0, 8) && scope.region === region && scope.service === 's3') return;
  const code = expiresIn_s === undefined ? 'AuthorizationHeaderMalformed' : 'AuthorizationQueryParametersError';
  throw new Refusal(code, 'The credential is for another day, region or service.');
}

function checkTime({ signedAt_ms, expiresIn_s }: Claim, now_ms: number): void {
  const age_ms = now_ms - signedAt_ms;
  if (expiresIn_s === undefined && Math.abs(age_ms) > CLOCK_SKEW_MS) {
    throw new Refusal('RequestTimeTooSkewed', 'The request was signed too long ago, or by a clock that is wrong.');
  }
  if (expiresIn_s === undefined) return;
  if (age_ms < -CLOCK_SKEW_MS) throw new Refusal('AccessDenied', 'The address is not valid yet.');
  if (age_ms > expiresIn_s * 1_000) throw new Refusal('AccessDenied', 'The address has expired.');
}

function checkSignedHeaders({ signedHeaders }: Claim, request: StoreRequest): void {
  const signed = new Set(signedHeaders);
  if (!signed.has('host')) throw new Refusal('AccessDenied', 'The host header must be signed.');
  for (const name of request.headers.keys()) {
    if (name.startsWith('x-amz-') && !signed.has(name)) {
      throw new Refusal('AccessDenied', `The header ${name} was sent but not signed.`);
    }
  }
  for (const name of signed) {
    if (!request.headers.has(name))
      throw new Refusal('SignatureDoesNotMatch', `The signed header ${name} was not sent.`);
  }
}

/**
 * Proves that the holder of the secret signed this very request, within its time.
 * @throws Refusal otherwise
 */
export function authenticate(request: StoreRequest, account: Account, now_ms: number): Claim {
  const claim = readClaim(request);
  if (claim.accessKeyId !== account.credentials.accessKeyId) {
    throw new Refusal('InvalidAccessKeyId', 'No such access key.');
  }
  checkScope(claim, account.region);
  checkTime(claim, now_ms);
  checkSignedHeaders(claim, request);
  const { signedHeaders, payloadHash } = claim;
  const parts = { ...request, signedHeaders, payloadHash };
  const expected = signatureOf(parts, claim.amzDate, claim.scope, account.credentials.secretAccessKey);
  if (!isSameSignature(claim.signature, expected)) {
    throw new Refusal('SignatureDoesNotMatch', 'The signature does not fit the request.');
  }
  return claim;
}
