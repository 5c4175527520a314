import { describe, expect, test } from 'vitest';
import { moved, whyMoved, type Grounds } from '@/lib/schedule/window-moves';
import { closedOn, weekdaysIn } from './shop-calendars';

const calendar = weekdaysIn('America/Chicago', [closedOn('2026-11-26', '2026-11-27')]);
const window = (likelyOn: string, latestOn = '2026-12-18') => ({ earliestOn: '2026-11-02', likelyOn, latestOn });

describe('a window that moved', () => {
  test.each([
    ['2026-11-20', '2026-11-20', { kind: 'same', days: 0, isToTell: false }],
    ['2026-11-20', '2026-11-25', { kind: 'later', days: 3, isToTell: false }],
    ['2026-11-20', '2026-11-30', { kind: 'later', days: 4, isToTell: true }],
    ['2026-11-20', '2026-11-16', { kind: 'sooner', days: 4, isToTell: true }],
  ])('likely %s to %s, in working days', (from, to, expected) => {
    expect(moved(calendar, window(from), window(to))).toEqual(expected);
  });

  test('goes by its last date where that moved further', () => {
    expect(moved(calendar, window('2026-11-20'), window('2026-11-20', '2026-12-30')).days).toBe(8);
  });

  test('that was lost or found is told', () => {
    expect(moved(calendar, window('2026-11-20'), null)).toMatchObject({ kind: 'lost', isToTell: true });
    expect(moved(calendar, null, window('2026-11-20'))).toMatchObject({ kind: 'found', isToTell: true });
    expect(moved(calendar, null, null)).toMatchObject({ kind: 'same', isToTell: false });
  });
});

const before: Grounds = {
  stageName: 'Neck & board',
  stagePosition: 5,
  routeName: 'Solid body',
  spentDays: 4,
  usualDays: 9,
  waitingOn: null,
  closures: ['Year end'],
  isAdjusted: false,
};
const twoLater = { kind: 'later', days: 2, isToTell: false } as const;
const oneSooner = { kind: 'sooner', days: 1, isToTell: false } as const;

describe('why it moved, in one sentence', () => {
  test.each<[Partial<Grounds>, string]>([
    [{ stageName: 'the wood room', stagePosition: 2 }, 'it went back to the wood room'],
    [{ stageName: 'Frets', stagePosition: 6 }, 'neck & board took longer than it usually does'],
    [{ spentDays: 12 }, 'neck & board is taking longer than it usually does'],
    [{ waitingOn: 'the inlay drawing' }, 'it waits for the inlay drawing to be signed off'],
    [{ closures: ['Year end', 'Inventory'] }, 'the shop will be closed for Inventory'],
    [{ routeName: 'Hollow body' }, 'it now takes the route Hollow body'],
    [{ isAdjusted: true }, 'we give our windows a different width now, by how past ones held'],
    [{}, 'recent builds took longer in the stages ahead'],
  ])('%o', (change, reason) => {
    expect(whyMoved(twoLater, before, { ...before, ...change })).toBe(`two working days later: ${reason}`);
  });

  test('sooner, too', () => {
    const frets = { ...before, stageName: 'Frets', stagePosition: 6 };
    expect(whyMoved(oneSooner, before, frets)).toBe(
      'one working day sooner: neck & board went faster than it usually does',
    );
    expect(whyMoved(oneSooner, before, { ...before, closures: [] })).toBe(
      'one working day sooner: the shop will not close for Year end after all',
    );
    expect(whyMoved(oneSooner, { ...before, waitingOn: 'the sample' }, before)).toBe(
      'one working day sooner: recent builds took less time in the stages ahead',
    );
    expect(whyMoved(twoLater, { ...before, waitingOn: 'the sample' }, before)).toMatch(/it waited for the sample/);
  });

  test('what the shop wrote goes first', () => {
    expect(whyMoved(twoLater, before, before, 'the neck went back to the wood room')).toBe(
      'two working days later: the neck went back to the wood room',
    );
  });

  test('a date that went or came', () => {
    const lost = { kind: 'lost', days: 0, isToTell: true } as const;
    expect(whyMoved(lost, before, before)).toBe('no date for now: neck & board is taking longer than ever before');
    expect(whyMoved({ ...lost, kind: 'found' }, before, before)).toBe(
      'there is a date again: it is in neck & board now',
    );
    expect(whyMoved({ kind: 'same', days: 0, isToTell: false }, before, before)).toBeNull();
  });
});
