import { describe, expect, it } from 'vitest';

import { bLife, fitWeibull } from '../../../analytics';
import { estimateOf, expectClose, seededRandom } from './reference';

const lives = [
  ...[30, 49, 82, 90, 96].map((time) => ({ time, failed: true })),
  ...[10, 45, 100].map((time) => ({ time, failed: false })),
];

/** The log-likelihood written out plainly. */
function logLikelihood(shape: number, scale: number): number {
  return lives.reduce((sum, { time, failed }) => {
    const logHazard = Math.log(shape / scale) + (shape - 1) * Math.log(time / scale);
    return sum + (failed ? logHazard : 0) - (time / scale) ** shape;
  }, 0);
}

/** The highest value of a function of one variable, by golden-section search. */
function highest(f: (x: number) => number, start: number, end: number): number {
  const ratio = (Math.sqrt(5) - 1) / 2;
  let [a, b] = [start, end];
  for (let n = 0; n < 200; n++) {
    const [left, right] = [b - ratio * (b - a), a + ratio * (b - a)];
    if (f(left) > f(right)) b = right;
    else a = left;
  }
  return f((a + b) / 2);
}

describe('profile limits', () => {
  const fit = estimateOf(fitWeibull(lives, { limits: 'profile' }));
  /** Half the 95 % quantile of χ² with one degree of freedom. */
  const drop = 3.841458820694124 / 2;

  it.each(['lower', 'upper'] as const)(
    'of the shape, %s: the likelihood has fallen by half the χ² quantile',
    (side) => {
      const shape = fit.shapeInterval[side] ?? NaN;
      const best = highest((logScale) => logLikelihood(shape, Math.exp(logScale)), 0, 20);
      expectClose(fit.logLikelihood - best, drop, 1e-8);
    },
  );

  it.each(['lower', 'upper'] as const)('of the scale, %s', (side) => {
    const scale = fit.scaleInterval[side] ?? NaN;
    const best = highest((logShape) => logLikelihood(Math.exp(logShape), scale), -4, 4);
    expectClose(fit.logLikelihood - best, drop, 1e-8);
  });

  it.each(['lower', 'upper'] as const)('of B10, %s', (side) => {
    const age = bLife(fit, 10)[side] ?? NaN;
    const best = highest(
      (logShape) => {
        const shape = Math.exp(logShape);
        return logLikelihood(shape, age / (-Math.log(0.9)) ** (1 / shape));
      },
      -4,
      4,
    );
    expectClose(fit.logLikelihood - best, drop, 1e-8);
  });

  it('drawn from a Wald fit are the same', () => {
    const wald = estimateOf(fitWeibull(lives));
    expectClose(bLife(wald, 10, { limits: 'profile' }).upper, bLife(fit, 10).upper, 1e-9);
  });

  it('hold with late entries and one failure', () => {
    const one = estimateOf(
      fitWeibull(
        [
          { time: 500, failed: true, entry: 200 },
          { time: 900, failed: false, entry: 100 },
          { time: 800, failed: false },
        ],
        { limits: 'profile' },
      ),
    );
    for (const [estimate, { lower, upper }] of [
      [one.shape, one.shapeInterval],
      [one.scale, one.scaleInterval],
    ] as const) {
      expect(lower).toBeLessThan(estimate);
      expect(upper === null || upper > estimate).toBe(true);
    }
  });

  it('cover the true shape, scale and B10 as promised from 8 failures', () => {
    const random = seededRandom(7);
    const runs = 1500;
    const [shape, scale] = [1.5, 1000];
    const b10 = scale * (-Math.log(0.9)) ** (1 / shape);
    const missed = { shape: 0, scale: 0, b10: 0 };
    for (let run = 0; run < runs; run++) {
      const sample = Array.from({ length: 15 }, () => ({
        time: scale * (-Math.log(random())) ** (1 / shape),
        failed: true,
      }));
      const draw = estimateOf(fitWeibull(sample, { limits: 'profile' }));
      const covers = ({ lower, upper }: { lower: number | null; upper: number | null }, truth: number) =>
        (lower ?? 0) <= truth && (upper ?? Infinity) >= truth;
      if (!covers(draw.shapeInterval, shape)) missed.shape++;
      if (!covers(draw.scaleInterval, scale)) missed.scale++;
      if (!covers(bLife(draw, 10), b10)) missed.b10++;
    }
    // 92–98 % coverage, widened by the 99.9 % Monte Carlo margin of this many runs.
    for (const count of Object.values(missed)) {
      expect(count / runs).toBeGreaterThan(0.02 - 0.012);
      expect(count / runs).toBeLessThan(0.08 + 0.023);
    }
  });
});

describe('bLife', () => {
  const fit = estimateOf(fitWeibull(lives));

  it('of 63.2 % is the scale', () => {
    const share = 100 * (1 - Math.exp(-1));
    expectClose(bLife(fit, share).estimate, fit.scale, 1e-12);
    expectClose(bLife(fit, share).lower, fit.scaleInterval.lower, 1e-12);
  });

  it('keeps the confidence it is asked for', () => {
    const wide = bLife(fit, 10, { confidence: 0.99 });
    const narrow = bLife(fit, 10, { confidence: 0.8 });
    expect(wide.lower ?? NaN).toBeLessThan(narrow.lower ?? NaN);
    expect(wide.upper ?? NaN).toBeGreaterThan(narrow.upper ?? NaN);
  });

  it.each([0, 100, -5, NaN])('throws on %s percent', (percent) => {
    expect(() => bLife(fit, percent)).toThrow('bLife requires a percent between 0 and 100');
  });
});
