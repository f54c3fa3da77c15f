import { normalLimit } from '../distributions';
import { requireConfidence } from '../requirement';
import type { Forecast } from './conditional-failure';
import { conditionalFailures, requireForecast } from './conditional-failure';
import { countQuantiles, expectedVariance } from './failure-count-quantile';

export type ExpectedFailures = {
  expected: number;
  /** Limits of the expected number from the uncertainty of the fit; null without a covariance. */
  lower: number | null;
  upper: number | null;
  /** Of the number of failures, the fit taken as known. */
  variance: number;
  /** Chance of each part to fail within its horizon, in the order of the ages. */
  probabilities: number[];
  /** Between which numbers the failures will lie: chance, and the uncertainty of the fit where given. */
  countInterval: { lower: number; upper: number };
};

/**
 * How many of the parts now running will fail within the next hours.
 *
 * Assumes the Weibull life holds for each, independently, and counts first failures only. Expected = Σ
 * P(fail within horizon | alive at age) = Σ 1 − exp(−(H(age + horizon) − H(age))). `lower` and `upper` are
 * Wald limits of that sum on the log scale by the delta method, cut at the number of parts;
 * `countInterval` is where the count itself will lie (as `failureCountQuantile`). Both two-sided at
 * `confidence` (0.95). Ages and horizon in the unit of the scale.
 *
 * Source: Meeker, Escobar & Pascual (2022), Statistical Methods for Reliability Data, 2nd ed., ch. 15.
 *
 * @throws {RequirementError} where shape or scale is not finite and above 0, an age or horizon is not
 * finite or negative, horizons and ages differ in number, or the confidence is not between 0 and 1
 * @example expectedFailures({ fit: { shape: 1, scale: 1000 }, ages: [0, 500], horizon: 1000 }).expected // 1.264
 */
export function expectedFailures({
  confidence = 0.95,
  ...forecast
}: Forecast & { confidence?: number }): ExpectedFailures {
  requireForecast(forecast, 'expectedFailures');
  requireConfidence(confidence, 'expectedFailures');
  const probabilities = conditionalFailures(forecast).map(({ probability }) => probability);
  const expected = probabilities.reduce((sum, p) => sum + p, 0);
  const tail = (1 - confidence) / 2;
  const [low = 0, high = 0] = countQuantiles(forecast, [tail, 1 - tail]);
  return {
    expected,
    ...limitsOf(forecast, expected, confidence),
    variance: probabilities.reduce((sum, p) => sum + p * (1 - p), 0),
    probabilities,
    countInterval: { lower: low, upper: high },
  };
}

function limitsOf(
  forecast: Forecast,
  expected: number,
  confidence: number,
): { lower: number | null; upper: number | null } {
  if (forecast.fit.covariance === undefined) return { lower: null, upper: null };
  if (expected === 0) return { lower: 0, upper: 0 };
  const logError = Math.sqrt(Math.max(expectedVariance(forecast).variance, 0)) / expected;
  const reach = Math.exp(normalLimit(confidence) * logError);
  return { lower: expected / reach, upper: Math.min(expected * reach, forecast.ages.length) };
}
