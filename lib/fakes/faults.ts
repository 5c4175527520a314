import { isRecord } from './record';

export interface Fault {
  /** HTTP status to answer with; 0 cuts the connection without an answer. */
  status: number;
  /** How many more requests it hits. */
  times: number;
  retryAfter_s?: number;
  /** The work is done first, and only the answer is bad. */
  afterAccepting: boolean;
  /** How long the answer is held back, in milliseconds. */
  hold_ms: number;
  /** It hits one request in so many, the first of each round; 1 hits every one. */
  oneIn: number;
}

/** The switch that lets a test or a demonstration make a stand-in misbehave. */
export interface FaultSwitch {
  set(fault: Fault): void;
  clear(): void;
  /** Uses up one turn of the fault that is set, if there is one. */
  take(): Fault | undefined;
}

export function createFaultSwitch(): FaultSwitch {
  let current: Fault | undefined;
  let requests = 0;
  return {
    set: (fault) => {
      current = { ...fault };
      requests = 0;
    },
    clear: () => {
      current = undefined;
    },
    take: () => {
      if (current === undefined || current.times < 1) return undefined;
      requests += 1;
      if ((requests - 1) % current.oneIn !== 0) return undefined;
      current.times -= 1;
      return { ...current };
    },
  };
}

function wholeNumber(value: unknown, fallback: number): number {
  if (value === undefined) return fallback;
  if (typeof value !== 'number' || !Number.isInteger(value) || value < 0) throw new RangeError('Send whole numbers.');
  return value;
}

/**
 * Reads `{ status, times, retryAfterSeconds?, afterAccepting?, holdMs?, oneIn? }`; `times` is 1 unless given.
 * @throws RangeError naming what is wrong
 */
export function readFault(value: unknown): Fault {
  if (!isRecord(value)) throw new RangeError('Send an object such as {"status":503,"times":1}.');
  const status = wholeNumber(value.status, 500);
  if (status !== 0 && (status < 400 || status > 599)) throw new RangeError('The status must be 400 to 599, or 0.');
  const fault: Fault = {
    status,
    times: wholeNumber(value.times, 1),
    afterAccepting: value.afterAccepting === true,
    hold_ms: wholeNumber(value.holdMs, 0),
    oneIn: Math.max(1, wholeNumber(value.oneIn, 1)),
  };
  return value.retryAfterSeconds === undefined
    ? fault
    : { ...fault, retryAfter_s: wholeNumber(value.retryAfterSeconds, 0) };
}
