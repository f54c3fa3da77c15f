import { normalUpperTail } from '../distributions';

/** P(count ≤ c) of a sum of independent yes/no chances (Poisson-binomial). */
export type CountDistribution = (count: number) => number;

/** Variance above which the sum is normal enough (corrected for skewness: Volkova 1996). */
const EXACT_VARIANCE = 400;

/** Mass at the ends of the running sum that is dropped. */
const NEGLIGIBLE = 1e-18;

export function countDistribution(probabilities: readonly number[]): CountDistribution {
  const variance = probabilities.reduce((sum, p) => sum + p * (1 - p), 0);
  return variance > EXACT_VARIANCE ? nearNormal(probabilities, variance) : exact(probabilities);
}

function exact(probabilities: readonly number[]): CountDistribution {
  let first = 0;
  let masses = Float64Array.of(1);
  for (const p of probabilities) {
    const next = new Float64Array(masses.length + 1);
    for (let i = 0; i < masses.length; i++) {
      const mass = masses[i] ?? 0;
      next[i] = (next[i] ?? 0) + mass * (1 - p);
      next[i + 1] = mass * p;
    }
    let [start, end] = [0, next.length];
    while ((next[start] ?? 1) < NEGLIGIBLE) start++;
    while ((next[end - 1] ?? 1) < NEGLIGIBLE) end--;
    first += start;
    masses = next.subarray(start, end);
  }
  return (count) => {
    let total = 0;
    for (let i = 0; i < masses.length && first + i <= count; i++) total += masses[i] ?? 0;
    return Math.min(1, total);
  };
}

function nearNormal(probabilities: readonly number[], variance: number): CountDistribution {
  const mean = probabilities.reduce((sum, p) => sum + p, 0);
  const third = probabilities.reduce((sum, p) => sum + p * (1 - p) * (1 - 2 * p), 0);
  const deviation = Math.sqrt(variance);
  const skewness = third / deviation ** 3;
  return (count) => {
    const z = (count + 0.5 - mean) / deviation;
    const density = Math.exp((-z * z) / 2) / Math.sqrt(2 * Math.PI);
    return Math.min(1, Math.max(0, normalUpperTail(-z) + (skewness * (1 - z * z) * density) / 6));
  };
}

/** The smallest count up to `most` with P(X ≤ count) ≥ level, over weighted distributions. */
export function mixtureQuantile(
  parts: readonly { weight: number; distribution: CountDistribution }[],
  level: number,
  most: number,
): number {
  const reaches = (count: number): boolean =>
    parts.reduce((sum, { weight, distribution }) => sum + weight * distribution(count), 0) >= level;
  let [low, high] = [0, most];
  while (low < high) {
    const middle = Math.floor((low + high) / 2);
    if (reaches(middle)) high = middle;
    else low = middle + 1;
  }
  return low;
}
