import { describe, expect, test } from 'vitest';
import { forecast, standOf, type BuildToForecast, type ForecastBasis } from '@/lib/floor/forecast';
import { movedWhy } from '@/lib/floor/moved-window';
import { routeOutlook, stageOutlook, type RouteStage } from '@/lib/floor/outlook';
import { pastByStage, type PastBuild } from '@/lib/floor/past';
import type { FloorStage } from '@/lib/floor/waits';
import type { WorkingCalendar } from '@/lib/schedule/calendar';

const calendar: WorkingCalendar = {
  zone: 'UTC',
  hours: [1, 2, 3, 4, 5].map((weekday) => ({ weekday, opensAtMin: 480, closesAtMin: 1020 })),
  closures: [],
};
const TODAY = '2026-11-02';
const at = (day: string) => Date.parse(`${day}T12:00:00Z`);
const keys = ['wood', 'neck', 'finish'];
const route: RouteStage[] = keys.map((key) => ({
  key,
  name: key,
  department: key,
  bestDays: 4,
  likelyDays: 6,
  worstDays: 12,
  minimumWaitDays: 0,
  silenceDays: 14,
}));

type Times = [startedOn: string | null, finishedOn: string | null];
const moment = (day: string | null | undefined) => (day == null ? null : at(day));
const stagesOf = (...times: Times[]): FloorStage[] =>
  keys.map((key, position) => ({
    key,
    name: key,
    department: key,
    position,
    startedAt: moment(times[position]?.[0]),
    finishedAt: moment(times[position]?.[1]),
  }));

const build = (...times: Times[]): BuildToForecast => ({
  id: 'b',
  routeId: 'solid',
  stages: stagesOf(...times),
  signOffs: [],
  moves: [],
});

const basis = (over: Partial<ForecastBasis> = {}): ForecastBasis => ({
  calendar,
  today: TODAY,
  nowMs: at(TODAY),
  routeNames: new Map([['solid', 'Solid body']]),
  outlooks: new Map([['solid', routeOutlook(route, new Map(), TODAY)]]),
  adjustmentFor: () => null,
  ...over,
});

describe('where a build stands', () => {
  const standing = (...times: Times[]) => {
    const { now, ahead } = standOf(stagesOf(...times));
    return [now?.key ?? null, ahead.map(({ key }) => key)];
  };
  test.each<[string, Times[], [string | null, string[]]]>([
    ['not begun', [], [null, ['wood', 'neck', 'finish']]],
    [
      'in the second',
      [
        ['2026-10-01', '2026-10-09'],
        ['2026-10-09', null],
      ],
      ['neck', ['finish']],
    ],
    ['between two', [['2026-10-01', '2026-10-09']], [null, ['neck', 'finish']]],
    [
      'the first skipped',
      [
        [null, null],
        ['2026-10-09', null],
      ],
      ['neck', ['finish']],
    ],
    [
      'two open at once',
      [
        ['2026-10-01', null],
        ['2026-10-09', null],
      ],
      ['neck', ['finish']],
    ],
    [
      'finished before started',
      [
        ['2026-10-09', '2026-10-01'],
        ['2026-10-09', null],
      ],
      ['neck', ['finish']],
    ],
    [
      'all finished',
      [
        ['2026-10-01', '2026-10-02'],
        ['2026-10-02', '2026-10-03'],
        ['2026-10-03', '2026-10-04'],
      ],
      [null, []],
    ],
  ])('%s', (_, times, expected) => {
    expect(standing(...times)).toEqual(expected);
  });
});

describe('the forecast of a build', () => {
  test('of one with every stage finished there is none', () => {
    const done: Times = ['2026-10-01', '2026-10-02'];
    expect(forecast(build(done, done, done), basis())).toBeNull();
  });

  test('a build whose route does not know its stage is reckoned with what another route knows of it', () => {
    const outlooks = new Map([
      ['bass', routeOutlook(route, new Map(), TODAY)],
      ['solid', routeOutlook(route.slice(0, 1), new Map(), TODAY)],
    ]);
    expect(stageOutlook(outlooks, 'solid', 'finish').durations).not.toBeNull();
    expect(forecast(build(['2026-10-28', null]), basis({ outlooks }))?.window.kind).toBe('window');
  });

  test('an open sign-off that the next stage needs stops the clock; one further ahead does not', () => {
    const asked = (blocksStageKey: string) => ({
      ...build(['2026-10-28', null]),
      signOffs: [{ blocksStageKey, kind: 'sample', fromMs: at('2026-10-29'), toMs: null }],
    });
    expect(forecast(asked('neck'), basis())?.window).toMatchObject({ kind: 'waiting', onWhat: 'a sample' });
    expect(forecast(asked('finish'), basis())?.window.kind).toBe('window');
  });

  test('says why a window moved: days off that lie in it, and not those that are over', () => {
    const standing = build(['2026-10-28', null]);
    const given = forecast(standing, basis());
    if (!given || given.window.kind === 'unsayable') throw new Error('no window');
    const { earliestOn, likelyOn, latestOn } = given.window;
    const passed = [{ name: 'Old holiday', endsOn: '2026-10-30' }];
    const known = { earliestOn, likelyOn, latestOn, grounds: { ...given.grounds, closures: passed } };
    expect(movedWhy(known, given, calendar, TODAY)).toBeNull();
    const closures = [{ startsOn: '2026-11-09', endsOn: '2026-11-20', name: 'the move', closesAtMin: null }];
    const closed = { ...calendar, closures };
    const later = forecast(standing, basis({ calendar: closed }));
    expect(later && movedWhy(known, later, closed, TODAY)).toMatch(
      /working days later: the shop will be closed for the move\.$/,
    );
  });
});

test('a build that was taken back counts the days of both visits, and those it was further on for neither', () => {
  const stages = stagesOf(['2026-09-01', '2026-09-08'], ['2026-09-08', '2026-09-29'], ['2026-09-29', '2026-10-06']);
  const before = stagesOf(['2026-09-01', '2026-09-08'], ['2026-09-08', '2026-09-15'], ['2026-09-15', null]);
  const taken: PastBuild = {
    id: 'p',
    routeId: 'solid',
    rack: null,
    stages,
    signOffs: [],
    moves: [{ movedAt: at('2026-09-22'), toPosition: 1, before }],
  };
  const past = pastByStage([taken], calendar, TODAY, at(TODAY));
  const days = Object.fromEntries([...past].map(([key, [first]]) => [key, first?.days]));
  // A week each: 1 to 8, 8 to 15 and 22 to 29, 15 to 22 and 29 September to 6 October, five working days a week.
  expect(days).toEqual({ wood: 5, neck: 10, finish: 10 });
});
