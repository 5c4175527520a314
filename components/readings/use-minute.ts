import { useSyncExternalStore } from 'react';

const MINUTE_MS = 60_000;

function subscribe(tell: () => void) {
  const timer = setInterval(tell, MINUTE_MS / 4);
  return () => clearInterval(timer);
}

const thisMinute = () => Math.floor(Date.now() / MINUTE_MS) * MINUTE_MS;

/** The minute it is, in milliseconds since 1970; null until the page runs in a browser. */
export const useMinute = () => useSyncExternalStore<number | null>(subscribe, thisMinute, () => null);
