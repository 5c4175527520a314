import autocannon from 'autocannon';
import { orderNumberOf, ownerToken, staffToken } from './fill';
import { median } from './row';

/** Runs in a process of its own: what asks must not take time from what answers more than the machine makes it. */

export type Load = { url: string; door: 'diary' | 'bare' | 'floor' | 'empty'; builds: number; seconds: number };
export type Answered = { requestsPerSecond: number; p50Ms: number };

const CONNECTIONS = 8;

/** A random build's diary as its owner reads it, or the floor as its lead does; what is bare gets the same cookies. */
function askFor(door: Load['door'], builds: number): { path: string; token: string } {
  const build = Math.floor(Math.random() * builds);
  if (door === 'floor' || door === 'empty') return { path: `/${door}`, token: staffToken(0) };
  return {
    path: door === 'bare' ? '/api/bare' : `/api/builds/${orderNumberOf(build)}/diary`,
    token: ownerToken(build),
  };
}

async function hammer({ url, door, builds, seconds }: Load): Promise<Answered> {
  const setupRequest = (request: object) => {
    const { path, token } = askFor(door, builds);
    return { ...request, method: 'GET', path, headers: { cookie: `flitchbook-session=${token}` } };
  };
  const tookMs: number[] = [];
  const others: number[] = [];
  const run = autocannon({ url, connections: CONNECTIONS, duration: seconds, requests: [{ setupRequest }] });
  run.on('response', (_client, status, _sizeBytes, ms) => (status === 200 ? tookMs : others).push(ms));
  const { duration, errors, timeouts } = await run;
  const bad = others.length + errors + timeouts;
  if (bad > 0) throw new Error(`${bad} requests to ${door} were not answered in full`);
  return { requestsPerSecond: tookMs.length / duration, p50Ms: median(tookMs) };
}

process.on('message', (load: Load) => {
  void hammer(load).then((answered) => process.send?.(answered));
});
