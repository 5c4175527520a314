import { describe, expect, test } from 'vitest';
import { TRUSS_ROD_SENTENCE } from '@/lib/craft/set-up';
import { readTwoNotes, turnDoubt } from '@/lib/readings/set-up-aids';

describe('a turn of the truss rod', () => {
  test.each(['', '1/8', '0.25', '-1/4', '1/8 turn'])('of "%s" is fine', (text) => expect(turnDoubt(text)).toBeNull());

  test.each(['1/2', '-0.3', '1'])('of %s is more than is done at once', (text) => {
    expect(turnDoubt(text)).toEqual({ kind: 'wrong', sentence: TRUSS_ROD_SENTENCE });
  });

  test.each(['a bit', '1/8 mm'])('of "%s" is none', (text) => expect(turnDoubt(text)?.kind).toBe('wrong'));
});

describe('two notes at the 12th fret', () => {
  test('are so many cents apart, and the saddle goes away from the neck where the fretted one is sharp', () => {
    // An octave is 1200 cents: 440 x 2^(5/1200) is five cents above 440.
    const { found } = readTwoNotes({ fretted: String((440 * 2 ** (5 / 1200)).toFixed(4)), harmonic: '440 Hz' }, 3);
    expect(found?.cents).toBeCloseTo(5, 2);
    expect(found?.words).toBe('5 cents sharp: move the saddle away from the neck');
  });

  test('within the limit of their line need nothing', () => {
    expect(readTwoNotes({ fretted: '164.8', harmonic: '164.81' }, 3).found).toMatchObject({ isWithin: true });
  });

  test('one alone says nothing yet', () => {
    expect(readTwoNotes({ fretted: '164.8', harmonic: '' }, 3)).toEqual({ doubts: {}, found: null });
  });

  test.each([
    { notes: { fretted: '0', harmonic: '440' }, field: 'fretted', says: /No string sounds there/ },
    { notes: { fretted: '440', harmonic: '-440' }, field: 'harmonic', says: /No string sounds there/ },
    { notes: { fretted: '440', harmonic: 'A4' }, field: 'harmonic', says: /not a number/ },
    { notes: { fretted: '466.2', harmonic: '440' }, field: 'fretted', says: /more than a semitone apart/ },
  ] as const)('that cannot be meant are refused at their field: $notes', ({ notes, field, says }) => {
    const { doubts, found } = readTwoNotes(notes, 3);
    expect(found).toBeNull();
    expect(doubts[field]).toMatchObject({ kind: 'wrong', sentence: expect.stringMatching(says) });
  });
});
