import { readFileSync, writeFileSync } from 'node:fs';
import { demoEnvironment } from '../../db/demo/settings.mjs';
import { build, finished, install, start, stopAll } from '../../db/demo/steps.mjs';

/**
 * `npm run bench`: the product beside a floor measured in the same run, as a table and in .data/bench.json. Ends with 1
 * when a target is missed. `npm run bench -- diary-js` runs that one alone and writes no file.
 */

/** Next adds the folder of a build to tsconfig.json; this one is nobody else's business. @param {() => Promise<void>} work */
async function keepingTsconfig(work) {
  const before = readFileSync('tsconfig.json');
  try {
    await work();
  } finally {
    writeFileSync('tsconfig.json', before);
  }
}

async function main() {
  process.chdir(new URL('../..', import.meta.url).pathname);
  install();
  const env = { ...demoEnvironment(), FLITCHBOOK_BENCH: '1' };
  await keepingTsconfig(() => build(env, '.data/next-bench'));
  await finished(start('npx', ['tsx', 'tests/bench/bench.ts', ...process.argv.slice(2)], env), 'A bench');
}

for (const signal of ['SIGINT', 'SIGTERM']) process.once(signal, stopAll);
main()
  .catch((error) => {
    console.error(error instanceof Error ? error.message : error);
    process.exitCode = 1;
  })
  .finally(stopAll);
