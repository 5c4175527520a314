import { fork, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { mkdtemp, readdir, rm } from 'node:fs/promises';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, expect, test } from 'vitest';

const SCRIPT = join(import.meta.dirname, '../../../lib/fakes/start.ts');
const SETTINGS = {
  APP_URL: 'http://127.0.0.1:3000/builds',
  S3_REGION: 'eu-north-1',
  S3_BUCKET: 'photos',
  S3_ACCESS_KEY_ID: 'AKEXAMPLE',
  S3_SECRET_ACCESS_KEY: 'secret',
  RESEND_API_KEY: 're_local_example',
};

let folder = '';
beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'fakes-'));
});
afterAll(() => rm(folder, { recursive: true, force: true }));

async function freePort(): Promise<number> {
  const server = createServer().listen(0, '127.0.0.1');
  await once(server, 'listening');
  const address = server.address();
  server.close();
  await once(server, 'close');
  return typeof address === 'object' && address !== null ? address.port : 0;
}

function start(settings: Record<string, string>): ChildProcess {
  const env = { PATH: process.env.PATH, FAKES_DIR: folder, ...settings };
  return fork(SCRIPT, { execArgv: ['--import', 'tsx'], env: { NODE_ENV: 'test', ...env }, silent: true });
}

test('both stand-ins start on the ports of their addresses, say they are ready, and stop on SIGTERM', async () => {
  const [storePort, roomPort] = [await freePort(), await freePort()];
  const child = start({
    ...SETTINGS,
    S3_ENDPOINT: `http://127.0.0.1:${storePort}`,
    RESEND_BASE_URL: `http://127.0.0.1:${roomPort}`,
  });
  expect(await once(child, 'message')).toContain('ready');
  expect((await fetch(`http://127.0.0.1:${storePort}/photos/x`)).status).toBe(403);
  expect(await (await fetch(`http://127.0.0.1:${roomPort}/mails`)).json()).toEqual([]);
  expect((await readdir(folder)).sort()).toEqual(['mails', 'objects']);
  child.kill('SIGTERM');
  expect(await once(child, 'exit')).toEqual([0, null]);
});

test.each([
  { why: 'a setting is missing', settings: { ...SETTINGS, S3_BUCKET: '' }, says: 'S3_BUCKET' },
  {
    why: 'an address is a hosted one',
    settings: { ...SETTINGS, S3_ENDPOINT: 'https://s3.example' },
    says: 'S3_ENDPOINT',
  },
])('nothing starts when $why', async ({ settings, says }) => {
  const child = start(settings);
  let errors = '';
  child.stderr?.on('data', (part: Buffer) => (errors += part.toString()));
  const [code] = await once(child, 'close');
  expect(code).toBe(1);
  expect(errors).toContain(says);
});
