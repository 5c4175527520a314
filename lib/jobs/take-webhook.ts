import { takeDelivery } from './take-delivery';
import { takeReply } from './take-reply';
import { recordProviderEvent } from '@/db/queries/provider-events';
import { logFault } from '@/lib/log';
import type { WebhookEvent } from '@/lib/mail/webhook';

/** Does what a checked webhook asks for. @returns false when the provider should send it again later */
export async function takeWebhook({ id, event }: WebhookEvent, nowMs: number): Promise<boolean> {
  try {
    if (event === null) {
      await recordProviderEvent({ id, kind: 'other', outcome: 'ignored' }, nowMs);
      return true;
    }
    if (event.type !== 'email.received') return await takeDelivery(id, event, nowMs);
    await takeReply(id, event, nowMs);
    return true;
  } catch (error) {
    logFault(error, { webhook: id });
    return false;
  }
}
