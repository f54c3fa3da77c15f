import { bracketRoot, findRoot, newtonRoot } from '../find-root';
import { requireConfidence, requireWhole } from '../requirement';
import type { Interval } from '../types';
import type { DiscreteDistribution } from './discrete-distribution';
import { fromRatios, momentsAt, tailsAt } from './discrete-distribution';

type Table = readonly [readonly [number, number], readonly [number, number]];

export type FisherResult = {
  /** Two-sided, by minimum likelihood. */
  pValue: number;
  /** Chance of a first cell this small or smaller. */
  less: number;
  /** Chance of a first cell this large or larger. */
  greater: number;
  /** Conditional; null where infinite, or undefined because a margin is empty. */
  oddsRatio: number | null;
  oddsRatioInterval: Interval;
};

/**
 * Whether two shares differ (came back after a repair with the clutch or without) when counts are too
 * small for approximations.
 *
 * Assumes independent rows; conditions on both margins, so the first cell is hypergeometric. The
 * two-sided p adds all tables no likelier than the one seen (minimum likelihood, as R's fisher.test). The odds
 * ratio is the conditional maximum likelihood one, not ad/bc; its exact limits are two-sided at
 * `confidence`. Counts in; chances and a ratio out.
 *
 * Source: Fisher (1935), JRSS 98; Agresti (2013), Categorical Data Analysis, 3rd ed., 3.5 and 16.6.
 *
 * @throws {RequirementError} where a count is not whole or the confidence is not between 0 and 1
 * @example fisherExact([[3, 1], [1, 3]]) // pValue 0.4857, greater 0.2429, oddsRatio 6.408
 */
export function fisherExact(
  [[a, b], [c, d]]: Table,
  { confidence = 0.95 }: { confidence?: number } = {},
): FisherResult {
  for (const count of [a, b, c, d]) requireWhole(count, 'fisherExact', 'every count');
  requireConfidence(confidence, 'fisherExact');
  const [row, column, rest] = [a + b, a + c, d - a];
  const first = Math.max(0, -rest);
  const last = Math.min(row, column);
  const distribution = fromRatios(
    first,
    last,
    (x) => ((row - x) * (column - x)) / ((x + 1) * (rest + x + 1)),
  );
  const { less, greater, twoSided } = tailsAt(distribution, a);
  return {
    pValue: twoSided,
    less,
    greater,
    oddsRatio: conditionalOddsRatio(distribution, a, last),
    oddsRatioInterval: oddsRatioLimits(distribution, a, last, (1 - confidence) / 2),
  };
}

/** The odds ratio at which the expected first cell is the observed one. */
function conditionalOddsRatio(
  distribution: DiscreteDistribution,
  observed: number,
  last: number,
): number | null {
  if (observed === last) return null;
  if (observed === distribution.first) return 0;
  const score = (logOdds: number): [number, number] => {
    const { mean, variance } = momentsAt(distribution, logOdds);
    return [mean - observed, variance];
  };
  const excess = (logOdds: number): number => score(logOdds)[0];
  const bracket = bracketRoot(excess, 0, excess(0) > 0 ? -1 : 1, 700);
  return bracket === null ? null : Math.exp(newtonRoot(score, bracket));
}

function oddsRatioLimits(
  distribution: DiscreteDistribution,
  observed: number,
  last: number,
  tail: number,
): Interval {
  const solve = (excess: (logOdds: number) => number): number | null => {
    const bracket = bracketRoot(excess, 0, excess(0) > 0 ? -1 : 1, 700);
    return bracket === null ? null : Math.exp(findRoot(excess, ...bracket));
  };
  return {
    lower:
      observed === distribution.first
        ? 0
        : solve((logOdds) => Math.log(tailsAt(distribution, observed, logOdds).greater / tail)),
    upper:
      observed === last
        ? null
        : solve((logOdds) => Math.log(tail / tailsAt(distribution, observed, logOdds).less)),
  };
}
