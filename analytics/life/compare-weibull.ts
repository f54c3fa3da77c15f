import { chiSquareUpperTail } from '../distributions';
import { requireThat } from '../requirement';
import type { LifeObservation, NotEstimable, WarningCode } from '../types';
import { fitCommonShape } from './common-shape';
import type { WeibullFit, WeibullReason } from './fit-weibull';
import { fitWeibullTable } from './fit-weibull';
import type { LifeTable } from './tabulate-lives';
import { tabulateLives } from './tabulate-lives';

type LikelihoodRatio = { statistic: number; degreesOfFreedom: number; pValue: number };

export type WeibullComparison = LikelihoodRatio & {
  kind: 'estimate';
  /** Whether the shapes differ, with each group's own scale. */
  equalShape: LikelihoodRatio;
  /** Whether the scales differ, given one common shape. */
  equalScale: LikelihoodRatio;
  /** Each group's own fit, in the order of the groups. */
  fits: WeibullFit[];
  pooled: WeibullFit;
  commonShape: { shape: number; scales: number[]; logLikelihood: number };
  warnings: WarningCode[];
};

/**
 * Whether several groups of parts (old number, new number) have different Weibull lives, in shape or
 * scale or both.
 *
 * Assumes a Weibull life in each group, independent lives, and at least about 30 failures in the
 * smallest group for the stated level. Twice the log-likelihood of separate fits over one pooled fit, χ²
 * with 2(k − 1) degrees of freedom; split into equal shape and equal scale given a common shape, k − 1
 * each. Times in one unit for all groups. Not estimable where the fit of any group is not.
 *
 * Source: Meeker, Escobar & Pascual (2022), Statistical Methods for Reliability Data, 2nd ed., ch. 8;
 * Lawless (2003), 5.2.
 *
 * @throws {RequirementError} with fewer than two groups, or on a wrong observation as in `fitWeibull`
 * @example compareWeibull([sixMp, control]) // Gehan (1965): statistic 19.653, 2 degrees, pValue 5.4e-5
 */
export function compareWeibull(
  groups: readonly (readonly LifeObservation[])[],
): WeibullComparison | NotEstimable<WeibullReason> {
  requireThat(groups.length >= 2, 'compareWeibull', 'at least two groups');
  const tables = groups.map((lives) => tabulateLives(lives, 'compareWeibull'));
  const fits: WeibullFit[] = [];
  for (const table of tables) {
    const fit = fitWeibullTable(table);
    if (fit.kind === 'notEstimable') return fit;
    fits.push(fit);
  }
  const pooled = fitWeibullTable(tabulateLives(groups.flat(), 'compareWeibull'));
  if (pooled.kind === 'notEstimable') return pooled;
  const common = fitCommonShape(tables);
  if (common === null) return { kind: 'notEstimable', reason: 'boundary' };
  const separate = fits.reduce((sum, fit) => sum + fit.logLikelihood, 0);
  const { shape, scales, logLikelihood } = common;
  return {
    kind: 'estimate',
    ...likelihoodRatio(separate, pooled.logLikelihood, 2 * (groups.length - 1)),
    equalShape: likelihoodRatio(separate, logLikelihood, groups.length - 1),
    equalScale: likelihoodRatio(logLikelihood, pooled.logLikelihood, groups.length - 1),
    fits,
    pooled,
    commonShape: { shape, scales, logLikelihood },
    warnings: warningsOf(tables),
  };
}

/** `fewFailures` where the smallest group has few. */
export function warningsOf(tables: readonly LifeTable[]): WarningCode[] {
  return tables.some(({ failures }) => failures < 6) ? ['fewFailures'] : [];
}

function likelihoodRatio(full: number, restricted: number, degreesOfFreedom: number): LikelihoodRatio {
  const statistic = Math.max(0, 2 * (full - restricted));
  return { statistic, degreesOfFreedom, pValue: chiSquareUpperTail(statistic, degreesOfFreedom) };
}
