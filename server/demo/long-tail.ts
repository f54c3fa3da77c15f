import { buildModel, MODELS } from './makers';
import type { Build, Model } from './makers';
import type { Random } from './random';

/** Invented makers of the machines of which a shop sees two or three. */
const MAKERS = [
  'Tarnlow',
  'Oakrill',
  'Greyhollow',
  'Brackwater',
  'Pellbrook',
  'Hadlorne',
  'Mossgate',
  'Quarrow',
  'Vennick',
  'Stillwold',
  'Fallowby',
  'Drumley',
];
const BUILDS: readonly (readonly [Build, number])[] = [
  ['tractor', 34],
  ['zeroTurn', 24],
  ['hydroWalk', 6],
  ['push', 18],
  ['snow', 10],
  ['handheld', 8],
];
const PREFIX: Record<Build, readonly string[]> = {
  tractor: ['LT', 'GT', 'YT'],
  zeroTurn: ['Z', 'ZR', 'ZX'],
  hydroWalk: ['HW', 'WB'],
  push: ['P', 'SP'],
  snow: ['SN', 'ST'],
  handheld: ['BC', 'TR'],
};

/** About three hundred models, a few common and most of them rare. */
export function longTailModels(random: Random, count: number): Model[] {
  const rare = Array.from({ length: count }, (_, at): Model => {
    const build = random.weighted(BUILDS);
    const code = `${random.pick(PREFIX[build])}${random.whole(10, 69)}${random.pick(['', '0', '-H', ' XL', '-2'])}`;
    const engine = random.pick([['Dunmarch', 'DV23'] as const, ['Ostwick', 'OS18'] as const]);
    return buildModel(random.pick(MAKERS), code, build, engine, [8 / (at + 3), 0, 1]);
  });
  return [...MODELS.map((model) => ({ ...model, weight: model.weight / 20 })), ...rare];
}

/** The same model as four people type it. */
export function spellModel(random: Random, model: string): string {
  const plain = model.replace(/[-\s]/g, '');
  return random.pick([
    model,
    model,
    plain,
    plain.toLowerCase(),
    plain.replace(/([A-Za-z])(\d)/, '$1 $2'),
    `${plain} `,
  ]);
}

export const spellMaker = (random: Random, maker: string): string =>
  random.pick([maker, maker, maker.toUpperCase(), maker.toUpperCase(), `${maker.slice(0, 4)}.`]);
