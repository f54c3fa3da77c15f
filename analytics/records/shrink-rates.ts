import { shrinkProportions } from '../rates/shrink-proportions';
import type { Interval } from '../types';

/** Rows with their rate after allowing for few jobs: drawn toward the common rate, with its 95 % limits. */
export function shrinkRates<Row extends { count: number; size: number }>(
  rows: readonly Row[],
): (Row & { shrunken: number | null; shrunkenInterval: Interval | null })[] {
  const fit = shrinkProportions(rows.map(({ count, size }) => ({ successes: count, trials: size })));
  if (fit.kind !== 'estimate') return rows.map((row) => ({ ...row, shrunken: null, shrunkenInterval: null }));
  return rows.map((row, index) => ({
    ...row,
    shrunken: fit.rates[index] ?? null,
    // Where the rows do not differ beyond chance there is no spread of which to give limits.
    shrunkenInterval: fit.alpha === null ? null : (fit.intervals[index] ?? null),
  }));
}
