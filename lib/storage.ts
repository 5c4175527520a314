import {
  DeleteObjectCommand,
  GetObjectCommand,
  HeadObjectCommand,
  PutObjectCommand,
  S3Client,
} from '@aws-sdk/client-s3';
import { getSignedUrl } from '@aws-sdk/s3-request-presigner';
import { env } from '@/lib/env';

const LINK_SECONDS = 300;
const CALL_MS = 20_000;
/** Links to photos change only this often, so that a browser can keep what it has; none outlives LINK_SECONDS. */
const LINK_STEP_MS = 120_000;

let client: S3Client | undefined;

function s3(): S3Client {
  process.env.AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED = 'true';
  client ??= new S3Client({
    endpoint: env().S3_ENDPOINT,
    region: env().S3_REGION,
    forcePathStyle: true,
    credentials: { accessKeyId: env().S3_ACCESS_KEY_ID, secretAccessKey: env().S3_SECRET_ACCESS_KEY },
    // Otherwise a presigned PUT carries the checksum of an empty body.
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
  });
  return client;
}

const at = (key: string) => ({ Bucket: env().S3_BUCKET, Key: key });
const patience = () => ({ abortSignal: AbortSignal.timeout(CALL_MS) });

type Promised = { key: string; contentType: string; sizeBytes: number; sha256: string };

/** A link that stores exactly the promised bytes once, within five minutes, and the headers to send with them. */
export async function presignUpload({ key, contentType, sizeBytes, sha256 }: Promised) {
  const command = new PutObjectCommand({
    ...at(key),
    ContentType: contentType,
    ContentLength: sizeBytes,
    ChecksumSHA256: sha256,
    IfNoneMatch: '*',
  });
  const url = await getSignedUrl(s3(), command, {
    expiresIn: LINK_SECONDS,
    signableHeaders: new Set(['content-type', 'content-length', 'host', 'if-none-match', 'x-amz-checksum-sha256']),
    unhoistableHeaders: new Set(['x-amz-checksum-sha256', 'if-none-match']),
  });
  return { url, headers: { 'Content-Type': contentType, 'x-amz-checksum-sha256': sha256, 'If-None-Match': '*' } };
}

/** A link that shows one stored picture and dies within five minutes. */
export function presignView(key: string, nowMs: number): Promise<string> {
  const command = new GetObjectCommand({ ...at(key), ResponseCacheControl: `private, max-age=${LINK_SECONDS}` });
  const signingDate = new Date(Math.floor(nowMs / LINK_STEP_MS) * LINK_STEP_MS);
  return getSignedUrl(s3(), command, { expiresIn: LINK_SECONDS, signingDate });
}

/** A link that opens one stored PDF, as a PDF and nothing else, and dies within five minutes. */
export function presignDocument(key: string, fileName: string, nowMs: number): Promise<string> {
  const command = new GetObjectCommand({
    ...at(key),
    ResponseContentType: 'application/pdf',
    ResponseContentDisposition: `inline; filename="${fileName}"`,
    ResponseCacheControl: `private, max-age=${LINK_SECONDS}`,
  });
  const signingDate = new Date(Math.floor(nowMs / LINK_STEP_MS) * LINK_STEP_MS);
  return getSignedUrl(s3(), command, { expiresIn: LINK_SECONDS, signingDate });
}

/** What the store holds under a key, or null. */
export async function findObject(key: string) {
  try {
    const head = await s3().send(new HeadObjectCommand({ ...at(key), ChecksumMode: 'ENABLED' }), patience());
    return {
      sizeBytes: head.ContentLength ?? 0,
      contentType: head.ContentType ?? '',
      sha256: head.ChecksumSHA256 ?? null,
    };
  } catch (error) {
    if (error instanceof Error && error.name === 'NotFound') return null;
    throw error;
  }
}

/** @throws Error when there is no such object, or the store cannot be reached */
export async function readObject(key: string): Promise<Buffer> {
  const object = await s3().send(new GetObjectCommand(at(key)), patience());
  if (!object.Body) throw new Error('the store sent no body');
  return Buffer.from(await object.Body.transformToByteArray());
}

export async function storeObject(key: string, bytes: Uint8Array, contentType: string): Promise<void> {
  await s3().send(new PutObjectCommand({ ...at(key), Body: bytes, ContentType: contentType }), patience());
}

export async function deleteObject(key: string): Promise<void> {
  await s3().send(new DeleteObjectCommand(at(key)), patience());
}
