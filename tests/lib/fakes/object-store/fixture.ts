import { createHash } from 'node:crypto';
import { mkdtemp, rm } from 'node:fs/promises';
import { request as httpRequest, type IncomingHttpHeaders } from 'node:http';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { PutObjectCommand, S3Client } from '@aws-sdk/client-s3';
import { getSignedUrl } from '@aws-sdk/s3-request-presigner';
import { startObjectStore, type ObjectStoreOptions } from '@/lib/fakes/object-store/server';

export const BUCKET = 'photos';
export const ORIGIN = 'https://diary.example';
export const REGION = 'eu-north-1';
export const CREDENTIALS = { accessKeyId: 'AKEXAMPLE', secretAccessKey: 'a/secret+for=tests' };
export const PICTURE = Buffer.from('a picture of a spruce top '.repeat(400));

interface Reply {
  status: number;
  headers: IncomingHttpHeaders;
  body: Buffer;
}

export interface Outgoing {
  method?: string;
  headers?: Record<string, string | number>;
  body?: Buffer;
}

export function sha256Base64(bytes: Buffer): string {
  return createHash('sha256').update(bytes).digest('base64');
}

/** One raw request; unlike fetch it sends exactly the headers and the address it is given. */
export function send(url: string, { method = 'GET', headers = {}, body }: Outgoing = {}): Promise<Reply> {
  const [, host = '', port = '', path = '/'] = /^http:\/\/([^:/]+):(\d+)(.*)$/.exec(url) ?? [];
  return new Promise((resolve, reject) => {
    const outgoing = httpRequest({ host, port, path, method, headers, agent: false }, (incoming) => {
      const parts: Buffer[] = [];
      incoming.on('data', (part: Buffer) => parts.push(part));
      incoming.on('error', reject);
      incoming.on('end', () =>
        resolve({ status: incoming.statusCode ?? 0, headers: incoming.headers, body: Buffer.concat(parts) }),
      );
    });
    outgoing.on('error', reject);
    outgoing.end(body);
  });
}

export async function startTestStore(options: Partial<ObjectStoreOptions> = {}) {
  const dataDir = await mkdtemp(join(tmpdir(), 'objects-'));
  const store = await startObjectStore({
    port: 0,
    dataDir,
    region: REGION,
    credentials: CREDENTIALS,
    buckets: [BUCKET],
    allowedOrigins: [ORIGIN],
    ...options,
  });
  const s3 = new S3Client({
    endpoint: store.url,
    region: REGION,
    forcePathStyle: true,
    credentials: CREDENTIALS,
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
    maxAttempts: 1,
  });
  const stop = async () => {
    s3.destroy();
    await store.close();
    await rm(dataDir, { recursive: true, force: true });
  };
  return { url: store.url, dataDir, s3, stop };
}

/** The headers a browser has to send with a granted upload. */
export function uploadHeaders(body: Buffer = PICTURE): Record<string, string | number> {
  return {
    'content-type': 'image/jpeg',
    'content-length': body.length,
    'if-none-match': '*',
    'x-amz-checksum-sha256': sha256Base64(body),
  };
}

/** An upload address with length, type, checksum and absence of the object all signed. */
export function grantUpload(s3: S3Client, key: string, expiresIn = 300, signingDate = new Date()): Promise<string> {
  const command = new PutObjectCommand({
    Bucket: BUCKET,
    Key: key,
    ContentType: 'image/jpeg',
    ContentLength: PICTURE.length,
    ChecksumSHA256: sha256Base64(PICTURE),
    IfNoneMatch: '*',
  });
  return getSignedUrl(s3, command, {
    expiresIn,
    signingDate,
    signableHeaders: new Set(['content-type', 'content-length', 'host', 'if-none-match', 'x-amz-checksum-sha256']),
    unhoistableHeaders: new Set(['x-amz-checksum-sha256']),
  });
}
