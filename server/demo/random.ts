/** A seeded source of chance: the same labels give the same stream on every machine. */
export interface Random {
  next(): number;
  chance(probability: number): boolean;
  between(low: number, high: number): number;
  whole(low: number, high: number): number;
  pick<T>(items: readonly T[]): T;
  weighted<T>(items: readonly (readonly [T, number])[]): T;
  exponential(mean: number): number;
  weibull(shape: number, scale: number, hazardFactor?: number): number;
}

function hash(text: string): number {
  let state = 2166136261;
  for (let index = 0; index < text.length; index += 1) {
    state = Math.imul(state ^ text.charCodeAt(index), 16777619);
  }
  return state >>> 0;
}

/** Mulberry32, seeded by an FNV-1a hash of the labels. */
export function createRandom(...labels: readonly (string | number)[]): Random {
  let state = hash(labels.join('/'));
  const next = (): number => {
    state = (state + 0x6d2b79f5) | 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296;
  };
  const pick = <T>(items: readonly T[]): T => {
    const item = items[Math.floor(next() * items.length)];
    if (item === undefined) throw new Error('pick requires a list with items');
    return item;
  };
  const exponential = (mean: number): number => -mean * Math.log(1 - next());
  return {
    next,
    chance: (probability) => next() < probability,
    between: (low, high) => low + (high - low) * next(),
    whole: (low, high) => low + Math.floor((high - low + 1) * next()),
    pick,
    weighted: (items) => {
      let left = next() * items.reduce((sum, [, weight]) => sum + weight, 0);
      for (const [item, weight] of items) {
        left -= weight;
        if (left < 0) return item;
      }
      return pick(items)[0];
    },
    exponential,
    weibull: (shape, scale, hazardFactor = 1) => scale * (exponential(1) / hazardFactor) ** (1 / shape),
  };
}
