import { isPassing, type Answer } from '@/lib/photos/upload-answer';
import { retryDelay } from '@/lib/photos/upload-delay';
import type { UploadLink } from '@/lib/photos/upload-steps';

/** How a PDF stands on its way to the shop. */
export type DocumentUpload =
  | { step: 'measuring' }
  /** `share` is what has been sent, from 0 to 1. */
  | { step: 'sending'; share: number }
  | { step: 'checking' }
  /** Nothing can be done just now; it is tried again by itself. */
  | { step: 'waiting'; message: string }
  | { step: 'ready'; documentId: string }
  /** Looked at and not taken: sending it again would not help. */
  | { step: 'refused'; message: string }
  /** Given up after some tries; a person may try again. */
  | { step: 'failed'; message: string };

export type DocumentFile = { orderNumber: string; uploadKey: string; name: string; blob: Blob };

export type DocumentPromise = {
  orderNumber: string;
  uploadKey: string;
  label: string;
  sizeBytes: number;
  sha256: string;
};

export type DocumentGrant =
  | { state: 'granted'; id: string; upload: UploadLink }
  | { state: 'ready'; id: string }
  | { state: 'refused'; id: string; message: string };

export type DocumentChecked = { state: 'ready' | 'missing' } | { state: 'refused'; message: string };

/** The doors an upload goes through. None of these promises rejects, except `measure` for bytes that cannot be read. */
export type DocumentDoors = {
  /** SHA-256 in base64 (RFC 4648, section 4). */
  measure(blob: Blob): Promise<string>;
  ask(document: DocumentPromise, signal: AbortSignal): Promise<Answer<DocumentGrant>>;
  send(link: UploadLink, blob: Blob, onShare: (share: number) => void, signal: AbortSignal): Promise<Answer<null>>;
  check(documentId: string, signal: AbortSignal): Promise<Answer<DocumentChecked>>;
  /** Resolves after `ms` or when aborted. */
  pause(ms: number, signal: AbortSignal): Promise<void>;
  random(): number;
};

type Report = (upload: DocumentUpload) => void;
type Settled = Extract<DocumentUpload, { step: 'ready' | 'refused' | 'failed' }>;
type Trouble = { step: 'waiting'; message: string; leastMs?: number };

const MAX_TRIES = 6;
const GIVEN_UP = 'The shop could not take this file. Try again, or choose another.';
const NO_SIGNAL = 'No signal. It goes up by itself when there is some.';
const BUSY = 'The shop does not answer just now. It is tried again by itself.';
const NO_STORE = 'The store does not take it just now. It is tried again by itself.';
const AGAIN = 'It is sent once more.';

/**
 * Carries one PDF to the shop until it is ready or refused; what fails in passing is tried again. Carried twice under the
 * same key it arrives once. Reports every step, the last one included; silent once aborted.
 */
export async function uploadDocument(
  file: DocumentFile,
  doors: DocumentDoors,
  report: Report,
  signal: AbortSignal,
): Promise<void> {
  const tell: Report = (upload) => void (signal.aborted || report(upload));
  tell({ step: 'measuring' });
  const sha256 = await doors.measure(file.blob).catch(() => null);
  if (sha256 === null) return tell({ step: 'failed', message: 'This file could not be read. Choose it again.' });
  for (let tries = 0; !signal.aborted; tries += 1) {
    const outcome = await tryOnce(file, sha256, doors, tell, signal);
    if (outcome.step !== 'waiting') return tell(outcome);
    if (tries + 1 >= MAX_TRIES) return tell({ step: 'failed', message: GIVEN_UP });
    tell({ step: 'waiting', message: outcome.message });
    await doors.pause(retryDelay(tries, doors.random(), outcome.leastMs), signal);
  }
}

async function tryOnce(
  { orderNumber, uploadKey, name, blob }: DocumentFile,
  sha256: string,
  doors: DocumentDoors,
  tell: Report,
  signal: AbortSignal,
): Promise<Settled | Trouble> {
  const promise = { orderNumber, uploadKey, label: name, sizeBytes: blob.size, sha256 };
  const grant = await doors.ask(promise, signal);
  if (grant.kind !== 'ok') return troubleOf(grant);
  const { id } = grant.body;
  if (grant.body.state === 'ready') return { step: 'ready', documentId: id };
  if (grant.body.state === 'refused') return { step: 'refused', message: grant.body.message };
  tell({ step: 'sending', share: 0 });
  const onShare = (share: number) => tell({ step: 'sending', share });
  const sent = await doors.send(grant.body.upload, blob, onShare, signal);
  // 412: an earlier try did arrive.
  if (sent.kind !== 'ok' && !(sent.kind === 'status' && sent.status === 412))
    return { step: 'waiting', message: NO_STORE };
  tell({ step: 'checking' });
  const checked = await doors.check(id, signal);
  if (checked.kind !== 'ok') return troubleOf(checked);
  if (checked.body.state === 'refused') return { step: 'refused', message: checked.body.message };
  return checked.body.state === 'ready' ? { step: 'ready', documentId: id } : { step: 'waiting', message: AGAIN };
}

function troubleOf(answer: Exclude<Answer<never>, { kind: 'ok' }>): Settled | Trouble {
  if (answer.kind === 'no-signal') return { step: 'waiting', message: NO_SIGNAL };
  const { status, message, fields, retryAfterMs: leastMs } = answer;
  if (isPassing(status)) return { step: 'waiting', message: message ?? BUSY, leastMs };
  if (status === 422) return { step: 'refused', message: Object.values(fields ?? {})[0] ?? message ?? GIVEN_UP };
  return { step: 'failed', message: message ?? GIVEN_UP };
}
