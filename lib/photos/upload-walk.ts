import type { PhotoType } from './limits';
import type { Answer } from './upload-answer';
import type { UploadState } from './upload-state';
import {
  afterAsk,
  afterCheck,
  afterClear,
  afterSend,
  GIVEN_UP,
  type Checked,
  type Grant,
  type Outcome,
  type UploadLink,
  type UploadStep,
} from './upload-steps';

export type UploadFile = {
  /** The sender's own mark: the same one again is the same photo, however often it is sent. */
  uploadKey: string;
  name: string;
  contentType: PhotoType;
  blob: Blob;
  /** Known from an earlier run, so that its place in the shop is asked for first. */
  photoId?: string;
};

export type PhotoPromise = {
  uploadKey: string;
  label: string;
  contentType: PhotoType;
  sizeBytes: number;
  sha256: string;
};

/** The doors an upload goes through. None of these promises rejects, except `measure` for bytes that cannot be read. */
export type UploadTransport = {
  /** SHA-256 in base64 (RFC 4648, section 4). */
  measure(blob: Blob): Promise<string>;
  ask(photo: PhotoPromise, signal: AbortSignal): Promise<Answer<Grant>>;
  send(link: UploadLink, blob: Blob, onShare: (share: number) => void, signal: AbortSignal): Promise<Answer<null>>;
  check(photoId: string, signal: AbortSignal): Promise<Answer<Checked>>;
  discard(photoId: string): Promise<Answer<object>>;
};

/** One photo under way, and what has been learned about it. */
export type Job = { file: UploadFile; leaving: AbortController; photoId?: string; sha256?: string };

type Report = (upload: UploadState) => void;
type Stop = Exclude<Outcome, { kind: 'next' }>;

/** A promise may be renewed this often without a rest before the photo is given up. */
const MAX_RESTARTS = 3;
const UNREADABLE = 'This photo could not be read on this phone. Leave it out and choose it again.';

const failed = (message: string): Stop => ({ kind: 'settled', upload: { step: 'failed', message } });

/**
 * From step to step until there is something to wait for, or the end. A retry is silent until it gets further than the
 * try before, so that a photo that waits is not seen to flicker.
 */
export async function walk(job: Job, transport: UploadTransport, first: UploadStep, isRetry: boolean, report: Report) {
  let step = first;
  let restarts = 0;
  for (let moves = 0; ; moves += 1) {
    const isSilent = isRetry && moves === 0;
    const outcome = await perform(job, transport, step, isSilent ? () => undefined : report, report);
    if (outcome.kind !== 'next') return { outcome, hasMoved: moves > 0 };
    if (outcome.step.do === 'ask') restarts += 1;
    if (restarts > MAX_RESTARTS) return { outcome: failed(GIVEN_UP), hasMoved: true };
    if (job.leaving.signal.aborted) return { outcome: failed(''), hasMoved: true };
    step = outcome.step;
  }
}

async function perform(
  job: Job,
  transport: UploadTransport,
  step: UploadStep,
  tell: Report,
  report: Report,
): Promise<Outcome> {
  const { signal } = job.leaving;
  switch (step.do) {
    case 'ask':
      return ask(job, transport, tell);
    case 'send': {
      tell({ step: 'sending', share: 0 });
      const onShare = (share: number) => report({ step: 'sending', share });
      return afterSend(await transport.send(step.link, job.file.blob, onShare, signal), step);
    }
    case 'check':
      tell({ step: 'checking' });
      return afterCheck(await transport.check(step.photoId, signal), step);
    case 'clear':
      return afterClear(await transport.discard(step.photoId), step);
  }
}

async function ask(job: Job, transport: UploadTransport, tell: Report): Promise<Outcome> {
  const { uploadKey, name: label, contentType, blob } = job.file;
  try {
    if (!job.sha256) tell({ step: 'measuring' });
    job.sha256 ??= await transport.measure(blob);
  } catch {
    return failed(UNREADABLE);
  }
  tell({ step: 'asking' });
  const promise = { uploadKey, label, contentType, sizeBytes: blob.size, sha256: job.sha256 };
  const answer = await transport.ask(promise, job.leaving.signal);
  if (answer.kind === 'ok') job.photoId = answer.body.id;
  return afterAsk(answer);
}
