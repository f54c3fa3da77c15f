import type { PairEvidence } from './evidence';
import { fitHazards, unitAges } from './hazards';
import type { HazardBetween, UnitAges } from './hazards';
import { chooseClock, unitClocks } from './clock';
import type { Histories, ModelHistory, UnitHistory } from './histories';
import { expectedAfter, failureIndex, linkedPairs, pairEpisodes, pairSteps } from './links';
import type { PairEpisode } from './links';

/** One pair in one model that was near each other at least once. */
export type ExaminedPair = {
  model: number;
  a: number;
  b: number;
  /** Units where the two were within the window; elsewhere each stands alone. */
  units: number[];
  evidence: PairEvidence;
  linkedVisits: number;
  /** Replacements of A, of B in the episodes with both. */
  aLinked: number;
  bLinked: number;
};

export type ExaminedModel = {
  history: ModelHistory;
  ages: UnitAges[];
  failures: Map<number, { unit: number; at: number }[]>;
  /** Chains of each component's own failures: its episodes where nothing else is near. */
  chains: Map<number, number>;
  between: HazardBetween;
  ratePerDay: (component: number) => number;
  pairs: ExaminedPair[];
};

export type Examined = { clock: 'hours' | 'days'; models: ExaminedModel[] };

const countChains = (
  model: ModelHistory,
  list: readonly { unit: number; at: number }[],
  windowDays: number,
) => {
  let chains = 0;
  list.forEach(({ unit, at }, position) => {
    const before = list[position - 1];
    const occasions = model.units[unit]?.occasions;
    const gap = (occasions?.[at]?.day ?? 0) - (occasions?.[before?.at ?? at]?.day ?? 0);
    if (before?.unit !== unit || gap > windowDays) chains += 1;
  });
  return chains;
};

/** A return within this share of the window is soon. */
const SOON = 1 / 4;

/** Share of the chance lags that are soon: exponential, cut off at the window's end. */
export const soonByChance = (failuresPerWindow: number) => {
  const rate = Math.max(failuresPerWindow, 1e-6);
  return (1 - Math.exp(-rate * SOON)) / (1 - Math.exp(-rate));
};

/**
 * Share of chance episodes in which the first part was replaced again before the other failed: the odds that a
 * chain without the other goes on, doubled because longer chains leave more room for chance, and never below a
 * floor: bad parts and poor work repeat too.
 */
export const repeatByChance = (chains: number, repeats: number) =>
  Math.min(0.9, Math.max(0.08, (2 * repeats) / (chains + repeats + 12)));

/**
 * Whether an episode's course speaks for a cause left in (step 1): a machine whose trouble was not cured is soon
 * back, or gets the same part again; a chance failure falls anywhere in what is left of the window.
 */
const isPrompt = (unit: UnitHistory, { steps }: PairEpisode, windowDays: number) => {
  const leads = steps.findIndex(({ hasA, hasB }) => hasA !== steps[0]?.hasA || hasB !== steps[0]?.hasB);
  const dayOf = (at: number) => unit.occasions[steps[at]?.at ?? 0]?.day ?? 0;
  return leads > 1 || dayOf(leads) - dayOf(leads - 1) <= SOON * windowDays;
};

