import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { addWorkingDays, type Closure } from '@/lib/schedule/calendar';
import { addDays } from '@/lib/schedule/days';
import { readyWindow, type ReadyInput, type ReadyWindow } from '@/lib/schedule/ready-window';
import { windowWords } from '@/lib/schedule/window-words';
import { closedOn, weekdaysIn } from './shop-calendars';
import { ahead, evenly, inStage } from './stages';

const calendar = weekdaysIn('America/Chicago');
// A Monday.
const TODAY = '2026-10-05';
const exactly = (days: number) => evenly(days, days);

const input = (over: Partial<ReadyInput>): ReadyInput => ({
  today: TODAY,
  calendar,
  now: inStage(ahead('Frets', exactly(5)), TODAY),
  ahead: [],
  waitingOn: null,
  adjustment: null,
  ...over,
});

function datesOf(window: ReadyWindow) {
  if (window.kind === 'unsayable') throw new Error(window.why);
  return window;
}
const likely = (over: Partial<ReadyInput>) => datesOf(readyWindow(input(over))).likelyOn;

describe('a ready window', () => {
  test('adds the stages up on the calendar', () => {
    expect(likely({})).toBe('2026-10-12');
    expect(likely({ ahead: [ahead('Set-up', exactly(3)), ahead('Final check', exactly(1))] })).toBe('2026-10-16');
    const closed = weekdaysIn('America/Chicago', [closedOn('2026-10-07', '2026-10-09')]);
    expect(likely({ calendar: closed })).toBe('2026-10-15');
  });

  test('takes off the days that have passed', () => {
    expect(likely({ now: inStage(ahead('Frets', exactly(5)), '2026-09-30') })).toBe('2026-10-07');
  });

  test('does not take off the days it waited for its owner', () => {
    expect(likely({ now: inStage(ahead('Frets', exactly(5)), '2026-09-30', 2) })).toBe('2026-10-09');
  });

  test('a stage begun on a closed day takes as long as one begun on the next working day', () => {
    const frets = ahead('Frets', exactly(0));
    expect(likely({ now: inStage(frets, '2026-10-03'), today: '2026-10-03' })).toBe(TODAY);
    expect(likely({ now: inStage(ahead('Frets', exactly(2)), '2026-10-03') })).toBe('2026-10-07');
  });

  test('today can still be the day, and on a closed day it is the next working day', () => {
    const now = inStage(ahead('Frets', exactly(3)), '2026-09-30');
    expect(likely({ now })).toBe(TODAY);
    expect(likely({ now: inStage(ahead('Frets', exactly(2)), '2026-10-01'), today: '2026-10-04' })).toBe(TODAY);
    expect(likely({ now: null, ahead: [ahead('Lumber', exactly(2))], today: '2026-10-03' })).toBe('2026-10-07');
  });

  test('spans eight in ten of two dice, and its curve is their distribution', () => {
    const dice = input({ now: inStage(ahead('Frets', evenly(1, 6)), TODAY), ahead: [ahead('Set-up', evenly(1, 6))] });
    const { earliestOn, likelyOn, latestOn, curve } = datesOf(readyWindow(dice));
    expect([earliestOn, likelyOn, latestOn]).toEqual([4, 7, 10].map((days) => addWorkingDays(calendar, TODAY, days)));
    expect(curve).toHaveLength(11);
    expect(curve[3]).toMatchObject({
      on: addWorkingDays(calendar, TODAY, 5),
      probability: expect.closeTo(10 / 36, 12),
    });
  });

  test('keeps at most 41 points of a long curve, in order', () => {
    const slow = input({ now: inStage(ahead('Wood room', evenly(10, 300)), TODAY) });
    const { curve } = datesOf(readyWindow(slow));
    expect(curve.length).toBeLessThanOrEqual(41);
    expect(curve.map(({ on }) => on)).toEqual(curve.map(({ on }) => on).sort());
    expect(curve.at(-1)?.probability).toBeGreaterThan(0.98);
  });

  test('wood rests and finish cures by the calendar, however fast the work was', () => {
    const cure = ahead('Colour & clear', exactly(2), 14);
    expect(likely({ now: inStage(cure, TODAY) })).toBe('2026-10-19');
    expect(likely({ now: inStage(cure, '2026-09-30') })).toBe('2026-10-14');
    expect(likely({ ahead: [cure] })).toBe('2026-10-26');
    expect(likely({ ahead: [ahead('Colour & clear', exactly(12), 14)] })).toBe('2026-10-28');
  });

  test('a build that only rests has a date, even when its work took longer than any before', () => {
    const cure = ahead('Colour & clear', exactly(2), 14);
    expect(likely({ now: inStage(cure, '2026-09-23') })).toBe('2026-10-07');
    expect(readyWindow(input({ now: inStage(cure, '2026-09-21') })).kind).toBe('unsayable');
  });
});

