import { chiSquareUpperTail } from '../distributions';
import { requireThat } from '../requirement';
import type { LifeObservation, NotEstimable, WarningCode } from '../types';
import { quadraticForm } from './quadratic-form';
import { riskAt, tabulateLives } from './tabulate-lives';

export type LogRankTest = {
  kind: 'estimate';
  chiSquare: number;
  degreesOfFreedom: number;
  pValue: number;
  /** Failures seen, and expected if all groups failed alike, in the order of the groups. */
  observed: number[];
  expected: number[];
  /** Covariance of observed − expected. */
  variance: number[][];
  warnings: WarningCode[];
};

/**
 * Whether parts of several groups (old number, new number) fail differently, without assuming any
 * distribution; strongest where one group's failure rate is a fixed multiple of the other's.
 *
 * Assumes independent lives, and censoring and late entry unrelated to failure. At every failure age
 * the failures are shared out by the numbers at risk (entry < t ≤ exit); χ² = uᵀV⁻¹u with u = observed
 * − expected and the hypergeometric V. Groups never at risk at a failure take no degree of freedom.
 * Times in one unit for all groups. Not estimable without failures, or where no two groups were ever at
 * risk together.
 *
 * Source: Mantel (1966), Cancer Chemotherapy Reports 50; Kalbfleisch & Prentice (2002), 1.5.
 *
 * @throws {RequirementError} with fewer than two groups, or on a wrong observation as in `kaplanMeier`
 * @example logRankTest([sixMp, control]) // Gehan (1965): chiSquare 16.793, 1 degree of freedom, pValue 4.2e-5
 */
export function logRankTest(
  groups: readonly (readonly LifeObservation[])[],
): LogRankTest | NotEstimable<'noFailures' | 'neverAtRiskTogether'> {
  requireThat(groups.length >= 2, 'logRankTest', 'at least two groups');
  const tables = groups.map((lives) => tabulateLives(lives, 'logRankTest'));
  const times = Float64Array.from(
    new Set(tables.flatMap(({ ages, failed }) => Array.from(ages.filter((_, i) => (failed[i] ?? 0) > 0)))),
  ).sort();
  if (times.length === 0) return { kind: 'notEstimable', reason: 'noFailures' };
  const risks = tables.map((table) => riskAt(table, times));
  const observed = tables.map(({ failures }) => failures);
  const expected = groups.map(() => 0);
  const variance = groups.map(() => groups.map(() => 0));
  for (let i = 0; i < times.length; i++) {
    const atRisk = risks.map((risk) => risk.atRisk[i] ?? 0);
    const total = atRisk.reduce((sum, n) => sum + n, 0);
    const failures = risks.reduce((sum, risk) => sum + (risk.failures[i] ?? 0), 0);
    const spread = total > 1 ? (failures * (total - failures)) / (total - 1) : 0;
    atRisk.forEach((n, g) => {
      const share = n / total;
      expected[g] = (expected[g] ?? 0) + failures * share;
      atRisk.forEach((m, h) => {
        const row = variance[g];
        if (row) row[h] = (row[h] ?? 0) + spread * share * ((g === h ? 1 : 0) - m / total);
      });
    });
  }
  const difference = observed.map((count, g) => count - (expected[g] ?? 0));
  // The differences add up to 0, so the last group says nothing more; rank finds any further emptiness.
  const { value, rank } = quadraticForm(variance, difference);
  if (rank === 0) return { kind: 'notEstimable', reason: 'neverAtRiskTogether' };
  return {
    kind: 'estimate',
    chiSquare: value,
    degreesOfFreedom: rank,
    pValue: chiSquareUpperTail(value, rank),
    observed,
    expected,
    variance,
    warnings: observed.reduce((sum, count) => sum + count, 0) < 6 ? ['fewFailures'] : [],
  };
}
