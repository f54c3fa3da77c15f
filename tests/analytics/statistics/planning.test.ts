import { describe, expect, it } from 'vitest';

import { checkOrder, expectedFailures, failureCountQuantile } from '../../../analytics';
import { expectClose, referenceEntries, seededRandom } from './reference';

describe('expectedFailures', () => {
  const entries = referenceEntries<{
    data: { shape: number; scale: number; age: number[]; interval: number; count?: number[] };
    result: { p: number[]; expected_failures: number; variance: number };
  }>('conditional-forecast');

  it.each(entries)('$id', ({ data, result }) => {
    const { shape, scale, age, interval, count } = data;
    const each = expectedFailures({ fit: { shape, scale }, ages: age, horizon: interval });
    each.probabilities.forEach((p, i) => expectClose(p, result.p[i], 1e-10));
    const all = age.flatMap((a, i) => Array<number>(count?.[i] ?? 1).fill(a));
    const together = expectedFailures({ fit: { shape, scale }, ages: all, horizon: all.map(() => interval) });
    expectClose(together.expected, result.expected_failures, 1e-10);
    expectClose(together.variance, result.variance, 1e-10);
    expect(together).toMatchObject({ lower: null, upper: null });
  });

  const forecast = {
    fit: {
      shape: 1.6,
      scale: 900,
      covariance: [
        [0.02, -0.008],
        [-0.008, 0.03],
      ] as const,
    },
    ages: Array.from({ length: 60 }, (_, i) => 10 * i),
    horizon: 150,
  };

  it('has the limits of numerical slopes', () => {
    const { expected, lower, upper } = expectedFailures(forecast);
    const at = (dScale: number, dShape: number) =>
      expectedFailures({
        ...forecast,
        fit: { scale: 900 * Math.exp(dScale), shape: 1.6 * Math.exp(dShape) },
      }).expected;
    const h = 1e-5;
    const [a, b] = [(at(h, 0) - at(-h, 0)) / (2 * h), (at(0, h) - at(0, -h)) / (2 * h)];
    const error = Math.sqrt(a * a * 0.02 - 2 * a * b * 0.008 + b * b * 0.03) / expected;
    expectClose(upper, expected * Math.exp(1.959963984540054 * error), 1e-7);
    expectClose(lower, expected / Math.exp(1.959963984540054 * error), 1e-7);
  });

  it('gives the count wider limits where the fit is uncertain', () => {
    const known = expectedFailures({ ...forecast, fit: { shape: 1.6, scale: 900 } }).countInterval;
    const uncertain = expectedFailures(forecast).countInterval;
    expect(uncertain.lower).toBeLessThan(known.lower);
    expect(uncertain.upper).toBeGreaterThan(known.upper);
  });

  it('takes nothing, very old ages and no horizon', () => {
    expect(expectedFailures({ fit: { shape: 2, scale: 1 }, ages: [], horizon: 5 })).toMatchObject({
      expected: 0,
    });
    const extreme = expectedFailures({ ...forecast, ages: [1e9, 1e300, 0, 1e-9], horizon: 100 });
    for (const p of extreme.probabilities) expect(p >= 0 && p <= 1).toBe(true);
    expect(extreme.lower).toBeLessThanOrEqual(extreme.expected);
    expect(expectedFailures({ ...forecast, horizon: 0 })).toMatchObject({ expected: 0, lower: 0, upper: 0 });
  });

  it('throws on wrong use', () => {
    const wrong = [
      { ages: [-1] },
      { ages: [NaN] },
      { horizon: -1 },
      { horizon: [1] },
      { fit: { shape: 0, scale: 1 } },
    ];
    for (const part of wrong)
      expect(() => expectedFailures({ ...forecast, ...part })).toThrow(/^expectedFailures requires /);
    expect(() => expectedFailures({ ...forecast, confidence: 1 })).toThrow(
      /^expectedFailures requires a confidence/,
    );
  });
});

