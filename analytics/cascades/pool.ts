import type { PairEvidence } from './evidence';
import { pairLikelihood } from './evidence';
import type { Examined, ExaminedPair } from './examine';
import { repeatByChance, sharedInflation, soonByChance, unlinkedEvidence } from './examine';
import type { PairPosterior, Unlinked } from './mixture';
import { poolPairs } from './mixture';

/** One model's pair after all models have been heard. */
export type JudgedPair = { pair: ExaminedPair; evidence: PairEvidence; posterior: PairPosterior };

/** All models' judgements of one pair of names. */
export type JudgedName = { a: number; b: number; byModel: Map<number, JudgedPair> };

type Entry = { model: number; pair: ExaminedPair | undefined; evidence: PairEvidence; unrelated: number };
type Named = { a: number; b: number; groups: Entry[][] };

/** Pairs by name, their models grouped by family; models without a family form one group. */
const namePairs = (
  examined: Examined,
  components: number,
  windowDays: number,
  familyOf: (at: number) => string,
) => {
  const linked = new Map<number, { a: number; b: number; pairs: Map<number, ExaminedPair> }>();
  for (const { pairs } of examined.models)
    for (const pair of pairs) {
      const key = pair.a * components + pair.b;
      const known = linked.get(key);
      if (known) known.pairs.set(pair.model, pair);
      else linked.set(key, { a: pair.a, b: pair.b, pairs: new Map([[pair.model, pair]]) });
    }
  return [...linked.values()].map(({ a, b, pairs }): Named => {
    const groups = new Map<string, Entry[]>();
    examined.models.forEach((model, at) => {
      if (!model.failures.has(a) || !model.failures.has(b)) return;
      const pair = pairs.get(at);
      const evidence = pair?.evidence ?? unlinkedEvidence(model, a, b, windowDays);
      const entry = { model: at, pair, evidence, unrelated: 1 };
      const group = groups.get(familyOf(at));
      if (group) group.push(entry);
      else groups.set(familyOf(at), [entry]);
    });
    return { a, b, groups: [...groups.values()] };
  });
};

type Outside = { aChains: number; aRepeats: number; bChains: number; bRepeats: number };

/** Other models say how often a part repeats by itself, but count for so many chains at most: elsewhere it may be a result. */
const LENT_CHAINS = 6;

const blend = (chains: number, repeats: number, lentChains: number, lentRepeats: number) => {
  const weight = Math.min(1, LENT_CHAINS / Math.max(1, lentChains));
  return repeatByChance(
    Math.max(0, chains + weight * lentChains),
    Math.max(0, repeats + weight * lentRepeats),
  );
};

/** What a chance episode of this pair would look like, from the chains that have only one of the two. */
const withChanceCourse = (named: Named, examined: Examined, windowDays: number): Named => {
  const all: Outside = { aChains: 0, aRepeats: 0, bChains: 0, bRepeats: 0 };
  const outsideOf = ({ model, pair, evidence: e }: Entry): Outside => {
    const both = e.aFirst + e.bFirst + e.together;
    const failures = (component: number) => examined.models[model]?.failures.get(component)?.length ?? 0;
    return {
      aChains: e.withA - both,
      aRepeats: failures(named.a) - e.withA - ((pair?.aLinked ?? 0) - both),
      bChains: e.withB - both,
      bRepeats: failures(named.b) - e.withB - ((pair?.bLinked ?? 0) - both),
    };
  };
  for (const entry of named.groups.flat()) {
    const outside = outsideOf(entry);
    all.aChains += outside.aChains;
    all.aRepeats += outside.aRepeats;
    all.bChains += outside.bChains;
    all.bRepeats += outside.bRepeats;
  }
  const complete = (entry: Entry): Entry => {
    const model = examined.models[entry.model];
    const perDay = model ? model.ratePerDay(named.a) + model.ratePerDay(named.b) : 0;
    const soon = soonByChance(perDay * windowDays);
    const own = outsideOf(entry);
    const repeatA = blend(own.aChains, own.aRepeats, all.aChains - own.aChains, all.aRepeats - own.aRepeats);
    const repeatB = blend(own.bChains, own.bRepeats, all.bChains - own.bChains, all.bRepeats - own.bRepeats);
    const chancePromptA = 1 - (1 - soon) * (1 - repeatA);
    const chancePromptB = 1 - (1 - soon) * (1 - repeatB);
    return { ...entry, evidence: { ...entry.evidence, chancePromptA, chancePromptB } };
  };
  return { ...named, groups: named.groups.map((group) => group.map(complete)) };
};

const inflated = (e: PairEvidence, inflation: number): PairEvidence => ({
  ...e,
  expectedAFirst: e.expectedAFirst * inflation,
  expectedBFirst: e.expectedBFirst * inflation,
});

const ROUNDS = 2;
/** Frailty of coefficient of variation one half, to begin with. */
const USUAL_INFLATION = 1.25;

/** Judges one list of pairs (declared or searched) by itself: the two share the inflation, not the prior. */
const judge = (named: readonly Named[], unlinked: Unlinked, inflation: number) => {
  const likelihoods = named.map(({ groups }) => ({
    groups: groups.map((group) => group.map(({ evidence }) => pairLikelihood(inflated(evidence, inflation)))),
  }));
  return poolPairs(likelihoods, unlinked);
};

export type PoolInput = {
  examined: Examined;
  components: number;
  windowDays: number;
  familyOf: (model: number) => string;
  isDeclared: (a: number, b: number) => boolean;
  /** Pairs of names examined in any model, and pairs of single models, near each other or not. */
  declaredPairs: Unlinked;
  searchedPairs: Unlinked;
};

export const poolModels = (input: PoolInput): { declared: JudgedName[]; searched: JudgedName[] } => {
  const { examined, components, windowDays, familyOf, isDeclared, declaredPairs, searchedPairs } = input;
  const named = namePairs(examined, components, windowDays, familyOf).map((one) =>
    withChanceCourse(one, examined, windowDays),
  );
  const lists = [
    { pairs: named.filter(({ a, b }) => isDeclared(a, b)), examined: declaredPairs },
    { pairs: named.filter(({ a, b }) => !isDeclared(a, b)), examined: searchedPairs },
  ];
  let inflation = USUAL_INFLATION;
  let judged: JudgedName[][] = [];
  for (let round = 0; round < ROUNDS; round += 1) {
    judged = lists.map(({ pairs, examined: all }) => {
      const entries = pairs.reduce((sum, { groups }) => sum + groups.flat().length, 0);
      const unlinked = { names: all.names - pairs.length, entries: all.entries - entries };
      const posteriors = judge(pairs, unlinked, inflation);
      return pairs.map(({ a, b, groups }, pairAt): JudgedName => {
        const byModel = new Map<number, JudgedPair>();
        groups.forEach((group, groupAt) => {
          group.forEach((entry, at) => {
            const posterior = posteriors[pairAt]?.[groupAt]?.[at];
            if (!posterior) return;
            entry.unrelated = posterior.nothing;
            if (!entry.pair) return;
            byModel.set(entry.model, {
              pair: entry.pair,
              evidence: inflated(entry.evidence, inflation),
              posterior,
            });
          });
        });
        return { a, b, byModel };
      });
    });
    inflation = sharedInflation(named.flatMap(({ groups }) => groups.flat()));
  }
  return { declared: judged[0] ?? [], searched: judged[1] ?? [] };
};
