import { figure } from './figure';

/**
 * Interval from one frequency to another in cents, positive when `frequencyHz` is the higher: 1200 log2(f/f0), a hundredth
 * of an equal-tempered semitone.
 * @throws RangeError when a frequency is not above 0
 */
export function centsBetween(frequencyHz: number, referenceHz: number): number {
  for (const hz of [frequencyHz, referenceHz]) {
    if (!(hz > 0 && Number.isFinite(hz))) throw new RangeError(`A frequency is above 0; got ${hz}.`);
  }
  return 1200 * Math.log2(frequencyHz / referenceHz);
}

/** Which way the saddle of a string goes whose fretted note is so many cents off, sharp above 0. */
export const saddleWords = (cents: number) => `move the saddle ${cents > 0 ? 'away from' : 'towards'} the neck`;

export type IntonationVerdict = { cents: number; isWithin: boolean; words: string };

/**
 * The fretted note at the 12th fret against the harmonic there, and which way the saddle goes. A limit of 3 cents is common
 * practice, without a source.
 * @throws RangeError when a frequency is not above 0, or the limit is negative
 */
export function intonationVerdict(frettedHz: number, harmonicHz: number, limitCents = 3): IntonationVerdict {
  if (!(limitCents >= 0)) throw new RangeError(`A limit is at least 0 cents; got ${limitCents}.`);
  const cents = centsBetween(frettedHz, harmonicHz);
  const isWithin = Math.abs(cents) <= limitCents;
  const size = figure(Math.abs(cents), 1);
  const found = size === '0' ? 'in tune' : `${size} cents ${cents > 0 ? 'sharp' : 'flat'}`;
  if (isWithin) return { cents, isWithin, words: `${found}, within ${figure(limitCents, 1)} cents` };
  return { cents, isWithin, words: `${found}: ${saddleWords(cents)}` };
}
