import { requireThat } from '../requirement';
import type { LifeObservation, NotEstimable, WarningCode } from '../types';

export type RankRegression = {
  kind: 'estimate';
  shape: number;
  /** In the unit of the times. */
  scale: number;
  rSquared: number;
  points: { time: number; adjustedRank: number; failedShare: number }[];
  warnings: WarningCode[];
};

/**
 * The line through the failures on Weibull paper, as shops and suppliers draw it by hand; for comparison
 * with them, since maximum likelihood (`fitWeibull`) uses the running parts better.
 *
 * Assumes Weibull lives, observed from age 0. Failures take Johnson's adjusted ranks, plotted at
 * Benard's (rank − 0.3)/(n + 0.4); log time is regressed on log(−log(1 − share)) (x on y). Tied failures
 * keep separate ranks, and precede parts still running at the same age; a whole weight counts copies.
 * Not estimable with fewer than two distinct failure ages.
 *
 * Source: Abernethy, The New Weibull Handbook, ch. 2; IEC 61649:2008; Johnson (1964).
 *
 * @throws {RequirementError} where a time is not finite and above 0, an entry is not 0, or a weight not
 * whole
 * @example medianRankRegression(abernethy) // 30F 49F 82F 90F 96F, 10 45 100 running: shape 2.024, scale 95.00
 */
export function medianRankRegression(
  observations: readonly LifeObservation[],
): RankRegression | NotEstimable<'noFailures' | 'oneFailureAge'> {
  for (const { time, entry = 0, weight = 1 } of observations) {
    requireThat(time > 0 && time < Infinity, 'medianRankRegression', 'every time to be finite and above 0');
    requireThat(entry === 0, 'medianRankRegression', 'every entry to be 0');
    requireThat(
      Number.isSafeInteger(weight) && weight >= 0,
      'medianRankRegression',
      'every weight to be a whole number ≥ 0',
    );
  }
  const points = adjustedRanks(observations);
  if (points.length === 0) return { kind: 'notEstimable', reason: 'noFailures' };
  if (points.every(({ time }) => time === points[0]?.time))
    return { kind: 'notEstimable', reason: 'oneFailureAge' };
  const reference = points.at(-1)?.time ?? 1;
  const x = points.map(({ time }) => Math.log(time / reference));
  const y = points.map(({ failedShare }) => Math.log(-Math.log1p(-failedShare)));
  const [xx, xy, yy] = [products(x, x), products(x, y), products(y, y)];
  const shape = yy / xy;
  return {
    kind: 'estimate',
    shape,
    scale: reference * Math.exp(mean(x) - mean(y) / shape),
    rSquared: (xy * xy) / (xx * yy),
    points,
    warnings: points.length < 6 ? ['fewFailures'] : [],
  };
}

function adjustedRanks(observations: readonly LifeObservation[]): RankRegression['points'] {
  const rows = observations
    .map(({ time, failed, weight = 1 }) => ({ time, failed, weight }))
    .sort((a, b) => a.time - b.time || Number(b.failed) - Number(a.failed));
  const total = rows.reduce((sum, { weight }) => sum + weight, 0);
  const points: RankRegression['points'] = [];
  let rank = 0;
  let left = total;
  for (const { time, failed, weight } of rows) {
    for (let copy = 0; failed && copy < weight; copy++) {
      rank += (total + 1 - rank) / (left - copy + 1);
      points.push({ time, adjustedRank: rank, failedShare: (rank - 0.3) / (total + 0.4) });
    }
    left -= weight;
  }
  return points;
}

function mean(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}

/** Sum of products of deviations. */
function products(a: readonly number[], b: readonly number[]): number {
  const [meanA, meanB] = [mean(a), mean(b)];
  return a.reduce((sum, value, i) => sum + (value - meanA) * ((b[i] ?? 0) - meanB), 0);
}
