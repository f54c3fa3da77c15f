import { normalLimit } from '../distributions';
import { requireConfidence } from '../requirement';
import type { ProportionEstimate } from './proportion';
import { requireProportion } from './proportion';

/**
 * A share (7 of 60 came back) with limits that stay sensible for few trials and for shares near 0 or 1.
 *
 * Assumes independent trials with one common chance. Wilson's score interval, without continuity
 * correction: the shares p for which |x/n − p| ≤ z·√(p(1 − p)/n). All results are shares; no trials give
 * estimate null with limits 0 and 1.
 *
 * Source: Wilson (1927), JASA 22; Brown, Cai & DasGupta (2001), Statistical Science 16.
 *
 * @throws {RequirementError} where the counts are not whole, successes exceed trials, or the confidence
 * is not between 0 and 1
 * @example wilsonInterval(7, 60) // { estimate: 0.1167, lower: 0.0577, upper: 0.2218 }
 */
export function wilsonInterval(successes: number, trials: number, confidence = 0.95): ProportionEstimate {
  requireProportion(successes, trials, 'wilsonInterval');
  requireConfidence(confidence, 'wilsonInterval');
  if (trials === 0) return { estimate: null, lower: 0, upper: 1 };
  const estimate = successes / trials;
  const z2 = normalLimit(confidence) ** 2 / trials;
  const middle = estimate + z2 / 2;
  const reach = Math.sqrt(z2 * (estimate * (1 - estimate) + z2 / 4));
  return {
    estimate,
    // The smaller root through the product of both: no digits are lost for rare events.
    lower: (estimate * estimate) / (middle + reach),
    upper: successes === trials ? 1 : (middle + reach) / (1 + z2),
  };
}
