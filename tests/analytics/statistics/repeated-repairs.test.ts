import { describe, expect, it } from 'vitest';

import { fitPowerLaw, laplaceTest, meanCumulativeFunction } from '../../../analytics';
import { estimateOf, expectClose, referenceEntries, seededRandom } from './reference';

type Limits = [number, number];

describe('meanCumulativeFunction against R', () => {
  const entries = referenceEntries<{
    data: { start: number; end: number; events: number[] }[];
    result: {
      time: number[];
      n_risk: number[];
      n_event: number[];
      mcf: number[];
      se_robust: number[];
      log_lower95: number[];
      log_upper95: number[];
    };
  }>('mean-cumulative-function');

  it.each(entries)('$id', ({ data, result }) => {
    const rows = meanCumulativeFunction(
      data.map(({ start, end, events }) => ({ entry: start, end, events })),
    );
    expect(rows.map(({ time }) => time)).toEqual(result.time);
    expect(rows.map(({ atRisk }) => atRisk)).toEqual(result.n_risk);
    expect(rows.map(({ events }) => events)).toEqual(result.n_event);
    rows.forEach((row, i) => {
      expectClose(row.mean, result.mcf[i], 1e-10);
      expectClose(row.standardError, result.se_robust[i], 1e-9);
      expectClose(row.lower, result.log_lower95[i], 1e-8);
      expectClose(row.upper, result.log_upper95[i], 1e-8);
    });
  });

  it('has no rows without repairs and no limits for one machine', () => {
    expect(meanCumulativeFunction([])).toEqual([]);
    expect(meanCumulativeFunction([{ end: 5, events: [] }])).toEqual([]);
    expect(meanCumulativeFunction([{ end: 5, events: [3, 3] }])).toEqual([
      { time: 3, atRisk: 1, events: 2, mean: 2, standardError: 0, lower: null, upper: null },
    ]);
  });

  it.each([
    [{ end: 5, events: [6] }],
    [{ end: 5, entry: 2, events: [2] }],
    [{ end: 5, events: [NaN] }],
    [{ end: 5, entry: 5, events: [] }],
    [{ end: NaN, events: [] }],
    [{ end: 5, entry: -1, events: [] }],
  ])('throws on %j', (history) => {
    expect(() => meanCumulativeFunction([history])).toThrow(/^meanCumulativeFunction requires every /);
  });

  it('covers the true mean where some machines are worse than others', () => {
    const random = seededRandom(3);
    const runs = 800;
    let missed = 0;
    for (let run = 0; run < runs; run++) {
      const histories = Array.from({ length: 80 }, () => {
        const rate = random() < 0.5 ? 0.5 : 1.5;
        const events: number[] = [];
        for (let t = -Math.log(random()) / rate; t < 2; t -= Math.log(random()) / rate) events.push(t);
        return { end: 2, events };
      });
      const { lower, upper } = meanCumulativeFunction(histories).at(-1) ?? {};
      if ((lower ?? 0) > 2 || (upper ?? Infinity) < 2) missed++;
    }
    expect(missed / runs).toBeGreaterThan(0.02 - 0.015);
    expect(missed / runs).toBeLessThan(0.08 + 0.032);
  });
});

const series = referenceEntries<{
  data: { times: number[]; T: number | null };
  result: {
    T: number;
    termination: 'time' | 'failure';
    beta_mle: number;
    lambda_mle: number;
    beta_ci90_exact: Limits;
    beta_ci95_exact: Limits;
    intensity_at_T: number;
    laplace_U: number;
    laplace_p_two_sided: number;
  };
}>('power-law-nhpp', 'crow_amsaa_time_truncated', 'crow_amsaa_failure_truncated');

