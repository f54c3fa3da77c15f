import { kaplanMeier, type LifeObservation } from '../../../analytics';
import type { PartLife } from '../../../shared/parts';
import { thinned } from '../../lives/thinned';

const MOST_ROWS = 400;
const TICKS = 6;

/** The life curve; a long one is thinned for the wire, every row that is sent being exact. */
export function curveOf(observations: readonly LifeObservation[]): PartLife['kaplanMeier'] {
  return thinned(kaplanMeier(observations), MOST_ROWS);
}

/** How many were under observation at a few round ages: of hours, or of whole months on the calendar. */
export function numbersAtRisk(
  observations: readonly LifeObservation[],
  clock: PartLife['clock'],
): PartLife['atRiskAt'] {
  const longest = observations.reduce((most, { time }) => Math.max(most, time), 0);
  if (longest === 0) return [];
  const step = clock === 'hours' ? roundStep(longest / TICKS) : monthStep(longest / TICKS);
  const ticks = Array.from({ length: Math.floor(longest / step) + 1 }, (_, at) => at * step);
  return ticks.map((time) => ({
    time,
    atRisk: observations.reduce(
      (sum, { time: exit, entry = 0, weight = 1 }) =>
        // At 0 stand those that were seen from new.
        (time === 0 ? entry === 0 : entry < time && time <= exit) ? sum + weight : sum,
      0,
    ),
  }));
}

/** The smallest of 1, 2, 5 × 10ⁿ that is not less. */
function roundStep(least: number): number {
  const power = 10 ** Math.floor(Math.log10(least));
  return [1, 2, 5, 10].map((factor) => factor * power).find((step) => step >= least) ?? least;
}

const DAYS_PER_MONTH = 365.25 / 12;
const MONTH_STEPS = [1, 2, 3, 6, 12, 24, 36, 60, 120];

/** The days of the smallest usual number of months that is not less. */
function monthStep(leastDays: number): number {
  const months = MONTH_STEPS.find((step) => step * DAYS_PER_MONTH >= leastDays) ?? 240;
  return months * DAYS_PER_MONTH;
}
