import { and, eq, gt, gte, inArray, lt, lte, ne, or, sql } from 'drizzle-orm';
import { findChoice } from './mail-choices';
import { addNews, hastenNews } from './news';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { outbox } from '../schema';
import { Denied, OutOfReach } from '@/lib/errors';
import type { FrozenMail, MailAbout, MailKind } from '@/lib/mail/kinds';
import type { Viewer } from '@/lib/viewer';

type NewMail = {
  kind: MailKind;
  userId: string;
  about: MailAbout;
  dedupeKey: string;
  /** Not sent before this moment: what it tells of may still change. */
  notBeforeAt?: number;
};

/**
 * Tells somebody of something in the way they chose for its kind: by a mail of its own, in their next digest, or not at
 * all; written in the transaction of what it tells of. The same dedupe key tells nothing twice.
 */
export async function queueMail(tx: Tx, mail: NewMail, nowMs: number): Promise<void> {
  const { kind, userId } = mail;
  const choice = await findChoice(tx, userId, kind);
  if (choice === 'at_once') await insertMail(tx, mail, nowMs);
  if (choice === 'digest') await addNews(tx, mail, nowMs);
}

/** Writes a mail whatever its reader chose: the digest itself, and what an admin sends again. */
export async function insertMail(tx: Tx, { notBeforeAt = 0, ...mail }: NewMail, nowMs: number): Promise<void> {
  await tx
    .insert(outbox)
    .values({ ...mail, state: 'waiting', nextAttemptAt: Math.max(nowMs, notBeforeAt), createdAt: nowMs })
    .onConflictDoNothing({ target: outbox.dedupeKey });
}

/** Lets a mail, or a piece of a digest's news, that waits for its time go now. */
export async function hastenMail(tx: Tx, dedupeKey: string, nowMs: number): Promise<void> {
  const waiting = and(eq(outbox.dedupeKey, dedupeKey), eq(outbox.state, 'waiting'), gt(outbox.nextAttemptAt, nowMs));
  await tx.update(outbox).set({ nextAttemptAt: nowMs }).where(waiting);
  await hastenNews(tx, dedupeKey, nowMs);
}

export type ClaimedMail = {
  id: string;
  kind: MailKind;
  userId: string;
  about: MailAbout;
  dedupeKey: string;
  frozen: FrozenMail | null;
  /** Tries made before this one. */
  attempts: number;
  firstAttemptAt: number | null;
};

/**
 * Takes the mails that are due next, or whose sender died, for `leaseMs`. No try begins so late that it could last
 * longer than the lease, so that no two senders try at once.
 */
export function claimMails(owner: string, nowMs: number, leaseMs: number, limit: number): Promise<ClaimedMail[]> {
  return write(async (tx) => {
    const due = and(eq(outbox.state, 'waiting'), lte(outbox.nextAttemptAt, nowMs));
    const abandoned = and(eq(outbox.state, 'sending'), lt(outbox.leaseEndsAt, nowMs));
    const next = tx
      .select({ id: outbox.id })
      .from(outbox)
      .where(or(due, abandoned))
      .orderBy(outbox.nextAttemptAt)
      .limit(limit);
    return tx
      .update(outbox)
      .set({
        state: 'sending',
        leaseOwner: owner,
        leaseEndsAt: nowMs + leaseMs,
      })
      .where(inArray(outbox.id, next))
      .returning({
        id: outbox.id,
        kind: outbox.kind,
        userId: outbox.userId,
        about: outbox.about,
        dedupeKey: outbox.dedupeKey,
        frozen: outbox.frozen,
        attempts: outbox.attempts,
        firstAttemptAt: outbox.firstAttemptAt,
      });
  });
}

const held = (mailId: string, owner: string) =>
  and(eq(outbox.id, mailId), eq(outbox.leaseOwner, owner), eq(outbox.state, 'sending'));

type Beginning = { mail: Pick<ClaimedMail, 'id' | 'attempts' | 'frozen'>; frozen: FrozenMail };

/**
 * Counts a try of each of these mails before it is made, and keeps the bytes of a first one: from here on every try sends
 * the same. A sender that dies before this has tried nothing.
 * @returns the ids of those that the sender still holds
 */
export function beginTries(owner: string, mails: Beginning[], nowMs: number): Promise<Set<string>> {
  return write(async (tx) => {
    const kept = new Set<string>();
    for (const { mail, frozen } of mails) {
      const firstAttemptAt = sql`coalesce(${outbox.firstAttemptAt}, ${nowMs})`;
      const begun = { attempts: mail.attempts + 1, firstAttemptAt, ...(mail.frozen ? {} : { frozen }) };
      const [row] = await tx.update(outbox).set(begun).where(held(mail.id, owner)).returning({ id: outbox.id });
      if (row) kept.add(row.id);
    }
    return kept;
  });
}

