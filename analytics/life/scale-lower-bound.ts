import { chiSquareQuantile } from '../distributions';
import { requireConfidence, requireThat } from '../requirement';
import type { LifeObservation, NotEstimable, WarningCode } from '../types';
import { tabulateLives } from './tabulate-lives';
import { powerSums, weibullData } from './weibull-likelihood';

/**
 * How long parts last at least when the shape is taken as known, also when none has failed yet: with
 * confidence 0.95, η is longer than this.
 *
 * Assumes Weibull lives with exactly the given shape, which is the caller's assumption and not in the
 * data. Then Σ (time^β − entry^β) is an exponential test: one-sided bound (2Σ/χ²)^(1/β) with 2r + 2
 * degrees of freedom for r failures; without any, (Σ / −log(1 − confidence))^(1/β). Bound in the unit of
 * the times. Not estimable without observations.
 *
 * Source: Nelson (1985), Journal of Quality Technology 17; Abernethy, The New Weibull Handbook, ch. 6.
 *
 * @throws {RequirementError} where the shape is not finite and above 0, the confidence not between 0 and
 * 1, or on a wrong observation as in `fitWeibull`
 * @example scaleLowerBound([300, 400, 500].map((time) => ({ time, failed: false })), { shape: 1 }) // bound 400.6
 */
export function scaleLowerBound(
  observations: readonly LifeObservation[],
  { shape, confidence = 0.95 }: { shape: number; confidence?: number },
):
  | { kind: 'estimate'; bound: number; failures: number; warnings: WarningCode[] }
  | NotEstimable<'noObservations'> {
  requireThat(shape > 0 && shape < Infinity, 'scaleLowerBound', 'a shape that is finite and above 0');
  requireConfidence(confidence, 'scaleLowerBound');
  const table = tabulateLives(observations, 'scaleLowerBound');
  if (table.observations === 0) return { kind: 'notEstimable', reason: 'noObservations' };
  const data = weibullData(table);
  const [sum] = powerSums(data, shape);
  const quantile = chiSquareQuantile(confidence, 2 * table.failures + 2);
  return {
    kind: 'estimate',
    bound: Math.exp(data.reference + Math.log((2 * sum) / quantile) / shape),
    failures: table.failures,
    warnings: table.failures < 6 ? ['fewFailures'] : [],
  };
}
