import { fork } from 'node:child_process';
import { createClient } from '@libsql/client';
import { jpegWithExif } from '../support/photo-fixtures';
import { ask, ended, openMailPlace, ready, type MailPlace } from './mail-processes';
import { fillMailWorld } from './mail-world';
import { peakMb } from './process-memory';
import { ratioAtLeast, valueBelow, type Bench } from './row';

const READERS = 5000;
const BUILDS = 2000;
/** Interleaved, because the machine has other work. */
const ROUNDS = 2;

/** A mail picture of each build in the store, of about the size a photo of the bench has. */
async function storePictures({ env }: MailPlace): Promise<number> {
  Object.assign(process.env, env);
  const { storeObject } = await import('@/lib/storage');
  const bytes = await jpegWithExif({ widthPx: 560, heightPx: 420, orientation: 1, gps: false });
  const builds = Array.from({ length: BUILDS }, (_, i) => i).values();
  const lane = async () => {
    for (const i of builds) await storeObject(`out/build-${i}/mail.jpg`, bytes, 'image/jpeg');
  };
  await Promise.all(Array.from({ length: 16 }, lane));
  return bytes.length;
}

async function inWorker<Answer>(
  { env }: MailPlace,
  word: string,
  watch: (pid: number, work: () => Promise<unknown>) => Promise<unknown>,
) {
  const options = { env, execArgv: ['--import', 'tsx'], stdio: ['ignore', 'inherit', 'inherit', 'ipc'] as const };
  const worker = await ready(fork('tests/bench/digest-worker.ts', { ...options, stdio: [...options.stdio] }));
  let answer: Answer | undefined;
  await watch(worker.pid ?? 0, async () => (answer = await ask<Answer>(worker, { word })));
  await ended(worker, 'SIGTERM');
  if (!answer) throw new Error('A worker gave no answer.');
  return answer;
}

const emptyRoom = ({ env }: MailPlace) => fetch(`${env.RESEND_BASE_URL}/mails`, { method: 'DELETE' });

/** Everybody's digest is due and untold once more. */
async function rewind({ env }: MailPlace): Promise<void> {
  const client = createClient({ url: env.DATABASE_URL });
  await client.execute('delete from outbox');
  await client.execute(`update mail_settings set told_seq = 0, next_digest_at = ${Date.now()}`);
  client.close();
}

async function requireSent({ env }: MailPlace): Promise<void> {
  const client = createClient({ url: env.DATABASE_URL });
  const { rows } = await client.execute(`select count(*) as n from outbox where state = 'sent'`);
  client.close();
  if (Number(rows[0]?.n) !== READERS) throw new Error(`Only ${String(rows[0]?.n)} of ${READERS} digests went out.`);
}

/** Digests to 5,000 readers over 2,000 builds, beside the bare SDK sending the same bodies to the same mail room. */
export const digestRun: Bench = {
  name: 'digest-run',
  run: async () => {
    const place = await openMailPlace();
    try {
      const world = { builds: BUILDS, readers: READERS, cadence: 'daily', hasPages: true } as const;
      await fillMailWorld({ file: place.file, ...world, nowMs: Date.now() - 1000 });
      await storePictures(place);
      let [productSeconds, bareSeconds, peak] = [0, 0, 0];
      for (let round = 0; round < ROUNDS; round++) {
        const run = await inWorker<{ seconds: number }>(place, 'product', async (pid, work) => {
          peak = Math.max(peak, await peakMb(pid, work));
        });
        await requireSent(place);
        await emptyRoom(place);
        const bare = await inWorker<{ seconds: number }>(place, 'bare', (_pid, work) => work());
        await emptyRoom(place);
        await rewind(place);
        productSeconds += run.seconds;
        bareSeconds += bare.seconds;
      }
      const rate = (seconds: number) => (READERS * ROUNDS) / seconds;
      const speed = { value: rate(productSeconds), floor: rate(bareSeconds), unit: 'mails/s' };
      return [
        ratioAtLeast(0.6, { name: 'digest-run', ...speed }),
        valueBelow(500, { name: 'digest-run-memory', value: peak, floor: 500, unit: 'MB' }),
      ];
    } finally {
      await place.close();
    }
  },
};
