import { randomUUID } from 'node:crypto';
import { mkdir, readdir, rm, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { isErrno, placeNewFile, replaceFile } from '../durable-file';
import { sha256Hex } from './canonical';
import type { Digest } from './digest';
import { openObjectFile, writeObjectFile, type ObjectRecord, type OpenObject } from './object-file';

/** Not a valid bucket name, so no bucket can collide with it. */
const INCOMING = '.incoming';

export interface NewObject {
  bucket: string;
  key: string;
  content: AsyncIterable<Uint8Array>;
  onlyIfAbsent: boolean;
  /** Makes the record from the content's sums; throws to refuse the content. */
  describe(digest: Digest): ObjectRecord;
}

export interface Store {
  /** False when the bucket is there already. */
  createBucket(bucket: string): Promise<boolean>;
  hasBucket(bucket: string): Promise<boolean>;
  /** Undefined when the object had to be absent and was not. */
  put(object: NewObject): Promise<ObjectRecord | undefined>;
  /** The caller closes the handle. */
  open(bucket: string, key: string): Promise<OpenObject | undefined>;
  remove(bucket: string, key: string): Promise<void>;
  /** All records of a bucket, in the order of their keys' UTF-8 bytes. */
  list(bucket: string): Promise<ObjectRecord[]>;
}

async function createBucket(path: string): Promise<boolean> {
  try {
    await mkdir(path);
    return true;
  } catch (error) {
    if (isErrno(error, 'EEXIST')) return false;
    throw error;
  }
}

async function put(dataDir: string, path: string, object: NewObject): Promise<ObjectRecord | undefined> {
  const temporary = join(dataDir, INCOMING, randomUUID());
  try {
    const record = await writeObjectFile(temporary, object.content, object.describe);
    if (!object.onlyIfAbsent) await replaceFile(temporary, path);
    else if (!(await placeNewFile(temporary, path))) return undefined;
    return record;
  } finally {
    await rm(temporary, { force: true });
  }
}

async function list(folder: string): Promise<ObjectRecord[]> {
  const records: ObjectRecord[] = [];
  for (const name of await readdir(folder)) {
    const object = await openObjectFile(join(folder, name));
    if (object === undefined) continue;
    await object.handle.close();
    records.push(object.record);
  }
  return records.sort((a, b) => Buffer.compare(Buffer.from(a.key), Buffer.from(b.key)));
}

/** Opens a store on a folder. Uploads that a crash cut short are swept away first. */
export async function openStore(dataDir: string): Promise<Store> {
  await rm(join(dataDir, INCOMING), { recursive: true, force: true });
  await mkdir(join(dataDir, INCOMING), { recursive: true });
  const pathOf = (bucket: string, key: string) => join(dataDir, bucket, sha256Hex(key));
  return {
    createBucket: (bucket) => createBucket(join(dataDir, bucket)),
    hasBucket: async (bucket) => (await stat(join(dataDir, bucket)).catch(() => undefined))?.isDirectory() ?? false,
    put: (object) => put(dataDir, pathOf(object.bucket, object.key), object),
    open: (bucket, key) => openObjectFile(pathOf(bucket, key)),
    remove: (bucket, key) => rm(pathOf(bucket, key), { force: true }),
    list: (bucket) => list(join(dataDir, bucket)),
  };
}
