import betainc from '@stdlib/math-base-special-betainc';
import gammainc from '@stdlib/math-base-special-gammainc';
import betaQuantileOf from '@stdlib/stats-base-dists-beta-quantile';
import chiSquareQuantileOf from '@stdlib/stats-base-dists-chisquare-quantile';
import normalQuantileOf from '@stdlib/stats-base-dists-normal-quantile';

/**
 * Quantiles and tails of the usual distributions, from the library and mended where checks against
 * SciPy 1.x showed it wrong: the incomplete gamma function is off by up to 2.5 % for parameters from
 * about 1,000 on the upper side, chi-square quantiles follow it, and the normal quantile loses digits
 * below 1e-6.
 */

/** Largest gamma parameter up to which the library was found right to 1e-12. */
const LIBRARY_GAMMA_LIMIT = 200;

/** z with P(Z ≤ z) = probability, for a standard normal Z. */
export function normalQuantile(probability: number): number {
  if (probability > 0.5) return -normalQuantile(1 - probability);
  if (probability === 0.5) return 0;
  const start =
    probability > 1e-15 ? normalQuantileOf(probability, 0, 1) : -Math.sqrt(-2 * Math.log(probability));
  return polish(start, (z) => {
    const density = Math.exp((-z * z) / 2) / Math.sqrt(2 * Math.PI);
    const tail = normalUpperTail(-z);
    return (Math.log(tail / probability) * tail) / density;
  });
}

/** z with P(|Z| ≤ z) = confidence: 1.96 for 0.95. */
export function normalLimit(confidence: number): number {
  return -normalQuantile((1 - confidence) / 2);
}

/** P(Z > z), without the loss of 1 − P(Z ≤ z) in the far tail. */
export function normalUpperTail(z: number): number {
  const tail = gammainc((z * z) / 2, 0.5, true, true) / 2;
  return z >= 0 ? tail : 1 - tail;
}

/** P(|Z| ≥ |z|). */
export function normalTwoSided(z: number): number {
  return gammainc((z * z) / 2, 0.5, true, true);
}

/** P(X ≥ x) for X chi-square with the given degrees of freedom. */
export function chiSquareUpperTail(x: number, degreesOfFreedom: number): number {
  return x <= 0 ? 1 : upperGamma(degreesOfFreedom / 2, x / 2);
}

/** x with P(X ≤ x) = probability, for X chi-square. */
export function chiSquareQuantile(probability: number, degreesOfFreedom: number): number {
  const a = degreesOfFreedom / 2;
  if (a <= LIBRARY_GAMMA_LIMIT) return chiSquareQuantileOf(probability, degreesOfFreedom);
  const spread = 2 / (9 * degreesOfFreedom);
  const start = a * (1 - spread + normalQuantile(probability) * Math.sqrt(spread)) ** 3;
  const fromAbove = probability > 0.5;
  const target = fromAbove ? 1 - probability : probability;
  const half = polish(start, (x) => {
    const density = gammaDensity(a, x);
    return fromAbove ? (target - upperGamma(a, x)) / density : (lowerGamma(a, x) - target) / density;
  });
  return 2 * half;
}

/** x with P(X ≤ x) = probability, for X beta distributed. */
export function betaQuantile(probability: number, a: number, b: number): number {
  return betaQuantileOf(probability, a, b);
}

/** P(X ≤ count) for X binomial. */
export function binomialLowerTail(count: number, size: number, probability: number): number {
  if (count >= size) return 1;
  return count < 0 ? 0 : betainc(probability, count + 1, size - count, true, true);
}

/** P(X ≥ count) for X binomial. */
export function binomialUpperTail(count: number, size: number, probability: number): number {
  if (count <= 0) return 1;
  return count > size ? 0 : betainc(probability, count, size - count + 1, true, false);
}

function upperGamma(a: number, x: number): number {
  if (a <= LIBRARY_GAMMA_LIMIT) return gammainc(x, a, true, true);
  return x > a ? upperFraction(a, x) : 1 - lowerSeries(a, x);
}

function lowerGamma(a: number, x: number): number {
  if (a <= LIBRARY_GAMMA_LIMIT) return gammainc(x, a, true, false);
  return x > a ? 1 - upperFraction(a, x) : lowerSeries(a, x);
}

/** x^(a−1) e^(−x) / Γ(a) for large a, by Stirling's series around x = a. */
function gammaDensity(a: number, x: number): number {
  const shift = (x - a) / a;
  const stirling = 1 / (12 * a) - 1 / (360 * a ** 3) + 1 / (1260 * a ** 5);
  return (Math.exp(a * (Math.log1p(shift) - shift) - stirling) * Math.sqrt(a / (2 * Math.PI))) / x;
}

/** Abramowitz & Stegun 6.5.29. */
function lowerSeries(a: number, x: number): number {
  let term = 1 / a;
  let sum = term;
  for (let n = 1; term > sum * 1e-17; n++) {
    term *= x / (a + n);
    sum += term;
  }
  return gammaDensity(a, x) * x * sum;
}

/** Abramowitz & Stegun 6.5.31, by Lentz's method. */
function upperFraction(a: number, x: number): number {
  let b = x + 1 - a;
  let c = 1e300;
  let d = 1 / b;
  let product = d;
  for (let n = 1; n < 100_000; n++) {
    const numerator = -n * (n - a);
    b += 2;
    d = 1 / (numerator * d + b);
    c = b + numerator / c;
    product *= d * c;
    if (Math.abs(d * c - 1) < 1e-16) break;
  }
  return gammaDensity(a, x) * x * product;
}

/** A few Newton steps from a good start. */
function polish(start: number, step: (x: number) => number): number {
  let x = start;
  for (let n = 0; n < 20; n++) {
    const change = step(x);
    if (!Number.isFinite(change)) break;
    x -= change;
    if (Math.abs(change) <= 1e-15 * Math.abs(x)) break;
  }
  return x;
}
