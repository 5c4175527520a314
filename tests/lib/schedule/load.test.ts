import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { departmentLoads, type LoadBuild } from '@/lib/schedule/load';
import { weekdaysIn } from './shop-calendars';
import { ahead, evenly, inStage } from './stages';

const calendar = weekdaysIn('America/Chicago');
// A Monday.
const TODAY = '2026-10-05';
const departments = [
  { key: 'neck & frets', capacityPerWeek: 2 },
  { key: 'finish', capacityPerWeek: 1 },
  { key: 'set-up', capacityPerWeek: null },
];

const frets = (fromDays: number, toDays: number) => ({
  ...ahead('Frets', evenly(fromDays, toDays)),
  department: 'neck & frets',
});
const finish = (name: string, fromDays: number, toDays: number) => ({
  ...ahead(name, evenly(fromDays, toDays)),
  department: 'finish',
});
const now = (stage: ReturnType<typeof frets>, startedOn = TODAY) => ({
  ...inStage(stage, startedOn),
  department: stage.department,
});

const loadsOf = (builds: LoadBuild[]) => {
  const loads = departmentLoads(calendar, TODAY, builds, departments);
  return (key: string) => {
    const load = loads.find((each) => each.key === key);
    if (!load) throw new Error(key);
    return load;
  };
};
const arriving = (load: ReturnType<ReturnType<typeof loadsOf>>) => load.weeks.map((week) => week.arriving);
const present = (load: ReturnType<ReturnType<typeof loadsOf>>) => load.weeks.map((week) => week.present);

describe('what comes to a department', () => {
  test('in eight weeks from today’s Monday', () => {
    const { weeks } = loadsOf([])('finish');
    expect(weeks).toHaveLength(8);
    expect([weeks[0]?.weekStartsOn, weeks[7]?.weekStartsOn]).toEqual(['2026-10-05', '2026-11-23']);
  });

  test('a build arrives in the week in which the stage before it ends', () => {
    const load = loadsOf([{ now: now(frets(7, 7)), ahead: [finish('Colour', 5, 5)] }]);
    expect(load('neck & frets').presentNow).toBe(1);
    expect(present(load('neck & frets'))).toEqual([1, 0, 0, 0, 0, 0, 0, 0]);
    expect(arriving(load('finish'))).toEqual([0, 1, 0, 0, 0, 0, 0, 0]);
    expect(present(load('finish'))).toEqual([0, 1, 0, 0, 0, 0, 0, 0]);
  });

  test('by its probability when that is not certain', () => {
    const load = loadsOf([{ now: now(frets(3, 6)), ahead: [finish('Colour', 30, 30)] }]);
    expect(arriving(load('finish'))[0]).toBeCloseTo(0.5, 12);
    expect(arriving(load('finish'))[1]).toBeCloseTo(0.5, 12);
  });

  test('once, when two stages of the department follow each other', () => {
    const load = loadsOf([{ now: now(frets(1, 1)), ahead: [finish('Colour', 6, 6), finish('Buff', 6, 6)] }]);
    expect(arriving(load('finish'))).toEqual([1, 0, 0, 0, 0, 0, 0, 0]);
    expect(present(load('finish'))).toEqual([1, 1, 0, 0, 0, 0, 0, 0]);
  });

  test('a pile-up shows before it happens', () => {
    const two = Array.from({ length: 2 }, () => ({ now: now(frets(7, 7)), ahead: [finish('Colour', 5, 5)] }));
    const over = loadsOf(two)('finish').weeks.map(({ isOverCapacity }) => isOverCapacity);
    expect(over).toEqual([false, true, false, false, false, false, false, false]);
  });

  test('a build longer in its stage than any before is named, and guessed nowhere', () => {
    const load = loadsOf([{ now: now(frets(2, 3), '2026-09-01'), ahead: [finish('Colour', 5, 5)] }]);
    expect(load('neck & frets')).toMatchObject({ presentNow: 1, unsayable: 1 });
    expect(present(load('neck & frets'))).toEqual([1, 1, 1, 1, 1, 1, 1, 1]);
    expect(arriving(load('finish'))).toEqual([0, 0, 0, 0, 0, 0, 0, 0]);
  });

  test('a build between stages can arrive today', () => {
    expect(arriving(loadsOf([{ now: null, ahead: [finish('Colour', 3, 3)] }])('finish'))[0]).toBe(1);
  });

  test('a department that is not listed is refused by name', () => {
    expect(() => departmentLoads(calendar, TODAY, [{ now: now(frets(1, 1)), ahead: [] }], [])).toThrow(/neck & frets/);
  });
});

test('no build is ever lost or doubled: it is in one department or has left', () =>
  fc.assert(
    fc.property(fc.integer({ min: 0, max: 9 }), fc.integer({ min: 0, max: 30 }), (from, more) => {
      const load = loadsOf([{ now: now(frets(from, from + more)), ahead: [finish('Colour', from, from + more)] }]);
      const inside = present(load('neck & frets')).map((share, week) => share + (present(load('finish'))[week] ?? 0));
      expect(inside.every((share) => share <= 1 + 1e-9)).toBe(true);
      expect(inside).toEqual([...inside].sort((one, other) => other - one));
      const arrived = arriving(load('finish')).reduce((sum, share) => sum + share, 0);
      expect(arrived).toBeCloseTo(1 - (present(load('neck & frets')).at(-1) ?? 0), 9);
    }),
  ));
