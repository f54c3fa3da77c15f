import { betaQuantile } from '../distributions';
import { requireConfidence } from '../requirement';
import type { ProportionEstimate } from './proportion';
import { requireProportion } from './proportion';

/**
 * A share with exact limits, which cover the true share at least as often as promised, at the price of
 * being wide.
 *
 * Assumes independent trials with one common chance. The limits are the shares at which the observed
 * count or a more extreme one has chance (1 − confidence)/2, by beta quantiles. All results are shares;
 * no trials give estimate null with limits 0 and 1.
 *
 * Source: Clopper & Pearson (1934), Biometrika 26.
 *
 * @throws {RequirementError} where the counts are not whole, successes exceed trials, or the confidence
 * is not between 0 and 1
 * @example clopperPearsonInterval(0, 5, 0.9) // { estimate: 0, lower: 0, upper: 0.4507 }
 */
export function clopperPearsonInterval(
  successes: number,
  trials: number,
  confidence = 0.95,
): ProportionEstimate {
  requireProportion(successes, trials, 'clopperPearsonInterval');
  requireConfidence(confidence, 'clopperPearsonInterval');
  if (trials === 0) return { estimate: null, lower: 0, upper: 1 };
  const tail = (1 - confidence) / 2;
  const failures = trials - successes;
  return {
    estimate: successes / trials,
    lower: successes === 0 ? 0 : betaQuantile(tail, successes, failures + 1),
    upper: failures === 0 ? 1 : betaQuantile(1 - tail, successes + 1, failures),
  };
}
