const FIRST_MS = 1_000;
const LONGEST_MS = 30_000;

/**
 * How long to wait before the next try, in ms: doubling from a second to half a minute, at random between half of that
 * and all of it, and never less than the other side asked for. `random` is from 0 up to 1.
 */
export function retryDelay(triesBefore: number, random: number, leastMs = 0): number {
  const fullMs = Math.min(LONGEST_MS, FIRST_MS * 2 ** triesBefore);
  return Math.max(leastMs, fullMs * (0.5 + random / 2));
}

/** Resolves after `ms`, or at once when `signal` is aborted. */
export function pause(ms: number, signal: AbortSignal): Promise<void> {
  return new Promise((resolve) => {
    if (signal.aborted) return resolve();
    const timer = setTimeout(resolve, ms);
    signal.addEventListener('abort', () => (clearTimeout(timer), resolve()), { once: true });
  });
}
