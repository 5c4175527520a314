import { mkdtempSync, rmSync } from 'node:fs';
import { createServer } from 'node:net';
import { once } from 'node:events';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { demoEnvironment } from '../../db/demo/settings.mjs';
import { reachable, start } from '../../db/demo/steps.mjs';
import { fillDatabase } from './fill';

export type App = { url: string; pid: number; env: Awaited<ReturnType<typeof settings>>; stop: () => Promise<void> };

async function freePort(): Promise<number> {
  const server = createServer().listen(0, '127.0.0.1');
  await once(server, 'listening');
  const address = server.address();
  server.close();
  if (address === null || typeof address === 'string') throw new Error('No port is free.');
  return address.port;
}

async function settings(folder: string) {
  const local = async () => `http://127.0.0.1:${await freePort()}`;
  const mailRoom = await local();
  return {
    ...demoEnvironment(),
    NODE_ENV: 'production' as const,
    LOG_LEVEL: 'warn',
    APP_URL: await local(),
    S3_ENDPOINT: await local(),
    RESEND_BASE_URL: mailRoom,
    DEMO_MAIL_ROOM_URL: mailRoom,
    FAKES_DIR: folder,
    DATABASE_URL: `file:${join(folder, 'diary.db')}`,
  };
}

function stopping(child: ReturnType<typeof start>) {
  return async () => {
    if (child.exitCode !== null || child.pid === undefined) return;
    const exit = once(child, 'exit');
    process.kill(-child.pid, 'SIGTERM');
    await exit;
  };
}

/**
 * The built app with a database of its own that holds so many builds, and the local stand-ins where they are needed.
 * `fill` writes the database.
 */
export async function openApp(builds: number, withStandIns = false, fill = fillDatabase): Promise<App> {
  const folder = mkdtempSync(join(tmpdir(), 'flitchbook-bench-'));
  const env = await settings(folder);
  await fill(join(folder, 'diary.db'), builds, Date.now());
  const standIns = withStandIns ? start('npx', ['tsx', 'lib/fakes/start.ts'], env, 'ignore') : undefined;
  if (standIns) await reachable(`${env.RESEND_BASE_URL}/`, 60);
  const next = ['node_modules/next/dist/bin/next', 'start', '-H', '127.0.0.1', '-p', new URL(env.APP_URL).port];
  const app = start(process.execPath, next, env, 'ignore');
  await reachable(`${env.APP_URL}/api/health`, 120);
  const stop = async () => {
    await stopping(app)();
    if (standIns) await stopping(standIns)();
    rmSync(folder, { recursive: true, force: true });
  };
  return { url: env.APP_URL, pid: app.pid ?? 0, env, stop };
}
