import { normalTwoSided } from '../distributions';
import { requireConfidence } from '../requirement';
import type { Interval, LifeObservation, NotEstimable, WarningCode } from '../types';
import { fitCommonShape } from './common-shape';
import { warningsOf } from './compare-weibull';
import { logInterval } from './fit-weibull';
import type { WeibullReason } from './fit-weibull';
import { tabulateLives } from './tabulate-lives';

export type HazardRatio = {
  kind: 'estimate';
  /** Failure rate of `compared` over that of `baseline` at the same age. */
  ratio: number;
  interval: Interval;
  /** Wald, two-sided, of ratio 1. */
  pValue: number;
  shape: number;
  warnings: WarningCode[];
};

/**
 * How many times as often parts of one group fail as those of another at the same age: 0.5 reads "fails
 * half as often at the same age".
 *
 * Assumes Weibull lives with one common shape in both groups (see `equalShape` of `compareWeibull`), so
 * that the ratio is the same at every age: (η_baseline/η_compared)^β. Maximum likelihood with right
 * censoring and left truncation; Wald limits on the log scale from the observed information, two-sided
 * at `confidence` (0.95). Times in one unit for both; the ratio has none. Not estimable where a group
 * has no failure, or the fit is driven to a boundary.
 *
 * Source: Lawless (2003), Statistical Models and Methods for Lifetime Data, 2nd ed., 6.3 (Weibull
 * regression with a group indicator).
 *
 * @throws {RequirementError} on a wrong observation as in `fitWeibull`, or a confidence not between 0
 * and 1
 * @example hazardRatio(sixMp, control) // Gehan (1965): ratio 5.64
 */
export function hazardRatio(
  baseline: readonly LifeObservation[],
  compared: readonly LifeObservation[],
  { confidence = 0.95 }: { confidence?: number } = {},
): HazardRatio | NotEstimable<WeibullReason> {
  requireConfidence(confidence, 'hazardRatio');
  const tables = [baseline, compared].map((lives) => tabulateLives(lives, 'hazardRatio'));
  if (tables.some(({ failures }) => failures === 0)) return { kind: 'notEstimable', reason: 'noFailures' };
  if (tables.every(({ failed, failures }) => failed.at(-1) === failures)) {
    return { kind: 'notEstimable', reason: 'allFailuresAtLargestAge' };
  }
  const common = fitCommonShape(tables);
  if (common === null) return { kind: 'notEstimable', reason: 'boundary' };
  const { logRates, rateCovariance: covariance, shape } = common;
  const logRatio = (logRates[1] ?? 0) - (logRates[0] ?? 0);
  const ratio = Math.exp(logRatio);
  if (!(ratio > 0 && ratio < Infinity)) return { kind: 'notEstimable', reason: 'boundary' };
  const variance = (covariance[0]?.[0] ?? 0) + (covariance[1]?.[1] ?? 0) - 2 * (covariance[0]?.[1] ?? 0);
  const error = Math.sqrt(variance);
  return {
    kind: 'estimate',
    ratio,
    interval: logInterval(logRatio, error, confidence),
    pValue: normalTwoSided(logRatio / error),
    shape,
    warnings: warningsOf(tables),
  };
}
