import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import type { LifeObservation } from '../../../analytics';
import {
  benjaminiHochberg,
  bLife,
  clopperPearsonInterval,
  fisherExact,
  fitWeibull,
  kaplanMeier,
  logRankTest,
  nelsonAalen,
  poissonRateRatio,
  wilsonInterval,
} from '../../../analytics';
import { estimateOf, expectClose } from './reference';

const settings = { seed: 20260101, numRuns: 200 };

/** Lives with ties, late entries and weights. */
const life = fc
  .record({
    time: fc.integer({ min: 1, max: 60 }),
    failed: fc.boolean(),
    early: fc.double({ min: 0, max: 0.9, noNaN: true }),
    isLate: fc.boolean(),
    weight: fc.integer({ min: 1, max: 4 }),
  })
  .map(({ time, failed, early, isLate, weight }): LifeObservation => ({
    time,
    failed,
    entry: isLate ? Math.floor(time * early) : 0,
    weight,
  }));
const lives = fc.array(life, { minLength: 1, maxLength: 30 });

const copiesOf = (all: LifeObservation[]) =>
  all.flatMap(({ weight = 1, ...one }) => Array.from({ length: weight }, () => ({ ...one, weight: 1 })));

describe('fitWeibull', () => {
  it('moves only the scale with the unit of time', () => {
    fc.assert(
      fc.property(lives, fc.constantFrom(1e-9, 0.01, 24, 1e9), (all, factor) => {
        const fit = fitWeibull(all);
        const moved = fitWeibull(
          all.map((one) => ({ ...one, time: one.time * factor, entry: (one.entry ?? 0) * factor })),
        );
        expect(moved.kind).toBe(fit.kind);
        if (fit.kind !== 'estimate' || moved.kind !== 'estimate') return;
        expectClose(moved.shape, fit.shape, 1e-6);
        expectClose(Math.log(moved.scale), Math.log(fit.scale * factor), 1e-6, 1e-6);
      }),
      settings,
    );
  });

  it('takes weight k as k copies, in any order of rows', () => {
    fc.assert(
      fc.property(lives, (all) => {
        const fit = fitWeibull(all);
        expect(fitWeibull(copiesOf(all).reverse())).toEqual(fit);
      }),
      settings,
    );
  });

  it('finds a maximum, and limits that contain it, by both methods', () => {
    fc.assert(
      fc.property(lives, (all) => {
        const wald = fitWeibull(all);
        const fit = fitWeibull(all, { limits: 'profile' });
        if (fit.kind !== 'estimate' || wald.kind !== 'estimate') return;
        const value = (shape: number, scale: number) =>
          all.reduce((sum, { time, failed, entry = 0, weight = 1 }) => {
            const logHazard = Math.log(shape) - shape * Math.log(scale) + (shape - 1) * Math.log(time);
            const power = Math.exp(shape * Math.log(time / scale));
            const before = entry > 0 ? Math.exp(shape * Math.log(entry / scale)) : 0;
            return sum + weight * ((failed ? logHazard : 0) - power + before);
          }, 0);
        const top = value(fit.shape, fit.scale);
        expectClose(fit.logLikelihood, top, 1e-7, 1e-7);
        for (const [a, b] of [
          [1.02, 1],
          [0.98, 1],
          [1, 1.02],
          [1, 0.98],
        ] as const) {
          expect(value(fit.shape * a, fit.scale * b)).toBeLessThanOrEqual(top + 1e-7 * (1 + Math.abs(top)));
        }
        for (const one of [fit, wald]) {
          expect(one.shapeInterval.lower ?? 0).toBeLessThanOrEqual(one.shape);
          expect(one.shapeInterval.upper ?? Infinity).toBeGreaterThanOrEqual(one.shape);
          expect(one.scaleInterval.lower ?? 0).toBeLessThanOrEqual(one.scale);
          expect(one.scaleInterval.upper ?? Infinity).toBeGreaterThanOrEqual(one.scale);
          const b10 = bLife(one, 10);
          expect(b10.lower ?? 0).toBeLessThanOrEqual(b10.estimate ?? Infinity);
          expect(b10.upper ?? Infinity).toBeGreaterThanOrEqual(b10.estimate ?? Infinity);
        }
        expect(JSON.stringify(fit)).not.toContain('NaN');
        for (const bound of [...Object.values(fit.shapeInterval), ...Object.values(fit.scaleInterval)]) {
          expect(bound === null || Number.isFinite(bound)).toBe(true);
        }
      }),
      settings,
    );
  });
});

describe('survival curves', () => {
  it('never rise, stay within their limits, and read weights as copies in any order', () => {
    fc.assert(
      fc.property(lives, (all) => {
        const rows = kaplanMeier(all);
        rows.reduce((before, { survival, lower, upper }) => {
          expect(survival).toBeLessThanOrEqual(before);
          expect(survival).toBeGreaterThanOrEqual(0);
          expect(lower ?? 0).toBeLessThanOrEqual(survival);
          expect(upper ?? 1).toBeGreaterThanOrEqual(survival);
          return survival;
        }, 1);
        expect(kaplanMeier(copiesOf(all).reverse())).toEqual(rows);
        expect(nelsonAalen(copiesOf(all))).toEqual(nelsonAalen(all));
      }),
      settings,
    );
  });
});

