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
  /** Of the A-first, B-first episodes, those in which a later visit replaced both. */
  aFirstJoined: number;
  bFirstJoined: number;
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

/** Shape of the gamma spread of chance counts about their expectation: a coefficient of variation of a third. */
const CHANCE_SHAPE = 8;

/** Spread of the null order: equal ageing is known only so well. */
const ORDER_SPREAD = 30;

type Order = { first: number; second: number; expectedFirst: number; expectedSecond: number };

const BY_CHANCE = { inflation: 1, shape: CHANCE_SHAPE, evenness: 0 };
/**
 * Parts that fail together for a reason of their own lean less to the null order than parts that meet by chance: it
 * is taken where neither came before, so it runs away where one part hardly ever fails without the other.
 */
const BY_COMPANY = { ...BY_CHANCE, evenness: 0.6 };
const BY_CLOSE_COMPANY = { inflation: 4, shape: 1, evenness: 0.6 };

/** Two counts whose sum is as expected and whose split follows the null ratio, each with its spread. */
const unordered = (
  { first, second, expectedFirst, expectedSecond }: Order,
  { inflation, shape, evenness } = BY_CHANCE,
) => {
  const expected = Math.max(expectedFirst + expectedSecond, 2e-3);
  const byHazard = Math.min(0.95, Math.max(0.05, expectedFirst / expected));
  const share = evenness / 2 + (1 - evenness) * byHazard;
  return (
    negativeBinomial(first + second, expected * inflation, shape) +
    betaBinomial(first, first + second, ORDER_SPREAD * share, ORDER_SPREAD * (1 - share))
  );
};

/** Shares of prompt returns that a cause left in may have, averaged over. */
const PROMPT_SHARES = [0.3, 0.5, 0.7, 0.85, 0.95];
const PROMPT_SPREAD = 40;

const promptAt = (prompt: number, episodes: number, share: number) =>
  betaBinomial(prompt, episodes, PROMPT_SPREAD * share, PROMPT_SPREAD * (1 - share));

/** Shares of cures that replace the broken part along with its cause, averaged over. */
const CURE_SHARES = [0.1, 0.3, 0.5, 0.7, 0.9];
const CURE_SPREAD = 40;
/** Parts that meet by chance are hardly ever replaced at one visit after one of them was alone. */
const CHANCE_JOINED = 0.04;
const joinedByChance = (joined: number, ordered: number) =>
  betaBinomial(joined, ordered, 10 * CHANCE_JOINED, 10 * (1 - CHANCE_JOINED));
const joinedByCompany = (joined: number, ordered: number) => betaBinomial(joined, ordered, 1, 1);
/** Cause first, both later: a cure that did not hold. */
const joinedAfterCause = (joined: number, ordered: number) => betaBinomial(joined, ordered, 0.6, 2.4);

type Course = { first: number; prompt: number; chancePrompt: number; joined: number };

/** How the episodes that the resultant part began went on, where a share of them are chance and the rest the cause's. */
const courseByCause = ({ first, prompt, chancePrompt, joined }: Course, ownShare: number) => {
  if (first === 0) return 0;
  const mixed = (linked: number, chance: number) => (1 - ownShare) * linked + ownShare * chance;
  const prompts = PROMPT_SHARES.map((share) =>
    promptAt(prompt, first, mixed(Math.max(share, chancePrompt), chancePrompt)),
  );
  const cures = CURE_SHARES.map((share) => {
    const mean = mixed(share, CHANCE_JOINED);
    return betaBinomial(joined, first, CURE_SPREAD * mean, CURE_SPREAD * (1 - mean));
  });
  return logSum(...prompts) + logSum(...cures) - Math.log(PROMPT_SHARES.length * CURE_SHARES.length);
};

/** Own shares at which the course is reckoned; straight lines between them. */
const OWN_STEPS = 4;

/** Large sums are taken at so many points. */
const MOST_TERMS = 48;

/** Episodes that the resultant part alone came before: some by chance, the rest a share of the causal part's episodes. */
const cured = (order: Order, causal: number, course: Course) => {
  const { first, expectedFirst } = order;
  const spread = 6 * Math.sqrt(expectedFirst + (expectedFirst * expectedFirst) / 4) + 6;
  const most = Math.min(first, Math.ceil(expectedFirst + spread));
  const step = Math.ceil((most + 1) / MOST_TERMS);
  const courses = Array.from({ length: OWN_STEPS + 1 }, (_, at) => courseByCause(course, at / OWN_STEPS));
  const terms: number[] = [];
  for (let own = 0; own <= most; own += step) {
    const linked = first - own;
    const place = (OWN_STEPS * own) / Math.max(first, 1);
    const low = Math.floor(place);
    const lowCourse = courses[low] ?? 0;
    terms.push(
      unordered({ ...order, first: own }) +
        betaBinomial(linked, Math.max(causal - own, linked), 2, 3.5) +
        lowCourse +
        (place - low) * ((courses[low + 1] ?? lowCourse) - lowCourse) +
        Math.log(step),
    );
  }
  return logSum(...terms);
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
  const aCourse: Course = {
    first: e.aFirst,
    prompt: e.aFirstPrompt,
    chancePrompt: e.chancePromptA,
    joined: e.aFirstJoined,
  };
  const bCourse: Course = {
    first: e.bFirst,
    prompt: e.bFirstPrompt,
    chancePrompt: e.chancePromptB,
    joined: e.bFirstJoined,
  };
  const leaked = (order: Order, causal: number) => ({
    ...order,
    expectedSecond: order.expectedSecond + LEAK * causal,
  });
  return {
    nothing:
      unordered(aFirst) +
      negativeBinomial(e.together, sameDay, 1) +
      joinedByChance(e.aFirstJoined, e.aFirst) +
      joinedByChance(e.bFirstJoined, e.bFirst) +
      symmetric,
    together:
      logSum(unordered(aFirst, BY_COMPANY), unordered(aFirst, BY_CLOSE_COMPANY)) -
      Math.log(2) +
      sameVisit(e) +
      joinedByCompany(e.aFirstJoined + e.bFirstJoined, e.aFirst + e.bFirst) +
      symmetric,
    aCauses:
      cured(leaked(bFirst, e.withA), e.withA, bCourse) +
      aChance +
      joinedAfterCause(e.aFirstJoined, e.aFirst) +
      sameVisit(e) +
      damage(e.bDamaged, e.aDamaged, true),
    bCauses:
      cured(leaked(aFirst, e.withB), e.withB, aCourse) +
      bChance +
      joinedAfterCause(e.bFirstJoined, e.bFirst) +
      sameVisit(e) +
      damage(e.aDamaged, e.bDamaged, true),
  };
};
