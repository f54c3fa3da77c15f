import { describe, expect, it } from 'vitest';

import {
  benjaminiHochberg,
  clopperPearsonInterval,
  exactBinomialLimits,
  fisherExact,
  meanTimeBetweenFailures,
  poissonRateRatio,
  wilsonInterval,
} from '../../../analytics';
import { estimateOf, expectClose, referenceEntries } from './reference';

describe('proportion intervals', () => {
  type Row = {
    x: number;
    n: number;
    conf: number;
    wilson: [number, number];
    clopper_pearson: [number, number];
  };
  const rows = referenceEntries<{ result: { rows: Row[] } }>('proportion-intervals').flatMap(
    (entry) => entry.result.rows,
  );

  it.each(rows)('$x of $n at $conf', ({ x, n, conf, wilson, clopper_pearson }) => {
    const score = wilsonInterval(x, n, conf);
    expectClose(score.lower, wilson[0], 1e-10, 1e-12);
    expectClose(score.upper, wilson[1], 1e-10, 1e-12);
    const exact = clopperPearsonInterval(x, n, conf);
    expectClose(exact.lower, clopper_pearson[0], 1e-8, 1e-12);
    expectClose(exact.upper, clopper_pearson[1], 1e-8, 1e-12);
  });

  it('of no trials are null, 0 and 1', () => {
    expect(wilsonInterval(0, 0)).toEqual({ estimate: null, lower: 0, upper: 1 });
    expect(clopperPearsonInterval(0, 0)).toEqual({ estimate: null, lower: 0, upper: 1 });
  });

  it('reach 0 and 1 exactly', () => {
    for (const interval of [wilsonInterval, clopperPearsonInterval]) {
      expect(interval(0, 7).lower).toBe(0);
      expect(interval(7, 7).upper).toBe(1);
    }
  });

  it.each([
    [3, 2],
    [-1, 5],
    [1.5, 5],
    [NaN, 5],
    [1, NaN],
  ])('throw on %s of %s', (successes, trials) => {
    expect(() => wilsonInterval(successes, trials)).toThrow(/^wilsonInterval requires /);
    expect(() => clopperPearsonInterval(successes, trials)).toThrow(/^clopperPearsonInterval requires /);
  });
});

describe('exactBinomialLimits', () => {
  const tailSum = (from: number, to: number, size: number, rate: number) => {
    let total = 0;
    for (let c = from; c <= to; c++) {
      let log = c * Math.log(rate) + (size - c) * Math.log1p(-rate);
      for (let i = 1; i <= c; i++) log += Math.log((size - c + i) / i);
      total += Math.exp(log);
    }
    return total;
  };

  it.each([
    [50, 0.2],
    [120, 0.07],
    [30, 0.5],
    [8, 0.95],
    [400, 0.03],
  ])('size %s, rate %s: the limits are the last counts without a signal', (size, rate) => {
    const { lower, upper } = exactBinomialLimits(size, rate);
    expect(tailSum(0, lower, size, rate)).toBeGreaterThan(0.00135);
    if (lower > 0) expect(tailSum(0, lower - 1, size, rate)).toBeLessThanOrEqual(0.00135);
    expect(tailSum(upper, size, size, rate)).toBeGreaterThan(0.00135);
    if (upper < size) expect(tailSum(upper + 1, size, size, rate)).toBeLessThanOrEqual(0.00135);
  });

  it('never signals at size 0 and knows certain rates', () => {
    expect(exactBinomialLimits(0, 0.3)).toEqual({ lower: 0, upper: 0 });
    expect(exactBinomialLimits(9, 0)).toEqual({ lower: 0, upper: 0 });
    expect(exactBinomialLimits(9, 1)).toEqual({ lower: 9, upper: 9 });
  });

  it('throws on wrong use', () => {
    expect(() => exactBinomialLimits(2.5, 0.1)).toThrow(
      'exactBinomialLimits requires size to be a whole number ≥ 0',
    );
    expect(() => exactBinomialLimits(5, 1.1)).toThrow('exactBinomialLimits requires a rate from 0 to 1');
    expect(() => exactBinomialLimits(5, 0.1, 0)).toThrow(
      'exactBinomialLimits requires a tail between 0 and 0.5',
    );
  });
});

