import { describe, expect, it } from 'vitest';

import { bLife, fitWeibull, RequirementError } from '../../../analytics';
import type { LifeColumns } from './reference';
import { estimateOf, expectClose, livesOf, referenceEntries, seededRandom } from './reference';

type Entry = {
  data: LifeColumns;
  result: {
    finite_mle?: boolean;
    n: number;
    failures: number;
    shape: number;
    scale: number;
    loglik: number;
    cov_logscale_logshape: [[number, number], [number, number]];
    shape_ci95: [number, number];
    scale_ci95: [number, number];
    B10: { value: number; ci95: [number, number] };
    B50: { value: number; ci95: [number, number] };
    ignoring_truncation?: { shape: number };
  };
};

const rightCensored = referenceEntries<Entry>('weibull-mle-right-censored');
const truncated = referenceEntries<Entry>('weibull-mle-left-truncated');

const failing = (...times: number[]) => times.map((time) => ({ time, failed: true }));
const running = (...times: number[]) => times.map((time) => ({ time, failed: false }));

describe('fitWeibull against R survival 3.5-3', () => {
  const check = ({ data, result }: Entry, tolerance: { fit: number; cov: number }) => {
    const fit = estimateOf(fitWeibull(livesOf(data)));
    expect(fit.observations).toBe(result.n);
    expect(fit.failures).toBe(result.failures);
    expectClose(fit.shape, result.shape, tolerance.fit);
    expectClose(fit.scale, result.scale, tolerance.fit);
    expectClose(fit.logLikelihood, result.loglik, 1e-9);
    const largest = Math.max(...result.cov_logscale_logshape.flat().map(Math.abs));
    fit.covariance.flat().forEach((value, i) => {
      expectClose(value, result.cov_logscale_logshape.flat()[i], 0, tolerance.cov * largest);
    });
    expectClose(fit.shapeInterval.lower, result.shape_ci95[0], tolerance.cov);
    expectClose(fit.shapeInterval.upper, result.shape_ci95[1], tolerance.cov);
    expectClose(fit.scaleInterval.lower, result.scale_ci95[0], tolerance.cov);
    expectClose(fit.scaleInterval.upper, result.scale_ci95[1], tolerance.cov);
    for (const [percent, life] of [
      [10, result.B10],
      [50, result.B50],
    ] as const) {
      const { estimate, lower, upper } = bLife(fit, percent);
      expectClose(estimate, life.value, tolerance.fit);
      expectClose(lower, life.ci95[0], tolerance.cov);
      expectClose(upper, life.ci95[1], tolerance.cov);
    }
    expect(fit.warnings).toEqual(result.failures < 6 ? ['fewFailures'] : []);
  };

  it.each(rightCensored.filter(({ result }) => result.finite_mle !== false))('$id', (entry) =>
    check(entry, { fit: 1e-7, cov: 1e-5 }),
  );
  it.each(truncated)('$id', (entry) => check(entry, { fit: 1e-6, cov: 1e-4 }));

  it('looks better where late entry is ignored', () => {
    const men = truncated.find(({ id }) => id === 'b-channing-men');
    const ignoring = estimateOf(
      fitWeibull(livesOf({ ...(men?.data ?? { time: [], status: [] }), entry: [] })),
    );
    expectClose(ignoring.shape, men?.result.ignoring_truncation?.shape, 1e-7);
  });

  it.each(
    referenceEntries<{ n: number; shape: number; scale: number; loglik: number; sum_time: number }>(
      'large-sample',
    ),
  )('a simulated sample of $n', ({ n, shape, scale, loglik, sum_time }) => {
    const random = seededRandom(20260101);
    const lives = Array.from({ length: n }, () => {
      const t = 1000 * (-Math.log(random())) ** (1 / 1.5);
      const c = 1000 * random();
      return { time: Math.max(0.1, Math.floor(Math.min(t, c) * 10 + 0.5) / 10), failed: t <= c };
    });
    expectClose(
      lives.reduce((sum, { time }) => sum + time, 0),
      sum_time,
      1e-9,
    );
    const fit = estimateOf(fitWeibull(lives));
    expectClose(fit.shape, shape, 1e-7);
    expectClose(fit.scale, scale, 1e-7);
    expectClose(fit.logLikelihood, loglik, 1e-9);
  });
});

