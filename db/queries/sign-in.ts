import { and, count, desc, eq, gt, isNotNull, isNull, lt, sql } from 'drizzle-orm';
import { recordEvent } from './audit';
import { takeFromLimit } from './rate-limits';
import { db, write, type Tx } from '../client';
import { newId } from '../schema/columns';
import { outbox, sessions, signInLinks, users } from '../schema';
import { hashMailedToken, hashToken, keyedHash, newToken } from '@/lib/auth/secrets';
import { SIGN_IN_CODE_TRIES, SIGN_IN_LINK_MS, sessionLimits } from '@/lib/auth/session-limits';
import type { Role } from '@/lib/access';

type Ask = { address: string | null; peer: string; browser: string; token: string; code: string; nowMs: number };

/**
 * Writes down that somebody asked for a link. The same work is done for an unknown address, a closed account and a
 * known one; only the last gets a mail, and older links of the person die.
 */
export function askForLink({ address, peer, browser, token, code, nowMs }: Ask): Promise<void> {
  return write(async (tx) => {
    const allowed = await isWithinLimits(tx, address ?? 'unreadable', peer, nowMs);
    const [user] = await tx
      .select({ id: users.id })
      .from(users)
      .where(and(eq(users.email, address ?? ''), isNull(users.disabledAt)));
    const userId = allowed ? (user?.id ?? null) : null;
    await tx.delete(signInLinks).where(eq(signInLinks.userId, userId ?? 'nobody'));
    const linkId = newId();
    await tx.insert(signInLinks).values({
      id: linkId,
      userId,
      tokenHash: hashMailedToken(token),
      codeHash: keyedHash('sign-in code', `${linkId} ${code}`),
      browserHash: hashToken(browser),
      expiresAt: nowMs + SIGN_IN_LINK_MS,
      createdAt: nowMs,
    });
    if (!userId) return;
    await tx.insert(outbox).values({
      kind: 'sign_in',
      userId,
      about: { signIn: { linkId, token, code } },
      state: 'waiting',
      dedupeKey: `sign-in/${linkId}`,
      nextAttemptAt: nowMs,
      createdAt: nowMs,
    });
  });
}

async function isWithinLimits(tx: Tx, address: string, peer: string, nowMs: number): Promise<boolean> {
  const who = keyedHash('address', address);
  const waits = [
    await takeFromLimit(tx, 'sign_in_peer', peer, nowMs),
    await takeFromLimit(tx, 'sign_in_address', who, nowMs),
    await takeFromLimit(tx, 'sign_in_address_day', who, nowMs),
  ];
  return waits.every((seconds) => seconds === 0);
}

export type Claim = { email: string; token: string };
type ClaimResult =
  { ok: true; claim: Claim } | { ok: false; why: 'expired' | 'other_browser' | 'wrong_code' | 'too_many' };

const live = (nowMs: number) => and(gt(signInLinks.expiresAt, nowMs), isNull(signInLinks.claimedAt));

/**
 * Turns a link into the right to one session: by its token in the browser that asked, or there by the code from the
 * mail. A claimed link gets a fresh token, so that what stood in the mail is worthless from then on.
 */
export function claimLink(
  presented: { token: string } | { code: string },
  browser: string,
  peer: string,
  nowMs: number,
): Promise<ClaimResult> {
  return write(async (tx): Promise<ClaimResult> => {
    if (await takeFromLimit(tx, 'sign_in_open', peer, nowMs)) return { ok: false, why: 'too_many' };
    const found =
      'token' in presented ? await findByToken(tx, presented.token, nowMs) : await findByBrowser(tx, browser, nowMs);
    if (!found?.userId) return { ok: false, why: 'token' in presented ? 'expired' : 'wrong_code' };
    if (found.browserHash !== hashToken(browser)) return { ok: false, why: 'other_browser' };
    if ('code' in presented && !(await codeFits(tx, found, presented.code))) return { ok: false, why: 'wrong_code' };
    return claim(tx, found.id, nowMs);
  });
}

type Link = typeof signInLinks.$inferSelect;

async function findByToken(tx: Tx, token: string, nowMs: number): Promise<Link | undefined> {
  const [link] = await tx
    .select()
    .from(signInLinks)
    .where(and(eq(signInLinks.tokenHash, hashMailedToken(token)), live(nowMs)));
  return link;
}

