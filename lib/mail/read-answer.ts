import { z } from 'zod';

export type SendOutcome =
  | { outcome: 'sent'; id: string }
  | { outcome: 'retry'; reason: string; retryAfterMs?: number; unknown: boolean }
  | { outcome: 'refused'; reason: string };

// The SDK passes the provider's JSON on unread, whatever a proxy on the way put in its place.
const sentAnswer = z.object({ data: z.object({ id: z.string().min(1) }), error: z.null() });
const failedAnswer = z.object({
  error: z.object({
    name: z.string().catch('unnamed_error'),
    message: z.string().catch('no message'),
    statusCode: z.number().nullable().catch(null),
  }),
  headers: z.record(z.string(), z.string()).nullable().catch(null),
});

function retryAfterMs(headers: Record<string, string> | null): number | undefined {
  const seconds = headers?.['retry-after'];
  return seconds !== undefined && /^\d{1,6}$/.test(seconds) ? Number(seconds) * 1000 : undefined;
}

/**
 * What the SDK's answer means for the mail. No status code (connection lost, time ran out, unreadable answer), an error of
 * the provider's own (500 and up) and "the same key is being worked on" leave open whether the mail was taken; 429 says it
 * was not; every other refusal is final.
 */
export function readAnswer(answer: unknown): SendOutcome {
  const sent = sentAnswer.safeParse(answer);
  if (sent.success) return { outcome: 'sent', id: sent.data.data.id };
  const failed = failedAnswer.safeParse(answer);
  if (!failed.success)
    return { outcome: 'retry', reason: 'the provider gave an answer without a mail id', unknown: true };

  const { name, message, statusCode } = failed.data.error;
  const reason = `${statusCode ?? 'no status'} ${name}: ${message}`;
  const isOpen = statusCode === null || statusCode >= 500 || name === 'concurrent_idempotent_requests';
  if (!isOpen && statusCode !== 429) return { outcome: 'refused', reason };

  const waitMs = retryAfterMs(failed.data.headers);
  return { outcome: 'retry', reason, unknown: isOpen, ...(waitMs === undefined ? {} : { retryAfterMs: waitMs }) };
}
