import { chiSquareQuantile } from '../distributions';
import { requireConfidence, requireThat, requireWhole } from '../requirement';
import type { NotEstimable, WarningCode } from '../types';

export type MeanTimeBetweenFailures = {
  kind: 'estimate';
  /** In the unit of the exposure; null (infinite) without a failure. */
  estimate: number | null;
  lower: number;
  upper: number | null;
  warnings: WarningCode[];
};

/**
 * How long a machine runs between failures on average, with exact limits.
 *
 * Assumes a failure rate that does not change with age: test for a trend first. Exposure/failures;
 * limits 2·exposure/χ² with 2r degrees of freedom, and 2r + 2 for the lower one where observation ended
 * at a set time (`'time'`) rather than at the last failure (`'failure'`). Results are in the unit of the
 * exposure (hours). Without a failure the estimate and upper limit are null and the lower limit is the
 * two-sided one, at α/2.
 *
 * Not estimable without exposure, or at truncation `'failure'` without a failure.
 *
 * Source: NIST/SEMATECH e-Handbook of Statistical Methods, 8.4.5.1.
 *
 * @throws {RequirementError} where failures are not whole, the exposure is not finite or negative, or
 * the confidence is not between 0 and 1
 * @example meanTimeBetweenFailures({ failures: 2, exposure: 1600, truncation: 'time', confidence: 0.9 })
 * // { estimate: 800, lower: 254.1, upper: 4502.5 } hours
 */
export function meanTimeBetweenFailures(observed: {
  failures: number;
  exposure: number;
  truncation: 'time' | 'failure';
  confidence?: number;
}): MeanTimeBetweenFailures | NotEstimable<'noExposure' | 'noFailures'> {
  const { failures, exposure, truncation, confidence = 0.95 } = observed;
  requireWhole(failures, 'meanTimeBetweenFailures', 'failures');
  requireThat(
    exposure >= 0 && exposure < Infinity,
    'meanTimeBetweenFailures',
    'the exposure to be finite and not negative',
  );
  requireConfidence(confidence, 'meanTimeBetweenFailures');
  if (exposure === 0) return { kind: 'notEstimable', reason: 'noExposure' };
  if (truncation === 'failure' && failures === 0) return { kind: 'notEstimable', reason: 'noFailures' };
  const tail = (1 - confidence) / 2;
  const lowerDegrees = truncation === 'time' ? 2 * failures + 2 : 2 * failures;
  return {
    kind: 'estimate',
    estimate: failures === 0 ? null : exposure / failures,
    lower: (2 * exposure) / chiSquareQuantile(1 - tail, lowerDegrees),
    upper: failures === 0 ? null : (2 * exposure) / chiSquareQuantile(tail, 2 * failures),
    warnings: [],
  };
}
