import { and, desc, eq, gt, isNull, ne, sql } from 'drizzle-orm';
import { recordEvent } from './audit';
import { db, write } from '../client';
import { prepared } from '../prepared';
import { sessions, users } from '../schema';
import { hashToken } from '@/lib/auth/secrets';
import { sessionLimits } from '@/lib/auth/session-limits';
import { soundZone } from '@/lib/schedule/digest-times';
import type { Viewer } from '@/lib/viewer';

/** Idle time is written at most this often, so that reading a diary is not a stream of writes. */
const TOUCH_EVERY_MS = 5 * 60_000;

export type SessionViewer = Viewer & { sessionId: string; email: string; timeZoneAskedAt: number | null };

const liveSession = prepared((on) =>
  on
    .select({
      id: users.id,
      role: users.role,
      name: users.name,
      email: users.email,
      department: users.department,
      timeZone: users.timeZone,
      timeZoneAskedAt: users.timeZoneAskedAt,
      sessionId: sessions.id,
      lastSeenAt: sessions.lastSeenAt,
    })
    .from(sessions)
    .innerJoin(users, eq(users.id, sessions.userId))
    .where(
      and(
        eq(sessions.tokenHash, sql.placeholder('tokenHash')),
        gt(sessions.endsAt, sql.placeholder('nowMs')),
        gt(sessions.idleEndsAt, sql.placeholder('nowMs')),
        isNull(users.disabledAt),
      ),
    )
    .prepare(),
);

/** Whose session a cookie is, read afresh at every request; null when it is over, unknown, or its person is closed. */
export async function findSessionViewer(token: string, nowMs: number): Promise<SessionViewer | null> {
  const row = await liveSession().get({ tokenHash: hashToken(token), nowMs });
  if (!row) return null;
  const { lastSeenAt, timeZone, ...person } = row;
  const viewer = { ...person, timeZone: soundZone(timeZone) };
  if (nowMs - lastSeenAt > TOUCH_EVERY_MS) await touchSession(viewer, nowMs);
  return viewer;
}

function touchSession(viewer: SessionViewer, nowMs: number): Promise<unknown> {
  const idleEndsAt = nowMs + sessionLimits(viewer.role).idleMs;
  return write((tx) =>
    tx.update(sessions).set({ lastSeenAt: nowMs, idleEndsAt }).where(eq(sessions.id, viewer.sessionId)),
  );
}

/** The viewer's own live sessions, newest use first. */
export function listOwnSessions(viewer: Viewer, nowMs: number) {
  return db()
    .select({
      id: sessions.id,
      device: sessions.device,
      lastSeenAt: sessions.lastSeenAt,
      createdAt: sessions.createdAt,
    })
    .from(sessions)
    .where(and(eq(sessions.userId, viewer.id), gt(sessions.endsAt, nowMs), gt(sessions.idleEndsAt, nowMs)))
    .orderBy(desc(sessions.lastSeenAt))
    .limit(20);
}

export function endSession(viewer: SessionViewer, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await tx.delete(sessions).where(eq(sessions.id, viewer.sessionId));
    await recordEvent(tx, { actorId: viewer.id, action: 'signed_out' }, nowMs);
  });
}

/** Signs the viewer out everywhere but here. */
export function endOtherSessions(viewer: SessionViewer, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await tx.delete(sessions).where(and(eq(sessions.userId, viewer.id), ne(sessions.id, viewer.sessionId)));
    await recordEvent(tx, { actorId: viewer.id, action: 'sessions_ended', subjectId: viewer.id }, nowMs);
  });
}
