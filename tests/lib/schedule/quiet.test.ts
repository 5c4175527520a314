import { describe, expect, test } from 'vitest';
import { quietOf, waitingWords } from '@/lib/schedule/quiet';

const TODAY = '2026-07-20';

describe('a quiet build', () => {
  test.each([
    ['2026-07-10', 0, 10],
    ['2026-07-09', 1, 11],
    ['2026-06-30', 1, 20],
    ['2026-06-29', 2, 21],
    ['2026-07-21', 0, 0],
  ])('last news on %s with ten days allowed: level %i', (lastNewsOn, level, silentDays) => {
    expect(quietOf({ lastNewsOn, longestSilenceDays: 10, today: TODAY })).toEqual({ level, silentDays });
  });

  test('a silence of no days is refused', () => {
    expect(() => quietOf({ lastNewsOn: TODAY, longestSilenceDays: 0, today: TODAY })).toThrow(RangeError);
  });
});

describe('the player reads', () => {
  const woodRoom = { place: 'the wood room', rest: 'rests', untilOn: '2026-08-12', waitingOn: null } as const;

  test.each([
    [woodRoom, 'It rests in the wood room until about 12 August, nothing to photograph until then.'],
    [{ ...woodRoom, untilOn: null }, 'It rests in the wood room, nothing to photograph for now.'],
    [{ ...woodRoom, untilOn: TODAY }, 'It rests in the wood room, nothing to photograph for now.'],
    [
      { ...woodRoom, place: 'the finish room', rest: 'cures', untilOn: '2027-01-05' },
      'It cures in the finish room until about 5 January 2027, nothing to photograph until then.',
    ],
    [{ ...woodRoom, rest: 'is worked on' }, 'It is being worked on in the wood room until about 12 August.'],
    [
      { ...woodRoom, waitingOn: 'the finish sample' },
      'It waits in the wood room for you to sign off the finish sample.',
    ],
  ] as const)('%o', (waiting, words) => expect(waitingWords(waiting, TODAY)).toBe(words));
});
