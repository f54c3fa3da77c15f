import type { PairLikelihood } from './evidence';

/** Posterior probabilities of one model's pair. */
export type PairPosterior = { nothing: number; together: number; aCauses: number; bCauses: number };

/** One pair of component names: groups (families) of models, each with the likelihood of every model in it. */
export type PooledPair = { groups: PairLikelihood[][] };

/** Never near each other, so nothing: pairs of names in any model, and pairs of one model, beyond those given. */
export type Unlinked = { names: number; entries: number };

const TYPES = ['nothing', 'together', 'aCauses', 'bCauses'] as const;
type Shares = [nothing: number, together: number, aCauses: number, bCauses: number];
const EACH = [0, 1, 2, 3] as const;
const SOMETHING = [1, 2, 3] as const;

/** Share of the models of a group in which a pair of a type is at work: unknown, so averaged over. */
const SHARES = [0.03, 0.1, 0.3, 0.6, 0.9];
/** Pairs of names that the prior stands for before the shop's own are looked at. */
const PSEUDO_NAMES: Shares = [10, 0.3, 0.1, 0.1];
/** Pairs of single models that the prior of strays stands for. */
const PSEUDO_STRAYS: Shares = [50, 1, 0.1, 0.1];
const MOST_ROUNDS = 40;
const SETTLED = 1e-3;

/** Which of two names comes first in the alphabet says nothing: the two directions share one prior. */
const toShares = ([nothing, together, aCauses, bCauses]: Shares): Shares => {
  const total = nothing + together + aCauses + bCauses;
  const causes = (aCauses + bCauses) / 2 / total;
  return [nothing / total, together / total, causes, causes];
};

/** Likelihoods of one group over the largest of each model, four to a model. */
type Group = { models: number; scaled: Float64Array };

const toGroup = (likelihoods: readonly PairLikelihood[]): Group => {
  const scaled = new Float64Array(4 * likelihoods.length);
  likelihoods.forEach((l, model) => {
    const high = Math.max(l.nothing, l.together, l.aCauses, l.bCauses);
    TYPES.forEach((type, at) => (scaled[4 * model + at] = Math.exp(l[type] - high)));
  });
  return { models: likelihoods.length, scaled };
};

/** One model's likelihood where the pair of names is nothing there: strays of every type still turn up. */
const backgroundOf = (scaled: Float64Array, at: number, strays: Shares) =>
  strays[0] * (scaled[at] ?? 0) +
  strays[1] * (scaled[at + 1] ?? 0) +
  strays[2] * (scaled[at + 2] ?? 0) +
  strays[3] * (scaled[at + 3] ?? 0);

/** Sum of logs of factors, with one logarithm for many of them. */
const logProduct = (count: number, factorAt: (at: number) => number) => {
  let sum = 0;
  let product = 1;
  for (let at = 0; at < count; at += 1) {
    product *= factorAt(at);
    if (product > 1e100 || product < 1e-100) {
      sum += Math.log(product);
      product = 1;
    }
  }
  return sum + Math.log(product);
};

const normalize = (logs: readonly number[]) => {
  const high = Math.max(...logs);
  const parts = logs.map((log) => Math.exp(log - high));
  const total = parts.reduce((sum, part) => sum + part, 0);
  return { parts: parts.map((part) => part / total), log: high + Math.log(total) };
};

/** Of a group, given a type of the pair: log-likelihood against the background alone, and what is likely of the share. */
const judgeGroup = ({ models, scaled }: Group, type: number, strays: Shares) => {
  const ratios = new Float64Array(models);
  for (let at = 0; at < models; at += 1)
    ratios[at] = (scaled[4 * at + type] ?? 0) / backgroundOf(scaled, 4 * at, strays);
  const logs = SHARES.map((share) => logProduct(models, (at) => 1 + share * ((ratios[at] ?? 0) - 1)));
  const { parts, log } = normalize(logs);
  const own = new Float64Array(models);
  SHARES.forEach((share, shareAt) => {
    const weight = (parts[shareAt] ?? 0) * share;
    if (weight < 1e-12) return;
    for (let at = 0; at < models; at += 1) {
      const ratio = ratios[at] ?? 0;
      own[at] = (own[at] ?? 0) + (weight * ratio) / (1 + share * (ratio - 1));
    }
  });
  return { log: log - Math.log(SHARES.length), own };
};