describe('logRankTest', () => {
  it('does not depend on the order of groups, and shares out every failure', () => {
    fc.assert(
      fc.property(fc.array(lives, { minLength: 2, maxLength: 4 }), (groups) => {
        const there = logRankTest(groups);
        const back = logRankTest([...groups].reverse());
        expect(back.kind).toBe(there.kind);
        if (there.kind !== 'estimate') return;
        const other = estimateOf(back);
        expectClose(other.chiSquare, there.chiSquare, 1e-7, 1e-9);
        expect(other.degreesOfFreedom).toBe(there.degreesOfFreedom);
        const sum = (values: number[]) => values.reduce((total, value) => total + value, 0);
        expectClose(sum(there.expected), sum(there.observed), 1e-10);
        expect(there.pValue >= 0 && there.pValue <= 1).toBe(true);
      }),
      settings,
    );
  });
});

describe('counts', () => {
  const count = fc.integer({ min: 0, max: 40 });

  it('intervals contain their share and mirror it', () => {
    fc.assert(
      fc.property(count, count, (successes, others) => {
        const trials = successes + others;
        for (const interval of [wilsonInterval, clopperPearsonInterval]) {
          const { estimate, lower, upper } = interval(successes, trials);
          if (trials > 0) expectClose(estimate, successes / trials, 1e-15);
          expect(lower).toBeLessThanOrEqual(estimate ?? 0);
          expect(upper).toBeGreaterThanOrEqual(estimate ?? 1);
          expectClose(interval(others, trials).upper, 1 - lower, 1e-9, 1e-12);
        }
      }),
      settings,
    );
  });

  it('exact tests turn over with their rows, and never pass their level', () => {
    fc.assert(
      fc.property(count, count, count, count, (a, b, c, d) => {
        const there = fisherExact([
          [a, b],
          [c, d],
        ]);
        const back = fisherExact([
          [c, d],
          [a, b],
        ]);
        expectClose(back.pValue, there.pValue, 1e-9);
        expectClose(back.less, there.greater, 1e-9);
        if (there.oddsRatio !== null && there.oddsRatio > 0)
          expectClose(back.oddsRatio, 1 / there.oddsRatio, 1e-8);
        const { lower, upper } = there.oddsRatioInterval;
        if (there.oddsRatio !== null) {
          expect(lower ?? 0).toBeLessThanOrEqual(there.oddsRatio);
          expect(upper ?? Infinity).toBeGreaterThanOrEqual(there.oddsRatio);
        }
      }),
      settings,
    );
    // Under one common chance, the p-values of all first cells: P(p ≤ level) ≤ level.
    for (const level of [0.01, 0.05, 0.2]) {
      const [row, other, column] = [12, 17, 9];
      let rejected = 0;
      for (let a = 0; a <= column; a++) {
        const cells = [
          [a, row - a],
          [column - a, other - column + a],
        ] as const;
        const { pValue, less, greater } = fisherExact([cells[0], cells[1]]);
        if (pValue <= level) rejected += less + greater - 1;
      }
      expect(rejected).toBeLessThanOrEqual(level);
    }
  });

  it('rate ratios contain their estimate and do not depend on the unit of exposure', () => {
    fc.assert(
      fc.property(
        count,
        count,
        fc.integer({ min: 1, max: 500 }),
        fc.integer({ min: 1, max: 500 }),
        (a, b, ta, tb) => {
          const plain = poissonRateRatio({ countA: a, exposureA: ta, countB: b, exposureB: tb });
          const scaled = poissonRateRatio({ countA: a, exposureA: ta * 1e6, countB: b, exposureB: tb * 1e6 });
          expectClose(scaled.pValue, plain.pValue, 1e-9);
          expectClose(scaled.upper, plain.upper, 1e-9);
          if (plain.ratio === null) return;
          expect(plain.lower).toBeLessThanOrEqual(plain.ratio);
          expect(plain.upper ?? Infinity).toBeGreaterThanOrEqual(plain.ratio);
        },
      ),
      settings,
    );
  });

  it('adjusted p-values keep their order and never fall', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { maxLength: 20 }), (pValues) => {
        const adjusted = benjaminiHochberg(pValues);
        adjusted.forEach((value, i) => {
          expect(value).toBeGreaterThanOrEqual((pValues[i] ?? 0) * (1 - 1e-15));
          expect(value).toBeLessThanOrEqual(1);
          adjusted.forEach((other, j) => {
            if ((pValues[i] ?? 0) <= (pValues[j] ?? 0)) expect(value).toBeLessThanOrEqual(other);
          });
        });
      }),
      settings,
    );
  });
});
