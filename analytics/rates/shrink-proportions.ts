import { betaQuantile } from '../distributions';
import { requireConfidence } from '../requirement';
import type { Interval, NotEstimable, WarningCode } from '../types';
import type { BetaBinomialData } from './beta-binomial-likelihood';
import { betaBinomialData, derivativesAt, logLikelihoodAt } from './beta-binomial-likelihood';
import { requireProportion } from './proportion';

export type ShrunkenProportions = {
  kind: 'estimate';
  /** Of the beta distribution of the true shares; null where the shares show no spread. */
  alpha: number | null;
  beta: number | null;
  /** After allowing for few jobs, in the order given. */
  rates: number[];
  intervals: Interval[];
  warnings: WarningCode[];
};

/**
 * Shares of many groups (people, models) after allowing for few jobs: a group with little of its own is
 * drawn toward what is usual, one with much keeps its own share.
 *
 * Assumes each group's true share comes from one beta distribution, fitted by maximum likelihood of the
 * beta-binomial counts; rate = (α + successes)/(α + β + trials), its interval the beta posterior's equal
 * tails at `confidence` (0.95), the fit taken as known. Shares that differ no more than chance makes
 * them give α and β null, every rate the pooled one, limits null and the warning `noSpread`. Counts in, shares out.
 * Not estimable without a trial, or where groups are so unlike that α, β → 0.
 *
 * Source: Efron & Morris (1975), JASA 70; Skellam (1948), JRSS B 10 (beta-binomial maximum likelihood).
 *
 * @throws {RequirementError} where a count is not whole, successes exceed trials, or the confidence is
 * not between 0 and 1
 * @example shrinkProportions(battersOf1970) // alpha 210.55, beta 582.69; 18 of 45 → 0.2727
 */
export function shrinkProportions(
  counts: readonly { successes: number; trials: number }[],
  { confidence = 0.95 }: { confidence?: number } = {},
): ShrunkenProportions | NotEstimable<'noTrials' | 'boundary'> {
  requireConfidence(confidence, 'shrinkProportions');
  for (const { successes, trials } of counts) requireProportion(successes, trials, 'shrinkProportions');
  const trials = counts.reduce((sum, count) => sum + count.trials, 0);
  if (trials === 0) return { kind: 'notEstimable', reason: 'noTrials' };
  const pooled = counts.reduce((sum, count) => sum + count.successes, 0) / trials;
  const prior = pooled === 0 || pooled === 1 ? 'noSpread' : fitBeta(betaBinomialData(counts), pooled);
  if (prior === 'boundary') return { kind: 'notEstimable', reason: 'boundary' };
  if (prior === 'noSpread') {
    return {
      kind: 'estimate',
      alpha: null,
      beta: null,
      rates: counts.map(() => pooled),
      intervals: counts.map(() => ({ lower: null, upper: null })),
      warnings: ['noSpread'],
    };
  }
  const { alpha, beta } = prior;
  const tail = (1 - confidence) / 2;
  const posteriors = counts.map(
    ({ successes, trials: n }) => [alpha + successes, beta + n - successes] as const,
  );
  return {
    kind: 'estimate',
    alpha,
    beta,
    rates: posteriors.map(([a, b]) => a / (a + b)),
    intervals: posteriors.map(([a, b]) => ({
      lower: betaQuantile(tail, a, b),
      upper: betaQuantile(1 - tail, a, b),
    })),
    warnings: [],
  };
}

/** Log strengths α + β that are looked at: below, groups are all or none; above, they are binomial. */
const LOG_STRENGTHS = Array.from({ length: 97 }, (_, i) => -7 + i * 0.25);

function fitBeta(
  data: BetaBinomialData,
  pooled: number,
): { alpha: number; beta: number } | 'noSpread' | 'boundary' {
  let mean = pooled;
  // The mean hardly depends on the strength, so each step of the grid starts at its neighbor's.
  const profile = LOG_STRENGTHS.toReversed().map((logStrength) => {
    mean = bestMean(data, mean, Math.exp(logStrength));
    return { logStrength, mean, logLikelihood: logLikelihoodAt(data, mean, Math.exp(logStrength)) };
  });
  const best = profile.reduce((top, next) => (next.logLikelihood > top.logLikelihood ? next : top));
  if (best === profile.at(-1)) return 'boundary';
  const binomial = logLikelihoodAt(data, pooled, Infinity);
  const rounding = 1e-10 * (1 + Math.abs(binomial));
  if (best === profile[0] || best.logLikelihood <= binomial + rounding) return 'noSpread';
  return newton(data, best.mean * Math.exp(best.logStrength), (1 - best.mean) * Math.exp(best.logStrength));
}

/** The best mean at a given strength, by Newton steps on its logit (ℓ is concave in the mean). */
function bestMean(data: BetaBinomialData, start: number, strength: number): number {
  let mean = start;
  for (let n = 0; n < 50; n++) {
    const [alpha, beta] = [mean * strength, (1 - mean) * strength];
    const {
      gradient: [ga, gb],
      hessian: [haa, hab, hbb],
    } = derivativesAt(data, alpha, beta);
    // d log α/d logit = 1 − mean, d log β/d logit = −mean.
    const slope = (1 - mean) * ga - mean * gb;
    const bend =
      (1 - mean) ** 2 * haa - 2 * mean * (1 - mean) * hab + mean * mean * hbb - mean * (1 - mean) * (ga + gb);
    const step = bend < 0 ? Math.max(-1, Math.min(1, -slope / bend)) : Math.sign(slope) * 0.1;
    const next = 1 / (1 + ((1 - mean) / mean) * Math.exp(-step));
    if (Math.abs(next - mean) <= 1e-13 * mean) return next;
    mean = next;
  }
  return mean;
}

/** Both parameters to the last digits, in (log α, log β). */
function newton(
  data: BetaBinomialData,
  startAlpha: number,
  startBeta: number,
): { alpha: number; beta: number } {
  let [alpha, beta] = [startAlpha, startBeta];
  for (let n = 0; n < 100; n++) {
    const {
      gradient: [ga, gb],
      hessian: [haa, hab, hbb],
    } = derivativesAt(data, alpha, beta);
    const determinant = haa * hbb - hab * hab;
    if (!(determinant > 0)) break;
    const clip = (step: number): number => Math.max(-0.5, Math.min(0.5, step));
    const stepA = clip((hab * gb - hbb * ga) / determinant);
    const stepB = clip((hab * ga - haa * gb) / determinant);
    alpha *= Math.exp(stepA);
    beta *= Math.exp(stepB);
    if (Math.abs(stepA) + Math.abs(stepB) < 1e-14) break;
  }
  return { alpha, beta };
}
