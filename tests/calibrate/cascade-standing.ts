import { findCascades } from '../../analytics/cascades';
import { differingShop } from './links-differ';
import type { ShopSettings, SimulatedShop } from './shop';
import { simulateShop } from './shop';
import type { Score } from './shop/score';
import { scoreShop } from './shop/score';

export type StandingRow = {
  row: string;
  shops: number;
  findings: number;
  precision: number | null;
  recall: number | null;
  reversed: number;
  shopsWithAny: number;
};

type StandingSettings = { row: string; shops: number; makeShop: (seed: number) => SimulatedShop };

const own =
  (settings: Partial<ShopSettings>): StandingSettings['makeShop'] =>
  (seed) =>
    simulateShop({ ...settings, seed });
const differing =
  (unitsPerModel: number, models: number): StandingSettings['makeShop'] =>
  (seed) =>
    differingShop({ seed, unitsPerModel, models });

/** The rows of the standing table, then variants that a shop of other habits would give. */
export const standingRows: readonly StandingSettings[] = [
  { row: '400 × 8', shops: 30, makeShop: own({ unitsPerModel: 400, models: 8 }) },
  { row: '40 × 20', shops: 30, makeShop: own({ unitsPerModel: 40, models: 20 }) },
  { row: '15 × 20', shops: 30, makeShop: own({ unitsPerModel: 15, models: 20 }) },
  {
    row: '15 × 20, rarer failures, links in 40 % of the models',
    shops: 30,
    makeShop: own({ unitsPerModel: 15, models: 20, linkModels: 0.4, lifeHours: [400, 3000] }),
  },
  { row: 'long tail, 300 models', shops: 30, makeShop: own({ tail: true, unitsPerModel: 6, models: 300 }) },
  { row: 'nothing planted, 40 × 20', shops: 100, makeShop: own({ links: 0, unitsPerModel: 40, models: 20 }) },
  {
    row: 'nothing planted, 15 × 20, repeats and coincidences',
    shops: 100,
    makeShop: own({ links: 0, unitsPerModel: 15, models: 20, repeats: 0.1, sameAge: 3, sameAgeShape: 8 }),
  },
  {
    row: '40 × 20, no hours, no register',
    shops: 30,
    makeShop: own({ unitsPerModel: 40, models: 20, hoursMissing: 1, register: false }),
  },
  {
    row: '40 × 20, never coded as damage',
    shops: 30,
    makeShop: own({ unitsPerModel: 40, models: 20, codedDamage: 0 }),
  },
  { row: 'links differ by model, 400 × 8', shops: 30, makeShop: differing(400, 8) },
  { row: 'links differ by model, 40 × 20', shops: 30, makeShop: differing(40, 20) },
  { row: 'links differ by model, 15 × 20', shops: 30, makeShop: differing(15, 20) },
  { row: 'one model of 400', shops: 30, makeShop: own({ unitsPerModel: 400, models: 1 }) },
  {
    row: 'nothing planted, one model of 400',
    shops: 100,
    makeShop: own({ links: 0, unitsPerModel: 400, models: 1 }),
  },
  {
    row: 'three components, one link, 40 × 20',
    shops: 30,
    makeShop: own({
      unitsPerModel: 40,
      models: 20,
      components: 3,
      componentsPerModel: 3,
      links: 1,
      sameAge: 0,
      changedApart: 0,
      serviceItems: 0,
    }),
  },
  {
    row: '40 × 20, 30 % of reasons unknown',
    shops: 30,
    makeShop: own({ unitsPerModel: 40, models: 20, unknownReasons: 0.3 }),
  },
  {
    row: 'nothing planted, 15 × 20, frailty of cv 0.8, parts changed apart as failed, heavy season',
    shops: 100,
    makeShop: own({
      links: 0,
      unitsPerModel: 15,
      models: 20,
      frailtyCv: 0.8,
      changedApart: 4,
      changedApartReason: 'failed',
      winterUse: 0.02,
      unknownHistory: 0.8,
    }),
  },
];

/** Mean over shops of what is found against what was planted; each shop has its own seed from `firstSeed` on. */
export const measureStanding = (
  { row, shops, makeShop }: StandingSettings,
  firstSeed: number,
): StandingRow => {
  const scores = Array.from({ length: shops }, (_, at): Score => {
    const shop = makeShop(firstSeed + at);
    const { findings } = findCascades(shop.visits, shop.units.length > 0 ? { units: shop.units } : {});
    return scoreShop(
      shop,
      findings.filter(({ kind }) => kind === 'cascade'),
    );
  });
  const meanOf = (part: (score: Score) => number | null) => {
    const values = scores.map(part).filter((value) => value !== null);
    return values.length === 0 ? null : values.reduce((sum, value) => sum + value, 0) / values.length;
  };
  const total = (part: (score: Score) => number) => scores.reduce((sum, score) => sum + part(score), 0);
  return {
    row,
    shops,
    findings: total(({ found }) => found),
    precision: meanOf(({ found, right }) => (found > 0 ? right / found : null)),
    recall: meanOf(({ seen, seenFound }) => (seen > 0 ? seenFound / seen : null)),
    reversed: total(({ reversed }) => reversed),
    shopsWithAny: scores.filter(({ found }) => found > 0).length,
  };
};
