import { describe, expect, it } from 'vitest';

import { compareWeibull, hazardRatio, logRankTest } from '../../../analytics';
import type { LifeColumns } from './reference';
import { estimateOf, expectClose, livesOf, referenceEntries, seededRandom } from './reference';

type LikelihoodRatio = { statistic: number; df: number; p: number };
type Entry = {
  data: LifeColumns & { group: (string | number)[] };
  result: {
    groups: string[];
    observed: number[];
    expected: number[];
    variance: number[][];
    chisq: number;
    df: number;
    p: number;
    weibull: {
      pooled: { shape: number; scale: number };
      separate: { shape: number; scale: number }[];
      lr_any_difference: LikelihoodRatio;
      common_shape: { shape: number; scales: number[]; loglik: number };
      lr_equal_shape: LikelihoodRatio;
      lr_equal_scale_given_shape: LikelihoodRatio;
    };
  };
};

const entries = referenceEntries<Entry>('logrank-weibull-lr');

function groupsOf({ data, result }: Entry) {
  const lives = livesOf(data);
  return result.groups.map((name) => lives.filter((_, i) => String(data.group[i]) === name));
}

describe('logRankTest against R survival 3.5-3', () => {
  it.each(entries)('$id', (entry) => {
    const { result } = entry;
    const test = estimateOf(logRankTest(groupsOf(entry)));
    expectClose(test.chiSquare, result.chisq, 1e-9);
    expect(test.degreesOfFreedom).toBe(result.df);
    expectClose(test.pValue, result.p, 1e-8);
    expect(test.observed).toEqual(result.observed);
    test.expected.forEach((value, i) => expectClose(value, result.expected[i], 1e-10));
    test.variance.flat().forEach((value, i) => expectClose(value, result.variance.flat()[i], 1e-9));
  });

  const few = [
    { time: 3, failed: true },
    { time: 5, failed: false },
  ];

  it('leaves empty groups out of the degrees of freedom', () => {
    const [first] = entries;
    const groups = first ? groupsOf(first) : [];
    expect(logRankTest([...groups, []])).toMatchObject({
      chiSquare: expect.closeTo(first?.result.chisq ?? NaN, 8),
      degreesOfFreedom: 1,
    });
  });

  it('says where it cannot answer', () => {
    expect(logRankTest([[], []])).toEqual({ kind: 'notEstimable', reason: 'noFailures' });
    expect(logRankTest([few, []])).toEqual({ kind: 'notEstimable', reason: 'neverAtRiskTogether' });
    const later = [{ time: 9, failed: true, entry: 6 }];
    expect(logRankTest([few, later])).toEqual({ kind: 'notEstimable', reason: 'neverAtRiskTogether' });
  });

  it('throws on wrong use', () => {
    expect(() => logRankTest([few])).toThrow('logRankTest requires at least two groups');
    expect(() => logRankTest([few, [{ time: NaN, failed: true }]])).toThrow(/^logRankTest requires /);
  });
});

describe('compareWeibull against R survival 3.5-3', () => {
  const checkRatio = (
    actual: { statistic: number; degreesOfFreedom: number; pValue: number },
    expected: LikelihoodRatio,
  ) => {
    // A statistic near 0 is the difference of two log-likelihoods: their digits bound it.
    expectClose(actual.statistic, expected.statistic, 1e-7, 1e-11);
    expect(actual.degreesOfFreedom).toBe(expected.df);
    expectClose(actual.pValue, expected.p, 1e-7);
  };

  it.each(entries)('$id', (entry) => {
    const { weibull } = entry.result;
    const groups = groupsOf(entry);
    const comparison = estimateOf(compareWeibull(groups));
    checkRatio(comparison, weibull.lr_any_difference);
    checkRatio(comparison.equalShape, weibull.lr_equal_shape);
    checkRatio(comparison.equalScale, weibull.lr_equal_scale_given_shape);
    comparison.fits.forEach((fit, i) => {
      expectClose(fit.shape, weibull.separate[i]?.shape, 1e-7);
      expectClose(fit.scale, weibull.separate[i]?.scale, 1e-7);
    });
    expectClose(comparison.pooled.scale, weibull.pooled.scale, 1e-7);
    expectClose(comparison.commonShape.shape, weibull.common_shape.shape, 1e-7);
    expectClose(comparison.commonShape.logLikelihood, weibull.common_shape.loglik, 1e-9);
    comparison.commonShape.scales.forEach((scale, i) =>
      expectClose(scale, weibull.common_shape.scales[i], 1e-7),
    );
    const [a, b] = groups;
    const [scaleA = NaN, scaleB = NaN] = weibull.common_shape.scales;
    if (groups.length === 2 && a && b) {
      const { ratio } = estimateOf(hazardRatio(a, b));
      expectClose(ratio, (scaleA / scaleB) ** weibull.common_shape.shape, 1e-6);
    }
  });

  it('is not estimable where the fit of a group is not', () => {
    const fine = [3, 5, 8].map((time) => ({ time, failed: true }));
    const none = fine.map(({ time }) => ({ time, failed: false }));
    expect(compareWeibull([fine, none])).toEqual({ kind: 'notEstimable', reason: 'noFailures' });
    expect(compareWeibull([fine, [{ time: 3, failed: true }]])).toEqual({
      kind: 'notEstimable',
      reason: 'allFailuresAtLargestAge',
    });
    expect(() => compareWeibull([fine])).toThrow('compareWeibull requires at least two groups');
    expect(estimateOf(compareWeibull([fine, fine])).warnings).toEqual(['fewFailures']);
  });
});

