/** Why something was not sent, for the person who sent it. `status` is the HTTP status, or 0 when no answer came. */
export type Refused = { status: number; message: string; fields: Record<string, string> };

export type Sent = { ok: true; answer: unknown } | { ok: false; refused: Refused };

export type Sendable = { idempotencyKey: string; [field: string]: unknown };

const GIVE_UP_MS = 30_000;

/**
 * Sends JSON to one of this product's own doors. The idempotency key in it makes a second try safe: the door does the
 * work once, so the same body may be sent again whenever it is not known whether the first try arrived.
 * Never throws; every failure is a sentence.
 */
export async function sendJson(url: string, body: Sendable, isOnline = () => navigator.onLine): Promise<Sent> {
  try {
    const response = await fetch(url, {
      method: 'POST',
      headers: { 'Content-Type': 'application/json' },
      body: JSON.stringify(body),
      signal: AbortSignal.timeout(GIVE_UP_MS),
    });
    const answer: unknown = await response.json().catch(() => null);
    if (response.ok && answer !== null) return { ok: true, answer };
    return { ok: false, refused: refusalIn(response, answer) };
  } catch {
    return { ok: false, refused: { status: 0, message: unreachableWords(isOnline()), fields: {} } };
  }
}

function refusalIn({ status, headers }: Response, answer: unknown): Refused {
  const message = wordIn(answer, 'message') ?? statusWords(status, Number(headers.get('retry-after')));
  return { status, message, fields: fieldsIn(answer) };
}

/** The text under `name` in an answer of unknown shape. */
export function wordIn(answer: unknown, name: string): string | null {
  const value = partOf(answer, name);
  return typeof value === 'string' && value !== '' ? value : null;
}

function fieldsIn(answer: unknown): Record<string, string> {
  const fields = partOf(answer, 'fields');
  if (typeof fields !== 'object' || fields === null) return {};
  return Object.fromEntries(Object.entries(fields).filter(([, sentence]) => typeof sentence === 'string'));
}

function partOf(answer: unknown, name: string): unknown {
  if (typeof answer !== 'object' || answer === null) return undefined;
  return Object.entries(answer).find(([key]) => key === name)?.[1];
}

function unreachableWords(isOnline: boolean): string {
  if (!isOnline) return 'You are offline. What you wrote is kept here; send it when you are back.';
  return 'The shop gave no answer. What you wrote is kept here; send it again, it cannot arrive twice.';
}

/** For an answer that is not the door's own, as from a proxy in between. */
function statusWords(status: number, retryAfterSeconds: number): string {
  if (status === 401) return 'You are signed out. Sign in again; what you wrote is kept here.';
  if (status === 409) return 'Something changed in the meantime. Reload the page; what you wrote is kept here.';
  if (status === 413) return 'That is too long to send. Shorten it.';
  if (status === 429 || status === 502 || status === 503 || status === 504) {
    const wait = retryAfterSeconds > 0 ? `in ${retryAfterSeconds} seconds` : 'in a minute';
    return `The shop is busy just now. What you wrote is kept here; try again ${wait}.`;
  }
  return 'Something broke on our side. What you wrote is kept here; please try again.';
}
