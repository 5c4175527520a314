import { expect, test } from 'vitest';
import { planBuilds } from '@/db/demo/plan';
import { outlookOf } from '@/db/demo/shop-floor';
import { dayOf } from '@/lib/schedule/calendar';
import { addDays } from '@/lib/schedule/days';
import { quietOf } from '@/lib/schedule/quiet';

const ZONE = 'America/New_York';

test.each([Date.UTC(2026, 11, 1, 9), Date.UTC(2027, 2, 14, 4), Date.UTC(2027, 6, 1, 23, 59)])(
  'the demo has a build whose holder was told by yesterday that it is quiet, and one whose rep was too, at %d',
  (nowMs) => {
    const quiet = planBuilds(nowMs).flatMap(({ stages, silentSinceAt, isFeatured }) => {
      const stage = stages.findLast(({ startedAt }) => startedAt !== null);
      if (silentSinceAt === null || !stage?.startedAt) return [];
      expect([isFeatured, stage.startedAt < silentSinceAt]).toEqual([false, true]);
      const input = {
        lastNewsOn: dayOf(silentSinceAt, ZONE),
        longestSilenceDays: outlookOf(stage).silenceDays,
        today: addDays(dayOf(nowMs, ZONE), -1),
      };
      return [quietOf(input).level];
    });
    expect(quiet).toEqual([1, 2]);
  },
);
