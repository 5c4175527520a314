import { DecoderPool } from './decoder-pool';
import type { MadePhoto } from './decoder-reply';
import type { DecoderRules } from './decoder-run';
import { DECODER_LIMITS, DECODER_MEMORY_BYTES, DECODER_TIME_MS, MAX_PHOTO_BYTES } from './limits';
import { PHOTO_REFUSALS, type PhotoRefusalCode } from './refusals';

export interface PhotoJob {
  bytes: Buffer;
  /** The media type promised when the upload was granted. */
  contentType: string;
  /** The length promised. */
  sizeBytes: number;
  /** The SHA-256 promised, in hex. */
  sha256Hex?: string;
}

export interface RefusedPhoto {
  ok: false;
  code: PhotoRefusalCode;
  /** For the person who posted it. */
  message: string;
  /** For the log. */
  detail: string;
}

declare global {
  /** One pool a process, however many times a bundler loads this module. */
  var flitchbookDecoders: DecoderPool | undefined;
}

function decoders(): DecoderPool {
  globalThis.flitchbookDecoders ??= new DecoderPool();
  return globalThis.flitchbookDecoders;
}

function refused(code: PhotoRefusalCode, detail: string): RefusedPhoto {
  return { ok: false, code, detail, message: PHOTO_REFUSALS[code] };
}

const USUAL_RULES: DecoderRules = {
  concurrency: 1,
  timeLimitMs: DECODER_TIME_MS,
  memoryLimitBytes: DECODER_MEMORY_BYTES,
};

/**
 * Checks one uploaded file and makes all that is served of it: WebP variants, the JPEG for mail and a placeholder, upright,
 * in sRGB, without metadata. The picture is opened in a child process that can crash, hang or swell without harm; photos
 * wait in line for it. Never throws for anything a file can hold.
 */
export async function processPhoto(
  job: PhotoJob,
  rules: Partial<DecoderRules> = {},
): Promise<MadePhoto | RefusedPhoto> {
  const sizeBytes = Math.max(job.sizeBytes, job.bytes.length);
  if (sizeBytes > MAX_PHOTO_BYTES) return refused('too_large', `${sizeBytes} bytes`);
  const reply = await decoders().run({ ...job, limits: DECODER_LIMITS }, { ...USUAL_RULES, ...rules });
  return reply.ok ? reply : refused(reply.code, reply.detail);
}

/** Ends the decoder processes; the next photo starts a new one. */
export async function stopDecoders(): Promise<void> {
  await decoders().stop();
}
