import { requireProportion } from './proportion';

export type ChartPoint = { rate: number | null; lower: number; upper: number; signal: boolean };
export type ProportionChart = { center: number | null; points: ChartPoint[] };

/**
 * Which months (models, people) differ from the common share by more than chance explains: the funnel.
 *
 * Assumes independent jobs with one common chance. Center = all counts over all sizes; limits center ±
 * 3·√(center·(1 − center)/size), cut at 0 and 1; a rate outside of them is a signal. A point of size 0
 * has rate null, limits 0 and 1 and no signal; without any job the center is null. Counts in, shares out.
 * Normal limits: for small monthly sizes use `exactBinomialLimits`.
 *
 * Source: Montgomery, Introduction to Statistical Quality Control, 7th ed., 7.2 (p chart).
 *
 * @throws {RequirementError} where a count or size is not whole, or a count exceeds its size
 * @example proportionChart([{ count: 2, size: 50 }, { count: 14, size: 50 }]).center // 0.16
 */
export function proportionChart(points: readonly { count: number; size: number }[]): ProportionChart {
  for (const { count, size } of points) requireProportion(count, size, 'proportionChart');
  const counted = points.reduce((sum, { count }) => sum + count, 0);
  const total = points.reduce((sum, { size }) => sum + size, 0);
  const center = total === 0 ? null : counted / total;
  return {
    center,
    points: points.map(({ count, size }) => {
      if (center === null || size === 0) return { rate: null, lower: 0, upper: 1, signal: false };
      const reach = 3 * Math.sqrt((center * (1 - center)) / size);
      const lower = Math.max(0, center - reach);
      const upper = Math.min(1, center + reach);
      const rate = count / size;
      return { rate, lower, upper, signal: rate < lower || rate > upper };
    }),
  };
}