describe('where nothing can be said', () => {
  test('longer in its stage than any build before', () => {
    const now = inStage(ahead('Frets', evenly(3, 5)), '2026-09-25');
    expect(readyWindow(input({ now }))).toEqual({
      kind: 'unsayable',
      why: 'It has been in frets for 5 working days; the longest before took 5. No date can be given until it moves on.',
    });
    expect(readyWindow(input({ now: inStage(ahead('Frets', evenly(3, 6)), '2026-09-25') })).kind).toBe('window');
  });

  test('a stage nobody has been through', () => {
    const window = readyWindow(input({ ahead: [ahead('Inlay', null)] }));
    expect(windowWords(window, TODAY)).toBe(
      'Too few builds have been through inlay to say when this one will be ready.',
    );
  });

  test('a build without a stage left is not asked about', () => {
    expect(() => readyWindow(input({ now: null }))).toThrow(/no stage left/);
  });
});

describe('while the owner is asked', () => {
  const waiting = (today: string, stoppedDays: number) =>
    readyWindow(
      input({
        today,
        now: inStage(ahead('Frets', evenly(4, 6)), '2026-10-01', stoppedDays),
        waitingOn: 'the inlay drawing',
      }),
    );

  test('the window runs from an answer today, and moves on with every day without one', () => {
    const first = datesOf(waiting('2026-10-05', 1));
    const second = datesOf(waiting('2026-10-06', 2));
    expect(first.kind).toBe('waiting');
    expect(second.likelyOn).toBe(addWorkingDays(calendar, first.likelyOn, 1));
  });

  test('says so', () => {
    expect(windowWords(waiting('2026-10-05', 1), TODAY)).toBe(
      'between 8 October and 12 October, 8 in 10, if the inlay drawing is signed off today; the clock stands still until then',
    );
  });
});

describe('in words', () => {
  const dates = { kind: 'window', earliestOn: '2026-10-20', latestOn: '2026-11-06' } as const;

  test.each([
    [dates, '2026-10-05', 'between 20 October and 6 November, 8 in 10'],
    [{ ...dates, latestOn: '2027-01-08' }, '2026-10-05', 'between 20 October and 8 January 2027, 8 in 10'],
    [{ ...dates, latestOn: '2026-10-20' }, '2026-10-05', 'on 20 October, 8 in 10'],
    [dates, '2025-12-30', 'between 20 October and 6 November 2026, 8 in 10'],
  ] as const)('%o on %s', (window, today, words) => expect(windowWords(window, today)).toBe(words));
});

