import { normalLimit } from '../distributions';
import { requireConfidence } from '../requirement';
import type { Interval, LifeObservation, NotEstimable, WarningCode } from '../types';
import type { LifeTable } from './tabulate-lives';
import { tabulateLives } from './tabulate-lives';
import { maximizeWeibull, weibullCovariance, weibullData } from './weibull-likelihood';
import { profileAgeInterval, profileShapeInterval } from './weibull-profile';

export type LimitsMethod = 'wald' | 'profile';

export type WeibullFit = {
  kind: 'estimate';
  /** β: below 1 fails young, above 1 wears out. */
  shape: number;
  /** η, in the unit of the times: the age by which 63.2 % have failed. */
  scale: number;
  logLikelihood: number;
  failures: number;
  observations: number;
  distinctFailureAges: number;
  /** Of (log scale, log shape). */
  covariance: [[number, number], [number, number]];
  shapeInterval: Interval;
  scaleInterval: Interval;
  confidence: number;
  limits: LimitsMethod;
  warnings: WarningCode[];
  /** The observations added up by age, from which profile limits of B-lives are drawn. */
  table: LifeTable;
};

export type WeibullReason = 'noFailures' | 'allFailuresAtLargestAge' | 'boundary';

/** Failures below which an estimate carries the warning `fewFailures`. */
const FEW_FAILURES = 6;

/**
 * The Weibull distribution that best explains at which ages parts failed and at which others still ran.
 *
 * Assumes independent lives, and that a life is censored or enters late for reasons unrelated to how
 * soon it would fail. S(t) = exp(−(t/η)^β); maximizes Σ failed·log h(t) − Σ (t/η)^β + Σ (entry/η)^β,
 * which is maximum likelihood with right censoring and left truncation; a weight counts equal lives.
 *
 * Times, entries and `scale` are in one unit of the caller's choice (hours, days). Limits are two-sided
 * at `confidence` (0.95): `'wald'` (default) on the log scale from the observed information, or
 * `'profile'` likelihood. Not estimable with no failure, with every failure at the largest age (β → ∞),
 * or where late entries drive the fit to a boundary.
 *
 * Source: Meeker, Escobar & Pascual (2022), Statistical Methods for Reliability Data, 2nd ed., ch. 8
 * and 11; IEC 61649:2008.
 *
 * @throws {RequirementError} where a time is not finite or not after its entry, a weight is negative, or
 * the confidence is not between 0 and 1
 * @example fitWeibull([42, 88, 123, 150, 211].map((time) => ({ time, failed: true })))
 * // shape 2.3237, scale 138.90, warnings ['fewFailures']
 */
export function fitWeibull(
  observations: readonly LifeObservation[],
  options: { confidence?: number; limits?: LimitsMethod } = {},
): WeibullFit | NotEstimable<WeibullReason> {
  requireConfidence(options.confidence ?? 0.95, 'fitWeibull');
  return fitWeibullTable(tabulateLives(observations, 'fitWeibull'), options);
}

/** The same from lives already added up by age. */
export function fitWeibullTable(
  table: LifeTable,
  { confidence = 0.95, limits = 'wald' }: { confidence?: number; limits?: LimitsMethod } = {},
): WeibullFit | NotEstimable<WeibullReason> {
  if (table.failures === 0) return { kind: 'notEstimable', reason: 'noFailures' };
  if (table.failed.at(-1) === table.failures)
    return { kind: 'notEstimable', reason: 'allFailuresAtLargestAge' };
  const data = weibullData(table);
  const maximum = maximizeWeibull(data);
  const covariance = maximum === null ? null : weibullCovariance(data, maximum);
  const scale = Math.exp((maximum?.relativeLogScale ?? NaN) + data.reference);
  if (maximum === null || covariance === null || !(scale > 0 && scale < Infinity)) {
    return { kind: 'notEstimable', reason: 'boundary' };
  }
  const { shape, logLikelihood } = maximum;
  const scaleError = Math.sqrt(covariance[0][0]);
  const shapeError = Math.sqrt(covariance[1][1]);
  const isProfile = limits === 'profile';
  return {
    kind: 'estimate',
    shape,
    scale,
    logLikelihood,
    failures: table.failures,
    observations: table.observations,
    distinctFailureAges: table.failed.filter((weight) => weight > 0).length,
    covariance,
    shapeInterval: isProfile
      ? profileShapeInterval(data, maximum, confidence, shapeError)
      : logInterval(Math.log(shape), shapeError, confidence),
    scaleInterval: isProfile
      ? profileAgeInterval(data, maximum, 0, confidence, scaleError)
      : logInterval(Math.log(scale), scaleError, confidence),
    confidence,
    limits,
    warnings: table.failures < FEW_FAILURES ? ['fewFailures'] : [],
    table,
  };
}

/** Wald limits on the log scale: exp(log estimate ± z·error). */
export function logInterval(logEstimate: number, logError: number, confidence: number): Interval {
  const reach = normalLimit(confidence) * logError;
  return { lower: finiteExp(logEstimate - reach), upper: finiteExp(logEstimate + reach) };
}

/** e^x, null where that is beyond any number. */
export function finiteExp(x: number): number | null {
  const value = Math.exp(x);
  return value < Infinity ? value : null;
}
