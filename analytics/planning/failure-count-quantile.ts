import { requireThat } from '../requirement';
import type { Forecast } from './conditional-failure';
import { conditionalFailures, requireForecast } from './conditional-failure';
import { countDistribution, mixtureQuantile } from './count-distribution';

/**
 * How many parts to have in stock so that they suffice with a given chance.
 *
 * Assumes the Weibull life holds for each running part, independently, with at most one failure each.
 * The count is Poisson-binomial; where the fit has a covariance, averaged over the uncertainty of the
 * fit along the direction that moves the expected number most (31 normal points from −3.75 to 3.75). Ages and
 * horizon in the unit of the scale; `level` is a chance; the result counts parts.
 *
 * Source: Meeker, Escobar & Pascual (2022), Statistical Methods for Reliability Data, 2nd ed., ch. 15;
 * Hong (2013), Computational Statistics & Data Analysis 59.
 *
 * @throws {RequirementError} as `expectedFailures`, or where the level is not between 0 and 1
 * @example failureCountQuantile({ fit: { shape: 1, scale: 1000 }, ages: [0, 500, 900], horizon: 1000 }, 0.9) // 3
 */
export function failureCountQuantile(forecast: Forecast, level: number): number {
  requireForecast(forecast, 'failureCountQuantile');
  requireThat(level > 0 && level < 1, 'failureCountQuantile', 'a level between 0 and 1');
  return countQuantiles(forecast, [level])[0] ?? 0;
}

/** Standard normal points and weights that stand for the uncertainty of the fit. */
const POINTS = Array.from({ length: 31 }, (_, i) => (i - 15) / 4);
const WEIGHT_SUM = POINTS.reduce((sum, z) => sum + Math.exp((-z * z) / 2), 0);

export function countQuantiles(forecast: Forecast, levels: readonly number[]): number[] {
  const parts = likelyFits(forecast).map(({ weight, fit }) => ({
    weight,
    distribution: countDistribution(
      conditionalFailures({ ...forecast, fit }).map(({ probability }) => probability),
    ),
  }));
  return levels.map((level) => mixtureQuantile(parts, level, forecast.ages.length));
}

function likelyFits(forecast: Forecast): { weight: number; fit: { shape: number; scale: number } }[] {
  const { fit } = forecast;
  const { variance, direction } = expectedVariance(forecast);
  if (!(variance > 0)) return [{ weight: 1, fit }];
  return POINTS.map((z) => ({
    weight: Math.exp((-z * z) / 2) / WEIGHT_SUM,
    fit: {
      scale: fit.scale * Math.exp((z * direction[0]) / Math.sqrt(variance)),
      shape: fit.shape * Math.exp((z * direction[1]) / Math.sqrt(variance)),
    },
  }));
}

/** Delta-method variance of the expected number, and covariance times gradient. */
export function expectedVariance(forecast: Forecast): { variance: number; direction: [number, number] } {
  const { covariance } = forecast.fit;
  if (covariance === undefined) return { variance: 0, direction: [0, 0] };
  let [byScale, byShape] = [0, 0];
  for (const { byLogScale, byLogShape } of conditionalFailures(forecast)) {
    byScale += byLogScale;
    byShape += byLogShape;
  }
  const direction: [number, number] = [
    covariance[0][0] * byScale + covariance[0][1] * byShape,
    covariance[1][0] * byScale + covariance[1][1] * byShape,
  ];
  return { variance: byScale * direction[0] + byShape * direction[1], direction };
}
