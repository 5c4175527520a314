import { spawnSync } from 'node:child_process';
import { cpSync, existsSync, mkdirSync, mkdtempSync, readFileSync, readdirSync, rmSync, symlinkSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { demoEnvironment } from '../db/demo/settings.mjs';
import { build, install, stopAll } from '../db/demo/steps.mjs';
import { requireBrowser } from './browser/find-chromium.mjs';

/** `npm test`: everything, in the order in which a mistake is cheapest to find. Ends with "N passed, N failed". */

const REPORTS = '.data/reports';
let passed = 0;
let failed = 0;

/** @param {string} name @param {() => void | Promise<void>} work */
async function check(name, work) {
  const startedAt = Date.now();
  try {
    await work();
    passed++;
    console.log(`ok      ${name} (${Math.round((Date.now() - startedAt) / 1000)} s)`);
  } catch (error) {
    failed++;
    console.log(`FAILED  ${name}: ${error instanceof Error ? error.message : error}`);
  }
}

/** @param {string} command @param {string[]} args @param {NodeJS.ProcessEnv} [env] */
function run(command, args, env = process.env) {
  const { status } = spawnSync(command, args, { stdio: 'inherit', env });
  if (status !== 0) throw new Error(`${[command, ...args].join(' ')} ended with ${status}`);
}

/** A generator that would write another migration means that the schema and the migrations disagree. */
function migrationsAreUpToDate() {
  const copy = mkdtempSync(join(tmpdir(), 'flitchbook-migrations-'));
  try {
    for (const path of ['db', 'lib', 'drizzle.config.ts', 'package.json', 'tsconfig.json'])
      cpSync(path, join(copy, path), { recursive: true });
    symlinkSync(join(process.cwd(), 'node_modules'), join(copy, 'node_modules'));
    const before = readdirSync(join(copy, 'db/migrations')).length;
    const { status } = spawnSync('npx', ['drizzle-kit', 'generate'], { cwd: copy, stdio: 'ignore' });
    const after = readdirSync(join(copy, 'db/migrations')).length;
    if (status !== 0 || after !== before)
      throw new Error('run `npx drizzle-kit generate --name what_changes` and commit the result');
  } finally {
    rmSync(copy, { recursive: true, force: true });
  }
}

/** Adds up a JSON report of Vitest. @param {string} file */
function countUnitTests(file) {
  if (!existsSync(file)) return;
  const report = JSON.parse(readFileSync(file, 'utf8'));
  passed += report.numPassedTests;
  failed += report.numFailedTests;
}

/** Adds up a JSON report of Playwright. @param {string} file */
function countBrowserTests(file) {
  if (!existsSync(file)) return;
  const { stats } = JSON.parse(readFileSync(file, 'utf8'));
  passed += stats.expected + stats.flaky;
  failed += stats.unexpected;
}

function unitTests() {
  const report = `${REPORTS}/unit.json`;
  try {
    run('npx', ['vitest', 'run', '--reporter=default', '--reporter=json', `--outputFile.json=${report}`]);
  } finally {
    countUnitTests(report);
  }
}

function browserTests() {
  const report = `${REPORTS}/browser.json`;
  try {
    run('npx', ['playwright', 'test', '-c', 'tests/browser'], {
      ...process.env,
      CHROMIUM_PATH: requireBrowser(),
      PLAYWRIGHT_JSON_OUTPUT_FILE: report,
    });
  } finally {
    countBrowserTests(report);
  }
}

async function main() {
  process.chdir(new URL('..', import.meta.url).pathname);
  process.env.NEXT_TELEMETRY_DISABLED = '1';
  install();
  rmSync(REPORTS, { recursive: true, force: true });
  mkdirSync(REPORTS, { recursive: true });
  await check('formatting', () => run('npx', ['prettier', '--check', '--log-level=warn', '.']));
  await check('lint and the import fence', () => run('npx', ['eslint', '--max-warnings=0', '.']));
  await check('page types', () => run('npx', ['next', 'typegen']));
  await check('types', () => run('npx', ['tsc', '--noEmit']));
  await check('migrations up to date', migrationsAreUpToDate);
  await check('unit and integration tests', unitTests);
  await check('production build', () => build(demoEnvironment()));
  await check('browser tests', browserTests);
}

main()
  .catch((error) => {
    failed++;
    console.error(error instanceof Error ? error.message : error);
  })
  .finally(() => {
    stopAll();
    console.log(`${passed} passed, ${failed} failed`);
    process.exitCode = failed > 0 || passed === 0 ? 1 : 0;
  });
