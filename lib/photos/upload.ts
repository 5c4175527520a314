import type { PhotoType } from './limits';
import type { Answer } from './upload-answer';
import { retryDelay } from './upload-delay';
import { createGate } from './upload-gate';
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

type UploaderParts = {
  transport: UploadTransport;
  onChange: (uploadKey: string, upload: UploadState) => void;
  /** Resolves after `ms` or when aborted. */
  pause: (ms: number, signal: AbortSignal) => Promise<void>;
  random: () => number;
  atOnce?: number;
};

type Job = {
  file: UploadFile;
  leaving: AbortController;
  photoId?: string;
  sha256?: string;
  isOver: boolean;
  /** Ends the rest between two tries. */
  wake?: () => void;
};

export type Uploader = ReturnType<typeof createUploader>;

/** A promise may be renewed this often without a rest before the photo is given up. */
const MAX_RESTARTS = 3;

/** Carries photos to the shop, a few at a time, until each is ready or refused; what fails in passing is tried again. */
export function createUploader({ transport, onChange, pause, random, atOnce = 3 }: UploaderParts) {
  const jobs = new Map<string, Job>();
  const gate = createGate(atOnce);

  async function carry(job: Job): Promise<void> {
    const report = (upload: UploadState) => {
      if (!job.leaving.signal.aborted) onChange(job.file.uploadKey, upload);
    };
    let step: UploadStep = job.photoId ? { do: 'check', photoId: job.photoId } : { do: 'ask' };
    report({ step: 'queued' });
    for (let tries = 0; !job.leaving.signal.aborted; tries += 1) {
      const burst = await gate.through(() => walk(job, step, tries > 0, report));
      if (burst.outcome.kind === 'settled') {
        job.isOver = true;
        return report(burst.outcome.upload);
      }
      if (burst.hasMoved) tries = 0;
      step = burst.outcome.step;
      report({ step: 'waiting', message: burst.outcome.message });
      await nap(job, retryDelay(tries, random(), burst.outcome.leastMs));
    }
  }

  /** From step to step until there is something to wait for. A retry stays silent until it gets further. */
  async function walk(job: Job, first: UploadStep, isRetry: boolean, report: (upload: UploadState) => void) {
    let step = first;
    let restarts = 0;
    for (let moves = 0; ; moves += 1) {
      if (job.leaving.signal.aborted) return { outcome: wait(step), hasMoved: false };
      const outcome = await perform(job, step, isRetry && moves === 0, report);
      if (outcome.kind !== 'next') return { outcome, hasMoved: moves > 0 };
      if (outcome.step.do === 'ask' && (restarts += 1) > MAX_RESTARTS) return { outcome: givenUp, hasMoved: true };
      step = outcome.step;
    }
  }

  async function perform(
    job: Job,
    step: UploadStep,
    isSilent: boolean,
    report: (upload: UploadState) => void,
  ): Promise<Outcome> {
    const { signal } = job.leaving;
    const tell = (upload: UploadState) => void (isSilent || report(upload));
    switch (step.do) {
      case 'ask':
        return ask(job, tell);
      case 'send':
        tell({ step: 'sending', share: 0 });
        return afterSend(
          await transport.send(step.link, job.file.blob, (share) => report({ step: 'sending', share }), signal),
          step,
        );
      case 'check':
        tell({ step: 'checking' });
        return afterCheck(await transport.check(step.photoId, signal), step);
      case 'clear':
        return afterClear(await transport.discard(step.photoId), step);
    }
  }

  async function ask(job: Job, tell: (upload: UploadState) => void): Promise<Outcome> {
    const { uploadKey, name: label, contentType, blob } = job.file;
    try {
      if (!job.sha256) tell({ step: 'measuring' });
      job.sha256 ??= await transport.measure(blob);
    } catch {
      return { kind: 'settled', upload: { step: 'failed', message: UNREADABLE } };
    }
    tell({ step: 'asking' });
    const promise = { uploadKey, label, contentType, sizeBytes: blob.size, sha256: job.sha256 };
    const answer = await transport.ask(promise, job.leaving.signal);
    if (answer.kind === 'ok') job.photoId = answer.body.id;
    return afterAsk(answer);
  }

  async function nap(job: Job, ms: number): Promise<void> {
    const waking = new AbortController();
    job.wake = () => waking.abort();
    await pause(ms, AbortSignal.any([waking.signal, job.leaving.signal]));
    job.wake = undefined;
  }

  function begin(job: Job): void {
    jobs.set(job.file.uploadKey, job);
    void carry(job);
  }

  return {
    /** Takes a photo up; one that is under way already is left alone. */
    add(file: UploadFile): void {
      if (!jobs.has(file.uploadKey))
        begin({ file, leaving: new AbortController(), isOver: false, photoId: file.photoId });
    },
    /** Gives a photo up: the transfer stops, and what has arrived of it is thrown away. */
    async remove(uploadKey: string): Promise<void> {
      const job = jobs.get(uploadKey);
      jobs.delete(uploadKey);
      job?.leaving.abort();
      if (job?.photoId) await transport.discard(job.photoId);
    },
    /** Ends the wait of one photo, or starts it afresh after it has failed. */
    tryNow(uploadKey: string): void {
      const job = jobs.get(uploadKey);
      job?.wake?.();
      if (job?.isOver) begin({ ...job, isOver: false });
    },
    /** Ends every wait: the signal may be back. */
    wake(): void {
      for (const job of jobs.values()) job.wake?.();
    },
    /** Stops everything and forgets it; nothing is thrown away. */
    stop(): void {
      for (const job of jobs.values()) job.leaving.abort();
      jobs.clear();
    },
  };
}

const UNREADABLE = 'This photo could not be read on this phone. Leave it out and choose it again.';
const givenUp: Outcome & { kind: 'settled' } = { kind: 'settled', upload: { step: 'failed', message: GIVEN_UP } };
const wait = (step: UploadStep): Outcome & { kind: 'wait' } => ({ kind: 'wait', step, message: '' });
