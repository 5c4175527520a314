import { and, count, desc, eq, inArray, lt, lte, or, sql } from 'drizzle-orm';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { outbox, users } from '../schema';
import { Denied, OutOfReach } from '@/lib/errors';
import type { FrozenMail, MailAbout, MailKind } from '@/lib/mail/kinds';
import type { Viewer } from '@/lib/viewer';

type NewMail = { kind: MailKind; userId: string; about: MailAbout; dedupeKey: string };

/** Writes a mail to be sent, in the transaction of what it tells of. The same dedupe key writes nothing twice. */
export async function queueMail(tx: Tx, mail: NewMail, nowMs: number): Promise<void> {
  await tx
    .insert(outbox)
    .values({ ...mail, state: 'waiting', nextAttemptAt: nowMs, createdAt: nowMs })
    .onConflictDoNothing({ target: outbox.dedupeKey });
}

export type ClaimedMail = {
  id: string;
  kind: MailKind;
  userId: string;
  about: MailAbout;
  dedupeKey: string;
  frozen: FrozenMail | null;
  attempts: number;
  firstAttemptAt: number | null;
};

/**
 * Takes the next mail that is due, or one whose sender died, for `leaseMs`; null when there is none. The lease is
 * longer than the client's time-out, so that no two senders try at once.
 */
export function claimMail(owner: string, nowMs: number, leaseMs: number): Promise<ClaimedMail | null> {
  return write(async (tx) => {
    const due = and(eq(outbox.state, 'waiting'), lte(outbox.nextAttemptAt, nowMs));
    const abandoned = and(eq(outbox.state, 'sending'), lt(outbox.leaseEndsAt, nowMs));
    const next = tx
      .select({ id: outbox.id })
      .from(outbox)
      .where(or(due, abandoned))
      .orderBy(outbox.nextAttemptAt)
      .limit(1);
    const [claimed] = await tx
      .update(outbox)
      .set({
        state: 'sending',
        leaseOwner: owner,
        leaseEndsAt: nowMs + leaseMs,
        attempts: sql`${outbox.attempts} + 1`,
        firstAttemptAt: sql`coalesce(${outbox.firstAttemptAt}, ${nowMs})`,
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
    return claimed ?? null;
  });
}

const held = (mailId: string, owner: string) =>
  and(eq(outbox.id, mailId), eq(outbox.leaseOwner, owner), eq(outbox.state, 'sending'));

/** Keeps the bytes before the first try: from here on every try sends the same. */
export function freezeMail(mailId: string, owner: string, frozen: FrozenMail): Promise<boolean> {
  return write(async (tx) => {
    const kept = await tx.update(outbox).set({ frozen }).where(held(mailId, owner)).returning({ id: outbox.id });
    return kept.length === 1;
  });
}

type Settled =
  | { state: 'sent'; providerId: string; nowMs: number }
  | { state: 'waiting'; nextAttemptAt: number; problem: string }
  | { state: 'failed' | 'parked' | 'dropped'; problem: string };

const free = { leaseOwner: null, leaseEndsAt: null };

/** What is over keeps no secret of a sign-in link. */
const ended = ({ kind }: Pick<ClaimedMail, 'kind'>) =>
  kind === 'sign_in' ? { ...free, about: {}, frozen: null } : free;

/** Ends one try. Secrets of a sign-in mail go with its last one. */
export function settleMail(mail: Pick<ClaimedMail, 'id' | 'kind'>, owner: string, settled: Settled): Promise<void> {
  return write(async (tx) => {
    const outcome =
      settled.state === 'sent'
        ? { state: settled.state, providerId: settled.providerId, sentAt: settled.nowMs, lastProblem: null }
        : settled.state === 'waiting'
          ? { state: settled.state, nextAttemptAt: settled.nextAttemptAt, lastProblem: settled.problem }
          : { state: settled.state, lastProblem: settled.problem };
    await tx
      .update(outbox)
      .set({ ...outcome, ...(settled.state === 'waiting' ? free : ended(mail)) })
      .where(held(mail.id, owner));
  });
}

/** Drops a mail whose reader lost the right to part of it, and writes one about the rest under a new key. */
export function replaceMail(mail: ClaimedMail, owner: string, about: MailAbout, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await tx
      .update(outbox)
      .set({ state: 'dropped', lastProblem: 'part of it may no longer be read', ...ended(mail) })
      .where(held(mail.id, owner));
    const { kind, userId } = mail;
    await queueMail(tx, { kind, userId, about, dedupeKey: `${mail.dedupeKey}+` }, nowMs);
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

/** For the admin: how much mail is in which state, and the mail that waits for another try, failed or was parked, with why. No texts. */
export async function listMailProblems(viewer: Viewer) {
  await requireCan(viewer, 'mail.watch');
  const counts = await db().select({ state: outbox.state, n: count() }).from(outbox).groupBy(outbox.state);
  const troubled = await db()
    .select({
      id: outbox.id,
      kind: outbox.kind,
      state: outbox.state,
      attempts: outbox.attempts,
      problem: outbox.lastProblem,
      createdAt: outbox.createdAt,
      nextAttemptAt: outbox.nextAttemptAt,
      person: users.name,
    })
    .from(outbox)
    .innerJoin(users, eq(users.id, outbox.userId))
    .where(
      or(inArray(outbox.state, ['failed', 'parked']), and(eq(outbox.state, 'waiting'), sql`${outbox.attempts} > 0`)),
    )
    .orderBy(desc(outbox.createdAt))
    .limit(50);
  return { counts, troubled };
}

export type TroubledMail = Awaited<ReturnType<typeof listMailProblems>>['troubled'][number];
