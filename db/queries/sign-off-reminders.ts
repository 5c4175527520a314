import { and, asc, eq, isNull, lte } from 'drizzle-orm';
import { shopZone } from './calendar';
import { queueMail } from './outbox';
import { listOwnerIds } from './owners';
import { db, write, type Tx } from '../client';
import { signOffs } from '../schema';
import { dayOf } from '@/lib/schedule/calendar';
import { addDays } from '@/lib/schedule/days';
import { isReminderDue, REMINDER_DAYS } from '@/lib/sign-offs/reminder';

/** The shop's day begins at eight for reminders: nobody is woken by one. */
const MORNING_MS = 8 * 3_600_000;
const AT_ONCE = 100;

/** Queues the one reminder of every open sign-off whose time for it has come. @returns how many were queued */
export async function queueSignOffReminders(nowMs: number): Promise<number> {
  const due = (await listDue(nowMs)).slice(0, AT_ONCE);
  if (due.length > 0)
    await write(async (tx) => {
      for (const { id, buildId } of due) await remind(tx, id, buildId, nowMs);
    });
  return due.length;
}

async function listDue(nowMs: number) {
  const zone = await shopZone();
  const today = dayOf(nowMs - MORNING_MS, zone);
  const near = lte(signOffs.dueOn, addDays(today, REMINDER_DAYS));
  const open = await db()
    .select({ id: signOffs.id, buildId: signOffs.buildId, dueOn: signOffs.dueOn, askedAt: signOffs.askedAt })
    .from(signOffs)
    .where(and(eq(signOffs.state, 'asked'), isNull(signOffs.remindedAt), near))
    .orderBy(asc(signOffs.dueOn));
  return open.filter(({ dueOn, askedAt }) => isReminderDue({ dueOn, askedOn: dayOf(askedAt, zone) }, today));
}

async function remind(tx: Tx, signOffId: string, buildId: string, nowMs: number): Promise<void> {
  const stillOpen = and(eq(signOffs.id, signOffId), eq(signOffs.state, 'asked'), isNull(signOffs.remindedAt));
  const [marked] = await tx.update(signOffs).set({ remindedAt: nowMs }).where(stillOpen).returning({ id: signOffs.id });
  if (!marked) return;
  for (const userId of await listOwnerIds(tx, buildId)) {
    const mail = { kind: 'sign_off_reminder', userId, about: { signOffId } } as const;
    await queueMail(tx, { ...mail, dedupeKey: `sign_off_reminder/${signOffId}/${userId}` }, nowMs);
  }
}
