import type { SimulatedShop } from '.';

export type Score = { found: number; right: number; reversed: number; seen: number; seenFound: number };

/** Counts of one shop: precision = right / found, recall = seenFound / seen (planted pairs seen in six or more visits). */
export const scoreShop = (
  shop: SimulatedShop,
  cascades: readonly { model: string; causal: string; resultant: string }[],
): Score => {
  const score: Score = { found: 0, right: 0, reversed: 0, seen: 0, seenFound: 0 };
  const names = new Set<string>();
  for (const { model, causal, resultant } of cascades) {
    const [a, b] = causal < resultant ? [causal, resultant] : [resultant, causal];
    if (shop.implied.has(`${model}|${a}|${b}`)) continue;
    const name = `${model}|${causal}|${resultant}`;
    names.add(name);
    score.found += 1;
    if (shop.planted.has(name)) score.right += 1;
    else if (shop.planted.has(`${model}|${resultant}|${causal}`)) score.reversed += 1;
  }
  for (const [name, visits] of shop.planted) {
    if (visits < 6) continue;
    score.seen += 1;
    if (names.has(name)) score.seenFound += 1;
  }
  return score;
};
