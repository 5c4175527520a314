import { fork, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, rmSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { demoEnvironment } from '../../db/demo/settings.mjs';

async function freePort(): Promise<number> {
  const server = createServer().listen(0, '127.0.0.1');
  await once(server, 'listening');
  const address = server.address();
  server.close();
  if (address === null || typeof address === 'string') throw new Error('No port is free.');
  return address.port;
}

/** A folder of its own with the stand-ins running in it, and the environment of a program that uses them. */
export async function openMailPlace() {
  const folder = mkdtempSync(join(tmpdir(), 'flitchbook-mail-bench-'));
  const env = {
    ...demoEnvironment(),
    NODE_ENV: 'production' as const,
    LOG_LEVEL: 'silent',
    S3_ENDPOINT: `http://127.0.0.1:${await freePort()}`,
    RESEND_BASE_URL: `http://127.0.0.1:${await freePort()}`,
    FAKES_DIR: folder,
    DATABASE_URL: `file:${join(folder, 'diary.db')}`,
  };
  const standIns = await ready(
    fork('lib/fakes/start.ts', { env, execArgv: ['--import', 'tsx'], stdio: ['ignore', 'ignore', 'inherit', 'ipc'] }),
  );
  const close = async () => {
    await ended(standIns, 'SIGTERM');
    rmSync(folder, { recursive: true, force: true });
  };
  return { folder, file: join(folder, 'diary.db'), env, close };
}

export type MailPlace = Awaited<ReturnType<typeof openMailPlace>>;

/** A process that has said it is ready. @throws Error when it ends first */
export async function ready(child: ChildProcess): Promise<ChildProcess> {
  const failed = once(child, 'exit').then(() => {
    throw new Error('A process of the bench ended before it was ready.');
  });
  await Promise.race([once(child, 'message'), failed]);
  return child;
}

export async function ended(child: ChildProcess, signal: NodeJS.Signals): Promise<void> {
  if (child.exitCode !== null || child.signalCode !== null) return;
  const exit = once(child, 'exit');
  child.kill(signal);
  await exit;
}

/** Sends a word and waits for the answer. */
export async function ask<Answer>(child: ChildProcess, word: object): Promise<Answer> {
  const answer = once(child, 'message');
  child.send(word);
  const [given] = await answer;
  return given;
}
