import { requireConfidence, requireThat } from '../requirement';
import type { LimitsMethod, WeibullFit } from './fit-weibull';
import { finiteExp, logInterval } from './fit-weibull';
import { weibullData } from './weibull-likelihood';
import { profileAgeInterval } from './weibull-profile';

/**
 * The age by which a given percent of the parts have failed: B10 is `bLife(fit, 10)`.
 *
 * Assumes the Weibull fit holds, also where the age lies beyond those seen. t_p = η·(−log(1 − p))^(1/β).
 * The result is in the unit of the fit's times (null beyond any number); `percent` is between 0 and 100. Limits are those of the
 * fit unless asked otherwise: `'wald'` by the delta method on the log scale, or `'profile'` likelihood.
 *
 * Source: Meeker, Escobar & Pascual (2022), Statistical Methods for Reliability Data, 2nd ed., 8.3.
 *
 * @throws {RequirementError} where `percent` is not between 0 and 100 or the fit is not an estimate
 * @example bLife(fitWeibull(fans), 10) // { estimate: 3137.2, lower: 1686.2, upper: 5836.9 } hours
 */
export function bLife(
  fit: WeibullFit,
  percent: number,
  { confidence = fit.confidence, limits = fit.limits }: { confidence?: number; limits?: LimitsMethod } = {},
): { estimate: number | null; lower: number | null; upper: number | null } {
  requireThat(fit.kind === 'estimate', 'bLife', 'a fit that is an estimate');
  requireThat(percent > 0 && percent < 100, 'bLife', 'a percent between 0 and 100');
  requireConfidence(confidence, 'bLife');
  const { shape, scale, covariance } = fit;
  const logHazard = Math.log(-Math.log1p(-percent / 100));
  const logEstimate = Math.log(scale) + logHazard / shape;
  const estimate = finiteExp(logEstimate);
  const pull = -logHazard / shape;
  const variance = covariance[0][0] + 2 * pull * covariance[0][1] + pull * pull * covariance[1][1];
  const error = Math.sqrt(Math.max(variance, 0));
  if (limits === 'wald') return { estimate, ...logInterval(logEstimate, error, confidence) };
  const data = weibullData(fit.table);
  const maximum = {
    shape,
    relativeLogScale: Math.log(scale) - data.reference,
    logLikelihood: fit.logLikelihood,
  };
  return { estimate, ...profileAgeInterval(data, maximum, logHazard, confidence, error) };
}
