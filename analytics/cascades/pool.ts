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

/** What a chance episode of this pair would look like, from the chains that have only one of the two. */
const withChanceCourse = (named: Named, examined: Examined, windowDays: number): Named => {
  const outside = { aChains: 0, aRepeats: 0, bChains: 0, bRepeats: 0 };
  for (const { model, pair, evidence: e } of named.groups.flat()) {
    const both = e.aFirst + e.bFirst + e.together;
    const failures = (component: number) => examined.models[model]?.failures.get(component)?.length ?? 0;
    outside.aChains += e.withA - both;
    outside.bChains += e.withB - both;
    outside.aRepeats += failures(named.a) - e.withA - ((pair?.aLinked ?? 0) - both);
    outside.bRepeats += failures(named.b) - e.withB - ((pair?.bLinked ?? 0) - both);
  }
  const prompt = (soon: number, chains: number, repeats: number) =>
    1 - (1 - soon) * (1 - repeatByChance(Math.max(0, chains), Math.max(0, repeats)));
  const complete = (entry: Entry): Entry => {
    const model = examined.models[entry.model];
    const perDay = model ? model.ratePerDay(named.a) + model.ratePerDay(named.b) : 0;
    const soon = soonByChance(perDay * windowDays);
    const chancePromptA = prompt(soon, outside.aChains, outside.aRepeats);
    const chancePromptB = prompt(soon, outside.bChains, outside.bRepeats);
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
