/**
 * The beta-binomial log-likelihood, from how many groups have more than j successes, failures and trials:
 *
 *   ℓ = Σ_j s_j·log(α + j) + f_j·log(β + j) − n_j·log(α + β + j)
 *
 * plus a constant, so the cost grows with the largest group and not with their number.
 */
export type BetaBinomialData = { successes: Float64Array; failures: Float64Array; trials: Float64Array };

export function betaBinomialData(counts: readonly { successes: number; trials: number }[]): BetaBinomialData {
  return {
    successes: moreThan(counts.map(({ successes }) => successes)),
    failures: moreThan(counts.map(({ successes, trials }) => trials - successes)),
    trials: moreThan(counts.map(({ trials }) => trials)),
  };
}

/** How many values are above 0, 1, 2, … */
function moreThan(values: readonly number[]): Float64Array {
  const above = new Float64Array(values.reduce((largest, value) => Math.max(largest, value), 0));
  for (const value of values) if (value > 0) above[value - 1] = (above[value - 1] ?? 0) + 1;
  for (let j = above.length - 2; j >= 0; j--) above[j] = (above[j] ?? 0) + (above[j + 1] ?? 0);
  return above;
}

export function logLikelihoodAt(
  { successes, failures, trials }: BetaBinomialData,
  mean: number,
  strength: number,
): number {
  // log(α + j) − log M and so on: the logs of M cancel, also as M grows to infinity (the binomial).
  const part = (above: Float64Array, share: number): number =>
    above.reduce(
      (sum, groups, j) => sum + groups * (Math.log(share) + Math.log1p(j / (share * strength))),
      0,
    );
  return part(successes, mean) + part(failures, 1 - mean) - part(trials, 1);
}

/** Gradient and second derivatives in (log α, log β). */
export function derivativesAt(
  { successes, failures, trials }: BetaBinomialData,
  alpha: number,
  beta: number,
): { gradient: [number, number]; hessian: [number, number, number] } {
  const [sa, saa] = reciprocals(successes, alpha);
  const [fb, fbb] = reciprocals(failures, beta);
  const [nt, ntt] = reciprocals(trials, alpha + beta);
  const gradient: [number, number] = [alpha * (sa - nt), beta * (fb - nt)];
  return {
    gradient,
    hessian: [
      gradient[0] + alpha * alpha * (ntt - saa),
      alpha * beta * ntt,
      gradient[1] + beta * beta * (ntt - fbb),
    ],
  };
}

/** Σ groups/(shift + j) and Σ groups/(shift + j)². */
function reciprocals(above: Float64Array, shift: number): [number, number] {
  let first = 0;
  let second = 0;
  for (let j = 0; j < above.length; j++) {
    const share = (above[j] ?? 0) / (shift + j);
    first += share;
    second += share / (shift + j);
  }
  return [first, second];
}
