import { setTimeout as pause } from 'node:timers/promises';
import { chromium } from '@playwright/test';
import { requireBrowser } from '../browser/find-chromium.mjs';
import { openApp, type App } from './app';
import { openLoad } from './diary';
import { staffToken } from './fill';
import { fillFloor, ON_FLOOR } from './fill-floor';
import { longestFrameMs, stretch } from './longest-frame';
import { median, ratioAtLeast, valueBelow, type Bench } from './row';

const ROUNDS = 5;

/** Until the app has reckoned the windows of all builds: from then on the floor stands still. */
async function windowsAreThere({ url }: App): Promise<void> {
  const headers = { cookie: `flitchbook-session=${staffToken(0)}` };
  for (let tries = 0; tries < 60; tries++) {
    const text = await (await fetch(`${url}/api/floor`, { headers })).text();
    if (!text.includes('no date yet')) return;
    await pause(1000);
  }
  throw new Error('The windows of the floor were not reckoned within a minute.');
}

async function measureRequests({ url }: App) {
  const load = openLoad();
  const rounds: { floor: number; empty: number }[] = [];
  try {
    for (let round = -1; round < ROUNDS; round++) {
      const empty = await load.ask({ url, door: 'empty', builds: ON_FLOOR });
      const floor = await load.ask({ url, door: 'floor', builds: ON_FLOOR });
      if (round >= 0) rounds.push({ floor: floor.requestsPerSecond, empty: empty.requestsPerSecond });
    }
  } finally {
    load.stop();
  }
  return ratioAtLeast(0.4, {
    name: 'floor-500',
    value: median(rounds.map(({ floor }) => floor)),
    floor: median(rounds.map(({ empty }) => empty)),
    unit: 'requests/s',
  });
}

async function measureScroll({ url }: App) {
  const browser = await chromium.launch({ executablePath: requireBrowser(), args: ['--no-sandbox'] });
  try {
    const context = await browser.newContext({ viewport: { width: 1360, height: 900 } });
    await context.addCookies([{ name: 'flitchbook-session', value: staffToken(0), url }]);
    const page = await context.newPage();
    await page.goto(`${url}/empty`);
    await stretch(page);
    const still = await longestFrameMs(page);
    await page.goto(`${url}/floor`);
    await page.waitForFunction((count) => document.querySelectorAll('[role=row]').length > count, ON_FLOOR);
    return valueBelow(100, { name: 'floor-scroll', value: await longestFrameMs(page), floor: still, unit: 'ms' });
  } finally {
    await browser.close();
  }
}

/** The floor with five hundred builds: its page beside an empty one, and its longest frame when it is scrolled through. */
export const floor500: Bench = {
  name: 'floor-500',
  run: async () => {
    const app = await openApp(ON_FLOOR, false, fillFloor);
    try {
      await windowsAreThere(app);
      return [await measureRequests(app), await measureScroll(app)];
    } finally {
      await app.stop();
    }
  },
};
