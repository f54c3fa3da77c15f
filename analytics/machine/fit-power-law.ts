import { chiSquareQuantile } from '../distributions';
import { requireConfidence } from '../requirement';
import type { Interval, NotEstimable, WarningCode } from '../types';
import type { EventSeries } from './event-series';
import { readSeries } from './event-series';

export type PowerLawFit = {
  kind: 'estimate';
  /** Above 1 the machine gets worse with age, below 1 better. */
  shape: number;
  /** Repairs expected by age 1. */
  coefficient: number;
  shapeInterval: Interval;
  /** Repairs per unit of age at the end of observation. */
  intensityAtEnd: number;
  events: number;
  warnings: WarningCode[];
};

/**
 * How the repair rate of one machine changes with its age, when each repair leaves it as old as it was.
 *
 * Assumes a Poisson process with E N(t) = coefficient · t^shape. Maximum likelihood: shape = n / Σ
 * log(T/t), coefficient = n / T^shape (not the unbiased variant); stopped at the last event
 * (`'failure'`), T is that event. Exact limits of the shape: shape·χ²/(2n), with 2n degrees of freedom
 * stopped by time and 2(n − 1) by failure, two-sided at `confidence` (0.95). Ages in one unit; intensity
 * is repairs per that unit. Not estimable without events, or with all events at the end.
 *
 * Source: Crow (1975), AMSAA TR-138; MIL-HDBK-189 (1981), appendix C; IEC 61710.
 *
 * @throws {RequirementError} where an event or the end is not finite and above 0, an event is after the
 * end by more than the 0.1 % that its rounding may make, or the confidence is not between 0 and 1
 * @example fitPowerLaw({ events: [20, 60, 80, 90], end: 100, truncation: 'time' }) // shape 1.644
 */
export function fitPowerLaw(
  series: EventSeries & { confidence?: number },
): PowerLawFit | NotEstimable<'noEvents' | 'allEventsAtEnd'> {
  const { confidence = 0.95, truncation } = series;
  requireConfidence(confidence, 'fitPowerLaw');
  const { end, inner, count } = readSeries(series, 'fitPowerLaw');
  if (count === 0) return { kind: 'notEstimable', reason: 'noEvents' };
  const logSum = inner.reduce((sum, event) => sum - Math.log(event / end), 0);
  if (!(logSum > 0)) return { kind: 'notEstimable', reason: 'allEventsAtEnd' };
  const shape = count / logSum;
  const degreesOfFreedom = 2 * (truncation === 'time' ? count : count - 1);
  const tail = (1 - confidence) / 2;
  const limit = (probability: number): number =>
    (shape * chiSquareQuantile(probability, degreesOfFreedom)) / (2 * count);
  return {
    kind: 'estimate',
    shape,
    coefficient: Math.exp(Math.log(count) - shape * Math.log(end)),
    shapeInterval: { lower: limit(tail), upper: limit(1 - tail) },
    intensityAtEnd: (count * shape) / end,
    events: count,
    warnings: count < 6 ? ['fewFailures'] : [],
  };
}
