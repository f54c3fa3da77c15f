import { betaQuantile } from '../distributions';
import { requireThat } from '../requirement';

/**
 * Where the 1st, 2nd, … of n failures is expected on a scale of share failed: the median of each.
 *
 * Assumes n complete lives. Exact: the median of the beta distribution (i, n − i + 1), not Benard's
 * (i − 0.3)/(n + 0.4). Shares out.
 *
 * Source: Johnson (1964), The Statistical Treatment of Fatigue Experiments.
 *
 * @throws {RequirementError} where n is not a whole number above 0
 * @example medianRanks(3) // [0.2063, 0.5, 0.7937]
 */
export function medianRanks(n: number): number[] {
  requireThat(Number.isSafeInteger(n) && n > 0, 'medianRanks', 'n to be a whole number above 0');
  return Array.from({ length: n }, (_, i) => betaQuantile(0.5, i + 1, n - i));
}
