import { cpSync, rmSync } from 'node:fs';
import { demoEnvironment } from '../../db/demo/settings.mjs';
import { build, finished, reachable, start, stopAll } from '../../db/demo/steps.mjs';
import { WORLDS, worldOf } from './worlds.mjs';

/** @typedef {import('./worlds.mjs').World} World */

/** New demo worlds on ports of their own, with sessions for their people, each behind the built app. */
const worlds = Array.from({ length: WORLDS }, (_, index) => worldOf(index));

/** @param {World} world */
const environmentOf = ({ appUrl, storeUrl, mailUrl, dataDir }) => ({
  ...demoEnvironment(),
  APP_URL: appUrl,
  DATABASE_URL: `file:${dataDir}/flitchbook.db`,
  S3_ENDPOINT: storeUrl,
  RESEND_BASE_URL: mailUrl,
  DEMO_MAIL_ROOM_URL: mailUrl,
  FAKES_DIR: dataDir,
  DEMO_PICTURE_WIDTH_PX: '320',
  LOG_LEVEL: 'warn',
});

/** @param {World} world */
async function startFakes(world) {
  start('npx', ['tsx', 'lib/fakes/start.ts'], environmentOf(world));
  await reachable(`${world.mailUrl}/`, 60);
}

/** @param {World} world */
async function startApp(world) {
  const { port } = new URL(world.appUrl);
  start('npx', ['next', 'start', '-H', '127.0.0.1', '-p', port], { ...environmentOf(world), NODE_ENV: 'production' });
  await reachable(`${world.appUrl}/api/health`, 60);
}

/** Seeded once; the others are its copies. */
async function main() {
  const [first, ...others] = worlds;
  if (!first) return;
  for (const { dataDir } of worlds) rmSync(dataDir, { recursive: true, force: true });
  await startFakes(first);
  const seed = finished(start('npx', ['tsx', 'tests/browser/seed.ts'], environmentOf(first)), 'Seeding');
  await Promise.all([build(demoEnvironment()), seed]);
  for (const { dataDir } of others) cpSync(first.dataDir, dataDir, { recursive: true });
  await Promise.all(others.map(startFakes));
  // The last one to answer is the one that the tests wait for.
  for (const world of worlds) await startApp(world);
}

process.once('SIGINT', stopAll);
process.once('SIGTERM', () => {
  stopAll();
  process.exit(0);
});
await main();
