import { requireThat } from '../requirement';

/**
 * p-values adjusted for having looked at many things: keeping those up to 0.05 makes at most 5 % of what
 * is kept false on average.
 *
 * Assumes tests that are independent or positively dependent. q₍ᵢ₎ = min over j ≥ i of p₍ⱼ₎·m/j, at most
 * 1, returned in the order given. Chances in, chances out; an empty list gives an empty list.
 *
 * Source: Benjamini & Hochberg (1995), JRSS B 57.
 *
 * @throws {RequirementError} where a p-value is not from 0 to 1
 * @example benjaminiHochberg([0.01, 0.02, 0.03, 0.04]) // [0.04, 0.04, 0.04, 0.04]
 */
export function benjaminiHochberg(pValues: readonly number[]): number[] {
  for (const p of pValues)
    requireThat(p >= 0 && p <= 1, 'benjaminiHochberg', 'every p-value to be from 0 to 1');
  const falling = pValues.map((p, index) => ({ p, index })).sort((a, b) => b.p - a.p);
  const adjusted = new Array<number>(pValues.length).fill(1);
  let smallest = 1;
  falling.forEach(({ p, index }, i) => {
    smallest = Math.min(smallest, (p * pValues.length) / (pValues.length - i));
    adjusted[index] = smallest;
  });
  return adjusted;
}
