import type { Interval, LineReason } from '../types';

export type CascadeVisit = {
  unitId: string;
  model: string;
  /** Whole or fractional day on any one calendar scale, the same for all visits and units. */
  day: number;
  /** Meter reading; `null` where it was not read. */
  hours: number | null;
  lines: readonly { component: string; reason: LineReason | null }[];
  /** The caller's name of the visit, handed back in the cases. */
  visitId?: string;
};

/** From which day to which day the shop would have seen a unit's repairs. */
export type ObservedUnit = {
  unitId: string;
  model: string;
  fromDay: number;
  toDay: number;
  fromHours?: number | null;
  toHours?: number | null;
};

/** Models that share a deck, an engine or a clutch; a model may be in one family only. */
export type ModelFamily = { name: string; models: readonly string[] };

export type DeclaredChain = { causal: string; resultant: string };

export type CascadeOptions = {
  units?: readonly ObservedUnit[];
  /** Visits after this day are not looked at; the last day of the records when absent. */
  asOfDay?: number;
  /** Days within which a later visit belongs to the same trouble; 90 when absent. */
  windowDays?: number;
  /** Limit of the false discovery rate over everything examined; 0.05 when absent. */
  maxFalseDiscovery?: number;
  families?: readonly ModelFamily[];
  /** Chains named before the records are looked at; the trade's own list when absent. */
  declared?: readonly DeclaredChain[];
  /** What a line without a reason counts as; `excluded` when absent. */
  unknownReasons?: 'excluded' | 'failed';
};

export type CascadeWarning =
  'noUnits' | 'unknownReasons' | 'noFailures' | 'noHours' | 'visitsAfterAsOf' | 'visitsOutsideUnit';

/** What the records alone can show; `tested as cause` needs a reading or a bench test, which they do not hold. */
export type CascadeEvidence = 'seen together' | 'replaced before';

export type CaseVisit = { day: number; hours: number | null; visitIds: string[]; components: string[] };

/** One episode of one unit: its visits in order, and whether it speaks for the finding. */
export type CascadeCase = {
  unitId: string;
  stance: 'for' | 'against' | 'neutral';
  /** `resultantFirst`: the cure came later; `sameVisit`; `causalFirst`; `returnedAfterCure`: trouble came back although both were replaced. */
  course: 'resultantFirst' | 'sameVisit' | 'causalFirst' | 'returnedAfterCure';
  visits: CaseVisit[];
};

/** Every count behind a pair; sums that must hold are given with each group. */
export type CascadeCounts = {
  /** causalTotal, resultantTotal: visits in which the component was replaced as failed or damaged. */
  causalTotal: number;
  resultantTotal: number;
  /** resultantNearCausal + resultantAlone = resultantTotal; near = in an episode that also has the causal part. */
  resultantNearCausal: number;
  resultantAlone: number;
  /** withBoth + causalOnly + resultantOnly = episodes. */
  episodes: number;
  withBoth: number;
  causalOnly: number;
  resultantOnly: number;
  /** causalFirst + resultantFirst + sameVisitFirst = withBoth: what its first visit replaced. */
  causalFirst: number;
  resultantFirst: number;
  sameVisitFirst: number;
  /** endedByCausal + endedByResultant + endedByBoth = withBoth: what its last visit replaced. */
  endedByCausal: number;
  endedByResultant: number;
  endedByBoth: number;
  /** Of resultantFirst, those where the resultant part was replaced twice or more before the causal one. */
  repeatedBeforeCure: number;
  /** Visits of the episodes with both, beyond the first of each. */
  extraVisits: number;
  /** soloReplacements + withCausalReplacements + unjudgedReplacements = resultantTotal; unjudged = the window is not complete. */
  soloReplacements: number;
  soloReturns: number;
  withCausalReplacements: number;
  withCausalReturns: number;
  unjudgedReplacements: number;
};

export type CascadeFinding = CascadeCounts & {
  model: string;
  family?: string;
  causal: string;
  resultant: string;
  kind: 'cascade' | 'together';
  declared: boolean;
  evidence: CascadeEvidence;
  /** The smallest false-discovery limit at which the finding is kept. */
  qValue: number;
  /** Local false discovery rate: the probability, given all models, that this one is none of this kind (Efron 2010). */
  localFalseDiscovery: number;
  /** Share of returns after the resultant part alone ÷ share after both, exact limits; `null` = undefined or infinite. */
  returnRatio: number | null;
  returnRatioLimits: Interval;
  /** One-sided exact test that trouble returns oftener after the resultant part alone; `null` where nothing can be compared. */
  returnPValue: number | null;
  /** Episodes with both, against their number expected from each part's own age-dependent hazard. */
  observedNear: number;
  expectedNear: number;
  excessRatio: number | null;
  excessRatioLimits: Interval;
  /** Expected share of resultant-first among the ordered episodes if neither caused the other (sequence symmetry). */
  nullResultantFirst: number | null;
  /** resultantNearCausal ÷ resultantTotal. */
  shareExplained: number;
  /** From the first replacement of one to the first of the other, over the ordered episodes; `null` where unknown. */
  medianDays: number | null;
  medianHoursBetween: number | null;
  /** Other models whose records lent strength: the same pair is seen there too. */
  borrowedFrom: string[];
  cases: CascadeCase[];
};

/** A pair seen near each other, of which nothing is claimed. */
export type CascadeCaseFile = {
  model: string;
  /** Alphabetical. */
  components: [string, string];
  episodes: number;
  cases: CascadeCase[];
};

export type CascadeExamined = {
  models: number;
  units: number;
  visits: number;
  /** Unordered pairs of components of one model in which both failed at least once. */
  pairs: number;
  declaredPairs: number;
  searchedPairs: number;
  linesKnown: number;
  linesUnknown: number;
  /** Clock on which ages were taken. */
  clock: 'hours' | 'days';
};

export type CascadeResult = {
  findings: CascadeFinding[];
  caseFiles: CascadeCaseFile[];
  examined: CascadeExamined;
  warnings: CascadeWarning[];
};
