import gammaln from '@stdlib/math-base-special-gammaln';

/** What one model's records say of a pair A, B, reduced to what the hypotheses differ in. */
export type PairEvidence = {
  /** Episodes with A, with B (alone or with the other). */
  withA: number;
  withB: number;
  /** Episodes with both, by their first visit: A alone, B alone, both. */
  aFirst: number;
  bFirst: number;
  together: number;
  /** Expected by each part's own hazard, allowing for frailty and season. */
  expectedAFirst: number;
  expectedBFirst: number;
  /** Visits with both where A alone, B alone is coded as damage. */
  aDamaged: number;
  bDamaged: number;
  /** Of the A-first, B-first episodes, those that were soon back or replaced the first part again before the other. */
  aFirstPrompt: number;
  bFirstPrompt: number;
  /** Share of such episodes if the other part failed by chance. */
  chancePromptA: number;
  chancePromptB: number;
};

/** Log-likelihoods of the hypotheses on one model: nothing, together, A causes B, B causes A. */
export type PairLikelihood = { nothing: number; together: number; aCauses: number; bCauses: number };

const logBeta = (a: number, b: number) => gammaln(a) + gammaln(b) - gammaln(a + b);
const logChoose = (n: number, k: number) => gammaln(n + 1) - gammaln(k + 1) - gammaln(n - k + 1);

/** Beta-binomial log-probability of k of n. */
const betaBinomial = (k: number, n: number, a: number, b: number) =>
  k > n ? -Infinity : logChoose(n, k) + logBeta(k + a, n - k + b) - logBeta(a, b);

/** Negative binomial log-probability: Poisson whose mean has a gamma spread of the given shape. */
const negativeBinomial = (count: number, mean: number, shape: number) =>
  mean <= 0
    ? count === 0
      ? 0
      : -Infinity
    : gammaln(count + shape) -
      gammaln(shape) -
      gammaln(count + 1) +
      shape * Math.log(shape / (shape + mean)) +
      count * Math.log(mean / (shape + mean));

const logSum = (...logs: number[]) => {
  const high = Math.max(...logs);
  return high === -Infinity
    ? high
    : high + Math.log(logs.reduce((sum, log) => sum + Math.exp(log - high), 0));
};

/** Shape of the gamma spread of chance counts about their expectation: a coefficient of variation of one half. */
const CHANCE_SHAPE = 4;

/** Spread of the null order: equal ageing is known only so well. */
const ORDER_SPREAD = 12;

type Order = { first: number; second: number; expectedFirst: number; expectedSecond: number };

/** Two counts whose sum is as expected and whose split follows the null ratio, each with its spread. */
const unordered = (
  { first, second, expectedFirst, expectedSecond }: Order,
  inflation = 1,
  shape = CHANCE_SHAPE,
) => {
  const expected = Math.max(expectedFirst + expectedSecond, 2e-3);
  const share = Math.min(0.95, Math.max(0.05, expectedFirst / expected));
  return (
    negativeBinomial(first + second, expected * inflation, shape) +
    betaBinomial(first, first + second, ORDER_SPREAD * share, ORDER_SPREAD * (1 - share))
  );
};

/** Shares of prompt returns that a cause left in may have, averaged over. */
const PROMPT_SHARES = [0.3, 0.5, 0.7, 0.85, 0.95];
const PROMPT_SPREAD = 15;

const promptAt = (prompt: number, episodes: number, share: number) =>
  betaBinomial(prompt, episodes, PROMPT_SPREAD * share, PROMPT_SPREAD * (1 - share));

const promptByCause = (prompt: number, episodes: number, chance: number, ownShare: number) =>
  logSum(
    ...PROMPT_SHARES.map((share) =>
      promptAt(prompt, episodes, (1 - ownShare) * Math.max(share, chance) + ownShare * chance),
    ),
  ) - Math.log(PROMPT_SHARES.length);

/** Large sums are taken at so many points. */
const MOST_TERMS = 48;

/** Episodes that the resultant part alone came before: some by chance, the rest a share of the causal part's episodes. */
const cured = (order: Order, causal: number, prompt: number, chancePrompt: number) => {
  const { first, expectedFirst } = order;
  const spread = 6 * Math.sqrt(expectedFirst + (expectedFirst * expectedFirst) / 4) + 6;
  const most = Math.min(first, Math.ceil(expectedFirst + spread));
  const step = Math.ceil((most + 1) / MOST_TERMS);
  const terms: number[] = [];
  for (let own = 0; own <= most; own += step) {
    const linked = first - own;
    terms.push(
      unordered({ ...order, first: own }) +
        betaBinomial(linked, Math.max(causal - own, linked), 2, 3.5) +
        Math.log(step),
    );
  }
  const ownShare = Math.min(1, expectedFirst / Math.max(first, 1));
  return logSum(...terms) + promptByCause(prompt, first, chancePrompt, ownShare);
};

/** Both at the first visit: says that they belong together, nothing of which way; so it is the same for all but chance. */
const sameVisit = (e: PairEvidence) => {
  const ordered = e.aFirst + e.bFirst;
  const among = (episodes: number) =>
    betaBinomial(e.together, Math.max(episodes - ordered, e.together), 1, 2) - Math.log(2);
  return logSum(among(e.withA), among(e.withB));
};

const damage = (ofResultant: number, ofCausal: number, caused: boolean) =>
  caused
    ? betaBinomial(ofResultant, ofResultant + ofCausal, 3, 0.5)
    : betaBinomial(ofResultant, ofResultant + ofCausal, 1, 1);

/** Share of the causal part's episodes in which the order is wrong although it is the cause. */
const LEAK = 0.03;

export const pairLikelihood = (e: PairEvidence): PairLikelihood => {
  const fewer = Math.min(e.withA, e.withB);
  const sameDay = Math.max(0.02 * (e.expectedAFirst + e.expectedBFirst) + 0.004 * fewer, 1e-3);
  const aFirst: Order = {
    first: e.aFirst,
    second: e.bFirst,
    expectedFirst: e.expectedAFirst,
    expectedSecond: e.expectedBFirst,
  };
  const bFirst: Order = {
    first: e.bFirst,
    second: e.aFirst,
    expectedFirst: e.expectedBFirst,
    expectedSecond: e.expectedAFirst,
  };
  const aChance = promptAt(e.aFirstPrompt, e.aFirst, e.chancePromptA);
  const bChance = promptAt(e.bFirstPrompt, e.bFirst, e.chancePromptB);
  const symmetric = damage(e.aDamaged, e.bDamaged, false) + aChance + bChance;
  const leaked = (order: Order, causal: number) => ({
    ...order,
    expectedSecond: order.expectedSecond + LEAK * causal,
  });
  return {
    nothing: unordered(aFirst) + negativeBinomial(e.together, sameDay, 1) + symmetric,
    together: logSum(unordered(aFirst), unordered(aFirst, 4, 1)) - Math.log(2) + sameVisit(e) + symmetric,
    aCauses:
      cured(leaked(bFirst, e.withA), e.withA, e.bFirstPrompt, e.chancePromptB) +
      aChance +
      sameVisit(e) +
      damage(e.bDamaged, e.aDamaged, true),
    bCauses:
      cured(leaked(aFirst, e.withB), e.withB, e.aFirstPrompt, e.chancePromptA) +
      bChance +
      sameVisit(e) +
      damage(e.aDamaged, e.bDamaged, true),
  };
};
