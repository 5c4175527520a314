import { Refusal } from './refusal';
import { findParameter, type StoreRequest } from './request';
import { ALGORITHM, type Scope } from './signature';

const EXPIRES_LIMIT_S = 604_800;

/** What a request says about who signed it, before anything is checked against a secret. */
export interface Claim {
  accessKeyId: string;
  scope: Scope;
  amzDate: string;
  signedAt_ms: number;
  signedHeaders: string[];
  signature: string;
  payloadHash: string;
  /** Only a presigned address has a life of its own. */
  expiresIn_s?: number;
}

type Malformed = 'AuthorizationHeaderMalformed' | 'AuthorizationQueryParametersError';

function readInstant(amzDate: string, malformed: Malformed): number {
  const parts = /^(\d{4})(\d\d)(\d\d)T(\d\d)(\d\d)(\d\d)Z$/.exec(amzDate)?.slice(1).map(Number);
  if (parts === undefined) throw new Refusal(malformed, 'The date must look like 20130524T000000Z.');
  const [year = 0, month = 0, day = 0, hour = 0, minute = 0, second = 0] = parts;
  return Date.UTC(year, month - 1, day, hour, minute, second);
}

function readCredential(credential: string, malformed: Malformed): { accessKeyId: string; scope: Scope } {
  const parts = credential.split('/');
  const [accessKeyId = '', date = '', region = '', service = '', end] = parts;
  if (parts.length !== 5 || end !== 'aws4_request') throw new Refusal(malformed, 'The credential has a wrong scope.');
  return { accessKeyId, scope: { date, region, service } };
}

function readPresigned(request: StoreRequest): Claim {
  const malformed = 'AuthorizationQueryParametersError';
  const take = (name: string) => {
    const value = findParameter(request, `X-Amz-${name}`);
    if (value === undefined) throw new Refusal(malformed, `X-Amz-${name} is missing.`);
    return value;
  };
  if (take('Algorithm') !== ALGORITHM) throw new Refusal(malformed, `X-Amz-Algorithm must be ${ALGORITHM}.`);
  const expires = take('Expires');
  const expiresIn_s = /^\d{1,7}$/.test(expires) ? Number(expires) : 0;
  if (expiresIn_s < 1 || expiresIn_s > EXPIRES_LIMIT_S) {
    throw new Refusal(malformed, `X-Amz-Expires must be 1 to ${EXPIRES_LIMIT_S} seconds.`);
  }
  const amzDate = take('Date');
  return {
    ...readCredential(take('Credential'), malformed),
    amzDate,
    signedAt_ms: readInstant(amzDate, malformed),
    signedHeaders: take('SignedHeaders').split(';'),
    signature: take('Signature'),
    payloadHash:
      findParameter(request, 'X-Amz-Content-Sha256') ??
      request.headers.get('x-amz-content-sha256') ??
      'UNSIGNED-PAYLOAD',
    expiresIn_s,
  };
}

function readAuthorization(request: StoreRequest, authorization: string): Claim {
  const malformed = 'AuthorizationHeaderMalformed';
  const match = /^(\S+) +Credential=([^, ]+), *SignedHeaders=([^, ]+), *Signature=([^, ]+)$/.exec(authorization);
  if (match?.[1] !== ALGORITHM) throw new Refusal(malformed, 'The Authorization header is not Signature Version 4.');
  const [, , credential = '', signedHeaders = '', signature = ''] = match;
  const amzDate = request.headers.get('x-amz-date') ?? '';
  const payloadHash = request.headers.get('x-amz-content-sha256');
  if (payloadHash === undefined) throw new Refusal('InvalidRequest', 'The header x-amz-content-sha256 is missing.');
  return {
    ...readCredential(credential, malformed),
    amzDate,
    signedAt_ms: readInstant(amzDate, malformed),
    signedHeaders: signedHeaders.split(';'),
    signature,
    payloadHash,
  };
}

/** @throws Refusal when a request is not signed, is signed twice, or the signature's parts cannot be read */
export function readClaim(request: StoreRequest): Claim {
  const authorization = request.headers.get('authorization');
  const isPresigned = request.parameters.some(([name]) => name.toLowerCase() === 'x-amz-signature');
  if (authorization !== undefined && isPresigned)
    throw new Refusal('InvalidArgument', 'Sign a request in one way only.');
  if (authorization !== undefined) return readAuthorization(request, authorization);
  if (isPresigned) return readPresigned(request);
  throw new Refusal('AccessDenied', 'The request is not signed.');
}
