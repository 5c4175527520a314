const MINUTE_MS = 60_000;
const DAY_MS = 86_400_000;

/** So long a letter stays with its writer: it can be corrected, and its mail goes out after. */
export const CORRECTABLE_MS = 2 * MINUTE_MS;
/** So long after its end a question can go on. */
export const REOPEN_MS = 30 * DAY_MS;

export type Side = 'client' | 'shop';
type Clocked = { state: 'waiting' | 'answered' | 'closed'; dueAt: number | null };

/** Whether a closed question can still be taken up again. */
export const canReopen = (closedAt: number | null, nowMs: number): boolean =>
  closedAt !== null && nowMs - closedAt < REOPEN_MS;

/**
 * Whether a letter starts the clock anew: the client's next letter after an answer or an end does; who writes again
 * while they wait moves nothing, so nobody waits longer for having said more.
 */
export const startsClock = (side: Side, { state, dueAt }: Clocked): boolean =>
  side === 'client' && (state !== 'waiting' || dueAt === null);
