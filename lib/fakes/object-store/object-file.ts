import { open, type FileHandle } from 'node:fs/promises';
import { isErrno } from '../durable-file';
import { BodyDigest, type Digest } from './digest';

const FOOTER_BYTES = 4;

/** What is kept about an object beside its content. */
export interface ObjectRecord {
  key: string;
  size_bytes: number;
  /** In double quotes, as HTTP has it. */
  etag: string;
  modifiedAt_ms: number;
  /** Headers stored with the object and sent back with it. */
  headers: Record<string, string>;
  /** Checksum headers the uploader gave. */
  sums: Record<string, string>;
}

export interface OpenObject {
  record: ObjectRecord;
  /** The content is its first `record.size_bytes` bytes. */
  handle: FileHandle;
}

/**
 * Writes content, record and the record's length into one file, so that a single rename puts all of it in place.
 * `describe` sees the sums of the content and may refuse it by throwing.
 */
export async function writeObjectFile(
  path: string,
  content: AsyncIterable<Uint8Array>,
  describe: (digest: Digest) => ObjectRecord,
): Promise<ObjectRecord> {
  const handle = await open(path, 'wx');
  try {
    const digest = new BodyDigest();
    for await (const part of content) {
      digest.update(part);
      await handle.appendFile(part);
    }
    const record = describe(digest.finish());
    const text = Buffer.from(JSON.stringify(record));
    const footer = Buffer.alloc(FOOTER_BYTES);
    footer.writeUInt32BE(text.length);
    await handle.appendFile(Buffer.concat([text, footer]));
    await handle.sync();
    return record;
  } finally {
    await handle.close();
  }
}

async function readAt(handle: FileHandle, position: number, length: number): Promise<Buffer> {
  const { buffer } = await handle.read(Buffer.alloc(length), 0, length, position);
  return buffer;
}

/** Opens an object for reading; undefined when there is none. The caller closes the handle. */
export async function openObjectFile(path: string): Promise<OpenObject | undefined> {
  const handle = await open(path, 'r').catch((error: unknown) => {
    if (isErrno(error, 'ENOENT')) return undefined;
    throw error;
  });
  if (handle === undefined) return undefined;
  try {
    const { size } = await handle.stat();
    const length = (await readAt(handle, size - FOOTER_BYTES, FOOTER_BYTES)).readUInt32BE();
    const text = await readAt(handle, size - FOOTER_BYTES - length, length);
    const record: ObjectRecord = JSON.parse(text.toString('utf8'));
    return { record, handle };
  } catch (error) {
    await handle.close();
    throw error;
  }
}
