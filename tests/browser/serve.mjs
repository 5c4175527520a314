import { rmSync } from 'node:fs';
import { demoEnvironment } from '../../db/demo/settings.mjs';
import { build, finished, reachable, start, stopAll } from '../../db/demo/steps.mjs';

/** A new demo world on ports of its own, with sessions for its people, behind the built app. */
const dataDir = '.data/browser';

const env = {
  ...demoEnvironment(),
  APP_URL: 'http://127.0.0.1:3100',
  DATABASE_URL: `file:${dataDir}/flitchbook.db`,
  S3_ENDPOINT: 'http://127.0.0.1:4668',
  RESEND_BASE_URL: 'http://127.0.0.1:4669',
  DEMO_MAIL_ROOM_URL: 'http://127.0.0.1:4669',
  FAKES_DIR: dataDir,
  DEMO_PICTURE_WIDTH_PX: '320',
  LOG_LEVEL: 'warn',
};

async function main() {
  rmSync(dataDir, { recursive: true, force: true });
  start('npx', ['tsx', 'lib/fakes/start.ts'], env);
  await reachable(`${env.RESEND_BASE_URL}/`, 60);
  const seed = finished(start('npx', ['tsx', 'tests/browser/seed.ts'], env), 'Seeding');
  await Promise.all([build(demoEnvironment()), seed]);
  start('npx', ['next', 'start', '-H', '127.0.0.1', '-p', '3100'], { ...env, NODE_ENV: 'production' });
}

process.once('SIGINT', stopAll);
process.once('SIGTERM', () => {
  stopAll();
  process.exit(0);
});
await main();
