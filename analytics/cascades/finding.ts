import { chiSquareQuantile } from '../distributions';
import { fisherExact } from '../rates/fisher-exact';
import { poissonRateRatio } from '../rates/poisson-rate-ratio';
import type { Interval } from '../types';
import type { ExaminedModel } from './examine';
import { countEpisodes, episodesOf, medianGaps, toCases, unitsWithEither } from './pair-view';
import type { Selected } from './select';
import type { CascadeCounts, CascadeFinding } from './types';

/** Exact limits of a Poisson count over its expectation, 95 %. */
const excessLimits = (observed: number, expected: number): Interval =>
  expected > 0
    ? {
        lower: observed === 0 ? 0 : chiSquareQuantile(0.025, 2 * observed) / 2 / expected,
        upper: chiSquareQuantile(0.975, 2 * observed + 2) / 2 / expected,
      }
    : { lower: null, upper: null };

/** Step 1: trouble back after the resultant part alone, against after both. */
const compareReturns = (counts: CascadeCounts) => {
  const { soloReplacements, soloReturns, withCausalReplacements, withCausalReturns } = counts;
  if (soloReplacements === 0 || withCausalReplacements === 0)
    return { returnRatio: null, returnRatioLimits: { lower: null, upper: null }, returnPValue: null };
  const { ratio, lower, upper } = poissonRateRatio({
    countA: soloReturns,
    exposureA: soloReplacements,
    countB: withCausalReturns,
    exposureB: withCausalReplacements,
  });
  const { greater } = fisherExact([
    [soloReturns, soloReplacements - soloReturns],
    [withCausalReturns, withCausalReplacements - withCausalReturns],
  ]);
  return { returnRatio: ratio, returnRatioLimits: { lower, upper }, returnPValue: greater };
};

export type FindingContext = {
  model: ExaminedModel;
  names: readonly string[];
  windowDays: number;
  family: string | undefined;
  borrowedFrom: string[];
};

export const toFinding = (selected: Selected, context: FindingContext): CascadeFinding => {
  const { model, names, windowDays, family } = context;
  const { judged, kind, aCauses } = selected;
  const { a, b } = judged.pair;
  const [causal, resultant] = aCauses ? [a, b] : [b, a];
  const episodes = episodesOf(
    model,
    unitsWithEither(model, causal, resultant),
    causal,
    resultant,
    windowDays,
  );
  const counts = countEpisodes(episodes, windowDays);
  const { expectedAFirst, expectedBFirst } = judged.evidence;
  const ordered = expectedAFirst + expectedBFirst;
  const expectedNear = ordered * (1 + 1 / windowDays);
  return {
    model: model.history.model,
    ...(family === undefined ? {} : { family }),
    causal: names[causal] ?? '',
    resultant: names[resultant] ?? '',
    kind,
    declared: selected.declared,
    evidence: kind === 'cascade' && counts.resultantFirst > 0 ? 'replaced before' : 'seen together',
    qValue: selected.qValue,
    localFalseDiscovery: selected.localFalseDiscovery,
    ...counts,
    ...compareReturns(counts),
    observedNear: counts.withBoth,
    expectedNear,
    excessRatio: expectedNear > 0 ? counts.withBoth / expectedNear : null,
    excessRatioLimits: excessLimits(counts.withBoth, expectedNear),
    nullResultantFirst: ordered > 0 ? (aCauses ? expectedBFirst : expectedAFirst) / ordered : null,
    shareExplained: counts.resultantNearCausal / Math.max(1, counts.resultantTotal),
    ...medianGaps(episodes),
    borrowedFrom: context.borrowedFrom,
    cases: toCases(episodes, names, kind === 'cascade'),
  };
};
