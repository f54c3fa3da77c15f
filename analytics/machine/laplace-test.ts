import { normalTwoSided } from '../distributions';
import type { NotEstimable, WarningCode } from '../types';
import type { EventSeries } from './event-series';
import { readSeries } from './event-series';

export type LaplaceTest = {
  kind: 'estimate';
  /** Standard normal without a trend; above 0 repairs come faster with age, below 0 slower. */
  statistic: number;
  pValue: number;
  warnings: WarningCode[];
};

/**
 * Whether a machine's repairs come faster or slower as it ages.
 *
 * Assumes a Poisson process; tests against a rate that changes log-linearly with age. With m events
 * inside (0, T): U = (Σt − mT/2) / (T·√(m/12)), two-sided p from the normal distribution. Stopped at the
 * last event (`'failure'`), that event is T and is left out of the sum. Ages in one unit. Not estimable
 * without an event inside.
 *
 * Source: Cox & Lewis (1966), The Statistical Analysis of Series of Events, 3.3; IEC 60605-6.
 *
 * @throws {RequirementError} where an event or the end is not finite and above 0, or an event is after
 * the end (beyond the rounding of 0.1 % that an end in whole units may carry)
 * @example laplaceTest({ events: [20, 60, 80, 90], end: 100, truncation: 'time' }) // statistic 0.866, pValue 0.386
 */
export function laplaceTest(series: EventSeries): LaplaceTest | NotEstimable<'noEvents'> {
  const { end, inner } = readSeries(series, 'laplaceTest');
  if (inner.length === 0) return { kind: 'notEstimable', reason: 'noEvents' };
  const excess = inner.reduce((sum, event) => sum + (event / end - 0.5), 0);
  const statistic = excess / Math.sqrt(inner.length / 12);
  return {
    kind: 'estimate',
    statistic,
    pValue: normalTwoSided(statistic),
    warnings: inner.length < 6 ? ['fewFailures'] : [],
  };
}
