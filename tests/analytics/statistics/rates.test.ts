import { describe, expect, it } from 'vitest';

import { proportionChart, shrinkProportions } from '../../../analytics';
import { estimateOf, expectClose, referenceEntries } from './reference';

describe('proportionChart against R', () => {
  const entries = referenceEntries<{
    data: { x: number[]; n: number[] };
    result: { center: number; lcl: number[]; ucl: number[]; out_of_control_index_1based: number[] };
  }>('control-charts', 'p_chart');

  it.each(entries)('$id', ({ data, result }) => {
    const chart = proportionChart(data.x.map((count, i) => ({ count, size: data.n[i] ?? 0 })));
    expectClose(chart.center, result.center, 1e-10);
    chart.points.forEach((point, i) => {
      expectClose(point.lower, result.lcl[i], 1e-10);
      expectClose(point.upper, result.ucl[i], 1e-10);
      expect(point.signal).toBe(result.out_of_control_index_1based.includes(i + 1));
    });
  });

  it('gives no signal where there is nothing to judge', () => {
    const empty = { rate: null, lower: 0, upper: 1, signal: false };
    expect(proportionChart([])).toEqual({ center: null, points: [] });
    expect(proportionChart([{ count: 0, size: 0 }])).toEqual({ center: null, points: [empty] });
    expect(
      proportionChart([
        { count: 3, size: 9 },
        { count: 0, size: 0 },
      ]).points[1],
    ).toEqual(empty);
    expect(
      proportionChart([
        { count: 5, size: 5 },
        { count: 7, size: 7 },
      ]).points.map((p) => p.signal),
    ).toEqual([false, false]);
  });

  it.each([
    [{ count: 3, size: 2 }],
    [{ count: -1, size: 2 }],
    [{ count: 1, size: 2.5 }],
    [{ count: NaN, size: 2 }],
  ])('throws on %j', (point) => {
    expect(() => proportionChart([point])).toThrow(/^proportionChart requires /);
  });
});

describe('shrinkProportions against R', () => {
  const entries = referenceEntries<{
    data: { x: number[]; n: number[] };
    result: {
      alpha: number;
      beta: number;
      posterior_mean: number[];
      posterior_lower95: number[];
      posterior_upper95: number[];
    };
  }>('empirical-bayes', 'beta_binomial_mle_shrinkage');
  const countsOf = (x: number[], n: number[]) => x.map((successes, i) => ({ successes, trials: n[i] ?? 0 }));

  it.each(entries)('$id', ({ data, result }) => {
    const fit = estimateOf(shrinkProportions(countsOf(data.x, data.n)));
    expectClose(fit.alpha, result.alpha, 1e-6);
    expectClose(fit.beta, result.beta, 1e-6);
    expect(fit.warnings).toEqual([]);
    fit.rates.forEach((rate, i) => {
      expectClose(rate, result.posterior_mean[i], 1e-6);
      expectClose(fit.intervals[i]?.lower, result.posterior_lower95[i], 1e-5);
      expectClose(fit.intervals[i]?.upper, result.posterior_upper95[i], 1e-5);
    });
  });

  it.each([
    ['equal shares', [5, 5, 5], [10, 10, 10], 0.5],
    ['one group', [3], [9], 1 / 3],
    ['no successes', [0, 0], [5, 7], 0],
    ['all successes', [5, 7], [5, 7], 1],
    ['one trial each', [0, 1, 1, 0], [1, 1, 1, 1], 0.5],
  ])('pools %s', (_, x, n, pooled) => {
    const fit = estimateOf(shrinkProportions(countsOf(x, n)));
    expect(fit).toMatchObject({ alpha: null, beta: null, warnings: ['noSpread'] });
    fit.rates.forEach((rate) => expectClose(rate, pooled, 1e-12));
  });

  it('draws a group without trials wholly to the rest', () => {
    const fit = estimateOf(shrinkProportions(countsOf([1, 9, 0], [10, 10, 0])));
    expectClose(fit.rates[2], (fit.alpha ?? NaN) / ((fit.alpha ?? NaN) + (fit.beta ?? NaN)), 1e-12);
    expect(fit.rates[0]).toBeGreaterThan(0.1);
    expect(fit.rates[1]).toBeLessThan(0.9);
  });

  it('says where it cannot answer', () => {
    expect(shrinkProportions([])).toEqual({ kind: 'notEstimable', reason: 'noTrials' });
    expect(shrinkProportions(countsOf([0], [0]))).toEqual({ kind: 'notEstimable', reason: 'noTrials' });
    expect(shrinkProportions(countsOf([0, 10], [10, 10]))).toEqual({
      kind: 'notEstimable',
      reason: 'boundary',
    });
  });

  it('throws on wrong use', () => {
    expect(() => shrinkProportions([{ successes: 3, trials: 2 }])).toThrow(
      'shrinkProportions requires no more successes than trials',
    );
    expect(() => shrinkProportions([{ successes: 1, trials: 2 }], { confidence: 1 })).toThrow(
      'shrinkProportions requires a confidence between 0 and 1',
    );
  });
});
