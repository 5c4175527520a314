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

/** One part in this many of what remains to the bridge is the next gap between frets: 1 / (1 - 2^(-1/12)), about 17.817. */
export const GAP_DIVISOR = 1 / (1 - SEMITONE);

/**
 * Where a fret crosses one outer string of two scales, along that string from the perpendicular fret, positive towards the bridge, in the
 * unit of `scaleLength`: x = L (f(n) - f(p)), f(n) = 1 - 2^(-n/12) and f(bridge) = 1. The cosine of strings that fan out is left out.
 * @throws RangeError when scaleLength is not positive or a fret is not a whole number of at least 0
 */
export function multiscalePosition(scaleLength: number, fret: number | 'bridge', perpendicularFret: number): number {
  const fromNut = fret === 'bridge' ? scaleLength : fretPosition(scaleLength, fret);
  return fromNut - fretPosition(scaleLength, perpendicularFret);
}

/**
 * How far a fretted note sounds off when its slot is cut `slotError` from where it belongs, in cents, sharp above 0. Error and scale are in one unit,
 * the error positive towards the bridge: 1200 log2(r / (r - e)), r = L 2^(-n/12).
 * @throws RangeError on a bad scale or fret, or when the slot would lie at the bridge or past it
 */
export function slotErrorCents(scaleLength: number, fret: number, slotError: number): number {
  const remaining = scaleLength - fretPosition(scaleLength, fret);
  if (!(slotError < remaining)) throw new RangeError(`A slot lies before the bridge; got an error of ${slotError}.`);
  return 1200 * Math.log2(remaining / (remaining - slotError));
}

/**
 * Distance from the nut by the old rule of 18, d = L (1 - (17/18)^n), in the unit of `scaleLength`: for comparing with boards cut by it.
 * @throws RangeError when scaleLength is not positive or fret is not a whole number of at least 0
 */
export function ruleOf18Position(scaleLength: number, fret: number): number {
  fretPosition(scaleLength, fret);
  return scaleLength * (1 - (17 / 18) ** fret);
}

/** How far a note on a board cut by the rule of 18 sounds from equal temperament, in cents: 1200 n log2(18/17) - 100 n. @throws RangeError on a bad fret */
export function ruleOf18ErrorCents(fret: number): number {
  fretPosition(1, fret);
  return fret * (1200 * Math.log2(18 / 17) - 100);
}
