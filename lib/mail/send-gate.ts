import { setTimeout as pause } from 'node:timers/promises';

export type SendGate = <T>(send: () => Promise<T>) => Promise<T>;

/**
 * Lets at most `atOnce` sends run together and begins at most `perSecond` of them a second, evenly spaced, as the provider
 * wants it; without `perSecond` as many as come.
 */
export function createSendGate(atOnce: number, perSecond: number | undefined, now: () => number): SendGate {
  const waiting: (() => void)[] = [];
  const spacingMs = perSecond === undefined ? 0 : 1000 / perSecond;
  let running = 0;
  let nextSlotMs = 0;

  async function enter(): Promise<void> {
    if (running >= atOnce) await new Promise<void>((go) => waiting.push(go));
    else running += 1;
    const slotMs = Math.max(now(), nextSlotMs);
    nextSlotMs = slotMs + spacingMs;
    if (slotMs > now()) await pause(slotMs - now());
  }

  function leave(): void {
    const next = waiting.shift();
    if (next) next();
    else running -= 1;
  }

  return async (send) => {
    await enter();
    try {
      return await send();
    } finally {
      leave();
    }
  };
}