async function findByBrowser(tx: Tx, browser: string, nowMs: number): Promise<Link | undefined> {
  const [link] = await tx
    .select()
    .from(signInLinks)
    .where(and(eq(signInLinks.browserHash, hashToken(browser)), live(nowMs)))
    .orderBy(desc(signInLinks.createdAt))
    .limit(1);
  return link;
}

async function codeFits(tx: Tx, link: Link, code: string): Promise<boolean> {
  const tried = await tx
    .update(signInLinks)
    .set({ codeTries: sql`${signInLinks.codeTries} + 1` })
    .where(and(eq(signInLinks.id, link.id), lt(signInLinks.codeTries, SIGN_IN_CODE_TRIES)))
    .returning({ id: signInLinks.id });
  return tried.length === 1 && link.codeHash === keyedHash('sign-in code', `${link.id} ${code}`);
}

async function claim(tx: Tx, linkId: string, nowMs: number): Promise<ClaimResult> {
  const token = newToken();
  const [claimed] = await tx
    .update(signInLinks)
    .set({ claimedAt: nowMs, tokenHash: hashMailedToken(token) })
    .where(and(eq(signInLinks.id, linkId), live(nowMs)))
    .returning({ userId: signInLinks.userId });
  if (!claimed?.userId) return { ok: false, why: 'expired' };
  const [user] = await tx.select({ email: users.email }).from(users).where(eq(users.id, claimed.userId));
  return user ? { ok: true, claim: { email: user.email, token } } : { ok: false, why: 'expired' };
}

/** The adapter's last step: the link is deleted, and only a claimed one counts. */
export function consumeClaimedLink(email: string, tokenHash: string, nowMs: number): Promise<boolean> {
  return write(async (tx) => {
    const [user] = await tx.select({ id: users.id }).from(users).where(eq(users.email, email));
    if (!user) return false;
    const consumed = await tx
      .delete(signInLinks)
      .where(
        and(
          eq(signInLinks.userId, user.id),
          eq(signInLinks.tokenHash, tokenHash),
          isNotNull(signInLinks.claimedAt),
          gt(signInLinks.expiresAt, nowMs),
        ),
      )
      .returning({ id: signInLinks.id });
    return consumed.length === 1;
  });
}

/** The adapter's view of a person; null when there is none or the account is closed. */
export async function findSignInUser(by: { id: string } | { email: string }) {
  const which = 'id' in by ? eq(users.id, by.id) : eq(users.email, by.email);
  const [user] = await db()
    .select({ id: users.id, email: users.email, name: users.name, role: users.role, verifiedAt: users.emailVerifiedAt })
    .from(users)
    .where(and(which, isNull(users.disabledAt)));
  return user ?? null;
}

type NewSession = { userId: string; token: string; replaces: string | null; device: string; nowMs: number };

/** Starts a session and ends the one that the same browser had. @returns when it ends at the latest, UTC ms */
export function startSession({ userId, token, replaces, device, nowMs }: NewSession): Promise<number> {
  return write(async (tx) => {
    const [user] = await tx
      .update(users)
      .set({ emailVerifiedAt: nowMs })
      .where(and(eq(users.id, userId), isNull(users.disabledAt)))
      .returning({ role: users.role });
    if (!user) throw new Error('a session for nobody');
    const { idleMs, absoluteMs } = sessionLimits(user.role satisfies Role);
    if (replaces) await tx.delete(sessions).where(eq(sessions.tokenHash, hashToken(replaces)));
    const endsAt = nowMs + absoluteMs;
    const row = { userId, tokenHash: hashToken(token), device, lastSeenAt: nowMs, idleEndsAt: nowMs + idleMs, endsAt };
    await tx.insert(sessions).values(row);
    await recordEvent(tx, { actorId: userId, action: 'signed_in' }, nowMs);
    return endsAt;
  });
}

/** Links and sessions that are over. */
export function purgeExpiredSignIns(nowMs: number): Promise<number> {
  return write(async (tx) => {
    await tx.delete(signInLinks).where(lt(signInLinks.expiresAt, nowMs));
    await tx.delete(sessions).where(lt(sessions.endsAt, nowMs));
    await tx.delete(sessions).where(lt(sessions.idleEndsAt, nowMs));
    const [left] = await tx.select({ n: count() }).from(sessions);
    return left?.n ?? 0;
  });
}