export type Settled =
  | { state: 'sent'; providerId: string; nowMs: number }
  | { state: 'waiting'; nextAttemptAt: number; problem: string }
  /** Not tried at all: it waits for a better hour. */
  | { state: 'postponed'; untilMs: number }
  | { state: 'failed' | 'parked' | 'dropped'; problem: string };

export type Ended = { mail: Pick<ClaimedMail, 'id' | 'kind' | 'attempts'>; settled: Settled };

const free = { leaseOwner: null, leaseEndsAt: null };

/** What is over keeps no secret of a sign-in link. */
const ended = ({ kind }: Pick<ClaimedMail, 'kind'>) =>
  kind === 'sign_in' ? { ...free, about: {}, frozen: null } : free;

function outcomeOf(mail: Ended['mail'], settled: Settled) {
  const attempts = mail.attempts + 1;
  if (settled.state === 'postponed') return { ...free, state: 'waiting' as const, nextAttemptAt: settled.untilMs };
  if (settled.state === 'waiting')
    return {
      ...free,
      state: settled.state,
      attempts,
      nextAttemptAt: settled.nextAttemptAt,
      lastProblem: settled.problem,
    };
  const { state } = settled;
  if (state === 'sent')
    return {
      ...ended(mail),
      state,
      attempts,
      providerId: settled.providerId,
      sentAt: settled.nowMs,
      lastProblem: null,
    };
  return { ...ended(mail), state, lastProblem: settled.problem, ...(state === 'failed' ? { attempts } : {}) };
}

/** Ends one try of each of these mails. Secrets of a sign-in mail go with its last one. */
export function settleMails(owner: string, mails: Ended[]): Promise<void> {
  return write(async (tx) => {
    for (const { mail, settled } of mails)
      await tx.update(outbox).set(outcomeOf(mail, settled)).where(held(mail.id, owner));
  });
}

/** Whether another sign-in mail to this person was tried since; somebody whose mail bounces gets one a day. */
export async function wasSignInTried({ id, userId }: ClaimedMail, sinceMs: number): Promise<boolean> {
  const [row] = await db()
    .select({ id: outbox.id })
    .from(outbox)
    .where(and(eq(outbox.userId, userId), eq(outbox.kind, 'sign_in'), ne(outbox.id, id), gte(outbox.sentAt, sinceMs)))
    .limit(1);
  return row !== undefined;
}

/** Drops a mail whose reader lost the right to part of it, and writes one about the rest under a new key. */
export function replaceMail(mail: ClaimedMail, owner: string, about: MailAbout, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await tx
      .update(outbox)
      .set({ state: 'dropped', lastProblem: 'part of it may no longer be read', ...ended(mail) })
      .where(held(mail.id, owner));
    const { kind, userId } = mail;
    await insertMail(tx, { kind, userId, about, dedupeKey: `${mail.dedupeKey}+` }, nowMs);
  });
}

/**
 * Puts a failed mail in the queue again, with the same bytes and key. One that was given up keeps its first try: its
 * answers were lost, so a day after that it is parked rather than perhaps delivered twice. A refused one starts afresh.
 * @throws Denied for a mail that must not be sent again
 */
export function retryMail(viewer: Viewer, mailId: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'mail.watch');
    const [mail] = await tx
      .select({ kind: outbox.kind, state: outbox.state })
      .from(outbox)
      .where(eq(outbox.id, mailId));
    if (!mail) throw new OutOfReach();
    if (mail.state === 'parked')
      throw new Denied('conflict', 'This mail may have arrived. Sent again, it could come twice, so it stays here.');
    if (mail.state !== 'failed')
      throw new Denied('conflict', 'Only a mail that failed is sent again; this one did not.');
    if (mail.kind === 'sign_in')
      throw new Denied('conflict', 'Its link is dead by now. Its reader asks for a new one at the sign-in page.');
    const firstAttemptAt = sql`case when ${outbox.lastProblem} like 'given up:%' then ${outbox.firstAttemptAt} end`;
    await tx
      .update(outbox)
      .set({ state: 'waiting', attempts: 0, nextAttemptAt: nowMs, firstAttemptAt })
      .where(eq(outbox.id, mailId));
  });
}

/**
 * Writes a mail anew that went out, was dropped or was parked, as its reader may have it now, under a new key: it may
 * then come twice, which the admin who asks for it knows.
 * @throws OutOfReach, or Denied for a mail that still waits, and for a sign-in link, which is dead
 */
export function sendAgain(viewer: Viewer, mailId: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'mail.watch');
    const [mail] = await tx.select().from(outbox).where(eq(outbox.id, mailId));
    if (!mail) throw new OutOfReach();
    const { kind, userId, about, state } = mail;
    if (kind === 'sign_in')
      throw new Denied('conflict', 'Its link is dead by now. Its reader asks for a new one at the sign-in page.');
    if (state === 'waiting' || state === 'sending')
      throw new Denied('conflict', 'This mail is still on its way. It goes out by itself.');
    await insertMail(tx, { kind, userId, about, dedupeKey: `again/${mailId}/${nowMs}` }, nowMs);
  });
}
