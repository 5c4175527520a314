import { isStaffRole, type Role } from '@/lib/access';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;

/** How long a session lasts without use, and at most. Staff handle other people's orders, so theirs are shorter. */
export function sessionLimits(role: Role): { idleMs: number; absoluteMs: number } {
  return isStaffRole(role)
    ? { idleMs: 12 * HOUR_MS, absoluteMs: 7 * DAY_MS }
    : { idleMs: 14 * DAY_MS, absoluteMs: 30 * DAY_MS };
}

export const SIGN_IN_LINK_MS = 10 * 60_000;
export const SIGN_IN_CODE_TRIES = 5;
