import { spawn, spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { dirname } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';

/** Steps that `npm run demo`, `npm test` and `npm run bench` share. Plain Node: they run before anything is installed. */

/** @typedef {import('node:child_process').ChildProcess} ChildProcess */

/** @type {ChildProcess[]} */
const children = [];

/**
 * Starts a process that is stopped with this one.
 * @param {string} command
 * @param {string[]} args
 * @param {NodeJS.ProcessEnv} env
 * @param {'inherit' | 'ignore'} [output]
 */
export function start(command, args, env, output = 'inherit') {
  const child = spawn(command, args, { env, stdio: ['ignore', output, 'inherit'], detached: true });
  children.push(child);
  return child;
}

/** Stops what `start` started, with everything below it. */
export function stopAll() {
  for (const { pid, exitCode } of children) {
    if (pid === undefined || exitCode !== null) continue;
    try {
      process.kill(-pid, 'SIGTERM');
    } catch {
      // It ended by itself in the meantime.
    }
  }
}

/** @param {ChildProcess} child @param {string} what */
export const finished = (child, what) =>
  new Promise((done, fail) => {
    child.once('exit', (code) => (code === 0 ? done(undefined) : fail(new Error(`${what} did not work (see above).`))));
  });

/** Waits until something answers at a URL. @param {string} url @param {number} seconds */
export async function reachable(url, seconds) {
  for (let tries = 0; tries < seconds * 4; tries++) {
    const answers = await fetch(url).then(
      ({ ok }) => ok,
      () => false,
    );
    if (answers) return;
    await pause(250);
  }
  throw new Error(`${url} did not come up. Is something else using its port?`);
}

/** Installs when node_modules is missing or belongs to another lock file. */
export function install() {
  const lock = createHash('sha256').update(readFileSync('package-lock.json')).digest('hex');
  const mark = 'node_modules/.flitchbook-lock';
  if (existsSync(mark) && readFileSync(mark, 'utf8') === lock) return;
  console.log('Installing what it is made of (a few minutes, once).');
  const { status } = spawnSync('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error'], { stdio: 'inherit' });
  if (status !== 0) throw new Error('npm ci did not work (see above).');
  writeFileSync(mark, lock);
}

/** What the app is built from. */
const SOURCES = [
  'app',
  'components',
  'db',
  'emails',
  'lib',
  'proxy.ts',
  'instrumentation.ts',
  'next.config.ts',
  'package-lock.json',
];

function codeMark() {
  /** @param {string[]} args */
  const git = (args) => spawnSync('git', [...args, ...SOURCES], { encoding: 'utf8', maxBuffer: 1e8 }).stdout ?? '';
  return createHash('sha256')
    .update(git(['ls-files', '-s', '--']))
    .update(git(['diff', 'HEAD', '--']))
    .digest('hex');
}

/** Builds the app unless this very code is built already. @param {NodeJS.ProcessEnv} env @param {string} [distDir] */
export async function build(env, distDir = '.next') {
  const mark = `.data/built-${distDir.replaceAll('/', '-')}`;
  const code = codeMark();
  if (existsSync(`${distDir}/BUILD_ID`) && existsSync(mark) && readFileSync(mark, 'utf8') === code) return;
  console.log('Building the app (about a minute).');
  await finished(start('npx', ['next', 'build'], { ...env, NODE_ENV: 'production' }, 'ignore'), 'The build');
  mkdirSync(dirname(mark), { recursive: true });
  writeFileSync(mark, code);
}
