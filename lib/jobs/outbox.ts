import { attachPhotos } from './mail-photos';
import { prepareMail, type Prepared } from './prepare-mail';
import { beginTries, claimMails, settleMails, type ClaimedMail, type Ended, type Settled } from '@/db/queries/outbox';
import { env } from '@/lib/env';
import { log, logFault } from '@/lib/log';
import type { FrozenMail } from '@/lib/mail/kinds';
import { nextAttemptAt } from '@/lib/mail/retry-delay';
import { createSendGate, type SendGate } from '@/lib/mail/send-gate';
import { sendMail } from '@/lib/mail/send-mail';

const CLIENT_TIMEOUT_MS = 10_000;
const LEASE_MS = 60_000;
/** One lane writes mails while another waits for the provider. */
const LANES = 3;
const MAILS_A_TURN = 16;
/** What the provider takes from everybody; RESEND_BASE_URL is set where a stand-in takes its place. */
const PROVIDER_PER_SECOND = 2;

type Ready = Extract<Prepared, { is: 'ready' }>;

let gate: SendGate | undefined;

function sendGate(): SendGate {
  const { MAIL_AT_ONCE, MAIL_PER_SECOND, RESEND_BASE_URL } = env();
  const perSecond = MAIL_PER_SECOND ?? (RESEND_BASE_URL === undefined ? PROVIDER_PER_SECOND : undefined);
  gate ??= createSendGate(MAIL_AT_ONCE, perSecond, Date.now);
  return gate;
}

/** Sends what is due until nothing is. @returns how many tries were made */
export async function sendDueMail(owner: string, now: () => number): Promise<number> {
  const tries = await Promise.all(Array.from({ length: LANES }, () => runLane(owner, now)));
  return tries.reduce((sum, count) => sum + count, 0);
}

async function runLane(owner: string, now: () => number): Promise<number> {
  for (let tries = 0; ;) {
    const leaseEndsAt = now() + LEASE_MS;
    const mails = await claimMails(owner, now(), LEASE_MS, MAILS_A_TURN);
    if (mails.length === 0) return tries;
    await settleMails(owner, await tryMails(mails, { owner, now, leaseEndsAt }));
    tries += mails.length;
  }
}

type Turn = { owner: string; now: () => number; leaseEndsAt: number };

async function tryMails(mails: ClaimedMail[], turn: Turn): Promise<Ended[]> {
  const prepared = await Promise.all(mails.map((mail) => prepareOrWait(mail, turn)));
  const over = prepared.flatMap((each) => (each.is === 'over' ? [each] : []));
  const ready = prepared.flatMap((each) => (each.is === 'ready' ? [each] : []));
  const begun = await beginTries(turn.owner, ready, turn.now());
  const tried = await Promise.all(
    ready.filter(({ mail }) => begun.has(mail.id)).map((each) => sendGate()(() => trySending(each, turn))),
  );
  return [...over, ...tried.flatMap((each) => (each === null ? [] : [each]))];
}

/** A mail that cannot be written holds up none of the others: it is tried again, and failed for an admin to see. */
async function prepareOrWait(mail: ClaimedMail, { owner, now }: Turn): Promise<Prepared> {
  try {
    return await prepareMail(mail, owner, now());
  } catch (error) {
    logFault(error, { mail: mail.id });
    const problem = `it could not be written: ${error instanceof Error ? error.name : 'unknown'}`;
    return { is: 'over', mail, settled: later(mail, now(), problem) };
  }
}

/** Null when the lease could end before the provider answers: the mail is left to whoever claims it next. */
async function trySending({ mail, frozen }: Ready, { now, leaseEndsAt }: Turn): Promise<Ended | null> {
  if (now() + CLIENT_TIMEOUT_MS >= leaseEndsAt) return null;
  return { mail, settled: await send(mail, frozen, now) };
}

async function send(mail: ClaimedMail, frozen: FrozenMail, now: () => number): Promise<Settled> {
  const attachments = await attachPhotos(frozen).catch(() => null);
  if (!attachments) return later(mail, now(), 'its photos could not be read from the store');
  const { RESEND_API_KEY: apiKey, RESEND_BASE_URL: baseUrl, MAIL_FROM: from } = env();
  const { to, subject, html, text, headers, replyTo } = frozen;
  const message = { from, to, subject, html, text, headers, replyTo, attachments, idempotencyKey: mail.dedupeKey };
  const result = await sendMail(message, { apiKey, baseUrl }, CLIENT_TIMEOUT_MS);
  if (result.outcome === 'sent') return { state: 'sent', providerId: result.id, nowMs: now() };
  if (result.outcome === 'refused') return { state: 'failed', problem: result.reason };
  return later(mail, now(), result.reason, result.retryAfterMs);
}

function later(mail: ClaimedMail, nowMs: number, problem: string, retryAfterMs = 0): Settled {
  const attempt = mail.attempts + 1;
  const next = nextAttemptAt(attempt, nowMs, Math.random);
  log.warn({ mail: mail.id, attempt, problem }, 'mail not sent');
  if (next === null) return { state: 'failed', problem: `given up: ${problem}` };
  return { state: 'waiting', nextAttemptAt: Math.max(next, nowMs + retryAfterMs), problem };
}
