import { once } from 'node:events';
import { join } from 'node:path';
import { Worker } from 'node:worker_threads';
import { z } from 'zod';
import { planPaper, type PaperPlan } from './paper-plan';
import { readPictures } from './pictures';
import type { AsBuiltSheet } from './sheet';

/** What the setting thread is given. */
export type PaperJob = { plan: PaperPlan; pictures: Map<string, Uint8Array>; madeAtMs: number };

const answer = z.discriminatedUnion('ok', [
  z.object({ ok: z.literal(true), pdf: z.instanceof(Uint8Array) }),
  z.object({ ok: z.literal(false), problem: z.string() }),
]);

const PATIENCE_MS = 60_000;
/** A thread that has set one sheet sets the next much faster; after this it gives its memory back. */
const IDLE_MS = 60_000;
const resourceLimits = { maxOldGenerationSizeMb: 160, maxYoungGenerationSizeMb: 16 };

let kept: { worker: Worker; leaving: NodeJS.Timeout } | null = null;
/** Sheets are made one after another: each holds its pictures and the finished file in memory. */
let line: Promise<unknown> = Promise.resolve();

/**
 * The as-built sheet as a PDF, set in a thread of its own.
 * @param read gets one object of the store by its key; a picture that cannot be read is left out
 * @throws Error when the sheet cannot be set, or not in time
 */
export function renderPaper(
  sheet: AsBuiltSheet,
  read: (key: string) => Promise<Buffer>,
  madeAtMs: number,
): Promise<Uint8Array<ArrayBuffer>> {
  const turn = line.then(async () => {
    const keys = sheet.photos.map(({ jpegKey }) => jpegKey);
    const pictures = await readPictures(keys, read);
    return setInThread({ plan: planPaper(sheet, (key) => pictures.has(key)), pictures, madeAtMs });
  });
  line = turn.catch(() => undefined);
  return turn;
}

async function setInThread(job: PaperJob): Promise<Uint8Array<ArrayBuffer>> {
  const worker = takeWorker();
  try {
    worker.postMessage(job);
    const [message] = await once(worker, 'message', { signal: AbortSignal.timeout(PATIENCE_MS) });
    const said = answer.parse(message);
    if (!said.ok) throw new Error(`the sheet was not set: ${said.problem}`);
    keepWorker(worker);
    return new Uint8Array(said.pdf);
  } catch (error) {
    await worker.terminate();
    throw error;
  }
}

function takeWorker(): Worker {
  const known = kept;
  kept = null;
  if (known) {
    clearTimeout(known.leaving);
    known.worker.ref();
    return known.worker;
  }
  const file = join(/* turbopackIgnore: true */ process.cwd(), 'lib/as-built/paper-worker.mjs');
  const worker = new Worker(file, { resourceLimits });
  return worker.once('exit', () => {
    if (kept?.worker === worker) kept = null;
  });
}

function keepWorker(worker: Worker): void {
  worker.unref();
  kept = { worker, leaving: setTimeout(() => void worker.terminate(), IDLE_MS).unref() };
}

/** Ends the thread that waits for another sheet; for tests, and a process that is about to end. */
export async function stopSetting(): Promise<void> {
  await line;
  const worker = kept?.worker;
  kept = null;
  await worker?.terminate();
}
