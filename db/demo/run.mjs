import { spawn, spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { setTimeout as pause } from 'node:timers/promises';
import { demoEnvironment } from './settings.mjs';

/** `npm run demo`: from a fresh clone to the running product. What is done already is not done again. */

/** @type {import('node:child_process').ChildProcess[]} */
const children = [];
const tell = (/** @type {string} */ line) => console.log(line);

/** @param {string[]} paths @returns {string} what these files say, in short */
function fingerprint(paths) {
  const hash = createHash('sha256');
  for (const path of paths) hash.update(readFileSync(path));
  return hash.digest('hex');
}

/** @param {string} command @param {string[]} args @param {NodeJS.ProcessEnv} env */
function run(command, args, env) {
  const { status } = spawnSync(command, args, { env, stdio: 'inherit' });
  if (status !== 0)
    throw new Error(`${command} ${args.join(' ')} did not work (see above). Mend that and run it again.`);
}

/** @param {string} command @param {string[]} args @param {NodeJS.ProcessEnv} env @param {'inherit' | 'ignore'} output */
function start(command, args, env, output = 'inherit') {
  const child = spawn(command, args, { env, stdio: ['ignore', output, 'inherit'] });
  children.push(child);
  return child;
}

/** @param {import('node:child_process').ChildProcess} child @param {string} what */
const finished = (child, what) =>
  new Promise((done, fail) => {
    child.once('exit', (code) => (code === 0 ? done(undefined) : fail(new Error(`${what} did not work (see above).`))));
  });

/** @param {string} url @param {number} seconds */
async function reachable(url, seconds) {
  for (let tries = 0; tries < seconds * 4; tries++) {
    if (
      await fetch(url).then(
        () => true,
        () => false,
      )
    )
      return;
    await pause(250);
  }
  throw new Error(`${url} did not come up. Is something else using its port?`);
}

/** Installs when node_modules is missing or from another lock file. */
function install() {
  const lock = fingerprint(['package-lock.json']);
  const mark = 'node_modules/.flitchbook-lock';
  if (existsSync(mark) && readFileSync(mark, 'utf8') === lock) return;
  tell('Installing what it is made of (a few minutes, once).');
  run('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error'], process.env);
  writeFileSync(mark, lock);
}

/** @returns {string} what this checkout's code is, so that a changed one is built again */
function codeMark() {
  const list = spawnSync('git', ['ls-files', '-s', 'app', 'components', 'db', 'emails', 'lib', 'package-lock.json'], {
    encoding: 'utf8',
  });
  const dirty = spawnSync('git', ['diff', 'HEAD', '--', 'app', 'components', 'db', 'emails', 'lib'], {
    encoding: 'utf8',
    maxBuffer: 1e8,
  });
  return createHash('sha256')
    .update(list.stdout ?? '')
    .update(dirty.stdout ?? '')
    .digest('hex');
}

/** @param {NodeJS.ProcessEnv} env */
async function build(env) {
  const mark = '.data/built';
  const code = codeMark();
  if (existsSync('.next/BUILD_ID') && existsSync(mark) && readFileSync(mark, 'utf8') === code) return;
  tell('Building the app (about a minute, once).');
  await finished(start('npx', ['next', 'build'], env, 'ignore'), 'The build');
  writeFileSync(mark, code);
}

/** @param {NodeJS.ProcessEnv} env */
async function seed(env) {
  tell('Looking after the demo world (the first time it draws every photograph, which takes a minute or two).');
  await finished(start('npx', ['tsx', 'db/demo/start-seed.ts'], env), 'Seeding the demo world');
}

const people = [
  ['Maren Oyelaran', 'buyer of Q-2417', 'maren.oyelaran@clients.example'],
  ['Tove Järvi', 'builder in the finish room', 'tove.jarvi@quillhaven.example'],
  ['Ruth Adeyemi', 'rep', 'ruth.adeyemi@quillhaven.example'],
  ['Nadia Brandvold', 'admin', 'nadia.brandvold@quillhaven.example'],
];

/** @param {NodeJS.ProcessEnv} env */
function welcome(env) {
  tell(`\n  The shop is open:  ${env.APP_URL}\n  Its mail lies in:  ${env.DEMO_MAIL_ROOM_URL}\n`);
  tell('  Sign in as one of these; the link comes to the mail room.');
  for (const [name = '', what = '', address = ''] of people)
    tell(`    ${name.padEnd(17)} ${what.padEnd(27)} ${address}`);
  tell('\n  The data is in .data and stays. Ctrl-C stops everything.\n');
}

function stop() {
  for (const child of children) child.kill('SIGTERM');
}

async function main() {
  process.chdir(new URL('../..', import.meta.url).pathname);
  install();
  mkdirSync('.data', { recursive: true });
  const env = demoEnvironment();
  start('npx', ['tsx', 'lib/fakes/start.ts'], env);
  await reachable(`${env.RESEND_BASE_URL}/`, 30);
  await Promise.all([build(env), seed(env)]);
  const { port, hostname } = new URL(env.APP_URL ?? '');
  const app = start(
    'npx',
    ['next', 'start', '-H', hostname, '-p', port || '3000'],
    { ...env, NODE_ENV: 'production' },
    'ignore',
  );
  await reachable(`${env.APP_URL}/api/health`, 60);
  welcome(env);
  await new Promise((gone) => app.once('exit', gone));
}

process.on('SIGINT', stop);
process.on('SIGTERM', stop);
main()
  .catch((error) => {
    console.error(error instanceof Error ? error.message : error);
    process.exitCode = 1;
  })
  .finally(stop);