describe('fitWeibull where the data cannot answer', () => {
  it.each([
    ['nothing', [], 'noFailures'],
    ['all running', running(100, 200, 300), 'noFailures'],
    ['one failure alone', failing(100), 'allFailuresAtLargestAge'],
    ['all failures at the largest age', [...running(10, 20), ...failing(30, 30)], 'allFailuresAtLargestAge'],
    [
      'failures of weight 0',
      [...failing(10).map((life) => ({ ...life, weight: 0 })), ...running(20)],
      'noFailures',
    ],
    [
      'late entries that drive the shape to 0',
      [
        { entry: 1, time: 1.01, failed: true },
        { entry: 1, time: 1.02, failed: true },
        { entry: 1, time: 100, failed: false },
        { entry: 1, time: 100, failed: false },
      ],
      'boundary',
    ],
  ])('%s', (_, lives, reason) => {
    expect(fitWeibull(lives)).toEqual({ kind: 'notEstimable', reason });
  });

  it('gives the estimate of a single failure with a warning', () => {
    const fit = estimateOf(fitWeibull([...failing(500), ...running(600, 700)]));
    expect(fit.warnings).toEqual(['fewFailures']);
    expect(fit.shapeInterval.lower).toBeLessThan(fit.shape);
  });

  it.each([
    ['a time of 0', [{ time: 0, failed: true }]],
    ['a negative time', [{ time: -1, failed: false }]],
    ['NaN', [{ time: NaN, failed: true }]],
    ['an infinite time', [{ time: Infinity, failed: false }]],
    ['exit at entry', [{ time: 5, entry: 5, failed: true }]],
    ['NaN entry', [{ time: 5, entry: NaN, failed: true }]],
    ['a negative entry', [{ time: 5, entry: -1, failed: true }]],
    ['a negative weight', [{ time: 5, weight: -1, failed: true }]],
    ['NaN weight', [{ time: 5, weight: NaN, failed: true }]],
  ])('throws on %s', (_, lives) => {
    expect(() => fitWeibull(lives)).toThrow(RequirementError);
    expect(() => fitWeibull(lives)).toThrow(/^fitWeibull requires /);
  });

  it.each([0, 1, NaN, 95])('throws on confidence %s', (confidence) => {
    expect(() => fitWeibull(failing(1, 2), { confidence })).toThrow(
      'fitWeibull requires a confidence between 0 and 1',
    );
  });
});

describe('fitWeibull on hostile scales', () => {
  const ages = [120, 340, 410, 550, 700, 810, 990];
  const plain = estimateOf(fitWeibull([...failing(...ages), ...running(400, 1000)], { limits: 'profile' }));

  it.each([1e-12, 1e-9, 1e9, 1e100, 1e-100])('times ×%s', (factor) => {
    const lives = [...failing(...ages), ...running(400, 1000)].map((life) => ({
      ...life,
      time: life.time * factor,
    }));
    const fit = estimateOf(fitWeibull(lives, { limits: 'profile' }));
    expectClose(fit.shape, plain.shape, 1e-10);
    expectClose(fit.scale, plain.scale * factor, 1e-10);
    expectClose(fit.shapeInterval.upper, plain.shapeInterval.upper, 1e-8);
    expectClose(fit.scaleInterval.lower, (plain.scaleInterval.lower ?? 0) * factor, 1e-8);
  });

  it('1e-9 beside 1e9 hours', () => {
    const fit = estimateOf(fitWeibull([...failing(1e-9, 1, 1e9), ...running(1e9, 2e9)]));
    expect(fit.shape).toBeGreaterThan(0);
    expect(Number.isFinite(fit.logLikelihood)).toBe(true);
  });

  it('failures a billionth apart', () => {
    const fit = estimateOf(fitWeibull(failing(1e9, 1e9 + 1, 1e9 + 2)));
    expect(fit.shape).toBeGreaterThan(1e8);
    expectClose(fit.scale, 1e9 + 1.3, 1e-9);
  });
});
