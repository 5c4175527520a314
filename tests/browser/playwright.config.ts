import { defineConfig } from '@playwright/test';
import { world } from './world';
import { WORLDS, worldOf } from './worlds.mjs';

/** The real app with demo worlds behind it, served by serve.mjs; the tests of a worker share one, each with builds of its own. */
export default defineConfig({
  testDir: '.',
  outputDir: '../../.data/reports/browser',
  workers: WORLDS,
  timeout: 90_000,
  expect: { timeout: 15_000 },
  reporter: process.env.PLAYWRIGHT_JSON_OUTPUT_FILE ? [['list'], ['json']] : 'list',
  use: {
    baseURL: world.appUrl,
    launchOptions: { executablePath: process.env.CHROMIUM_PATH ?? '/usr/bin/chromium', args: ['--no-sandbox'] },
    viewport: { width: 1360, height: 900 },
    actionTimeout: 30_000,
    trace: 'retain-on-failure',
  },
  webServer: {
    command: 'node tests/browser/serve.mjs',
    cwd: '../..',
    url: `${worldOf(WORLDS - 1).appUrl}/api/health`,
    timeout: 240_000,
    // While writing a test: `node tests/browser/serve.mjs` in another terminal, and REUSE_WORLD=1, save the start.
    reuseExistingServer: process.env.REUSE_WORLD === '1',
    gracefulShutdown: { signal: 'SIGTERM', timeout: 10_000 },
    stdout: 'pipe',
  },
});
