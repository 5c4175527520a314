/** What came back from a door of the shop or of the photo store. `no-signal` means that nothing came back. */
export type Answer<T> =
  | { kind: 'ok'; body: T }
  | { kind: 'no-signal' }
  | { kind: 'status'; status: number; message?: string; fields?: Record<string, string>; retryAfterMs?: number };

type Call = {
  method: 'POST' | 'PATCH' | 'DELETE';
  url: string;
  body: object;
  signal?: AbortSignal;
  patienceMs?: number;
};

const PATIENCE_MS = 20_000;

/**
 * Asks one of the shop's JSON doors. The promise never rejects: silence, a time-out and a call given up look alike.
 * `T` is what that door answers with.
 */
export async function callShop<T>(call: Call): Promise<Answer<T>> {
  try {
    const answer = await fetch(call.url, {
      method: call.method,
      headers: { 'Content-Type': 'application/json' },
      body: JSON.stringify(call.body),
      signal: withPatience(call.signal, call.patienceMs ?? PATIENCE_MS),
      cache: 'no-store',
    });
    return answer.ok ? { kind: 'ok', body: await answer.json() } : await readRefusal(answer);
  } catch {
    return { kind: 'no-signal' };
  }
}

function withPatience(signal: AbortSignal | undefined, patienceMs: number): AbortSignal {
  const patience = AbortSignal.timeout(patienceMs);
  return signal ? AbortSignal.any([signal, patience]) : patience;
}

async function readRefusal(answer: Response): Promise<Answer<never>> {
  const told: { message?: string; fields?: Record<string, string> } = await answer.json().catch(() => ({}));
  const retryAfterMs = retryAfter(answer.headers.get('retry-after'));
  return { kind: 'status', status: answer.status, message: told.message, fields: told.fields, retryAfterMs };
}

/** The wait that a `Retry-After` of seconds asks for, in ms (RFC 9110, 10.2.3); its form as a date is not used here. */
export function retryAfter(header: string | null): number | undefined {
  return header !== null && /^\d{1,6}$/.test(header) ? Number(header) * 1000 : undefined;
}

/** Answers that say "not now": the same call may well succeed later. */
export const isPassing = (status: number) => status === 408 || status === 425 || status === 429 || status >= 500;
