const SEMITONE = 2 ** (-1 / 12);

/**
 * Distance of a fret slot from the nut on one string, in the unit of `scaleLength`.
 * Twelve-tone equal temperament: d = L (1 - 2^(-n/12)).
 * @throws RangeError when scaleLength is not positive or fret is not a whole number of at least 0
 */
export function fretPosition(scaleLength: number, fret: number): number {
  if (!(scaleLength > 0 && Number.isFinite(scaleLength))) {
    throw new RangeError(`A scale length is a number above 0; got ${scaleLength}.`);
  }
  if (!Number.isInteger(fret) || fret < 0) throw new RangeError(`A fret is a whole number from 0; got ${fret}.`);
  return scaleLength * (1 - SEMITONE ** fret);
}

/**
 * Where the stages of a build begin and end on its neck, as shares of the neck's length: `stageCount + 1` boundaries from 0 (the nut)
 * to 1. Each gap is 2^(-1/12) of the one before, as between frets, scaled so that the stages fill the neck.
 * @throws RangeError when stageCount is not a whole number of at least 1
 */
export function neckSpacing(stageCount: number): number[] {
  if (!Number.isInteger(stageCount) || stageCount < 1) {
    throw new RangeError(`A neck has a whole number of stages, at least 1; got ${stageCount}.`);
  }
  const wholeLength = fretPosition(1, stageCount);
  return Array.from({ length: stageCount + 1 }, (_, stage) => fretPosition(1, stage) / wholeLength);
}
