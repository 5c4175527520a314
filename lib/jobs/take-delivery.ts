import { applyDelivery, recordProviderEvent, type DeliveryNews } from '@/db/queries/provider-events';
import type { DeliveryEvent } from '@/lib/mail/webhook';

/** The provider may be faster than our own note of the id it gave: for so long an unknown mail is asked for again. */
const CATCH_UP_MS = 10 * 60_000;

type Fate = Pick<DeliveryNews, 'happened' | 'unreachable' | 'problem'>;

const short = (words: string) => words.replace(/\s+/g, ' ').slice(0, 300);

function fateOf({ type, data }: DeliveryEvent): Fate {
  if (type === 'email.delivered') return { happened: 'delivered' };
  if (type === 'email.complained')
    return { happened: 'complained', unreachable: 'complained', problem: 'its reader called it unwanted' };
  if (type === 'email.failed')
    return { happened: 'failed', problem: `the provider could not send it: ${short(data.failed?.reason ?? '')}` };
  // A mailbox that is full today is not gone: only what bounces for good stops mail.
  const isForGood = type === 'email.suppressed' || /^permanent$/i.test(data.bounce?.type ?? '');
  const problem = `it came back: ${short(data.bounce?.message ?? 'its address takes no mail')}`;
  return { happened: 'bounced', problem, ...(isForGood ? { unreachable: 'bounced' as const } : {}) };
}

/** Keeps what became of a mail. @returns false when the provider should tell it again later */
export async function takeDelivery(id: string, event: DeliveryEvent, nowMs: number): Promise<boolean> {
  const news = { id, kind: event.type, providerId: event.data.email_id, ...fateOf(event) };
  if (await applyDelivery(news, nowMs)) return true;
  const ageMs = nowMs - Date.parse(event.created_at);
  if (ageMs >= 0 && ageMs < CATCH_UP_MS) return false;
  await recordProviderEvent({ id, kind: event.type, outcome: 'unknown', note: 'No mail of ours has this id.' }, nowMs);
  return true;
}
