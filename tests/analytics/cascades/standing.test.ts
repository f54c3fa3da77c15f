import { describe, expect, it } from 'vitest';
import { clopperPearsonInterval } from '../../../analytics/rates/clopper-pearson-interval';
import { differingShop } from '../../calibrate/links-differ';
import { scoreShop } from '../../calibrate/shop/score';
import type { ShopSettings, SimulatedShop } from '../../calibrate/shop';
import { cascadesOf, shops } from './made-shop';

const measure = (count: number, settings: Partial<ShopSettings>, firstSeed: number) =>
  measureShops(shops(count, settings, firstSeed));

const measureShops = (made: readonly SimulatedShop[]) => {
  const sum = { found: 0, right: 0, reversed: 0, seen: 0, seenFound: 0, shopsWithAny: 0 };
  for (const shop of made) {
    const score = scoreShop(
      shop,
      cascadesOf(shop).findings.filter(({ kind }) => kind === 'cascade'),
    );
    for (const name of ['found', 'right', 'reversed', 'seen', 'seenFound'] as const) sum[name] += score[name];
    if (score.found > 0) sum.shopsWithAny += 1;
  }
  return sum;
};

/** A Monte Carlo check fails only where the 99.9 % interval excludes the band. */
const couldBeAtLeast = (successes: number, trials: number, band: number) =>
  clopperPearsonInterval(successes, trials, 0.999).upper >= band;
const couldBeAtMost = (successes: number, trials: number, band: number) =>
  clopperPearsonInterval(successes, trials, 0.999).lower <= band;

describe('standing on shops of our own making', () => {
  it.each([
    { name: '400 × 8', count: 1, settings: { unitsPerModel: 400, models: 8 }, precision: 0.97, recall: 0.97 },
    { name: '40 × 20', count: 3, settings: { unitsPerModel: 40, models: 20 }, precision: 0.95, recall: 0.92 },
    { name: '15 × 20', count: 6, settings: { unitsPerModel: 15, models: 20 }, precision: 0.95, recall: 0.7 },
    {
      name: 'a long tail',
      count: 1,
      settings: { tail: true, unitsPerModel: 6, models: 120 },
      precision: 0.95,
      recall: 0,
    },
    {
      name: 'no hours, no register',
      count: 3,
      settings: { unitsPerModel: 20, models: 12, hoursMissing: 1, register: false },
      precision: 0.95,
      recall: 0.7,
    },
  ])('finds what was planted and little else: $name', ({ count, settings, precision, recall }) => {
    const sum = measure(count, settings, 4100);
    expect(sum.found).toBeGreaterThan(10);
    expect(couldBeAtLeast(sum.right, sum.found, precision)).toBe(true);
    expect(couldBeAtLeast(sum.seenFound, sum.seen, recall)).toBe(true);
    expect(couldBeAtMost(sum.reversed, sum.found, 0.01)).toBe(true);
  });

  it('finds links that differ by model, where no other model can lend', () => {
    const sum = measureShops(
      [8800, 8801].map((seed) => differingShop({ seed, unitsPerModel: 40, models: 10 })),
    );
    expect(sum.found).toBeGreaterThan(20);
    expect(couldBeAtLeast(sum.right, sum.found, 0.95)).toBe(true);
    expect(couldBeAtLeast(sum.seenFound, sum.seen, 0.85)).toBe(true);
    expect(couldBeAtMost(sum.reversed, sum.found, 0.01)).toBe(true);
  });

  it.each([
    { name: 'frailty only', settings: { frailtyCv: 1, sameAge: 0, changedApart: 0, serviceItems: 0 } },
    { name: 'parts of one age', settings: { sameAge: 5, sameAgeShape: 8, sameAgeRatio: 1.1 } },
    {
      name: 'parts changed while apart',
      settings: { changedApart: 5, changedApartReason: 'failed' as const },
    },
    { name: 'services', settings: { serviceItems: 6, servicesPerYear: 2, serviceSees: 0.8 } },
  ])('claims no cascade where none is planted: $name', ({ settings }) => {
    const count = 8;
    const sum = measure(count, { links: 0, unitsPerModel: 20, models: 12, ...settings }, 7300);
    expect(couldBeAtMost(sum.shopsWithAny, count, 0.05)).toBe(true);
  });
});
