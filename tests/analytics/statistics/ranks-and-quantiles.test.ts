import { describe, expect, it } from 'vitest';

import {
  fitWeibull,
  lifeQuantile,
  medianRankRegression,
  medianRanks,
  probabilityPlot,
  scaleLowerBound,
} from '../../../analytics';
import type { LifeColumns } from './reference';
import { estimateOf, expectClose, livesOf, referenceEntries, seededRandom } from './reference';

describe('medianRanks', () => {
  const [entry] = referenceEntries<{ result: { rows: { n: number; exact: number[] }[] } }>(
    'median-rank-regression',
    'median_ranks',
  );

  it.each(entry?.result.rows ?? [])('of $n', ({ n, exact }) => {
    medianRanks(n).forEach((rank, i) => expectClose(rank, exact[i], 1e-9));
  });

  it.each([0, -1, 2.5, NaN])('throws on %s', (n) => {
    expect(() => medianRanks(n)).toThrow('medianRanks requires n to be a whole number above 0');
  });
});

describe('medianRankRegression', () => {
  const entries = referenceEntries<{
    data: LifeColumns;
    result: {
      adjusted_rank: number[];
      failure_time: number[];
      benard: { plotting_position: number[]; x_on_y: { shape: number; scale: number }; r_squared: number };
    };
  }>('median-rank-regression', 'median_rank_regression_weibull');

  it.each(entries)('$id', ({ data, result }) => {
    const line = estimateOf(medianRankRegression(livesOf(data)));
    line.points.forEach((point, i) => {
      expect(point.time).toBe(result.failure_time[i]);
      expectClose(point.adjustedRank, result.adjusted_rank[i], 1e-9);
      expectClose(point.failedShare, result.benard.plotting_position[i], 1e-9);
    });
    expectClose(line.shape, result.benard.x_on_y.shape, 1e-8);
    expectClose(line.scale, result.benard.x_on_y.scale, 1e-8);
    expectClose(line.rSquared, result.benard.r_squared, 1e-8);
  });

  it('takes a weight as copies', () => {
    const once = [4, 9, 9, 9, 15].map((time, i) => ({ time, failed: i !== 3 }));
    const weighted = [
      { time: 4, failed: true },
      { time: 9, failed: true, weight: 2 },
      { time: 9, failed: false },
      { time: 15, failed: true },
    ];
    expect(medianRankRegression(weighted)).toEqual(medianRankRegression(once));
  });

  it('says where it cannot answer and throws on what it cannot use', () => {
    expect(medianRankRegression([])).toEqual({ kind: 'notEstimable', reason: 'noFailures' });
    expect(medianRankRegression([{ time: 4, failed: true, weight: 3 }])).toEqual({
      kind: 'notEstimable',
      reason: 'oneFailureAge',
    });
    const wrong = [
      { time: 4, failed: true, entry: 1 },
      { time: 4, failed: true, weight: 0.5 },
      { time: 0, failed: true },
    ];
    for (const life of wrong)
      expect(() => medianRankRegression([life])).toThrow(/^medianRankRegression requires every /);
  });
});

describe('lifeQuantile against R: quantile(survfit(…))', () => {
  type Quantiles = {
    p: number[];
    time: (number | null)[];
    lower: (number | null)[];
    upper: (number | null)[];
  };
  const entries = referenceEntries<{ data: LifeColumns; result: { failure_quantiles: Quantiles } }>(
    'kaplan-meier',
  );

  it.each(entries)('$id', ({ data, result: { failure_quantiles: expected } }) => {
    const lives = livesOf(data);
    expected.p.forEach((share, i) => {
      const quantile = lifeQuantile(lives, share);
      expect(quantile).toEqual({
        estimate: expected.time[i],
        lower: expected.lower[i],
        upper: expected.upper[i],
      });
    });
  });

  it('is null where nothing failed, and throws on a share of 50', () => {
    expect(lifeQuantile([], 0.5)).toEqual({ estimate: null, lower: null, upper: null });
    expect(() => lifeQuantile([], 50)).toThrow('lifeQuantile requires a share between 0 and 1');
  });
});

describe('probabilityPlot', () => {
  it('lies along the fit of a large Weibull sample', () => {
    const random = seededRandom(17);
    const lives = Array.from({ length: 3000 }, () => ({
      time: 500 * (-Math.log(random())) ** (1 / 2),
      failed: true,
    }));
    const fit = estimateOf(fitWeibull(lives));
    const points = probabilityPlot(lives).filter(
      ({ failedShare }) => failedShare > 0.05 && failedShare < 0.95,
    );
    expect(points.length).toBeGreaterThan(2000);
    for (const { x, y } of points)
      expect(Math.abs(y - fit.shape * (x - Math.log(fit.scale)))).toBeLessThan(0.25);
  });

  it('sets each failure at the middle of its step', () => {
    expect(
      probabilityPlot([
        { time: 5, failed: true },
        { time: 8, failed: true },
      ]).map(({ failedShare }) => failedShare),
    ).toEqual([0.25, 0.75]);
  });
});

describe('scaleLowerBound', () => {
  const running = [300, 400, 500].map((time) => ({ time, failed: false }));

  it('without failures is (Σ t^β / −log α)^(1/β)', () => {
    expectClose(boundOf(running, 2), Math.sqrt((300 ** 2 + 400 ** 2 + 500 ** 2) / -Math.log(0.05)), 1e-9);
  });

  it('at shape 1 is the lower limit of an exponential mean', () => {
    // NIST/SEMATECH e-Handbook 8.4.5.1: 2 failures in 1600 h, lower one-sided 95 % limit 254.14 h.
    const lives = [
      { time: 600, failed: true },
      { time: 400, failed: true },
      { time: 600, failed: false },
    ];
    expectClose(boundOf(lives, 1), 254.137936549, 1e-9);
  });

  it('counts late entries from their entry', () => {
    expectClose(boundOf([{ time: 500, entry: 300, failed: false }], 1), 200 / -Math.log(0.05), 1e-9);
  });

  it('says where it cannot answer and throws on a shape of 0', () => {
    expect(scaleLowerBound([], { shape: 1 })).toEqual({ kind: 'notEstimable', reason: 'noObservations' });
    expect(() => scaleLowerBound(running, { shape: 0 })).toThrow(/^scaleLowerBound requires a shape/);
    expect(() => scaleLowerBound(running, { shape: 1, confidence: 1 })).toThrow(
      /^scaleLowerBound requires a confidence/,
    );
  });

  function boundOf(lives: Parameters<typeof scaleLowerBound>[0], shape: number): number {
    return estimateOf(scaleLowerBound(lives, { shape })).bound;
  }
});
