import { fork } from 'node:child_process';
import { once } from 'node:events';
import { join } from 'node:path';
import { openApp, type App } from './app';
import { orderNumberOf, ownerToken } from './fill';
import type { Answered, Load } from './load';
import { median, ratioAtLeast, ratioAtMost, type Bench } from './row';

/** 2,000 builds have 120,000 entries and 400,000 photos; see fill.ts. */
const BUILDS = 2000;
const FEW_BUILDS = BUILDS / 100;
const ROUNDS = 9;
const ROUND_SECONDS = 3;

/** Whoever asks the app, in a process of its own. */
export function openLoad() {
  const child = fork(join(process.cwd(), 'tests/bench/load.ts'));
  const ask = async (load: Omit<Load, 'seconds'>): Promise<Answered> => {
    child.send({ ...load, seconds: ROUND_SECONDS });
    const [answered] = await once(child, 'message', { signal: AbortSignal.timeout(20_000 + ROUND_SECONDS * 1000) });
    return answered;
  };
  return { ask, stop: () => child.kill() };
}

/** Has the bare handler say what a diary's page says. */
async function keepBarePage({ url }: App): Promise<void> {
  const cookie = `flitchbook-session=${ownerToken(0)}`;
  const page = await fetch(`${url}/api/builds/${orderNumberOf(0)}/diary`, { headers: { cookie } });
  const headers = { 'x-etag': page.headers.get('etag') ?? '' };
  const kept = await fetch(`${url}/api/bare`, { method: 'PUT', headers, body: await page.text() });
  if (!page.ok || !kept.ok) throw new Error(`The diary answered ${page.status}, the bare handler ${kept.status}.`);
}

/** Reads every diary once, as a shop's readers have long done: what the app keeps of them, it keeps. */
async function warmUp({ url }: App, builds: number): Promise<void> {
  for (let build = 0; build < builds; build++) {
    const cookie = `flitchbook-session=${ownerToken(build)}`;
    await (await fetch(`${url}/api/builds/${orderNumberOf(build)}/diary`, { headers: { cookie } })).arrayBuffer();
  }
}

async function measure(full: App, few: App, ask: ReturnType<typeof openLoad>['ask']) {
  const rounds: { bare: Answered; diary: Answered; small: Answered }[] = [];
  for (let round = -1; round < ROUNDS; round++) {
    const bare = await ask({ url: full.url, door: 'bare', builds: BUILDS });
    const diary = await ask({ url: full.url, door: 'diary', builds: BUILDS });
    const small = await ask({ url: few.url, door: 'diary', builds: FEW_BUILDS });
    if (round >= 0) rounds.push({ bare, diary, small });
  }
  return [
    ratioAtLeast(0.5, {
      name: 'diary-api',
      value: median(rounds.map(({ diary }) => diary.requestsPerSecond)),
      floor: median(rounds.map(({ bare }) => bare.requestsPerSecond)),
      unit: 'requests/s',
    }),
    ratioAtMost(1.2, {
      name: 'diary-growth',
      value: median(rounds.map(({ diary }) => diary.p50Ms)),
      floor: median(rounds.map(({ small }) => small.p50Ms)),
      unit: 'ms',
    }),
  ];
}

/** A diary's page over the API beside a handler that sends the same bytes from memory, and beside a hundredth of the rows. */
export const diary: Bench = {
  name: 'diary',
  run: async () => {
    const [full, few] = [await openApp(BUILDS), await openApp(FEW_BUILDS)];
    const load = openLoad();
    try {
      await keepBarePage(full);
      await warmUp(full, BUILDS);
      await warmUp(few, FEW_BUILDS);
      return await measure(full, few, load.ask);
    } finally {
      load.stop();
      await Promise.all([full.stop(), few.stop()]);
    }
  },
};
