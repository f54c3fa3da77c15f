import type { Model } from './makers';
import { modelsOfFamily } from './makers';
import type { Random } from './random';

/** A planted chain: the causal component, on the machines of one family, takes others with it. */
export interface Chain {
  family: string;
  causal: string;
  resultants: readonly { component: string; holds: number }[];
}

export const CHAINS: readonly Chain[] = [
  {
    family: 'Tarnlow 38-series clutch',
    causal: 'PTO clutch',
    resultants: [
      { component: 'PTO switch', holds: 0.75 },
      { component: 'Main fuse', holds: 0.7 },
    ],
  },
  {
    family: 'Dunmarch DV23 engine',
    causal: 'Voltage regulator',
    resultants: [{ component: 'Battery', holds: 0.85 }],
  },
  {
    family: 'Oakrill fabricated deck',
    causal: 'Spindle bearing',
    resultants: [{ component: 'Deck belt', holds: 0.85 }],
  },
  {
    family: 'Oakrill walk-behind deck',
    causal: 'Drive idler pulley',
    resultants: [{ component: 'Drive belt', holds: 0.9 }],
  },
  {
    family: 'Greyhollow 42/46 deck',
    causal: 'Battery cable',
    resultants: [{ component: 'Starter solenoid', holds: 0.85 }],
  },
];

export function chainOf(model: Model, causal: string): Chain | undefined {
  return CHAINS.find((chain) => chain.causal === causal && modelsOfFamily(chain.family).has(model.model));
}

/** Which of the chain's parts this failing causal part really takes with it: maybe none. */
export function damagedBy(chain: Chain, random: Random): string[] {
  return chain.resultants.filter(({ holds }) => random.chance(holds)).map(({ component }) => component);
}
