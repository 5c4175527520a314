import { expect, test } from 'vitest';
import { awayOf, waitedDaysAfter, waitsOf, type FloorStage } from '@/lib/floor/waits';

const at = (day: string) => Date.parse(`${day}T12:00:00Z`);
const stage = (key: string, position: number, startedOn: string | null, finishedOn: string | null): FloorStage => ({
  key,
  name: key,
  department: 'neck',
  position,
  startedAt: startedOn === null ? null : at(startedOn),
  finishedAt: finishedOn === null ? null : at(finishedOn),
});
const stages = [
  stage('wood', 0, '2026-10-01', '2026-10-20'),
  stage('neck', 1, '2026-10-20', null),
  stage('finish', 2, null, null),
];
const NOW = at('2026-11-02');
const waits = (fromOn: string, toOn: string | null, blocksStageKey: string | null = 'finish') =>
  waitsOf(
    stages,
    [{ blocksStageKey, kind: 'sample', fromMs: at(fromOn), toMs: toOn === null ? null : at(toOn) }],
    'UTC',
    NOW,
  );

test.each([
  [
    'from the day after it was asked to the day it was answered',
    '2026-10-25',
    '2026-10-28',
    [{ fromOn: '2026-10-26', toOn: '2026-10-28' }],
  ],
  ['asked and answered on one day is no day', '2026-10-25', '2026-10-25', []],
  ['an open one runs until today', '2026-10-30', null, [{ fromOn: '2026-10-31', toOn: '2026-11-02' }]],
  [
    'asked early, it counts from the stage before the blocked one',
    '2026-10-02',
    '2026-10-22',
    [{ fromOn: '2026-10-21', toOn: '2026-10-22' }],
  ],
])('a wait: %s', (_, fromOn, toOn, expected) => {
  expect(waits(fromOn, toOn)).toEqual(expected);
});

test('what blocks nothing, or a stage that is not on the route, stops no clock', () => {
  expect(waits('2026-10-25', '2026-10-28', null)).toEqual([]);
  expect(waits('2026-10-25', '2026-10-28', 'engraving')).toEqual([]);
});

test('while a build was further on, the stage it went back to did not run', () => {
  const before = [stages[0], stages[1]].flatMap((each) => each ?? []);
  expect(awayOf([{ movedAt: at('2026-10-27'), toPosition: 0, before }], 0, 'UTC')).toEqual([
    { fromOn: '2026-10-21', toOn: '2026-10-27' },
  ]);
});

test('days waited after a day count once where waits overlap', () => {
  const overlapping = [
    { fromOn: '2026-10-05', toOn: '2026-10-09' },
    { fromOn: '2026-10-01', toOn: '2026-10-06' },
  ];
  expect(waitedDaysAfter(overlapping, '2026-10-03')).toBe(6);
  expect(waitedDaysAfter(overlapping, '2026-10-09')).toBe(0);
});
