import type { IncomingMessage } from 'node:http';
import { Refusal } from './refusal';

const KEY_LIMIT_BYTES = 1_024;

/** A request's address, with every part percent-decoded. */
export interface Target {
  path: string;
  parameters: readonly (readonly [name: string, value: string])[];
}

export interface StoreRequest extends Target {
  method: string;
  /** By lower-case name; repeated headers are joined with a comma. */
  headers: ReadonlyMap<string, string>;
  bucket: string;
  /** Empty when the request is about the bucket itself. */
  key: string;
  message: IncomingMessage;
}

function decode(text: string): string {
  try {
    return decodeURIComponent(text);
  } catch {
    throw new Refusal('InvalidURI', 'The address holds a broken percent escape.');
  }
}

/** Splits a raw request target. A URL parser would resolve `..`, which is an ordinary part of a key here. */
export function readTarget(rawTarget: string): Target {
  const [rawPath = '', ...rest] = rawTarget.split('?');
  const pairs = rest
    .join('?')
    .split('&')
    .filter((pair) => pair !== '');
  return {
    path: decode(rawPath),
    parameters: pairs.map((pair) => {
      const [name = '', ...value] = pair.split('=');
      return [decode(name), decode(value.join('='))] as const;
    }),
  };
}

/** The first value of a query parameter; names are compared exactly. */
export function findParameter(target: Target, name: string): string | undefined {
  return target.parameters.find(([other]) => other === name)?.[1];
}

export function readRequest(message: IncomingMessage): StoreRequest {
  const target = readTarget(message.url ?? '/');
  const [, bucket = '', ...key] = target.path.split('/');
  const headers = new Map<string, string>();
  for (const [name, values] of Object.entries(message.headersDistinct)) headers.set(name, (values ?? []).join(','));
  const request = { ...target, method: message.method ?? '', headers, bucket, key: key.join('/'), message };
  if (Buffer.byteLength(request.key) > KEY_LIMIT_BYTES) throw new Refusal('KeyTooLongError', 'The key is too long.');
  return request;
}
