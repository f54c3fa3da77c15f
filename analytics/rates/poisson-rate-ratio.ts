import { betaQuantile } from '../distributions';
import { requireConfidence, requireThat, requireWhole } from '../requirement';
import { fromRatios, tailsAt } from './discrete-distribution';

export type RateRatio = {
  /** Rate A over rate B; null where infinite (no events in B) or undefined (none at all). */
  ratio: number | null;
  lower: number;
  upper: number | null;
  /** Two-sided, by minimum likelihood. */
  pValue: number;
  less: number;
  greater: number;
};

/**
 * How many times as often things happen in A as in B per hour (or per machine) of exposure.
 *
 * Assumes both counts are Poisson. Conditional on their sum, count A is binomial with chance
 * ρ·exposureA / (ρ·exposureA + exposureB) at rate ratio ρ; limits by Clopper–Pearson, the two-sided p
 * at ρ = 1 by minimum likelihood (as R's poisson.test, not doubled). Counts and exposures in, both
 * exposures in one unit; ratios and chances out. Without any event nothing is known: ratio null, limits
 * 0 and null, p 1.
 *
 * Source: Przyborowski & Wilenski (1940), Biometrika 31; Lehmann & Romano (2005), 4.5.
 *
 * @throws {RequirementError} where a count is not whole, an exposure not finite and above 0, or the
 * confidence not between 0 and 1
 * @example poissonRateRatio({ countA: 11, exposureA: 800, countB: 23, exposureB: 3000 })
 * // { ratio: 1.793, lower: 0.789, upper: 3.830, pValue: 0.137, … }
 */
export function poissonRateRatio(comparison: {
  countA: number;
  exposureA: number;
  countB: number;
  exposureB: number;
  confidence?: number;
}): RateRatio {
  const { countA, exposureA, countB, exposureB, confidence = 0.95 } = comparison;
  requireWhole(countA, 'poissonRateRatio', 'countA');
  requireWhole(countB, 'poissonRateRatio', 'countB');
  for (const exposure of [exposureA, exposureB]) {
    requireThat(
      exposure > 0 && exposure < Infinity,
      'poissonRateRatio',
      'every exposure to be finite and above 0',
    );
  }
  requireConfidence(confidence, 'poissonRateRatio');
  const total = countA + countB;
  const odds = exposureA / exposureB;
  const { less, greater, twoSided } = tailsAt(
    fromRatios(0, total, (x) => ((total - x) / (x + 1)) * odds),
    countA,
  );
  const tail = (1 - confidence) / 2;
  return {
    ratio: countB === 0 ? null : countA / countB / odds,
    lower: countA === 0 ? 0 : oddsAt(tail, countA, countB + 1) / odds,
    upper: countB === 0 ? null : oddsAt(1 - tail, countA + 1, countB) / odds,
    pValue: twoSided,
    less,
    greater,
  };
}

/** p/(1 − p) of a beta quantile, each side from its own quantile so that neither loses digits. */
function oddsAt(probability: number, a: number, b: number): number {
  return betaQuantile(probability, a, b) / betaQuantile(1 - probability, b, a);
}
