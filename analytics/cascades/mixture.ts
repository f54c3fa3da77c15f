import type { PairLikelihood } from './evidence';

/** Posterior probabilities of one model's pair. */
export type PairPosterior = { nothing: number; together: number; aCauses: number; bCauses: number };

/** One pair of component names: groups (families) of models, each with the likelihood of every model in it. */
export type PooledPair = { groups: PairLikelihood[][] };

const TYPES = ['nothing', 'together', 'aCauses', 'bCauses'] as const;
type PairType = (typeof TYPES)[number];
export type Prior = Record<PairType, number>;

/** Share of the models of a group in which a pair of a type is at work: unknown, so averaged over. */
const SHARES = [0.03, 0.1, 0.3, 0.6, 0.9];
/** Share of stray together-pairs among models of a pair of any type. */
const STRAY = 0.02;
/** Pairs that the prior stands for before the shop's own are looked at. */
const PSEUDO: Prior = { nothing: 10, together: 0.3, aCauses: 0.1, bCauses: 0.1 };
const ROUNDS = 30;

const logSumAll = (values: readonly number[]) => {
  const high = Math.max(...values);
  if (high === -Infinity) return high;
  return high + Math.log(values.reduce((sum, value) => sum + Math.exp(value - high), 0));
};

const background = (l: PairLikelihood) =>
  logSumAll([Math.log(1 - STRAY) + l.nothing, Math.log(STRAY) + l.together]);

const mixed = (l: PairLikelihood, type: PairType, share: number) =>
  logSumAll([Math.log(share) + l[type], Math.log(1 - share) + background(l)]);

const groupLikelihood = (group: readonly PairLikelihood[], type: PairType): number[] =>
  SHARES.map((share) => group.reduce((sum, l) => sum + mixed(l, type, share), -Math.log(SHARES.length)));

type Fitted = { byType: Record<PairType, number>; byShare: Record<PairType, number[][]> };

const fitPair = ({ groups }: PooledPair): Fitted => {
  const byShare = {} as Record<PairType, number[][]>;
  const byType = {} as Record<PairType, number>;
  for (const type of TYPES) {
    if (type === 'nothing') {
      byType.nothing = groups.flat().reduce((sum, l) => sum + background(l), 0);
      continue;
    }
    byShare[type] = groups.map((group) => groupLikelihood(group, type));
    byType[type] = byShare[type].reduce((sum, shares) => sum + logSumAll(shares), 0);
  }
  return { byType, byShare };
};

const typeWeights = (fitted: Fitted, prior: Prior): Prior => {
  const logs = TYPES.map((type) => Math.log(prior[type]) + fitted.byType[type]);
  const total = logSumAll(logs);
  const [nothing = 0, together = 0, aCauses = 0, bCauses = 0] = logs.map((log) => Math.exp(log - total));
  return { nothing, together, aCauses, bCauses };
};

/**
 * Empirical Bayes over all pairs of the shop (Efron 2010, ch. 2 and 5): each pair of names is nothing, together,
 * or a cascade one way; a pair that is something is so in an unknown share of the models. `unlinked` pairs were
 * never near each other anywhere and count as nothing in the prior.
 */
export const poolPairs = (pairs: readonly PooledPair[], unlinked: number): PairPosterior[][][] => {
  const fitted = pairs.map(fitPair);
  let prior: Prior = { nothing: 0.97, together: 0.02, aCauses: 0.005, bCauses: 0.005 };
  for (let round = 0; round < ROUNDS; round += 1) {
    const sums: Prior = { ...PSEUDO, nothing: PSEUDO.nothing + unlinked };
    for (const fit of fitted) {
      const weights = typeWeights(fit, prior);
      for (const type of TYPES) sums[type] += weights[type];
    }
    const total = TYPES.reduce((sum, type) => sum + sums[type], 0);
    // Which of two names comes first in the alphabet says nothing: the two directions share one prior.
    const causes = (sums.aCauses + sums.bCauses) / 2 / total;
    prior = {
      nothing: sums.nothing / total,
      together: sums.together / total,
      aCauses: causes,
      bCauses: causes,
    };
  }
  return fitted.map((fit, at) => {
    const weights = typeWeights(fit, prior);
    return (pairs[at]?.groups ?? []).map((group, groupAt) =>
      group.map((l) => posteriorOf(l, groupAt, fit, weights)),
    );
  });
};

const posteriorOf = (l: PairLikelihood, groupAt: number, fit: Fitted, weights: Prior): PairPosterior => {
  const posterior: PairPosterior = { nothing: 0, together: 0, aCauses: 0, bCauses: 0 };
  const back = background(l);
  const strayTogether = Math.exp(Math.log(STRAY) + l.together - back);
  for (const type of TYPES) {
    let own = 0;
    if (type !== 'nothing') {
      const shares = fit.byShare[type][groupAt] ?? [];
      const total = logSumAll(shares);
      shares.forEach((log, at) => {
        const share = SHARES[at] ?? 0;
        own += Math.exp(log - total) * Math.exp(Math.log(share) + l[type] - mixed(l, type, share));
      });
      posterior[type] += weights[type] * own;
    }
    posterior.together += weights[type] * (1 - own) * strayTogether;
    posterior.nothing += weights[type] * (1 - own) * (1 - strayTogether);
  }
  return posterior;
};
