import { fork, spawnSync, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { createClient } from '@libsql/client';
import { ended, openMailPlace, ready, type MailPlace } from './mail-processes';
import { fillMailWorld } from './mail-world';
import type { Bench, Row } from './row';

const KILLS = 200;
const BUILDS = 60;
const READERS = 60;
/** Kills fall within so many whole turns of posting, writing digests and sending. */
const TURNS = 1.5;
/** Each run's clock is so much further on: what a killed one had leased is free again. */
const STEP_MS = 61_000;

/** One file, because a process that starts 200 times should not look for its modules each time. */
function bundleWorker(folder: string): string {
  const file = join(folder, 'kill-worker.mjs');
  const banner = `import{createRequire as madeRequire}from'node:module';const require=madeRequire(import.meta.url);`;
  const native = ['@libsql/client', 'libsql', 'sharp'].map((name) => `--external:${name}`);
  const bundled = spawnSync(
    'node_modules/.bin/esbuild',
    [
      ...['tests/bench/kill-worker.ts', '--bundle', '--platform=node', '--format=esm'],
      ...[`--outfile=${file}`, `--banner:js=${banner}`, '--log-level=error', '--jsx=automatic', '--minify', ...native],
      '--define:process.env.NODE_ENV="production"',
    ],
    { stdio: 'inherit' },
  );
  if (bundled.status !== 0) throw new Error('The worker could not be put into one file.');
  return file;
}

type Faults = { status: number; afterAccepting: boolean };
const kinds: Faults[] = [500, 0, 429].flatMap((status) => [
  { status, afterAccepting: false },
  { status, afterAccepting: true },
]);

const MIDWAY: Faults = { status: 0, afterAccepting: true };

const misbehave = ({ env }: MailPlace, fault: Faults) =>
  fetch(`${env.RESEND_BASE_URL}/_fail`, {
    method: 'POST',
    body: JSON.stringify({ ...fault, times: 1_000_000, oneIn: 5 }),
  });

function startWorker(file: string, { env }: MailPlace): Promise<ChildProcess> {
  // The bundle finds the packages from the folder of the project, and needs none of what this process was started with.
  return ready(fork(file, { env, execArgv: [], cwd: process.cwd(), stdio: ['ignore', 'inherit', 'inherit', 'ipc'] }));
}

type Work = 'once' | 'forever' | 'until done';

async function begin(worker: ChildProcess, work: Work, offsetMs: number): Promise<void> {
  const begun = once(worker, 'message');
  worker.send({ offsetMs, builds: BUILDS, work });
  await begun;
}

/** @returns how long it took, in milliseconds */
async function workThrough(worker: ChildProcess, work: Work, offsetMs: number): Promise<number> {
  await begin(worker, work, offsetMs);
  const [{ tookMs }] = await once(worker, 'message');
  return tookMs;
}

/** Kills it at a random moment of its work. */
async function killOne(worker: ChildProcess, offsetMs: number, longestMs: number): Promise<void> {
  await begin(worker, 'forever', offsetMs);
  await pause(Math.random() * longestMs);
  await ended(worker, 'SIGKILL');
}

/** How long a first whole turn takes on this machine now, in milliseconds: a killed process never gets warm. */
async function measureTurn(worker: ChildProcess): Promise<number> {
  const tookMs = await workThrough(worker, 'once', 0);
  await ended(worker, 'SIGTERM');
  return tookMs;
}

type Listed = { to: string[]; text: string; idempotencyKey: string | null };

/** Everything that is wrong afterwards, in words; nothing when each promise was kept. */
async function faultsOf({ env }: MailPlace): Promise<{ mails: number; wrong: string[] }> {
  const client = createClient({ url: env.DATABASE_URL });
  const rowsOf = async (sql: string) => (await client.execute(sql)).rows;
  const mails: Listed[] = await (await fetch(`${env.RESEND_BASE_URL}/mails`)).json();
  const wrong: string[] = [];
  const check = (isRight: boolean, words: string) => void (isRight || wrong.push(words));

  check((await rowsOf('pragma integrity_check'))[0]?.integrity_check === 'ok', 'the database is damaged');
  check((await rowsOf('pragma foreign_key_check')).length === 0, 'a foreign key leads nowhere');
  const keys = mails.map(({ idempotencyKey }) => idempotencyKey ?? '');
  check(new Set(keys).size === keys.length, 'a key was received twice');
  const written = await rowsOf('select dedupe_key as key, state from outbox');
  const unsent = written.filter(({ state }) => state !== 'sent');
  check(
    unsent.length === 0,
    `${unsent.length} mails were not sent: ${[...new Set(unsent.map(({ state }) => String(state)))].join()}`,
  );
  const received = new Set(keys);
  check(
    written.every(({ key }) => received.has(String(key))),
    'a mail that counts as sent was not received',
  );

  const told = new Map<string, number>();
  for (const { to, text } of mails)
    for (const [mark] of text.matchAll(/mark-[0-9a-f-]{36}/g))
      told.set(`${to[0]} ${mark}`, (told.get(`${to[0]} ${mark}`) ?? 0) + 1);
  const wanted = await rowsOf(
    'select u.email, e.body_text from entries e join build_people p on p.build_id = e.build_id join users u on u.id = p.user_id',
  );
  const counts = wanted.map(({ email, body_text: mark }) => told.get(`${String(email)} ${String(mark)}`) ?? 0);
  check(
    counts.every((count) => count > 0),
    `${counts.filter((count) => count === 0).length} pages were told to nobody`,
  );
  check(
    counts.every((count) => count < 2),
    `${counts.filter((count) => count > 1).length} pages were told twice`,
  );
  client.close();
  return { mails: mails.length, wrong };
}

const row = (mails: number, wrong: string[]): Row => ({
  name: 'digest-kill',
  value: wrong.length,
  floor: mails,
  ratio: wrong.length,
  target: 0,
  unit: `broken promises over so many mails, ${KILLS} kills`,
  isMet: wrong.length === 0 && mails > KILLS,
});

/** SIGKILL at 200 random moments of digest runs, while the mail room fails one call in five, before or after it took the mail. */
export const digestKill: Bench = {
  name: 'digest-kill',
  run: async () => {
    const place = await openMailPlace();
    try {
      await fillMailWorld({
        file: place.file,
        builds: BUILDS,
        readers: READERS,
        cadence: 'at_once',
        hasPages: false,
        nowMs: Date.now(),
      });
      const file = bundleWorker('.data');
      const longestMs = TURNS * (await measureTurn(await startWorker(file, place)));
      let next = startWorker(file, place);
      for (let kill = 0; kill < KILLS; kill++) {
        const worker = await next;
        next = startWorker(file, place);
        await misbehave(place, kinds[kill % kinds.length] ?? MIDWAY);
        await killOne(worker, kill * STEP_MS, longestMs);
        if ((kill + 1) % 50 === 0) console.log(`  killed ${kill + 1} of ${KILLS}`);
      }
      await workThrough(await next, 'until done', KILLS * STEP_MS);
      await ended(await next, 'SIGTERM');
      const { mails, wrong } = await faultsOf(place);
      for (const words of wrong) console.log(`digest-kill: ${words}`);
      return [row(mails, wrong)];
    } finally {
      await place.close();
    }
  },
};
