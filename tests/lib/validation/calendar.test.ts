import { describe, expect, test } from 'vitest';
import { capacityForm, closureForm, hoursForm, stageForm, zoneForm } from '@/lib/validation/calendar';

const problems = (result: { success: boolean; error?: { issues: { path: PropertyKey[] }[] } }) =>
  (result.error?.issues ?? []).map(({ path }) => path.join('.'));

describe('the working week', () => {
  test('takes Saturdays, and leaves a day without times off', () => {
    const result = hoursForm.safeParse({ opens1: '07:30', closes1: '16:00', opens6: '08:00', closes6: '12:30' });
    expect(result.data).toEqual([
      { weekday: 1, opensAtMin: 450, closesAtMin: 960 },
      { weekday: 6, opensAtMin: 480, closesAtMin: 750 },
    ]);
  });

  test('takes a day in two stretches, with the break between them', () => {
    const result = hoursForm.safeParse({ opens1: '07:30', closes1: '12:00', reopens1: '12:45', ends1: '16:15' });
    expect(result.data).toEqual([
      { weekday: 1, opensAtMin: 450, closesAtMin: 720 },
      { weekday: 1, opensAtMin: 765, closesAtMin: 975 },
    ]);
  });

  test('takes a day of which only the second stretch is filled in', () => {
    expect(hoursForm.parse({ reopens2: '13:00', ends2: '18:00' })).toEqual([
      { weekday: 2, opensAtMin: 780, closesAtMin: 1080 },
    ]);
  });

  test.each([
    ['half of an afternoon', { opens1: '07:30', closes1: '12:00', reopens1: '13:00' }, 'reopens1'],
    [
      'an afternoon that begins in the morning',
      { opens1: '07:30', closes1: '12:00', reopens1: '11:00', ends1: '16:00' },
      'reopens1',
    ],
    ['a break of no length', { opens1: '07:30', closes1: '12:00', reopens1: '12:00', ends1: '16:00' }, 'reopens1'],
    ['half of a day', { opens1: '07:30', closes1: '' }, 'opens1'],
    ['a day that ends before it begins', { opens2: '16:00', closes2: '08:00' }, 'opens2'],
    ['no such time', { opens3: '25:00', closes3: '26:00' }, 'opens3'],
    ['no day at all', {}, 'opens1'],
  ])('refuses %s at its field', (_, typed, field) => {
    expect(problems(hoursForm.safeParse(typed))).toEqual([field]);
  });
});

test.each(['EST', 'CET', '+02:00', 'Etc/GMT+5', 'America/Nowhere', ''])(
  'a time zone is that of a place, which %j is not',
  (zone) => {
    expect(problems(zoneForm.safeParse({ zone }))).toEqual(['zone']);
  },
);

describe('days off', () => {
  const closure = { name: 'Stocktaking', startsOn: '2026-12-28', endsOn: '', closesAt: '' };

  test('one day when no last one is named; half a day with the time it ends', () => {
    expect(closureForm.parse(closure)).toMatchObject({ endsOn: '2026-12-28', closesAtMin: null });
    expect(closureForm.parse({ ...closure, closesAt: '12:00' })).toMatchObject({ closesAtMin: 720 });
  });

  test.each([
    ['a day that does not exist', { startsOn: '2027-02-30' }, ['startsOn']],
    ['an end before its start', { endsOn: '2026-12-01' }, ['endsOn']],
    ['more than a year', { endsOn: '2028-12-28' }, ['endsOn']],
    ['a time that does not exist', { closesAt: '24:30' }, ['closesAt']],
    ['no name', { name: '  ' }, ['name']],
  ])('refuses %s at its field', (_, over, fields) => {
    expect(problems(closureForm.safeParse({ ...closure, ...over }))).toEqual(fields);
  });
});

describe('the estimate of a stage', () => {
  const stage = {
    routeId: 'r',
    stageKey: 'neck',
    bestDays: '3',
    likelyDays: '5',
    worstDays: '9',
    minimumWaitDays: '0',
    silenceDays: '14',
  };

  test('is whole, or left out altogether', () => {
    expect(stageForm.parse(stage)).toMatchObject({ bestDays: 3, likelyDays: 5, worstDays: 9 });
    expect(stageForm.parse({ ...stage, bestDays: '', likelyDays: '', worstDays: '' })).toMatchObject({
      bestDays: null,
    });
  });

  test.each([
    ['two of three', { worstDays: '' }, ['likelyDays']],
    ['a best that is longer than likely', { bestDays: '7' }, ['bestDays']],
    ['a worst that is shorter than likely', { worstDays: '4' }, ['worstDays']],
    ['half days', { likelyDays: '5.5' }, ['likelyDays']],
    ['a wait below none', { minimumWaitDays: '-1' }, ['minimumWaitDays']],
    ['no silence at all', { silenceDays: '0' }, ['silenceDays']],
  ])('refuses %s at its field', (_, over, fields) => {
    expect(problems(stageForm.safeParse({ ...stage, ...over }))).toEqual(fields);
  });
});

test.each([
  ['', null],
  ['4', 4],
])('a capacity of %j builds a week is kept as %j', (capacityPerWeek, expected) => {
  expect(capacityForm.parse({ department: 'neck', capacityPerWeek }).capacityPerWeek).toBe(expected);
});
