import { setTimeout as pause } from 'node:timers/promises';
import { gzipSync } from 'node:zlib';
import { chromium, type Browser, type BrowserContext } from '@playwright/test';
import { requireBrowser } from '../browser/find-chromium.mjs';
import { openApp } from './app';
import { orderNumberOf, ownerToken } from './fill';
import { ratioAtMost, type Bench } from './row';

/** Words that only the editor, the shop's side of an entry, or the fields of a reading bring with them. */
const NOT_FOR_READERS = /prosemirror|tiptap|Release to the buyer|What was put on/i;

/** Every script that a page fetched, preloads included, until it had nothing more to fetch: address and text. */
async function scriptsOf(context: BrowserContext, url: string): Promise<Map<string, string>> {
  const page = await context.newPage();
  const scripts = new Map<string, Promise<string>>();
  page.on('response', (response) => {
    const isScript = response.request().resourceType() === 'script' || /\.m?js$/.test(new URL(response.url()).pathname);
    if (isScript) scripts.set(response.url(), response.text());
  });
  const answer = await page.goto(url, { waitUntil: 'load' });
  if (!answer?.ok() || page.url() !== url) throw new Error(`${url} answered ${answer?.status()} at ${page.url()}.`);
  await page.mouse.wheel(0, 20_000);
  await page.waitForLoadState('networkidle');
  await pause(2000);
  const texts = await Promise.all([...scripts].map(async ([name, text]) => [name, await text] as const));
  await page.close();
  return new Map(texts);
}

const gzippedKb = (scripts: Map<string, string>) =>
  [...scripts.values()].reduce((sum, text) => sum + gzipSync(text).length, 0) / 1000;

async function openBrowser(): Promise<Browser> {
  return chromium.launch({ executablePath: requireBrowser(), args: ['--no-sandbox'] });
}

/** The client code of a diary as its buyer opens it, gzipped, beside an empty page of the same app. */
export const diaryJs: Bench = {
  name: 'diary-js',
  run: async () => {
    const app = await openApp(20);
    const browser = await openBrowser();
    try {
      const context = await browser.newContext();
      await context.addCookies([{ name: 'flitchbook-session', value: ownerToken(0), url: app.url }]);
      const diary = await scriptsOf(context, `${app.url}/builds/${orderNumberOf(0)}`);
      const empty = await scriptsOf(context, `${app.url}/empty`);
      const stray = [...diary].find(([, text]) => NOT_FOR_READERS.test(text));
      if (stray) throw new Error(`${stray[0]} is fetched by a reader and is not for one.`);
      return [ratioAtMost(1.3, { name: 'diary-js', value: gzippedKb(diary), floor: gzippedKb(empty), unit: 'kB' })];
    } finally {
      await browser.close();
      await app.stop();
    }
  },
};