describe('failureCountQuantile', () => {
  const exponential = { fit: { shape: 1, scale: 1000 }, horizon: 1000 };

  it('of equal parts is the binomial quantile', () => {
    // scipy.stats.binom.ppf([0.05, 0.5, 0.95], 50, 1 − exp(−1)), SciPy 1.17.1
    const ages = Array<number>(50).fill(0);
    const quantiles = [0.05, 0.5, 0.95].map((level) => failureCountQuantile({ ...exponential, ages }, level));
    expect(quantiles).toEqual([26, 32, 37]);
  });

  it('of many parts stays near the exact one', () => {
    // scipy.stats.binom.ppf([0.025, 0.5, 0.999], 4000, 1 − exp(−1)), SciPy 1.17.1
    const ages = Array<number>(4000).fill(0);
    const quantiles = [0.025, 0.5, 0.999].map((level) =>
      failureCountQuantile({ ...exponential, ages }, level),
    );
    expect(quantiles).toEqual([2469, 2529, 2622]);
  });

  it('holds failures with at least the chance that was asked, for mixed ages', () => {
    const random = seededRandom(29);
    const fit = { shape: 2, scale: 800 };
    const ages = Array.from({ length: 40 }, () => 700 * random());
    const horizons = ages.map(() => 50 + 300 * random());
    const quantile = failureCountQuantile({ fit, ages, horizon: horizons }, 0.9);
    const { probabilities } = expectedFailures({ fit, ages, horizon: horizons });
    const runs = 4000;
    let [within, below] = [0, 0];
    for (let run = 0; run < runs; run++) {
      const count = probabilities.filter((p) => random() < p).length;
      if (count <= quantile) within++;
      if (count < quantile) below++;
    }
    expect(within / runs).toBeGreaterThan(0.9 - 0.016);
    expect(below / runs).toBeLessThan(0.9 + 0.016);
  });

  it.each([0, 1, NaN])('throws on a level of %s', (level) => {
    expect(() => failureCountQuantile({ ...exponential, ages: [1] }, level)).toThrow(
      'failureCountQuantile requires a level between 0 and 1',
    );
  });
});

describe('checkOrder', () => {
  const permutations = <T>(items: T[]): T[][] =>
    items.length < 2
      ? [items]
      : items.flatMap((item, i) => permutations(items.toSpliced(i, 1)).map((rest) => [item, ...rest]));

  it('is the best of all orders', () => {
    const random = seededRandom(41);
    for (let run = 0; run < 50; run++) {
      const checks = ['belt', 'switch', 'coil', 'clutch', 'fuse'].map((component) => ({
        component,
        probability: random() / 5,
        minutes: 1 + 20 * random(),
      }));
      const costs = permutations(checks).map((order) => {
        let spent = 0;
        const found = order.reduce(
          (sum, { probability, minutes }) => sum + probability * (spent += minutes),
          0,
        );
        return found + spent * (1 - order.reduce((sum, { probability }) => sum + probability, 0));
      });
      expectClose(checkOrder(checks).expectedMinutes, Math.min(...costs), 1e-12);
    }
  });

  it('lets what no check explains pay for all', () => {
    const checks = [
      { component: 'belt', probability: 0.6, minutes: 10 },
      { component: 'switch', probability: 0.3, minutes: 2 },
    ];
    const { order, expectedMinutes } = checkOrder(checks);
    expect(order).toEqual(['switch', 'belt']);
    expect(expectedMinutes).toBeCloseTo(0.3 * 2 + 0.6 * 12 + 0.1 * 12, 12);
  });

  it('keeps the order given among equals, and takes nothing', () => {
    const equal = ['b', 'a', 'c'].map((component) => ({ component, probability: 0.2, minutes: 5 }));
    expect(checkOrder(equal).order).toEqual(['b', 'a', 'c']);
    expect(checkOrder([])).toEqual({ order: [], expectedMinutes: 0 });
  });

  it.each([
    [[{ component: 'a', probability: -0.1, minutes: 5 }]],
    [[{ component: 'a', probability: NaN, minutes: 5 }]],
    [[{ component: 'a', probability: 0.5, minutes: 0 }]],
    [[{ component: 'a', probability: 0.5, minutes: NaN }]],
    [['a', 'b'].map((component) => ({ component, probability: 0.6, minutes: 5 }))],
  ])('throws on %j', (checks) => {
    expect(() => checkOrder(checks)).toThrow(/^checkOrder requires /);
  });
});
