import type { IncomingMessage } from 'node:http';

export class BodyTooLarge extends Error {}

/**
 * Reads a small request body into memory.
 * @throws BodyTooLarge as soon as more than `limit_bytes` have come in
 */
export async function readSmallBody(body: AsyncIterable<Uint8Array>, limit_bytes: number): Promise<Buffer> {
  const parts: Uint8Array[] = [];
  let size_bytes = 0;
  for await (const part of body) {
    size_bytes += part.length;
    if (size_bytes > limit_bytes) throw new BodyTooLarge(`The body is larger than ${limit_bytes} bytes.`);
    parts.push(part);
  }
  return Buffer.concat(parts);
}

/** @throws SyntaxError when the body is not JSON, BodyTooLarge when it is too long */
export async function readJson(request: IncomingMessage, limit_bytes: number): Promise<unknown> {
  const value: unknown = JSON.parse((await readSmallBody(request, limit_bytes)).toString('utf8'));
  return value;
}
