import { binomialLowerTail, binomialUpperTail } from '../distributions';
import { requireThat, requireWhole } from '../requirement';

/**
 * Which counts of a month are nothing unusual: the smallest and the largest that give no signal.
 *
 * Assumes `size` independent jobs with one known chance `rate` each. A count c signals high where
 * P(X ≥ c) ≤ tail and low where P(X ≤ c) ≤ tail, X binomial, so neither side signals falsely more often
 * than `tail` (0.00135, as three standard deviations of a normal figure). `size` and the results are
 * counts, `rate` and `tail` shares; the limits of size 0 are 0 and 0, so it never signals.
 *
 * Source: Montgomery, Introduction to Statistical Quality Control, ch. 7 (exact in place of normal).
 *
 * @throws {RequirementError} where the size is not whole, the rate not in 0–1 or the tail not in 0–0.5
 * @example exactBinomialLimits(50, 0.2) // { lower: 3, upper: 19 }
 */
export function exactBinomialLimits(
  size: number,
  rate: number,
  tail = 0.00135,
): { lower: number; upper: number } {
  requireWhole(size, 'exactBinomialLimits', 'size');
  requireThat(rate >= 0 && rate <= 1, 'exactBinomialLimits', 'a rate from 0 to 1');
  requireThat(tail > 0 && tail < 0.5, 'exactBinomialLimits', 'a tail between 0 and 0.5');
  if (rate === 0) return { lower: 0, upper: 0 };
  if (rate === 1) return { lower: size, upper: size };
  return {
    lower: firstWhere(size, (count) => binomialLowerTail(count, size, rate) > tail),
    upper: firstWhere(size, (count) => binomialUpperTail(count + 1, size, rate) <= tail),
  };
}

/** The smallest count up to `size` where a condition that stays true once met is met. */
function firstWhere(size: number, isMet: (count: number) => boolean): number {
  let [low, high] = [0, size];
  while (low < high) {
    const middle = Math.floor((low + high) / 2);
    if (isMet(middle)) high = middle;
    else low = middle + 1;
  }
  return low;
}