describe('fisherExact', () => {
  const entries = referenceEntries<{
    data: { table: [[number, number], [number, number]] };
    result: {
      p_two_sided: number;
      p_greater: number;
      p_less: number;
      odds_ratio_conditional_mle: number | null;
      odds_ratio_exact_ci95: [number, number | null];
    };
  }>('exact-tests', 'fisher_exact_2x2');

  it.each(entries)('$id', ({ data, result }) => {
    const test = fisherExact(data.table);
    expectClose(test.pValue, result.p_two_sided, 1e-9);
    expectClose(test.greater, result.p_greater, 1e-9);
    expectClose(test.less, result.p_less, 1e-9);
    expectClose(test.oddsRatio, result.odds_ratio_conditional_mle, 1e-7);
    expectClose(test.oddsRatioInterval.lower, result.odds_ratio_exact_ci95[0], 1e-7);
    expectClose(test.oddsRatioInterval.upper, result.odds_ratio_exact_ci95[1], 1e-7);
  });

  it('has the hypergeometric tails', () => {
    const [entry] = referenceEntries<{
      data: { rows: [number, number, number, number][] };
      result: { rows: { lower_tail: number; upper_tail_inclusive: number }[] };
    }>('exact-tests', 'hypergeometric_tails');
    entry?.data.rows.forEach(([x, defectives, good, sample], i) => {
      const test = fisherExact([
        [x, sample - x],
        [defectives - x, good - sample + x],
      ]);
      expectClose(test.less, entry.result.rows[i]?.lower_tail, 1e-9);
      expectClose(test.greater, entry.result.rows[i]?.upper_tail_inclusive, 1e-9);
    });
    expect(entry?.data.rows).toHaveLength(4);
  });

  it('says nothing where a margin is empty', () => {
    const empty = {
      pValue: 1,
      less: 1,
      greater: 1,
      oddsRatio: null,
      oddsRatioInterval: { lower: 0, upper: null },
    };
    expect(
      fisherExact([
        [0, 0],
        [3, 4],
      ]),
    ).toEqual(empty);
    expect(
      fisherExact([
        [0, 0],
        [0, 0],
      ]),
    ).toEqual(empty);
    expect(
      fisherExact([
        [5, 0],
        [3, 0],
      ]),
    ).toEqual(empty);
  });

  it('stays exact for large tables', () => {
    // scipy.stats.fisher_exact([[60200, 39800], [59800, 40200]]), SciPy 1.17.1
    expectClose(
      fisherExact([
        [60200, 39800],
        [59800, 40200],
      ]).pValue,
      0.06857956730758127,
      1e-8,
    );
  });

  it('throws on counts that are none', () => {
    expect(() =>
      fisherExact([
        [1, 2],
        [3, -4],
      ]),
    ).toThrow('fisherExact requires every count to be a whole number ≥ 0');
    expect(() =>
      fisherExact([
        [1, 2],
        [NaN, 4],
      ]),
    ).toThrow(/^fisherExact requires /);
  });
});

describe('poissonRateRatio', () => {
  const [entry] = referenceEntries<{
    data: { rows: [number, number, number, number][] };
    result: {
      rows: {
        rate_ratio: number | null;
        p_two_sided: number;
        p_greater: number;
        p_less: number;
        ci95: [number, number | null];
      }[];
    };
  }>('exact-tests', 'poisson_two_sample_rate_ratio');

  it.each(entry?.data.rows.map((row, i) => ({ row, expected: entry.result.rows[i] })) ?? [])(
    '$row',
    ({ row, expected }) => {
      const [countA, exposureA, countB, exposureB] = row;
      const result = poissonRateRatio({ countA, exposureA, countB, exposureB });
      expectClose(result.ratio, expected?.rate_ratio, 1e-9);
      expectClose(result.pValue, expected?.p_two_sided, 1e-9);
      expectClose(result.greater, expected?.p_greater, 1e-9);
      expectClose(result.less, expected?.p_less, 1e-9);
      expectClose(result.lower, expected?.ci95[0], 1e-7);
      expectClose(result.upper, expected?.ci95[1], 1e-7);
    },
  );

  it('knows nothing without events', () => {
    expect(poissonRateRatio({ countA: 0, exposureA: 5, countB: 0, exposureB: 7 })).toEqual({
      ratio: null,
      lower: 0,
      upper: null,
      pValue: 1,
      less: 1,
      greater: 1,
    });
  });

  it('throws on wrong use', () => {
    const fine = { countA: 1, exposureA: 5, countB: 2, exposureB: 7 };
    for (const wrong of [
      { countA: -1 },
      { countB: 0.5 },
      { exposureA: 0 },
      { exposureB: NaN },
      { confidence: 1 },
    ]) {
      expect(() => poissonRateRatio({ ...fine, ...wrong })).toThrow(/^poissonRateRatio requires /);
    }
  });
});