describe('hazardRatio', () => {
  const groups = entries[0] ? groupsOf(entries[0]) : [];
  const [sixMp = [], control = []] = groups;

  it('has the published values of the leukemia trial', () => {
    // Venables & Ripley (2002), Modern Applied Statistics with S, 13.2: treatment 1.267 and scale 0.732 in the
    // log-linear form, so the log ratio is 1.267/0.732.
    const { ratio, shape } = estimateOf(hazardRatio(sixMp, control));
    expect(Math.log(ratio)).toBeCloseTo(1.267 / 0.732, 2);
    expect(1 / shape).toBeCloseTo(0.732, 3);
  });

  it('turns over with the groups', () => {
    const there = estimateOf(hazardRatio(sixMp, control));
    const back = estimateOf(hazardRatio(control, sixMp));
    expectClose(back.ratio, 1 / there.ratio, 1e-10);
    expectClose(back.interval.lower, 1 / (there.interval.upper ?? NaN), 1e-10);
    expectClose(back.pValue, there.pValue, 1e-10);
  });

  it('has the error of a numerical information matrix', () => {
    const { ratio, interval, shape } = estimateOf(hazardRatio(sixMp, control));
    const logLikelihood = ([logRateA = 0, logRatio = 0, logShape = 0]: number[]) => {
      const k = Math.exp(logShape);
      return [sixMp, control].reduce((sum, lives, g) => {
        const logRate = logRateA + g * logRatio;
        return lives.reduce(
          (total, { time, failed }) =>
            total +
            (failed ? logRate + logShape + (k - 1) * Math.log(time) : 0) -
            Math.exp(logRate) * time ** k,
          sum,
        );
      }, 0);
    };
    const { commonShape } = estimateOf(compareWeibull([sixMp, control]));
    const top = [-shape * Math.log(commonShape.scales[0] ?? NaN), Math.log(ratio), Math.log(shape)];
    const h = 1e-4;
    const second = (i: number, j: number) => {
      const shifted = (di: number, dj: number) =>
        logLikelihood(top.map((value, n) => value + (n === i ? di : 0) + (n === j ? dj : 0)));
      return -(shifted(h, h) - shifted(h, -h) - shifted(-h, h) + shifted(-h, -h)) / (4 * h * h);
    };
    const [a, b, c, d, e, f] = [
      second(0, 0),
      second(0, 1),
      second(0, 2),
      second(1, 1),
      second(1, 2),
      second(2, 2),
    ];
    const determinant = a * (d * f - e * e) - b * (b * f - c * e) + c * (b * e - c * d);
    const error = Math.sqrt((a * f - c * c) / determinant);
    expectClose(interval.upper, ratio * Math.exp(1.959963984540054 * error), 1e-5);
  });

  it('is not estimable without failures with all of them at the end, or beyond any number', () => {
    const running = [{ time: 5, failed: false }];
    const failed = [{ time: 5, failed: true }];
    expect(hazardRatio(sixMp, running)).toEqual({ kind: 'notEstimable', reason: 'noFailures' });
    expect(hazardRatio(failed, failed)).toEqual({ kind: 'notEstimable', reason: 'allFailuresAtLargestAge' });
    const short = [1e-9, 1.0000001e-9].map((time) => ({ time, failed: true }));
    const long = [1e9, 1.0000001e9].map((time) => ({ time, failed: true }));
    expect(hazardRatio(long, short)).toEqual({ kind: 'notEstimable', reason: 'boundary' });
    expect(() => hazardRatio(failed, failed, { confidence: 0 })).toThrow(/^hazardRatio requires /);
  });
});

it('tests of equal groups reject as often as they say, with ties and unequal sizes', () => {
  const random = seededRandom(5);
  const draw = (size: number) =>
    Array.from({ length: size }, () => {
      const [life, end] = [100 * (-Math.log(random())) ** (1 / 1.4), 250 * random()];
      return { time: Math.ceil(Math.min(life, end) / 5) * 5, failed: life <= end };
    });
  const runs = 1500;
  const rejected = { logRank: 0, weibull: 0, ratio: 0 };
  for (let run = 0; run < runs; run++) {
    const [a, b] = [draw(60), draw(140)];
    if (estimateOf(logRankTest([a, b])).pValue < 0.05) rejected.logRank++;
    if (estimateOf(compareWeibull([a, b])).pValue < 0.05) rejected.weibull++;
    if (estimateOf(hazardRatio(a, b)).pValue < 0.05) rejected.ratio++;
  }
  // 4–6 %, widened by the 99.9 % Monte Carlo margin of this many runs.
  for (const count of Object.values(rejected)) {
    expect(count / runs).toBeGreaterThan(0.04 - 0.017);
    expect(count / runs).toBeLessThan(0.06 + 0.02);
  }
});
