import { retryDelay } from './upload-delay';
import { createGate } from './upload-gate';
import type { UploadState } from './upload-state';
import type { UploadStep } from './upload-steps';
import { walk, type Job, type UploadFile, type UploadTransport } from './upload-walk';

type UploaderParts = {
  transport: UploadTransport;
  onChange: (uploadKey: string, upload: UploadState) => void;
  /** Resolves after `ms` or when aborted. */
  pause: (ms: number, signal: AbortSignal) => Promise<void>;
  random: () => number;
  atOnce?: number;
};

type Carried = Job & {
  isOver: boolean;
  /** Ends the rest between two tries. */
  wake?: () => void;
};

export type Uploader = ReturnType<typeof createUploader>;

/** Carries photos to the shop, a few at a time, until each is ready or refused; what fails in passing is tried again. */
export function createUploader({ transport, onChange, pause, random, atOnce = 3 }: UploaderParts) {
  const jobs = new Map<string, Carried>();
  const gate = createGate(atOnce);

  async function carry(job: Carried): Promise<void> {
    const { signal } = job.leaving;
    const report = (upload: UploadState) => void (signal.aborted || onChange(job.file.uploadKey, upload));
    let step: UploadStep = job.photoId ? { do: 'check', photoId: job.photoId } : { do: 'ask' };
    report({ step: 'queued' });
    for (let tries = 0; ; tries += 1) {
      const found = await gate.through(async () =>
        signal.aborted ? null : walk(job, transport, step, tries > 0, report),
      );
      if (!found || signal.aborted) return;
      if (found.outcome.kind === 'settled') {
        job.isOver = true;
        return report(found.outcome.upload);
      }
      if (found.hasMoved) tries = 0;
      step = found.outcome.step;
      report({ step: 'waiting', message: found.outcome.message });
      await rest(job, retryDelay(tries, random(), found.outcome.leastMs));
    }
  }

  async function rest(job: Carried, ms: number): Promise<void> {
    const waking = new AbortController();
    job.wake = () => waking.abort();
    await pause(ms, AbortSignal.any([waking.signal, job.leaving.signal]));
    job.wake = undefined;
  }

  function begin(job: Carried): void {
    jobs.set(job.file.uploadKey, job);
    void carry(job);
  }

  return {
    /** Takes a photo up; one that is under way already is left alone. */
    add(file: UploadFile): void {
      if (jobs.has(file.uploadKey)) return;
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