describe('fitPowerLaw and laplaceTest', () => {
  it.each(series)('$id', ({ data, result }) => {
    const observed = { events: data.times, end: result.T, truncation: result.termination };
    const fit = estimateOf(fitPowerLaw(observed));
    expectClose(fit.shape, result.beta_mle, 1e-10);
    expectClose(fit.coefficient, result.lambda_mle, 1e-9);
    expectClose(fit.intensityAtEnd, result.intensity_at_T, 1e-9);
    expectClose(fit.shapeInterval.lower, result.beta_ci95_exact[0], 1e-8);
    expectClose(fit.shapeInterval.upper, result.beta_ci95_exact[1], 1e-8);
    const narrow = estimateOf(fitPowerLaw({ ...observed, confidence: 0.9 }));
    expectClose(narrow.shapeInterval.lower, result.beta_ci90_exact[0], 1e-8);
    const trend = estimateOf(laplaceTest(observed));
    expectClose(trend.statistic, result.laplace_U, 1e-9);
    expectClose(trend.pValue, result.laplace_p_two_sided, 1e-9);
  });

  it('agree with the values printed in MIL-HDBK-189, appendix C', () => {
    const [prototypes] = series;
    const fit = estimateOf(
      fitPowerLaw({ events: prototypes?.data.times ?? [], end: 300, truncation: 'time' }),
    );
    expect(fit.shape).toBeCloseTo(0.716, 3);
    expect(fit.coefficient).toBeCloseTo(0.454, 3);
    expect(1 / fit.intensityAtEnd).toBeCloseTo(15.5, 1);
  });

  it('need no end where the last failure ended the watch', () => {
    expect(fitPowerLaw({ events: [5, 1, 9], truncation: 'failure' })).toMatchObject({
      kind: 'estimate',
      events: 3,
    });
  });

  it('say where they cannot answer', () => {
    expect(fitPowerLaw({ events: [], end: 9, truncation: 'time' })).toEqual({
      kind: 'notEstimable',
      reason: 'noEvents',
    });
    expect(fitPowerLaw({ events: [9, 9], end: 9, truncation: 'time' })).toEqual({
      kind: 'notEstimable',
      reason: 'allEventsAtEnd',
    });
    expect(fitPowerLaw({ events: [4], truncation: 'failure' })).toMatchObject({ reason: 'allEventsAtEnd' });
    expect(laplaceTest({ events: [], end: 9, truncation: 'time' })).toEqual({
      kind: 'notEstimable',
      reason: 'noEvents',
    });
    expect(laplaceTest({ events: [4], truncation: 'failure' })).toMatchObject({ reason: 'noEvents' });
    expect(estimateOf(laplaceTest({ events: [4], end: 8, truncation: 'time' }))).toMatchObject({
      statistic: 0,
      pValue: 1,
      warnings: ['fewFailures'],
    });
  });

  it('throw on wrong use', () => {
    for (const [name, run] of [
      ['fitPowerLaw', fitPowerLaw],
      ['laplaceTest', laplaceTest],
    ] as const) {
      expect(() => run({ events: [10], end: 9, truncation: 'time' })).toThrow(
        `${name} requires no event after the end`,
      );
      expect(() => run({ events: [1], truncation: 'time' })).toThrow(`${name} requires an end`);
      expect(() => run({ events: [0], end: 9, truncation: 'time' })).toThrow(`${name} requires every event`);
      expect(() => run({ events: [NaN], end: 9, truncation: 'time' })).toThrow(
        `${name} requires every event`,
      );
    }
    expect(() => fitPowerLaw({ events: [1], end: 2, truncation: 'time', confidence: 1 })).toThrow(
      'fitPowerLaw requires a confidence between 0 and 1',
    );
  });

  it('keep their promises without a trend', () => {
    const random = seededRandom(23);
    const runs = 3000;
    let [missed, rejected] = [0, 0];
    for (let run = 0; run < runs; run++) {
      const events: number[] = [];
      for (let t = -Math.log(random()); t < 30; t -= Math.log(random())) events.push(t);
      const { lower, upper } = estimateOf(fitPowerLaw({ events, end: 30, truncation: 'time' })).shapeInterval;
      if ((lower ?? 0) > 1 || (upper ?? Infinity) < 1) missed++;
      if (estimateOf(laplaceTest({ events, end: 30, truncation: 'time' })).pValue < 0.05) rejected++;
    }
    for (const share of [missed / runs, rejected / runs]) {
      expect(share).toBeGreaterThan(0.04 - 0.012);
      expect(share).toBeLessThan(0.06 + 0.015);
    }
  });
});
