import { composeMail } from './compose-mail';
import { findMailReader } from '@/db/queries/mail-content';
import { claimMail, freezeMail, settleMail, replaceMail, type ClaimedMail } from '@/db/queries/outbox';
import { env } from '@/lib/env';
import { log } from '@/lib/log';
import type { FrozenMail } from '@/lib/mail/kinds';
import { nextAttemptAt } from '@/lib/mail/retry-delay';
import { sendMail, type MailAttachment } from '@/lib/mail/send-mail';
import { readObject } from '@/lib/storage';

const CLIENT_TIMEOUT_MS = 10_000;
const LEASE_MS = 60_000;
/** As long as the provider remembers an idempotency key; later an unknown outcome may have been a delivery. */
const KEY_REMEMBERED_MS = 24 * 3_600_000;

/** Sends what is due, one mail after another, until nothing is. @returns how many tries were made */
export async function sendDueMail(owner: string, now: () => number): Promise<number> {
  for (let tries = 0; ; tries++) {
    const mail = await claimMail(owner, now(), LEASE_MS);
    if (!mail) return tries;
    await tryMail(mail, owner, now);
  }
}

async function tryMail(mail: ClaimedMail, owner: string, now: () => number): Promise<void> {
  if (mail.firstAttemptAt !== null && now() - mail.firstAttemptAt > KEY_REMEMBERED_MS) {
    await settleMail(mail, owner, { state: 'parked', problem: 'for a day nobody said whether it went out' });
    return;
  }
  const reader = await findMailReader(mail.userId);
  const current = reader && (await composeMail(mail, reader, now()));
  if (!current) {
    await settleMail(mail, owner, { state: 'dropped', problem: 'its reader may no longer read it' });
    return;
  }
  const frozen = mail.frozen ?? current;
  if (mail.frozen && !saysTheSame(mail.frozen, current)) {
    await replaceMail(mail, owner, mail.about, now());
    return;
  }
  if (!mail.frozen && !(await freezeMail(mail.id, owner, frozen))) return;
  await send(mail, frozen, owner, now);
}

/** Rights, addresses and entries are looked at again before every try: frozen bytes go out only while all still holds. */
function saysTheSame(frozen: FrozenMail, current: FrozenMail): boolean {
  return frozen.to === current.to && frozen.text === current.text && frozen.photos.length === current.photos.length;
}

async function send(mail: ClaimedMail, frozen: FrozenMail, owner: string, now: () => number): Promise<void> {
  const attachments = await attach(frozen).catch(() => null);
  if (!attachments) return tryLater(mail, owner, now(), 'its photos could not be read from the store');
  const { RESEND_API_KEY: apiKey, RESEND_BASE_URL: baseUrl, MAIL_FROM: from } = env();
  const { to, subject, html, text, headers } = frozen;
  const message = { from, to, subject, html, text, headers, attachments, idempotencyKey: mail.dedupeKey };
  const result = await sendMail(message, { apiKey, baseUrl }, CLIENT_TIMEOUT_MS);
  if (result.outcome === 'sent') return settleMail(mail, owner, { state: 'sent', providerId: result.id, nowMs: now() });
  if (result.outcome === 'refused') return settleMail(mail, owner, { state: 'failed', problem: result.reason });
  return tryLater(mail, owner, now(), result.reason, result.retryAfterMs);
}

async function attach(frozen: FrozenMail): Promise<MailAttachment[]> {
  return Promise.all(
    frozen.photos.map(async ({ key, contentId }) => ({
      filename: `${contentId}.jpg`,
      content: await readObject(key),
      contentType: 'image/jpeg',
      contentId,
    })),
  );
}

async function tryLater(
  mail: ClaimedMail,
  owner: string,
  nowMs: number,
  problem: string,
  retryAfterMs = 0,
): Promise<void> {
  const next = nextAttemptAt(mail.attempts, nowMs, Math.random);
  log.warn({ mail: mail.id, attempt: mail.attempts, problem }, 'mail not sent');
  if (next === null) return settleMail(mail, owner, { state: 'failed', problem: `given up: ${problem}` });
  return settleMail(mail, owner, { state: 'waiting', nextAttemptAt: Math.max(next, nowMs + retryAfterMs), problem });
}
