import { defineConfig } from '@playwright/test';
import { world } from './world';

/** One real app with the demo world behind it, served by serve.mjs; the tests share it and each uses builds of its own. */
export default defineConfig({
  testDir: '.',
  outputDir: '../../.data/reports/browser',
  workers: 1,
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
  // Knocking on every door changes the world that the others read: it comes last, and needs no pictures of its pages.
  projects: [
    { name: 'jobs', testIgnore: 'access.spec.ts' },
    { name: 'doors', testMatch: 'access.spec.ts', use: { trace: 'off' } },
  ],
  webServer: {
    command: 'node tests/browser/serve.mjs',
    cwd: '../..',
    url: `${world.appUrl}/api/health`,
    timeout: 240_000,
    // While writing a test: `node tests/browser/serve.mjs` in another terminal, and REUSE_WORLD=1, save the start.
    reuseExistingServer: process.env.REUSE_WORLD === '1',
    gracefulShutdown: { signal: 'SIGTERM', timeout: 10_000 },
    stdout: 'pipe',
  },
});
