import autocannon from 'autocannon';
import { orderNumberOf, ownerToken } from './fill';
import { median } from './row';

/** Runs in a process of its own: what asks must not take time from what answers more than the machine makes it. */

export type Load = { url: string; door: 'diary' | 'bare'; builds: number; seconds: number };
export type Answered = { requestsPerSecond: number; p50Ms: number };

const CONNECTIONS = 8;

/** Asks for random builds, each as its owner; the bare handler gets the same cookies. */
async function hammer({ url, door, builds, seconds }: Load): Promise<Answered> {
  const setupRequest = (request: object) => {
    const build = Math.floor(Math.random() * builds);
    const path = door === 'bare' ? '/api/bare' : `/api/builds/${orderNumberOf(build)}/diary`;
    return { ...request, method: 'GET', path, headers: { cookie: `flitchbook-session=${ownerToken(build)}` } };
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
