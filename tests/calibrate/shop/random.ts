/** Seeded source of random numbers (mulberry32): the same seed gives the same shop on every machine. */
export type Random = () => number;

export const seeded = (seed: number): Random => {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296;
  };
};

export const between = (random: Random, low: number, high: number) => low + (high - low) * random();

export const exponential = (random: Random, mean: number) => -mean * Math.log(1 - random());

export const normal = (random: Random) =>
  Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());

/** Gamma with mean 1 and the given coefficient of variation (Marsaglia & Tsang 2000). */
export const frailty = (random: Random, cv: number): number => {
  if (cv === 0) return 1;
  const shape = 1 / (cv * cv);
  const raised = shape < 1 ? shape + 1 : shape;
  const d = raised - 1 / 3;
  const c = 1 / Math.sqrt(9 * d);
  for (;;) {
    const z = normal(random);
    const v = (1 + c * z) ** 3;
    if (v > 0 && Math.log(1 - random()) < 0.5 * z * z + d - d * v + d * Math.log(v)) {
      const boost = shape < 1 ? (1 - random()) ** (1 / shape) : 1;
      return (d * v * boost) / shape;
    }
  }
};

export const pick = <T>(random: Random, items: readonly T[]): T => {
  const item = items[Math.floor(random() * items.length)];
  if (item === undefined) throw new Error('pick requires a non-empty list');
  return item;
};

export const shuffled = <T>(random: Random, items: readonly T[]): T[] => {
  const keyed = items.map((item) => ({ item, key: random() }));
  return keyed.sort((a, b) => a.key - b.key).map(({ item }) => item);
};