const examinePair = (
  model: number,
  examined: Omit<ExaminedModel, 'pairs'>,
  pair: { a: number; b: number; units: number[] },
  windowDays: number,
): ExaminedPair => {
  const { a, b } = pair;
  const { history } = examined;
  const evidence: PairEvidence = {
    withA: examined.chains.get(a) ?? 0,
    withB: examined.chains.get(b) ?? 0,
    aFirst: 0,
    bFirst: 0,
    together: 0,
    expectedAFirst: 0,
    expectedBFirst: 0,
    aDamaged: 0,
    bDamaged: 0,
    aFirstPrompt: 0,
    bFirstPrompt: 0,
    chancePromptA: 0.3,
    chancePromptB: 0.3,
    aFirstJoined: 0,
    bFirstJoined: 0,
  };
  let linkedVisits = 0;
  let aLinked = 0;
  let bLinked = 0;
  for (const unitAt of pair.units) {
    const unit = history.units[unitAt];
    if (!unit) continue;
    for (const episode of pairEpisodes(unit, pairSteps(unit, a, b), windowDays)) {
      if (!episode.hasA || !episode.hasB) continue;
      const first = episode.steps[0];
      const isJoined = episode.steps.some(({ hasA, hasB }) => hasA && hasB);
      if (first?.hasA && first.hasB) evidence.together += 1;
      else if (first?.hasA) {
        evidence.aFirst += 1;
        if (isPrompt(unit, episode, windowDays)) evidence.aFirstPrompt += 1;
        if (isJoined) evidence.aFirstJoined += 1;
      } else {
        evidence.bFirst += 1;
        if (isPrompt(unit, episode, windowDays)) evidence.bFirstPrompt += 1;
        if (isJoined) evidence.bFirstJoined += 1;
      }
      linkedVisits += episode.steps.length;
      aLinked += episode.steps.filter(({ hasA }) => hasA).length;
      bLinked += episode.steps.filter(({ hasB }) => hasB).length;
      for (const step of episode.steps) {
        if (!step.hasA || !step.hasB) continue;
        const damaged = unit.occasions[step.at]?.damaged ?? [];
        const aDamaged = damaged.includes(a);
        if (aDamaged === damaged.includes(b)) continue;
        if (aDamaged) evidence.aDamaged += 1;
        else evidence.bDamaged += 1;
      }
    }
  }
  const { ages, between, failures } = examined;
  evidence.expectedAFirst = expectedAfter(history, ages, between, failures, a, b, windowDays);
  evidence.expectedBFirst = expectedAfter(history, ages, between, failures, b, a, windowDays);
  return { model, a, b, units: pair.units, evidence, linkedVisits, aLinked, bLinked };
};

/** Every pair of every model that was ever near each other, with what the records say of it. */
export const examine = (histories: Histories, windowDays: number): Examined => {
  const clock = chooseClock(histories);
  const ages = histories.models.map((model) => unitAges(model, unitClocks(model, clock), windowDays));
  const hazards = fitHazards(histories, ages);
  const models = histories.models.map((history, at): ExaminedModel => {
    const failures = failureIndex(history);
    const chains = new Map<number, number>();
    for (const [component, list] of failures) chains.set(component, countChains(history, list, windowDays));
    const hazard = hazards[at] ?? { between: () => 0, ratePerDay: () => 0 };
    const base = { history, ages: ages[at] ?? [], failures, chains, ...hazard };
    const pairs = linkedPairs(history, windowDays, histories.components.length).map((pair) =>
      examinePair(at, base, pair, windowDays),
    );
    return { ...base, pairs };
  });
  return { clock, models };
};

/** Evidence of a pair that was never near in this model: only its numbers of failures speak. */
export const unlinkedEvidence = (
  model: ExaminedModel,
  a: number,
  b: number,
  windowDays: number,
): PairEvidence => {
  const listA = model.failures.get(a)?.length ?? 0;
  const listB = model.failures.get(b)?.length ?? 0;
  return {
    withA: model.chains.get(a) ?? 0,
    withB: model.chains.get(b) ?? 0,
    aFirst: 0,
    bFirst: 0,
    together: 0,
    expectedAFirst: listA * model.ratePerDay(b) * windowDays,
    expectedBFirst: listB * model.ratePerDay(a) * windowDays,
    aDamaged: 0,
    bDamaged: 0,
    aFirstPrompt: 0,
    bFirstPrompt: 0,
    chancePromptA: 0.3,
    chancePromptB: 0.3,
    aFirstJoined: 0,
    bFirstJoined: 0,
  };
};

/**
 * How much oftener unrelated parts fail near each other than their hazards say: frailty (1 + cv²), seasons and
 * whatever else all pairs of the shop share. Each pair counts by the probability that it is unrelated.
 */
export const sharedInflation = (pairs: readonly { evidence: PairEvidence; unrelated: number }[]): number => {
  let seen = 0;
  let expected = 0;
  for (const { evidence: e, unrelated } of pairs) {
    seen += unrelated * (e.aFirst + e.bFirst);
    expected += unrelated * (e.expectedAFirst + e.expectedBFirst);
  }
  // One pair's worth of the usual frailty (cv 0.5) steadies a shop with next to no records.
  return Math.min(3, Math.max(0.5, (seen + 1.25) / (expected + 1)));
};