describe('an adjusted window', () => {
  const stages = { now: inStage(ahead('Wood room', evenly(20, 40)), TODAY), ahead: [ahead('Frets', evenly(3, 9))] };
  const plain = datesOf(readyWindow(input(stages)));
  const adjusted = (early: number, late: number) =>
    datesOf(readyWindow(input({ ...stages, adjustment: { early, late } })));

  test('is wider on the side that missed, around the same middle', () => {
    const wider = adjusted(1, 1.5);
    expect(wider.earliestOn).toBe(plain.earliestOn);
    expect(wider.likelyOn).toBe(plain.likelyOn);
    expect(wider.latestOn > plain.latestOn).toBe(true);
    expect(adjusted(1.5, 1).earliestOn < plain.earliestOn).toBe(true);
  });

  test('narrows, and never past its middle', () => {
    const narrow = adjusted(0.8, 0.8);
    expect(narrow.earliestOn > plain.earliestOn && narrow.latestOn < plain.latestOn).toBe(true);
    const none = adjusted(0.01, 0.01);
    expect(none.earliestOn <= none.likelyOn && none.likelyOn <= none.latestOn).toBe(true);
  });

  test('never begins in the past, and keeps what it was without', () => {
    const wide = adjusted(9, 1);
    expect(wide.earliestOn).toBe(TODAY);
    expect(wide.raw).toMatchObject({ earliestOn: plain.earliestOn, latestOn: plain.latestOn });
  });
});

const closures = fc
  .tuple(fc.integer({ min: 0, max: 90 }), fc.integer({ min: 0, max: 12 }))
  .map(([start, days]): Closure => closedOn(addDays(TODAY, start), addDays(TODAY, start + days)));
const distributions = fc
  .tuple(fc.integer({ min: 0, max: 8 }), fc.integer({ min: 0, max: 20 }))
  .map(([from, more]) => evenly(from, from + more));
const stages = fc.array(
  fc.tuple(distributions, fc.constantFrom(0, 0, 7, 21)).map(([pmf, wait]) => ahead('Stage', pmf, wait)),
  { minLength: 1, maxLength: 4 },
);
const adjustments = fc.option(
  fc.record({
    early: fc.double({ min: 0.5, max: 3, noNaN: true }),
    late: fc.double({ min: 0.5, max: 3, noNaN: true }),
  }),
);

describe('for every build', () => {
  test('a window never goes backwards in time while nothing happens, and never lies in the past', () =>
    fc.assert(
      fc.property(stages, fc.array(closures, { maxLength: 2 }), adjustments, ([first, ...rest], closed, adjustment) => {
        if (!first) return;
        const shop = weekdaysIn('America/Chicago', closed);
        let previous = { earliestOn: '', likelyOn: '', latestOn: '' };
        for (let days = 0; days < 45; days++) {
          const today = addDays(TODAY, days);
          const window = readyWindow(
            input({ today, calendar: shop, now: inStage(first, TODAY), ahead: rest, adjustment }),
          );
          if (window.kind === 'unsayable') return;
          const { earliestOn, likelyOn, latestOn } = datesOf(window);
          expect(today <= earliestOn && earliestOn <= likelyOn && likelyOn <= latestOn).toBe(true);
          expect(earliestOn >= previous.earliestOn).toBe(true);
          expect(likelyOn >= previous.likelyOn).toBe(true);
          expect(latestOn >= previous.latestOn).toBe(true);
          previous = { earliestOn, likelyOn, latestOn };
        }
      }),
      { numRuns: 60 },
    ));

  test('adding a closure never makes a date earlier', () =>
    fc.assert(
      fc.property(stages, closures, adjustments, ([first, ...rest], closure, adjustment) => {
        if (!first) return;
        const asked = { now: inStage(first, TODAY), ahead: rest, adjustment };
        const open = datesOf(readyWindow(input(asked)));
        const closed = datesOf(readyWindow(input({ ...asked, calendar: weekdaysIn('America/Chicago', [closure]) })));
        expect(closed.earliestOn >= open.earliestOn).toBe(true);
        expect(closed.likelyOn >= open.likelyOn).toBe(true);
        expect(closed.latestOn >= open.latestOn).toBe(true);
      }),
      { numRuns: 150 },
    ));
});
