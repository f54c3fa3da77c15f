import { bracketRoot, newtonRoot } from '../find-root';
import type { LifeTable } from './tabulate-lives';
import { powerSums, weibullData } from './weibull-likelihood';

export type CommonShape = {
  shape: number;
  scales: number[];
  logLikelihood: number;
  /** log η^−β of each group, ages relative to the largest of all. */
  logRates: number[];
  rateCovariance: number[][];
};

/**
 * Weibull fits that share one β, each group with its own η; null where the fit is driven to a boundary.
 * Every group has a failure.
 */
export function fitCommonShape(tables: readonly LifeTable[]): CommonShape | null {
  const groups = tables.map(weibullData);
  const failures = groups.reduce((sum, group) => sum + group.failures, 0);
  const failedLogSum = groups.reduce((sum, group) => sum + group.failedLogSum, 0);
  // Every failure at the largest age of its group: the shape is driven to infinity.
  if (failedLogSum === 0) return null;
  const slopeAt = (logShape: number): [number, number] => {
    const shape = Math.exp(logShape);
    let tilt = shape * failedLogSum;
    let bend = 0;
    for (const group of groups) {
      const [sum, first, second] = powerSums(group, shape);
      const mean = first / sum;
      tilt -= shape * group.failures * mean;
      bend += group.failures * shape * shape * (second / sum - mean * mean);
    }
    return [failures + tilt, tilt - bend];
  };
  const valueAt = (logShape: number): number => slopeAt(logShape)[0];
  const start = -Math.log(-failedLogSum / failures);
  const bracket = bracketRoot(valueAt, start, valueAt(start) > 0 ? 0.5 : -0.5, 60);
  if (bracket === null) return null;
  const logShape = newtonRoot(slopeAt, bracket);
  const curvature = -slopeAt(logShape)[1];
  const shape = Math.exp(logShape);
  if (!(curvature > 0)) return null;
  const sums = groups.map((group) => powerSums(group, shape));
  const logScales = groups.map(
    ({ reference, failures: count }, g) => reference + Math.log((sums[g]?.[0] ?? 1) / count) / shape,
  );
  const farthest = Math.max(...groups.map(({ reference }) => reference));
  // How the log rate of each group, by the power of the largest age, moves with log β.
  const pulls = groups.map(({ reference }, g) => {
    const [sum, first] = sums[g] ?? [1, 0];
    return -shape * (first / sum + reference - farthest);
  });
  return {
    shape,
    scales: logScales.map(Math.exp),
    logLikelihood: groups.reduce((total, group, g) => {
      const logRate = Math.log(group.failures / (sums[g]?.[0] ?? 1));
      return (
        total + group.failures * (logShape + logRate - group.reference - 1) + (shape - 1) * group.failedLogSum
      );
    }, 0),
    logRates: logScales.map((logScale) => shape * (farthest - logScale)),
    rateCovariance: pulls.map((pull, g) =>
      pulls.map((other, h) => (g === h ? 1 / (groups[g]?.failures ?? 1) : 0) + (pull * other) / curvature),
    ),
  };
}
