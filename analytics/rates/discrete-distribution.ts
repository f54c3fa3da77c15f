/**
 * A distribution on `first`, `first + 1`, … from the ratios of neighboring probabilities, scaled to its
 * largest so that no factorial is ever formed and the tails keep their digits.
 */
export type DiscreteDistribution = { first: number; logWeights: Float64Array };

/** `ratio(x)` is P(x + 1)/P(x). */
export function fromRatios(first: number, last: number, ratio: (x: number) => number): DiscreteDistribution {
  const logWeights = new Float64Array(last - first + 1);
  let top = 0;
  let log = 0;
  let lost = 0;
  for (let i = 1; i < logWeights.length; i++) {
    // Kahan's sum: a long walk from the edge to the middle would add up its rounding errors.
    const step = Math.log(ratio(first + i - 1)) - lost;
    const next = log + step;
    lost = next - log - step;
    log = next;
    logWeights[i] = log;
    if (log > top) top = log;
  }
  return { first, logWeights: logWeights.map((value) => value - top) };
}

/** P(X = x)·c for all x, with their sum; each weight tilted by ψ^(x − first). */
function tilted(
  { logWeights }: DiscreteDistribution,
  logTilt: number,
): { weights: Float64Array; total: number } {
  let top = -Infinity;
  for (let i = 0; i < logWeights.length; i++) top = Math.max(top, (logWeights[i] ?? 0) + i * logTilt);
  let total = 0;
  const weights = logWeights.map((log, i) => {
    const weight = Math.exp(log + i * logTilt - top);
    total += weight;
    return weight;
  });
  return { weights, total };
}

export type Tails = { less: number; greater: number; twoSided: number };

/** P(X ≤ x), P(X ≥ x) and the chance of all values that are no likelier than x (minimum likelihood). */
export function tailsAt(distribution: DiscreteDistribution, x: number, logTilt = 0): Tails {
  const { weights, total } = tilted(distribution, logTilt);
  const at = x - distribution.first;
  // Equal probabilities may differ in their last digits; the margin is that of R's exact tests.
  const limit = (weights[at] ?? 0) * (1 + 1e-7);
  let [less, greater, twoSided] = [0, 0, 0];
  for (let i = 0; i < weights.length; i++) {
    const weight = weights[i] ?? 0;
    if (i <= at) less += weight;
    if (i >= at) greater += weight;
    if (weight <= limit) twoSided += weight;
  }
  const share = (part: number): number => Math.min(1, part / total);
  return { less: share(less), greater: share(greater), twoSided: share(twoSided) };
}

/** Mean and variance under a tilt. */
export function momentsAt(
  distribution: DiscreteDistribution,
  logTilt: number,
): { mean: number; variance: number } {
  const { weights, total } = tilted(distribution, logTilt);
  let mean = 0;
  for (let i = 0; i < weights.length; i++) mean += (i * (weights[i] ?? 0)) / total;
  let variance = 0;
  for (let i = 0; i < weights.length; i++) variance += ((i - mean) ** 2 * (weights[i] ?? 0)) / total;
  return { mean: mean + distribution.first, variance };
}
