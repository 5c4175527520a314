import type { Grain, Movement } from './materials';

/** Between these moistures the constant coefficients hold; Wood Handbook, FPL-GTR-190 (2010), ch. 13, at Eq. (13-2). */
export const COEFFICIENT_RANGE = { lowPercent: 6, highPercent: 14 } as const;

/** Wood does not move above this moisture; the same chapter, at Eq. (13-3). */
const FIBRE_SATURATION_PERCENT = 30;

type Step = {
  /** Width at the first moisture, in any unit of length; the change comes out in the same one. */
  dimension: number;
  fromPercent: number;
  toPercent: number;
};

function requireStep({ dimension, fromPercent, toPercent }: Step): void {
  if (!(dimension > 0 && Number.isFinite(dimension))) {
    throw new RangeError(`A width is a number above 0; got ${dimension}.`);
  }
  for (const percent of [fromPercent, toPercent]) {
    if (!(percent >= 0 && Number.isFinite(percent))) {
      throw new RangeError(`A moisture content is a percentage from 0; got ${percent}.`);
    }
  }
}

/**
 * Change of a width while the moisture stays within 6 to 14 %, in the unit of `dimension`, negative when it shrinks.
 * dD = D C (Mf - Mi); Wood Handbook, FPL-GTR-190 (2010), Eq. (13-2), p. 13-15.
 * @throws RangeError when the width is not positive or a moisture is negative or not a number
 */
export function changeByCoefficient(step: Step, coefficientPerPercent: number): number {
  requireStep(step);
  return step.dimension * coefficientPerPercent * (step.toPercent - step.fromPercent);
}

/**
 * Change of a width between any two moistures, in the unit of `dimension`, negative when it shrinks. Moistures above 30 % count
 * as 30 %. dD = D (Mf - Mi) / (3000/S - 30 + Mi), S the shrinkage from green to oven-dry in percent;
 * Wood Handbook, FPL-GTR-190 (2010), Eq. (13-3), p. 13-18.
 * @throws RangeError as `changeByCoefficient`, and when the shrinkage is not between 0 and 100
 */
export function changeByShrinkage(step: Step, shrinkagePercent: number): number {
  requireStep(step);
  if (!(shrinkagePercent > 0 && shrinkagePercent < 100)) {
    throw new RangeError(`A shrinkage is a percentage between 0 and 100; got ${shrinkagePercent}.`);
  }
  const from = Math.min(step.fromPercent, FIBRE_SATURATION_PERCENT);
  const to = Math.min(step.toPercent, FIBRE_SATURATION_PERCENT);
  return (step.dimension * (to - from)) / (3000 / shrinkagePercent - FIBRE_SATURATION_PERCENT + from);
}

/** The shrinkage that belongs to a coefficient, at 10 %, where the two forms agree: C = 1/(3000/S - 20). */
export const shrinkageFor = (coefficientPerPercent: number) => 3000 / (1 / coefficientPerPercent + 20);

export type ExpectedMovement = {
  /** In the unit of the width, negative when it shrinks. */
  change: number;
  /** True when the figure rests on a value that was not read in its publication, or on one that was worked out. */
  isApproximate: boolean;
  /** How it was computed, in words for the page. */
  basis: string;
};

/**
 * How much a board of this wood is expected to move across its width; null where no figure is known. Lengthwise change is
 * taken as none. Real boards lie between quarter-sawn (radial) and flat-sawn (tangential).
 * @throws RangeError as `changeByCoefficient`
 */
export function expectedMovement(wood: Movement | null, grain: Grain, step: Step): ExpectedMovement | null {
  const figures = wood?.[grain];
  if (!wood || !figures) return null;
  const { coefficientPerPercent, shrinkagePercent } = figures;
  const { lowPercent, highPercent } = COEFFICIENT_RANGE;
  const staysInRange = [step.fromPercent, step.toPercent].every((mc) => mc >= lowPercent && mc <= highPercent);
  const isShrinkageBetter =
    shrinkagePercent !== null && wood.shrinkageProvenance === 'seen' && wood.coefficientProvenance !== 'seen';
  if (coefficientPerPercent !== null && staysInRange && !isShrinkageBetter) {
    const change = changeByCoefficient(step, coefficientPerPercent);
    return {
      change,
      isApproximate: wood.coefficientProvenance !== 'seen',
      basis: 'by the coefficient for 6 to 14 % moisture',
    };
  }
  if (shrinkagePercent !== null) {
    const change = changeByShrinkage(step, shrinkagePercent);
    return {
      change,
      isApproximate: wood.shrinkageProvenance !== 'seen',
      basis: 'by the shrinkage from green to oven-dry',
    };
  }
  if (coefficientPerPercent === null) return null;
  const change = changeByShrinkage(step, shrinkageFor(coefficientPerPercent));
  return { change, isApproximate: true, basis: 'by a shrinkage worked out from the coefficient' };
}
