import { demoEnvironment } from './settings.mjs';
import { build, finished, install, reachable, start, stopAll } from './steps.mjs';

/** `npm run demo`: from a fresh clone to the running product. What is done already is not done again. */

/** @param {NodeJS.ProcessEnv} env */
async function seed(env) {
  console.log('Looking after the demo world (the first time every photograph is drawn, which takes a few minutes).');
  await finished(start('npx', ['tsx', 'db/demo/start-seed.ts'], env), 'Seeding the demo world');
}

const people = [
  ['Maren Oyelaran', 'buyer of Q-2417', 'maren.oyelaran@clients.example'],
  ['Tove Järvi', 'builder in the finish room', 'tove.jarvi@quillhaven.example'],
  ['Lucia Tamberlan', 'rep', 'lucia.tamberlan@quillhaven.example'],
  ['Nadia Brandvold', 'admin', 'nadia.brandvold@quillhaven.example'],
];

/** @param {NodeJS.ProcessEnv} env */
function welcome(env) {
  console.log(`\n  The shop is open:  ${env.APP_URL}\n  Its mail lies in:  ${env.DEMO_MAIL_ROOM_URL}\n`);
  console.log('  Sign in as one of these; the link comes to the mail room.');
  for (const [name = '', what = '', address = ''] of people) {
    console.log(`    ${name.padEnd(17)} ${what.padEnd(27)} ${address}`);
  }
  console.log('\n  The data is in .data and stays. Ctrl-C stops everything.\n');
}

async function main() {
  process.chdir(new URL('../..', import.meta.url).pathname);
  install();
  const env = demoEnvironment();
  start('npx', ['tsx', 'lib/fakes/start.ts'], env);
  await reachable(`${env.RESEND_BASE_URL}/`, 60);
  await Promise.all([build(env), seed(env)]);
  const { port, hostname } = new URL(env.APP_URL ?? '');
  const app = start('npx', ['next', 'start', '-H', hostname, '-p', port], { ...env, NODE_ENV: 'production' }, 'ignore');
  await reachable(`${env.APP_URL}/api/health`, 60);
  welcome(env);
  await new Promise((gone) => app.once('exit', gone));
}

process.once('SIGINT', stopAll);
process.once('SIGTERM', stopAll);
main()
  .catch((error) => {
    console.error(error instanceof Error ? error.message : error);
    process.exitCode = 1;
  })
  .finally(stopAll);
