import { describe, expect, test } from 'vitest';
import { decodeChunks } from '@/lib/fakes/object-store/chunked';

async function* inPartsOf(size: number, text: string): AsyncGenerator<Uint8Array> {
  for (let i = 0; i < text.length; i += size) yield Buffer.from(text.slice(i, i + size));
}

async function decode(text: string, size: number) {
  const trailers = new Map<string, string>();
  let content = '';
  for await (const part of decodeChunks(inPartsOf(size, text), trailers)) content += part.toString();
  return { content, trailers: Object.fromEntries(trailers) };
}

const GOOD = '6\r\nspruce\r\n4;chunk-signature=ff\r\n top\r\n0\r\nX-Amz-Checksum-CRC32: AAAAAA==\r\n\r\n';

describe('aws-chunked framing', () => {
  test.each([1, 2, 3, 7, 1_000])('is taken off whatever the network splits it into (%i bytes a part)', async (size) => {
    expect(await decode(GOOD, size)).toEqual({
      content: 'spruce top',
      trailers: { 'x-amz-checksum-crc32': 'AAAAAA==' },
    });
  });

  test.each([
    ['ends inside a chunk', '6\r\nspr'],
    ['ends before the last chunk', '6\r\nspruce\r\n'],
    ['has a chunk longer than its size', '3\r\nspruce\r\n0\r\n\r\n'],
    ['has no size', 'spruce\r\n0\r\n\r\n'],
    ['has an endless header', 'a'.repeat(20_000)],
  ])('is refused when it %s', async (_what, text) => {
    await expect(decode(text, 5)).rejects.toMatchObject({ code: 'IncompleteBody' });
  });
});
