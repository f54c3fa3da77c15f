import type { Season } from './season';

export type ProductType =
  'lawn_tractor' | 'zero_turn' | 'walk_behind' | 'handheld' | 'snow' | 'utility' | 'other';
export type UseClass = 'homeowner' | 'commercial' | 'rental' | 'municipal';
/** How a machine is built, which decides what components it has. */
export type Build = 'tractor' | 'zeroTurn' | 'hydroWalk' | 'push' | 'snow' | 'handheld';

export interface Model {
  maker: string;
  model: string;
  productType: ProductType;
  build: Build;
  season: Season;
  engineMaker: string;
  engineModel: string;
  /** Share of the fleet, before scaling. */
  weight: number;
  /** Share of these machines that work for a living. */
  commercialShare: number;
  hasMeter: boolean;
  /** How many times longer its parts last than those of a machine built for households. */
  toughness: number;
}

export interface Family {
  name: string;
  shares: 'deck' | 'engine' | 'clutch';
  models: readonly string[];
}

const PRODUCT: Record<Build, ProductType> = {
  tractor: 'lawn_tractor',
  zeroTurn: 'zero_turn',
  hydroWalk: 'walk_behind',
  push: 'walk_behind',
  snow: 'snow',
  handheld: 'handheld',
};

const SEASON: Partial<Record<Build, Season>> = { snow: 'snow', handheld: 'allYear' };

export function buildModel(
  maker: string,
  model: string,
  build: Build,
  engine: readonly [maker: string, model: string],
  [weight, commercialShare, toughness = 1]: readonly [
    weight: number,
    commercialShare: number,
    toughness?: number,
  ],
): Model {
  return {
    maker,
    model,
    build,
    weight,
    commercialShare,
    toughness,
    productType: PRODUCT[build],
    season: SEASON[build] ?? 'mowing',
    engineMaker: engine[0],
    engineModel: engine[1],
    hasMeter: build !== 'push' && build !== 'handheld',
  };
}

const TWIN = ['Dunmarch', 'DV23'] as const;
const BIG_TWIN = ['Dunmarch', 'DV27'] as const;
const SINGLE = ['Ostwick', 'OS18'] as const;
const SMALL = ['Ostwick', 'OS6'] as const;

/** All makers, models and engines are invented. */
export const MODELS: readonly Model[] = [
  buildModel('Tarnlow', 'TZ-48', 'zeroTurn', BIG_TWIN, [9, 0.06, 2.5]),
  buildModel('Tarnlow', 'TZ-54', 'zeroTurn', BIG_TWIN, [9, 0.08, 2.5]),
  buildModel('Tarnlow', 'TZ-60', 'zeroTurn', BIG_TWIN, [7, 0.1, 2.5]),
  buildModel('Tarnlow', 'TL-42', 'tractor', TWIN, [7, 0]),
  buildModel('Tarnlow', 'TL-46', 'tractor', TWIN, [8, 0]),
  buildModel('Oakrill', 'R52C', 'zeroTurn', BIG_TWIN, [6, 0.55, 8]),
  buildModel('Oakrill', 'R60C', 'zeroTurn', BIG_TWIN, [6, 0.6, 8]),
  buildModel('Oakrill', 'R61C', 'zeroTurn', BIG_TWIN, [4, 0.65, 8]),
  buildModel('Oakrill', 'W36', 'hydroWalk', SINGLE, [4, 0.6, 8]),
  buildModel('Oakrill', 'W48', 'hydroWalk', SINGLE, [4, 0.65, 8]),
  buildModel('Greyhollow', '1842', 'tractor', SINGLE, [9, 0]),
  buildModel('Greyhollow', '1846', 'tractor', TWIN, [8, 0]),
  buildModel('Greyhollow', '2148', 'tractor', TWIN, [6, 0]),
  buildModel('Greyhollow', 'P21', 'push', SMALL, [5, 0]),
  buildModel('Greyhollow', 'S22', 'push', SMALL, [5, 0]),
  buildModel('Brackwater', 'BX24', 'snow', SMALL, [6, 0]),
  buildModel('Brackwater', 'BX28', 'snow', SINGLE, [5, 0]),
  buildModel('Brackwater', 'BX30', 'snow', SINGLE, [3, 0.1, 2]),
  buildModel('Pellbrook', 'T26', 'handheld', ['Pellbrook', '26cc'], [3, 0.1, 3]),
  buildModel('Pellbrook', 'B60', 'handheld', ['Pellbrook', '60cc'], [3, 0.12, 3]),
];

export const FAMILIES: readonly Family[] = [
  { name: 'Tarnlow 38-series clutch', shares: 'clutch', models: ['TZ-48', 'TZ-54', 'TZ-60', 'TL-46'] },
  { name: 'Oakrill fabricated deck', shares: 'deck', models: ['R52C', 'R60C', 'R61C'] },
  { name: 'Oakrill walk-behind deck', shares: 'deck', models: ['W36', 'W48'] },
  { name: 'Dunmarch DV23 engine', shares: 'engine', models: ['TL-42', 'TL-46', '1846', '2148'] },
  { name: 'Greyhollow 42/46 deck', shares: 'deck', models: ['1842', '1846'] },
  { name: 'Brackwater OS18 engine', shares: 'engine', models: ['BX28', 'BX30'] },
];

export const modelsOfFamily = (name: string): ReadonlySet<string> =>
  new Set(FAMILIES.find((family) => family.name === name)?.models ?? []);
