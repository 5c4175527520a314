import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { countWorkingDays } from '@/lib/schedule/calendar';
import { addDays } from '@/lib/schedule/days';
import { cleanHistory, stoppedDays, type Visit } from '@/lib/schedule/history';
import { closedOn, weekdaysIn } from './shop-calendars';

const calendar = weekdaysIn('America/Chicago', [closedOn('2026-09-07')]);
const TODAY = '2026-12-01';
const visit = (stageKey: string, startedOn: string | null, finishedOn: string | null): Visit => ({
  stageKey,
  startedOn,
  finishedOn,
});
const clean = (...visits: Visit[]) => cleanHistory(calendar, visits, [], TODAY);
const daysOf = (...visits: Visit[]) =>
  Object.fromEntries(clean(...visits).stages.map(({ stageKey, days }) => [stageKey, days]));

describe('days in each stage', () => {
  test('are working days, the first excluded and the last included', () => {
    expect(daysOf(visit('lumber', '2026-09-01', '2026-09-04'), visit('blanks', '2026-09-04', '2026-09-09'))).toEqual({
      lumber: 3,
      blanks: 2,
    });
  });

  test('a stage begun and finished on one day took none', () => {
    expect(daysOf(visit('pre-paint', '2026-09-02', '2026-09-02'))).toEqual({ 'pre-paint': 0 });
  });

  test('a stage begun on a closed day began on the next working day', () => {
    expect(daysOf(visit('lumber', '2026-09-05', '2026-09-08'))).toEqual({ lumber: 0 });
    expect(daysOf(visit('lumber', '2026-09-05', '2026-09-09'))).toEqual({ lumber: 1 });
    expect(daysOf(visit('lumber', '2026-09-05', '2026-09-06'))).toEqual({ lumber: 0 });
  });

  test('rows in any order give the same', () => {
    const rows = [visit('lumber', '2026-09-01', '2026-09-04'), visit('blanks', '2026-09-04', '2026-09-09')];
    expect(clean(...rows)).toEqual(clean(...rows.toReversed()));
  });

  test('a stage that was moved back to adds up, and the one it left counts no day meanwhile', () => {
    const rows = [
      visit('wood-room', '2026-09-01', '2026-09-04'),
      visit('neck', '2026-09-04', '2026-09-18'),
      visit('wood-room', '2026-09-10', '2026-09-15'),
    ];
    expect(daysOf(...rows)).toEqual({ 'wood-room': 3 + 3, neck: 3 + 3 });
    expect(clean(...rows).stages[0]).toMatchObject({ startedOn: '2026-09-01', finishedOn: '2026-09-15' });
  });

  test('a skipped stage is left out, and its neighbours are whole', () => {
    const { stages, leftOut } = clean(
      visit('lumber', '2026-09-01', '2026-09-04'),
      visit('wood-room', null, null),
      visit('blanks', '2026-09-04', '2026-09-09'),
    );
    expect(stages.map(({ stageKey }) => stageKey)).toEqual(['lumber', 'blanks']);
    expect(leftOut).toEqual([{ stageKey: 'wood-room', why: 'It was skipped.' }]);
  });

  test.each([
    [visit('frets', '2026-09-09', '2026-09-02'), 'It was finished before it was begun.'],
    [visit('frets', null, '2026-09-02'), 'It was finished without being begun.'],
    [visit('frets', '2026-09-02', null), 'It is not finished.'],
    [visit('frets', '2026-09-02', '2027-01-02'), 'It ends in the future.'],
    [visit('frets', '2026-09-31', '2026-10-02'), 'One of its dates does not exist.'],
  ])('%o is left out and said why', (row, why) => {
    expect(clean(row)).toEqual({ stages: [], leftOut: [{ stageKey: 'frets', why }] });
  });

  test('a stage with one good and one bad visit is left out whole', () => {
    const rows = [visit('frets', '2026-09-01', '2026-09-04'), visit('frets', '2026-09-20', '2026-09-10')];
    expect(clean(...rows).stages).toEqual([]);
  });

  test('the owner’s time is nobody’s', () => {
    const rows = [visit('frets', '2026-09-01', '2026-09-11')];
    const waits = [
      { fromOn: '2026-09-03', toOn: '2026-09-05' },
      { fromOn: '2026-09-04', toOn: '2026-09-08' },
    ];
    expect(cleanHistory(calendar, rows, waits, TODAY).stages[0]?.days).toBe(7 - 3);
  });

  test('a route changed midway keeps the stages that were really passed', () => {
    expect(daysOf(visit('lumber', '2026-09-01', '2026-09-04'), visit('carving', '2026-09-04', '2026-09-09'))).toEqual({
      lumber: 3,
      carving: 2,
    });
  });

  test('nothing at all is nothing at all', () => expect(clean()).toEqual({ stages: [], leftOut: [] }));
});

const dates = fc.integer({ min: 0, max: 80 }).map((days) => addDays('2026-08-03', days));
const visits = fc.array(
  fc
    .tuple(fc.constantFrom('lumber', 'neck', 'frets'), dates, fc.integer({ min: 0, max: 20 }))
    .map(([stageKey, startedOn, days]) => visit(stageKey, startedOn, addDays(startedOn, days))),
  { minLength: 1, maxLength: 6 },
);

test('no working day is ever counted twice, however the rows overlap', () =>
  fc.assert(
    fc.property(visits, (rows) => {
      const total = clean(...rows).stages.reduce((sum, { days }) => sum + days, 0);
      const starts = rows.map(({ startedOn }) => startedOn ?? '').sort();
      const ends = rows.map(({ finishedOn }) => finishedOn ?? '').sort();
      expect(total).toBeLessThanOrEqual(countWorkingDays(calendar, starts[0] ?? '', ends.at(-1) ?? ''));
    }),
  ));

describe('days on which the clock stood still', () => {
  test('are counted once where waits overlap, and only within the stage and up to today', () => {
    const waits = [
      { fromOn: '2026-08-28', toOn: '2026-09-02' },
      { fromOn: '2026-09-08', toOn: '2026-09-10' },
      { fromOn: '2026-09-09', toOn: '2026-09-30' },
    ];
    expect(stoppedDays(calendar, '2026-09-01', waits, '2026-09-11')).toBe(1 + 4);
    expect(stoppedDays(calendar, '2026-09-01', waits, '2026-09-01')).toBe(0);
    expect(stoppedDays(calendar, '2026-09-01', [], '2026-09-11')).toBe(0);
  });
});
