const MINUTE_MS = 60_000;
const HOUR_MS = 60 * MINUTE_MS;

/** Leaky buckets: `capacity` uses at once, refilled evenly over `perMs`. */
export const limits = {
  sign_in_address: { capacity: 5, perMs: 15 * MINUTE_MS },
  sign_in_address_day: { capacity: 20, perMs: 24 * HOUR_MS },
  sign_in_peer: { capacity: 30, perMs: 15 * MINUTE_MS },
  sign_in_open: { capacity: 20, perMs: 10 * MINUTE_MS },
  entry: { capacity: 30, perMs: MINUTE_MS },
  question: { capacity: 20, perMs: HOUR_MS },
  letter: { capacity: 30, perMs: 10 * MINUTE_MS },
  upload: { capacity: 60, perMs: HOUR_MS },
  upload_step: { capacity: 200, perMs: 10 * MINUTE_MS },
  visit: { capacity: 60, perMs: 10 * MINUTE_MS },
  check_line: { capacity: 300, perMs: 10 * MINUTE_MS },
  paper: { capacity: 20, perMs: 10 * MINUTE_MS },
  manage: { capacity: 120, perMs: 10 * MINUTE_MS },
} as const;

export type LimitName = keyof typeof limits;
