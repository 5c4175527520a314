import { betaShare } from './beta';
import { normalise, type Pmf } from './pmf';

/** How long a stage takes by the shop's own estimate, in working days. */
export type ThreePoint = {
  readonly optimisticDays: number;
  readonly likelyDays: number;
  readonly pessimisticDays: number;
};

/** What is wrong with an estimate, as a sentence; null when it can be used. */
export function findEstimateProblem({ optimisticDays, likelyDays, pessimisticDays }: ThreePoint): string | null {
  if (
    ![optimisticDays, likelyDays, pessimisticDays].every((days) => Number.isFinite(days) && days >= 0 && days <= 2000)
  ) {
    return 'Enter days from 0 to 2000.';
  }
  if (optimisticDays > likelyDays) return 'The shortest time is longer than the likely one.';
  return likelyDays > pessimisticDays ? 'The longest time is shorter than the likely one.' : null;
}

/** (o + 4 m + p) / 6, the mean that PERT takes (Malcolm et al. 1959). */
export function pertMean({ optimisticDays, likelyDays, pessimisticDays }: ThreePoint): number {
  return (optimisticDays + 4 * likelyDays + pessimisticDays) / 6;
}

/** ((p - o) / 6)^2, the variance that PERT takes (Malcolm et al. 1959). */
export function pertVariance({ optimisticDays, pessimisticDays }: ThreePoint): number {
  return ((pessimisticDays - optimisticDays) / 6) ** 2;
}

/** Expected days beyond `day`, E[(X - day)+], of the beta distribution with PERT's mean and variance. */
function expectedBeyond(estimate: ThreePoint): (day: number) => number {
  const { optimisticDays, pessimisticDays } = estimate;
  const mean = pertMean(estimate);
  const range = pessimisticDays - optimisticDays;
  if (range === 0) return (day) => Math.max(0, mean - day);
  const middle = (mean - optimisticDays) / range;
  const total = (middle * (1 - middle) * range * range) / pertVariance(estimate) - 1;
  const a = middle * total;
  const b = (1 - middle) * total;
  return (day) => {
    const x = (day - optimisticDays) / range;
    if (x <= 0) return mean - day;
    return range * (middle * (1 - betaShare(x, a + 1, b)) - x * (1 - betaShare(x, a, b)));
  };
}

/**
 * The estimate as whole working days: the beta distribution from o to p with PERT's mean and variance, each moment shared
 * between the whole days beside it, so that the mean stays (o + 4 m + p) / 6 exactly.
 * @throws RangeError with a sentence unless o <= m <= p
 */
export function pertPmf(estimate: ThreePoint): Pmf {
  const problem = findEstimateProblem(estimate);
  if (problem !== null) throw new RangeError(problem);
  const beyond = expectedBeyond(estimate);
  const pmf = new Float64Array(Math.ceil(estimate.pessimisticDays) + 1);
  for (let day = Math.floor(estimate.optimisticDays); day < pmf.length; day++) {
    pmf[day] = Math.max(0, beyond(day - 1) - 2 * beyond(day) + beyond(day + 1));
  }
  return normalise(pmf);
}