type Judged = { posteriors: Float64Array[]; weights: Shares; strayCounts: Shares };

/** Posterior of every model of a pair, four to a model and group by group, and of the type of the pair of names. */
const judgePair = (groups: readonly Group[], prior: Shares, strays: Shares): Judged => {
  const judged = SOMETHING.map((type) => groups.map((group) => judgeGroup(group, type, strays)));
  const logs = SOMETHING.map(
    (type, at) => judged[at]?.reduce((sum, { log }) => sum + log, Math.log(prior[type])) ?? 0,
  );
  const [nothing = 0, together = 0, aCauses = 0, bCauses = 0] = normalize([
    Math.log(prior[0]),
    ...logs,
  ]).parts;
  const weights: Shares = [nothing, together, aCauses, bCauses];
  const strayCounts: Shares = [0, 0, 0, 0];
  const posteriors = groups.map(({ models, scaled }, groupAt) => {
    const posterior = new Float64Array(4 * models);
    for (let model = 0; model < models; model += 1) {
      const from = 4 * model;
      let rest = 1;
      for (const type of SOMETHING) {
        const own = weights[type] * (judged[type - 1]?.[groupAt]?.own[model] ?? 0);
        posterior[from + type] = own;
        rest -= own;
      }
      const unit = Math.max(0, rest) / backgroundOf(scaled, from, strays);
      for (const type of EACH) {
        const stray = unit * strays[type] * (scaled[from + type] ?? 0);
        strayCounts[type] += stray;
        posterior[from + type] = (posterior[from + type] ?? 0) + stray;
      }
    }
    return posterior;
  });
  return { posteriors, weights, strayCounts };
};

const addTo = (sums: Shares, counts: Shares) => {
  for (const type of EACH) sums[type] += counts[type];
};

/**
 * Empirical Bayes over all pairs of the shop (Efron 2010, ch. 2 and 5). Each pair of names is nothing, together, or a
 * cascade one way, and one that is something is so in an unknown share of the models. Apart from that any one model
 * may stray: be together, or a cascade either way, whatever the pair of names is elsewhere. Both the shares of the
 * types and those of the strays are fitted to the shop; `unlinked` pairs count as nothing in both.
 */
export const poolPairs = (pairs: readonly PooledPair[], unlinked: Unlinked): PairPosterior[][][] => {
  const shop = pairs.map(({ groups }) => groups.map(toGroup));
  let prior: Shares = [0.97, 0.02, 0.005, 0.005];
  let strays: Shares = [0.978, 0.02, 0.001, 0.001];
  for (let round = 0; round < MOST_ROUNDS; round += 1) {
    const names: Shares = [...PSEUDO_NAMES];
    const entries: Shares = [...PSEUDO_STRAYS];
    names[0] += unlinked.names;
    entries[0] += unlinked.entries;
    for (const groups of shop) {
      const { weights, strayCounts } = judgePair(groups, prior, strays);
      addTo(names, weights);
      addTo(entries, strayCounts);
    }
    const before = [...prior, ...strays];
    prior = toShares(names);
    strays = toShares(entries);
    const moved = [...prior, ...strays].some(
      (share, at) => Math.abs(share / (before[at] ?? 1) - 1) > SETTLED,
    );
    if (!moved) break;
  }
  return shop.map((groups) =>
    judgePair(groups, prior, strays).posteriors.map((posterior, groupAt) =>
      Array.from({ length: groups[groupAt]?.models ?? 0 }, (_, model): PairPosterior => {
        const [nothing = 0, together = 0, aCauses = 0, bCauses = 0] = posterior.subarray(
          4 * model,
          4 * model + 4,
        );
        return { nothing, together, aCauses, bCauses };
      }),
    ),
  );
};
