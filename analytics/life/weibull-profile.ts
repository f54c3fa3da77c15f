import { chiSquareQuantile } from '../distributions';
import { bracketRoot, findRoot, newtonRoot } from '../find-root';
import type { Interval } from '../types';
import type { WeibullData, WeibullMaximum } from './weibull-likelihood';
import { profileLogLikelihood } from './weibull-likelihood';

/** Farthest a limit is looked for from the estimate, in logs. */
const SEARCH_SPAN = 700;

/** Profile-likelihood limits of β. */
export function profileShapeInterval(
  data: WeibullData,
  maximum: WeibullMaximum,
  confidence: number,
  standardError: number,
): Interval {
  const logShape = Math.log(maximum.shape);
  const limits = logLimits(logShape, standardError, maximum.logLikelihood, confidence, (x) =>
    profileLogLikelihood(data, Math.exp(x)),
  );
  return exponentiate(limits, 0);
}

/**
 * Profile-likelihood limits of the age t with (t/η)^β = e^logHazard: η itself at 0, the B-life of p at
 * log(−log(1 − p)).
 */
export function profileAgeInterval(
  data: WeibullData,
  maximum: WeibullMaximum,
  logHazard: number,
  confidence: number,
  standardError: number,
): Interval {
  const logAge = maximum.relativeLogScale + logHazard / maximum.shape;
  let logShape = Math.log(maximum.shape);
  const profile = (x: number): number => {
    const best = bestAtAge(data, x, logHazard, logShape);
    logShape = best.logShape;
    return best.logLikelihood;
  };
  const limits = logLimits(logAge, standardError, maximum.logLikelihood, confidence, profile);
  return exponentiate(limits, data.reference);
}

/** Where twice the fall of the profile reaches the χ² quantile, on both sides of the estimate. */
function logLimits(
  estimate: number,
  standardError: number,
  top: number,
  confidence: number,
  profile: (x: number) => number,
): [number | null, number | null] {
  const allowed = chiSquareQuantile(confidence, 1) / 2;
  const excess = (x: number): number => {
    const value = profile(x);
    return Number.isFinite(value) ? top - value - allowed : Infinity;
  };
  const side = (step: number): number | null => {
    const bracket = bracketRoot(excess, estimate, step, SEARCH_SPAN);
    return bracket === null ? null : findRoot(excess, ...bracket);
  };
  return [side(-standardError), side(standardError)];
}

/** ℓ maximized over β with the age of the given hazard held fixed. */
function bestAtAge(
  data: WeibullData,
  logAge: number,
  logHazard: number,
  start: number,
): { logShape: number; logLikelihood: number } {
  const { logAges, net, failures } = data;
  const failedSum = data.failedLogSum - failures * logAge;
  const hazard = Math.exp(logHazard);
  const slopeAt = (logShape: number): [number, number] => {
    const shape = Math.exp(logShape);
    let first = 0;
    let second = 0;
    for (let i = 0; i < net.length; i++) {
      const y = shape * ((logAges[i] ?? 0) - logAge);
      const term = (net[i] ?? 0) * hazard * Math.exp(y) * y;
      first += term;
      second += term * y;
    }
    const slope = failures + shape * failedSum - first;
    return [Number.isNaN(slope) ? -Infinity : slope, shape * failedSum - first - second];
  };
  const direction = slopeAt(start)[0] > 0 ? 0.1 : -0.1;
  const bracket = bracketRoot((x) => slopeAt(x)[0], start, direction, SEARCH_SPAN);
  if (bracket === null) return { logShape: start, logLikelihood: -Infinity };
  const logShape = newtonRoot(slopeAt, bracket);
  const shape = Math.exp(logShape);
  let cumulative = 0;
  for (let i = 0; i < net.length; i++) {
    cumulative += (net[i] ?? 0) * Math.exp(shape * ((logAges[i] ?? 0) - logAge) + logHazard);
  }
  const logLikelihood =
    failures * (logShape + logHazard - data.reference) + shape * failedSum - data.failedLogSum - cumulative;
  return { logShape, logLikelihood };
}

function exponentiate([low, high]: [number | null, number | null], reference: number): Interval {
  const upper = high === null ? Infinity : Math.exp(high + reference);
  return { lower: low === null ? 0 : Math.exp(low + reference), upper: upper === Infinity ? null : upper };
}