describe('benjaminiHochberg', () => {
  it.each(referenceEntries<{ data: { p: number[] }; result: { BH: number[] } }>('benjamini-hochberg'))(
    '$id',
    ({ data, result }) => {
      benjaminiHochberg(data.p).forEach((value, i) => expectClose(value, result.BH[i], 0, 1e-12));
    },
  );

  it('of nothing is nothing', () => expect(benjaminiHochberg([])).toEqual([]));

  it.each([NaN, -0.1, 1.1])('throws on %s', (p) => {
    expect(() => benjaminiHochberg([0.5, p])).toThrow(
      'benjaminiHochberg requires every p-value to be from 0 to 1',
    );
  });
});

describe('meanTimeBetweenFailures', () => {
  type Limits = [number, number | null];
  const entries = referenceEntries<{
    data: { failures: number; total_time: number; termination: 'time' | 'failure' };
    result: { mtbf: number | null; ci90: Limits; ci95: Limits };
  }>('mtbf-chi-square', 'mtbf_time_terminated', 'mtbf_failure_terminated');

  it.each(entries)('$id', ({ data, result }) => {
    const observed = { failures: data.failures, exposure: data.total_time, truncation: data.termination };
    for (const [confidence, limits] of [
      [0.9, result.ci90],
      [0.95, result.ci95],
    ] as const) {
      const { estimate, lower, upper } = estimateOf(meanTimeBetweenFailures({ ...observed, confidence }));
      expectClose(estimate, result.mtbf, 1e-9);
      expectClose(lower, limits[0], 1e-9);
      expectClose(upper, limits[1], 1e-9);
    }
  });

  it('agrees with the table of multipliers', () => {
    const [entry] = referenceEntries<{
      result: {
        rows: {
          r: number;
          conf: number;
          time_lower_mult: number;
          time_upper_mult: number | null;
          fail_lower_mult: number | null;
          fail_upper_mult: number | null;
        }[];
      };
    }>('mtbf-chi-square', 'mtbf_chi_square_multipliers');
    for (const row of entry?.result.rows ?? []) {
      const observed = { failures: row.r, exposure: Math.max(row.r, 1), confidence: row.conf };
      const time = estimateOf(meanTimeBetweenFailures({ ...observed, truncation: 'time' }));
      expectClose(time.lower, row.time_lower_mult, 1e-9);
      expectClose(time.upper, row.time_upper_mult, 1e-9);
      if (row.r === 0) continue;
      const failure = estimateOf(meanTimeBetweenFailures({ ...observed, truncation: 'failure' }));
      expectClose(failure.lower, row.fail_lower_mult, 1e-9);
      expectClose(failure.upper, row.fail_upper_mult, 1e-9);
    }
    expect(entry?.result.rows.length).toBe(32);
  });

  it('is not estimable without exposure, or failure-truncated without a failure', () => {
    expect(meanTimeBetweenFailures({ failures: 0, exposure: 0, truncation: 'time' })).toEqual({
      kind: 'notEstimable',
      reason: 'noExposure',
    });
    expect(meanTimeBetweenFailures({ failures: 0, exposure: 50, truncation: 'failure' })).toEqual({
      kind: 'notEstimable',
      reason: 'noFailures',
    });
  });

  it('throws on wrong use', () => {
    const fine = { failures: 1, exposure: 5, truncation: 'time' as const };
    for (const wrong of [
      { failures: -1 },
      { failures: NaN },
      { exposure: -5 },
      { exposure: NaN },
      { confidence: 2 },
    ]) {
      expect(() => meanTimeBetweenFailures({ ...fine, ...wrong })).toThrow(
        /^meanTimeBetweenFailures requires /,
      );
    }
  });
});
