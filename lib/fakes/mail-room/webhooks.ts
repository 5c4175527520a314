import { createHmac, randomUUID } from 'node:crypto';

export interface WebhookTarget {
  /** Where the program listens. */
  url: string;
  /** `whsec_` and the key in base64. */
  secret: string;
}

/** The three headers of a signed webhook (Standard Webhooks), as the service sends them. */
export function signWebhook(secret: string, body: string, id: string, now_ms: number): Record<string, string> {
  const timestamp = String(Math.floor(now_ms / 1_000));
  const key = Buffer.from(secret.replace(/^whsec_/, ''), 'base64');
  const signature = createHmac('sha256', key).update(`${id}.${timestamp}.${body}`).digest('base64');
  return { 'svix-id': id, 'svix-timestamp': timestamp, 'svix-signature': `v1,${signature}` };
}

/** Sends one event, signed. @returns the status of the answer, or 0 when there was none */
export async function sendWebhook(target: WebhookTarget, event: object, now_ms: number): Promise<number> {
  const body = JSON.stringify(event);
  const headers = {
    'content-type': 'application/json',
    ...signWebhook(target.secret, body, `msg_${randomUUID()}`, now_ms),
  };
  try {
    return (await fetch(target.url, { method: 'POST', headers, body })).status;
  } catch {
    return 0;
  }
}
