import { and, eq, inArray, isNull } from 'drizzle-orm';
import { staffOn } from './answerers';
import { lastNewsAt } from './floor';
import { unscopedForecastBasis, unscopedProgress } from './forecast-basis';
import { queueMail } from './outbox';
import { db, write, type Tx } from '../client';
import { correlated } from '../correlated';
import { builds, departments, quietReminders } from '../schema';
import { standOf } from '@/lib/floor/forecast';
import { stageOutlook } from '@/lib/floor/outlook';
import { dayOf } from '@/lib/schedule/calendar';
import { quietOf } from '@/lib/schedule/quiet';

/** The shop's day begins at eight for reminders, as for sign-offs. */
const MORNING_MS = 8 * 3_600_000;

type Quiet = { buildId: string; department: string; silentSinceAt: number; level: 1 | 2 };

/** The builds on the floor whose owner has seen nothing new for longer than their stage allows. */
async function quietBuilds(nowMs: number): Promise<Quiet[]> {
  const basis = await unscopedForecastBasis(nowMs);
  const rows = await db()
    .select({
      id: builds.id,
      routeId: builds.routeId,
      orderedAt: builds.orderedAt,
      lastNewsAt: correlated(lastNewsAt),
    })
    .from(builds)
    .where(and(isNull(builds.deliveredAt), isNull(builds.readyAt)));
  const progress = await unscopedProgress(rows.map(({ id }) => id));
  return rows.flatMap(({ id, routeId, orderedAt, lastNewsAt: newsAt }): Quiet[] => {
    const stand = standOf(progress.get(id)?.stages ?? []);
    const at = stand.now ?? stand.ahead[0];
    if (!at) return [];
    const silentSinceAt = newsAt ?? orderedAt;
    const { level } = quietOf({
      lastNewsOn: dayOf(silentSinceAt, basis.calendar.zone),
      longestSilenceDays: stageOutlook(basis.outlooks, routeId, at.key).silenceDays,
      today: basis.today,
    });
    return level === 0 ? [] : [{ buildId: id, department: at.department, silentSinceAt, level }];
  });
}

/** Who is to break a silence: first the builder whose stage it is, or else who leads the department; then the rep. */
async function listenerOf(tx: Tx, { buildId, department }: Quiet, level: 1 | 2, nowMs: number): Promise<string | null> {
  const staff = await staffOn(tx, buildId, nowMs);
  if (level === 2) return staff.find(({ role }) => role === 'rep')?.id ?? null;
  const holder = staff.find((person) => person.role === 'builder' && person.department === department);
  if (holder) return holder.id;
  const [lead] = await tx.select({ id: departments.leadId }).from(departments).where(eq(departments.key, department));
  return lead?.id ?? null;
}

async function remind(tx: Tx, quiet: Quiet, level: 1 | 2, nowMs: number): Promise<boolean> {
  const userId = await listenerOf(tx, quiet, level, nowMs);
  if (userId === null) return false;
  const { buildId, silentSinceAt } = quiet;
  await tx.insert(quietReminders).values({ buildId, silentSinceAt, level, userId, remindedAt: nowMs });
  const mail = { kind: 'quiet_build', userId, about: { buildId } } as const;
  await queueMail(tx, { ...mail, dedupeKey: `quiet_build/${buildId}/${silentSinceAt}/${level}` }, nowMs);
  return true;
}

/**
 * Reminds of every silence once: the holder of the stage when it is longer than the stage allows, the rep when it is
 * longer than twice that. Not before eight in the shop's morning.
 * @returns how many were reminded
 */
export async function queueQuietReminders(nowMs: number): Promise<number> {
  const { today, calendar } = await unscopedForecastBasis(nowMs);
  if (dayOf(nowMs - MORNING_MS, calendar.zone) !== today) return 0;
  const quiet = await quietBuilds(nowMs);
  if (quiet.length === 0) return 0;
  return write(async (tx) => {
    const ids = quiet.map(({ buildId }) => buildId);
    const before = await tx
      .select({
        buildId: quietReminders.buildId,
        silentSinceAt: quietReminders.silentSinceAt,
        level: quietReminders.level,
      })
      .from(quietReminders)
      .where(inArray(quietReminders.buildId, ids));
    const done = new Set(before.map((row) => `${row.buildId} ${row.silentSinceAt} ${row.level}`));
    let count = 0;
    for (const each of quiet)
      for (const level of [1, 2] as const)
        if (level <= each.level && !done.has(`${each.buildId} ${each.silentSinceAt} ${level}`))
          count += Number(await remind(tx, each, level, nowMs));
    return count;
  });
}
