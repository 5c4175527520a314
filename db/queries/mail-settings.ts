import { and, eq, isNull, sql } from 'drizzle-orm';
import { db, write } from '../client';
import { diaryEvents, mailSettings, users } from '../schema';
import { isStaffRole } from '@/lib/access';
import { isZone, nextDigestAt, type DigestPlan } from '@/lib/schedule/digest-times';
import type { Viewer } from '@/lib/viewer';

export type MailWish = Omit<DigestPlan, 'zone'> & {
  /** Hours on the reader's clock between which nothing but sign-in links is mailed; left out: as they were. */
  quietFromHour?: number | null;
  quietToHour?: number | null;
};

/** How a person's words are written: dates by the locale, measures in inches or millimetres. */
export type Wording = { locale: string; units: 'in' | 'mm' };

/** Clients get their diary once a week; staff what waits on them, each morning. */
export function usualWish(role: Viewer['role']): MailWish {
  return { cadence: isStaffRole(role) ? 'daily' : 'weekly', hourLocal: 8, weekday: 5 };
}

/** How the viewer gets the diary by mail. */
export async function findMailSettings(viewer: Viewer) {
  const [row] = await db()
    .select({
      cadence: mailSettings.cadence,
      hourLocal: mailSettings.hourLocal,
      weekday: mailSettings.weekday,
      quietFromHour: mailSettings.quietFromHour,
      quietToHour: mailSettings.quietToHour,
      nextDigestAt: mailSettings.nextDigestAt,
    })
    .from(mailSettings)
    .where(eq(mailSettings.userId, viewer.id));
  return row ?? { ...usualWish(viewer.role), nextDigestAt: null };
}

/** The newest event there is; what came before a reader is old news to them. */
export const lastSeq = sql<number>`(select coalesce(max(${diaryEvents.seq}), 0) from ${diaryEvents})`;

/** Between which events the viewer's next digest lies. Without settings nothing is old news yet, and nothing new. */
export async function findCursor(viewer: Viewer): Promise<{ toldSeq: number; upToSeq: number }> {
  const [row] = await db()
    .select({ toldSeq: mailSettings.toldSeq, upToSeq: lastSeq })
    .from(mailSettings)
    .where(eq(mailSettings.userId, viewer.id));
  return row ?? { toldSeq: 0, upToSeq: 0 };
}

/**
 * Saves when the viewer wants mail, and where they are. What happened before the first wish, or while they wanted none,
 * is not mailed.
 */
export function saveMailSettings(viewer: Viewer, wish: MailWish, zone: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    await tx.update(users).set({ timeZone: zone, timeZoneAskedAt: nowMs }).where(eq(users.id, viewer.id));
    const row = { ...wish, nextDigestAt: nextDigestAt({ ...wish, zone }, nowMs) };
    await tx
      .insert(mailSettings)
      .values({ userId: viewer.id, ...row, toldSeq: lastSeq })
      .onConflictDoUpdate({
        target: mailSettings.userId,
        set: {
          ...row,
          toldSeq: sql`case when ${mailSettings.cadence} = 'none' then ${lastSeq} else ${mailSettings.toldSeq} end`,
        },
      });
  });
}

/** How the viewer has words written; `lostZone` is their time zone when no clock of this machine knows it any more. */
export async function findWording(viewer: Viewer): Promise<Wording & { lostZone: string | null }> {
  const [row] = await db()
    .select({ locale: users.locale, units: users.units, zone: users.timeZone })
    .from(users)
    .where(eq(users.id, viewer.id));
  const { locale = 'en-GB', units = 'in', zone = 'UTC' } = row ?? {};
  return { locale, units, lostZone: isZone(zone) ? null : zone };
}

export function saveWording(viewer: Viewer, wording: Wording): Promise<void> {
  return write(async (tx) => {
    await tx.update(users).set(wording).where(eq(users.id, viewer.id));
  });
}

/** Ends the diary mails of one person; sign-in and answers to their own questions still come. */
export function unsubscribe(userId: string): Promise<boolean> {
  return write(async (tx) => {
    const stopped = await tx
      .update(mailSettings)
      .set({ cadence: 'none', nextDigestAt: null })
      .where(eq(mailSettings.userId, userId))
      .returning({ userId: mailSettings.userId });
    return stopped.length === 1;
  });
}

/** Takes the browser's zone once, for somebody who has not chosen one. */
export function adoptTimeZone(viewer: Viewer, zone: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const [adopted] = await tx
      .update(users)
      .set({ timeZone: zone, timeZoneAskedAt: nowMs })
      .where(and(eq(users.id, viewer.id), isNull(users.timeZoneAskedAt)))
      .returning({ id: users.id });
    if (!adopted) return;
    const [settings] = await tx.select().from(mailSettings).where(eq(mailSettings.userId, viewer.id));
    if (!settings || settings.cadence === 'none') return;
    await tx
      .update(mailSettings)
      .set({ nextDigestAt: nextDigestAt({ ...settings, zone }, nowMs) })
      .where(eq(mailSettings.userId, viewer.id));
  });
}
