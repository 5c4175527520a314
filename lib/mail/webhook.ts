import { Resend } from 'resend';
import { z } from 'zod';
import { env } from '@/lib/env';

export const WEBHOOK_LIMIT_BYTES = 256 * 1024;

const providerId = z.string().regex(/^[\w-]{1,100}$/);
const address = z.string().max(1000);

const received = z.object({
  type: z.literal('email.received'),
  data: z.object({ email_id: providerId, from: address, to: z.array(address).max(200) }),
});

const delivery = z.object({
  type: z.enum(['email.delivered', 'email.bounced', 'email.complained', 'email.suppressed', 'email.failed']),
  created_at: z.string().max(60),
  data: z.object({
    email_id: providerId,
    bounce: z.object({ type: z.string().catch(''), message: z.string().catch('') }).optional(),
    failed: z.object({ reason: z.string().catch('') }).optional(),
  }),
});

const webhookEvent = z.discriminatedUnion('type', [received, delivery]);

export type DeliveryEvent = z.output<typeof delivery>;
export type ReceivedEvent = z.output<typeof received>;
/** What the provider tells, under the id that stays the same however often it is told. */
export type WebhookEvent = { id: string; event: DeliveryEvent | ReceivedEvent | null };

/**
 * Reads a webhook that the provider signed (Standard Webhooks: HMAC-SHA256 over id, time and the raw body, at most five
 * minutes old). `event` is null for one that we have no use for; the answer is null when the signature does not hold.
 */
export function readWebhook(body: string, headers: Headers): WebhookEvent | null {
  const webhookSecret = env().RESEND_WEBHOOK_SECRET;
  const [id, timestamp, signature] = ['svix-id', 'svix-timestamp', 'svix-signature'].map((name) => headers.get(name));
  if (!webhookSecret || !id || !timestamp || !signature || !/^[\w.-]{1,200}$/.test(id)) return null;
  const signed = { payload: body, headers: { id, timestamp, signature }, webhookSecret };
  try {
    const read = webhookEvent.safeParse(new Resend(env().RESEND_API_KEY).webhooks.verify(signed));
    return { id, event: read.success ? read.data : null };
  } catch {
    return null;
  }
}
