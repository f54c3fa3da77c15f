import { bracketRoot, newtonRoot } from '../find-root';
import type { LifeTable } from './tabulate-lives';

/**
 * The Weibull log-likelihood of a life table, in log ages relative to the largest one so that powers
 * neither overflow nor vanish. With net = exits − entries at an age,
 *
 *   ℓ(η, β) = Σ failed·log h(t) − Σ net·(t/η)^β
 *
 * and for a given β the best η has η^β = Σ net·t^β / failures.
 */
export type WeibullData = {
  logAges: Float64Array;
  failed: Float64Array;
  net: Float64Array;
  /** Log of the largest age, which `logAges` are relative to. */
  reference: number;
  failures: number;
  failedLogSum: number;
  netSum: number;
  isTruncated: boolean;
};

export type WeibullMaximum = { shape: number; relativeLogScale: number; logLikelihood: number };

export function weibullData(table: LifeTable): WeibullData {
  const largest = table.ages.at(-1) ?? 1;
  const logAges = table.ages.map((age) =>
    age > largest / 2 ? Math.log1p((age - largest) / largest) : Math.log(age / largest),
  );
  const net = table.ages.map(
    (_, i) => (table.failed[i] ?? 0) + (table.censored[i] ?? 0) - (table.entered[i] ?? 0),
  );
  let failedLogSum = 0;
  let netSum = 0;
  for (let i = 0; i < net.length; i++) {
    failedLogSum += (table.failed[i] ?? 0) * (logAges[i] ?? 0);
    netSum += net[i] ?? 0;
  }
  return {
    logAges,
    failed: table.failed,
    net,
    reference: Math.log(largest),
    failures: table.failures,
    failedLogSum,
    netSum,
    isTruncated: table.entered.some((weight) => weight > 0),
  };
}

/** Σ net·t^β and its first two derivatives in β, t relative to the largest age. */
export function powerSums(data: WeibullData, shape: number): [number, number, number] {
  const { logAges, net } = data;
  // With late entries and a flat power the sum is a small difference: e^x − 1 keeps its digits.
  const isFlat = data.isTruncated && shape * Math.abs(logAges[0] ?? 0) < 1;
  let sum = isFlat ? data.netSum : 0;
  let first = 0;
  let second = 0;
  for (let i = 0; i < net.length; i++) {
    const x = logAges[i] ?? 0;
    const weight = net[i] ?? 0;
    const power = Math.exp(shape * x);
    sum += weight * (isFlat ? Math.expm1(shape * x) : power);
    first += weight * x * power;
    second += weight * x * x * power;
  }
  return [sum, first, second];
}

/** ℓ at its best η for this β. */
export function profileLogLikelihood(data: WeibullData, shape: number): number {
  const { failures } = data;
  const [sum] = powerSums(data, shape);
  return (
    failures * (Math.log(shape) - Math.log(sum / failures) - data.reference - 1) +
    (shape - 1) * data.failedLogSum
  );
}

/** The maximum of ℓ, or null where it is driven to a boundary (β → 0 or ∞). */
export function maximizeWeibull(data: WeibullData): WeibullMaximum | null {
  const { failures, failedLogSum } = data;
  const slopeAt = (logShape: number): [number, number] => {
    const shape = Math.exp(logShape);
    const [sum, first, second] = powerSums(data, shape);
    const mean = first / sum;
    const tilt = shape * (failedLogSum - failures * mean);
    return [failures + tilt, tilt - failures * shape * shape * (second / sum - mean * mean)];
  };
  const valueAt = (logShape: number): number => slopeAt(logShape)[0];
  // Without late entries the slope is positive here and falls from here on: one maximum.
  const start = -Math.log(-failedLogSum / failures);
  const brackets = data.isTruncated
    ? fallingBrackets(valueAt, start)
    : [bracketRoot(valueAt, start, 0.5, 60)].filter((bracket) => bracket !== null);
  const maxima = brackets.map((bracket) => {
    const shape = Math.exp(newtonRoot(slopeAt, bracket));
    const [sum] = powerSums(data, shape);
    return {
      shape,
      relativeLogScale: Math.log(sum / failures) / shape,
      logLikelihood: profileLogLikelihood(data, shape),
    };
  });
  const best = maxima.reduce<WeibullMaximum | null>(
    (top, next) => (top === null || next.logLikelihood > top.logLikelihood ? next : top),
    null,
  );
  return best !== null && best.logLikelihood > flatLimit(data) ? best : null;
}

/** With late entries ℓ can have several maxima: every place on a grid where its slope turns down. */
function fallingBrackets(slopeAt: (logShape: number) => number, start: number): [number, number][] {
  let left = start;
  while (slopeAt(left) <= 0 && left > start - 20) left -= 1;
  const brackets: [number, number][] = [];
  let before = slopeAt(left);
  for (let right = left + 0.5; right < start + 20; right += 0.5) {
    const after = slopeAt(right);
    if (before > 0 && after <= 0) brackets.push([right - 0.5, right]);
    if (!Number.isFinite(after)) break;
    before = after;
  }
  return brackets;
}

/** ℓ as β → 0: finite only where every life entered late. */
function flatLimit(data: WeibullData): number {
  if (Math.abs(data.netSum) > 1e-12 * data.net.reduce((total, weight) => total + Math.abs(weight), 0))
    return -Infinity;
  let slope = 0;
  for (let i = 0; i < data.net.length; i++) slope += (data.net[i] ?? 0) * (data.logAges[i] ?? 0);
  return -data.failures * (Math.log(slope / data.failures) + data.reference + 1) - data.failedLogSum;
}

/** Inverse of the observed information in (log η, log β); null where it is not positive definite. */
export function weibullCovariance(
  data: WeibullData,
  maximum: WeibullMaximum,
): [[number, number], [number, number]] | null {
  const { failures } = data;
  const { shape, relativeLogScale } = maximum;
  let first = 0;
  let second = 0;
  for (let i = 0; i < data.net.length; i++) {
    const y = shape * ((data.logAges[i] ?? 0) - relativeLogScale);
    const term = (data.net[i] ?? 0) * Math.exp(y) * y;
    first += term;
    second += term * y;
  }
  const core = failures * (second + failures) - first * first;
  if (!(core > 0)) return null;
  const cross = first / (shape * core);
  return [
    [(second + failures) / (shape * shape * core), cross],
    [cross, failures / core],
  ];
}
