import { eq } from 'drizzle-orm';
import { unscopedForecastBasis, unscopedProgress } from './forecast-basis';
import { requireCan } from './standing';
import { db } from '../client';
import { builds, buildStages, departments } from '../schema';
import { lastNewsAt } from './floor';
import { correlated } from '../correlated';
import { standOf, stageNowOf, waitingOnOf } from '@/lib/floor/forecast';
import { stageOutlook } from '@/lib/floor/outlook';
import { placeOf, restOf } from '@/lib/floor/place';
import { dayOf } from '@/lib/schedule/calendar';
import { daysBetween } from '@/lib/schedule/days';
import { quantileOf } from '@/lib/schedule/pmf';
import { waitingWords } from '@/lib/schedule/quiet';
import { dateAt, endStageNow } from '@/lib/schedule/walk';
import type { Viewer } from '@/lib/viewer';

async function namedStage(stageId: string) {
  const [stage] = await db()
    .select({ department: departments.name, work: buildStages.work })
    .from(buildStages)
    .innerJoin(departments, eq(departments.key, buildStages.department))
    .where(eq(buildStages.id, stageId));
  return stage;
}

/**
 * What a build's stage is waiting for, in a sentence, where there is little to show: it rests or cures, it waits for its
 * owner, or nothing new was shown for half of what its stage allows. Null where the diary speaks for itself.
 * @throws OutOfReach
 */
export async function findStageWords(viewer: Viewer, orderNumber: string, nowMs: number): Promise<string | null> {
  const reached = await requireCan(viewer, 'diary.read', orderNumber);
  const [[build], progress, basis] = await Promise.all([
    db()
      .select({ routeId: builds.routeId, orderedAt: builds.orderedAt, lastNewsAt: correlated(lastNewsAt) })
      .from(builds)
      .where(eq(builds.id, reached.id)),
    unscopedProgress([reached.id]),
    unscopedForecastBasis(nowMs),
  ]);
  const found = progress.get(reached.id);
  const now = found && standOf(found.stages).now;
  if (!build || !now) return null;
  const { calendar, today, outlooks } = basis;
  const whole = { id: reached.id, routeId: build.routeId, ...found };
  const outlook = stageOutlook(outlooks, build.routeId, now.key);
  const waitingOn = waitingOnOf(whole);
  const silentDays = daysBetween(dayOf(build.lastNewsAt ?? build.orderedAt, calendar.zone), today);
  const isSilent = silentDays * 2 > outlook.silenceDays;
  const stage = await namedStage(now.id);
  if (!stage || (outlook.minimumWaitDays === 0 && waitingOn === null && !isSilent)) return null;
  const ending = endStageNow(calendar, stageNowOf(whole, now, basis), today);
  return waitingWords(
    {
      place: placeOf(stage.department),
      rest: restOf(stage.work, outlook.minimumWaitDays),
      untilOn: ending ? dateAt(calendar, ending, quantileOf(ending.pmf, 0.5)) : null,
      waitingOn,
    },
    today,
  );
}
