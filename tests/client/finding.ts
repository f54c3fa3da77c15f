import type { FindingSummary, FindingWhole } from '../../shared/findings';
import { CLUTCH, FINDING_ID, R42, SWITCH } from './part-life';

type Episode = FindingWhole['cases'][number];

/** A switch first, the clutch a month later; or, against it, the clutch first. */
export function episode(index: number, given: Partial<Episode> = {}): Episode {
  const repair = (visit: number) => ({
    id: `repair-${index}-${visit}`,
    name: `R-${2000 + index * 10 + visit}`,
  });
  const visit = { hours: 100, spentCents: 12_000, causal: false, resultant: false };
  return {
    unit: { id: `unit-${index}`, name: `TN-${10_000 + index}` },
    speaks: 'for',
    why: 'PTO switch first; the trouble stayed until the PTO clutch was replaced.',
    visits: [
      { ...visit, repair: repair(0), on: '2025-05-02', daysIn: 0, hoursIn: 0, resultant: true },
      { ...visit, repair: repair(1), on: '2025-06-01', daysIn: 30, hoursIn: 20 + index, causal: true },
    ],
    ...given,
  };
}

export function findingWhole(given: Partial<FindingWhole> = {}): FindingWhole {
  return {
    id: FINDING_ID,
    maker: 'Tarnlow',
    model: 'R42',
    modelId: R42.id,
    family: null,
    causal: CLUTCH.name,
    resultant: SWITCH.name,
    causalComponent: CLUTCH,
    resultantComponent: SWITCH,
    kind: 'cascade',
    qValue: 0.0004,
    isDeclared: true,
    evidence: 'replaced_before',
    episodes: 74,
    episodesWithBoth: 61,
    resultantFailures: 86,
    resultantNearCausal: 73,
    resultantAlone: 13,
    leftIn: { returns: 31, of: 44, interval: { lower: 0.56, upper: 0.82 } },
    replaced: { returns: 1, of: 38, interval: { lower: 0, upper: 0.13 } },
    returnRatio: 26.8,
    returnRatioInterval: { lower: 4.4, upper: 189 },
    expectedNear: 3.4,
    excessRatio: 17.9,
    excessRatioInterval: { lower: 14, upper: 23 },
    endedByCausal: 30,
    endedByResultant: 4,
    causalFirst: 4,
    resultantFirst: 36,
    shareExplained: 73 / 86,
    medianHours: 26,
    medianDays: 31,
    borrowedFrom: [],
    spentCents: 687_000,
    cases: [
      ...Array.from({ length: 18 }, (_, index) => episode(index)),
      episode(90, {
        speaks: 'against',
        why: 'PTO clutch first, and the PTO switch still had to be replaced later.',
      }),
    ],
    ...given,
  };
}

export const summary = (given: Partial<FindingSummary> = {}): FindingSummary => ({
  asOf: '2026-06-30',
  pairsExamined: 153,
  models: 20,
  caseFiles: [],
  warnings: [],
  ...given,
});
