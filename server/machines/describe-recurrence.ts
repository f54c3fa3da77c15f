import { laplaceTest, meanCumulativeFunction, meanTimeBetweenFailures } from '../../analytics';
import type { ModelRecurrence, RepairHistory } from '../../analytics/records/recurrence';
import type { Recurrence } from '../../shared/machines';
import { thinned } from '../lives/thinned';

const MOST_ROWS = 400;
const FEWEST_REPAIRS = 6;
const SIGNIFICANT = 0.05;

/**
 * How machines of a model are repaired again and again: the mean number of repairs by age, whether they come faster
 * or slower with age, and the mean time between them only where neither does and the observation ends by itself.
 */
export function describeRecurrence(of: ModelRecurrence | undefined): Recurrence {
  const histories = of?.histories ?? [];
  const repairs = histories.reduce((sum, { events }) => sum + events.length, 0);
  const trend = trendOf(histories);
  const mean = trend === 'no_trend' || trend === 'too_few' ? meanOf(of) : undefined;
  return {
    kind: repairs > 0 ? 'estimate' : 'notEstimable',
    reason: histories.length === 0 ? 'noMachines' : repairs === 0 ? 'noRepairs' : null,
    amongThoseThatCameIn: of?.basis === 'came_in',
    machines: histories.length,
    repairs,
    rows: thinned(meanCumulativeFunction(histories), MOST_ROWS).map(
      ({ time, atRisk, mean: repairsSoFar, lower, upper }) => ({
        days: time,
        atRisk,
        mean: repairsSoFar,
        lower,
        upper,
      }),
    ),
    trend,
    meanDaysBetween: mean?.estimate ?? null,
    meanDaysBetweenInterval: { lower: mean?.lower ?? null, upper: mean?.upper ?? null },
  };
}

/**
 * Laplace's test over all machines at once: without a trend, where each repair stands between the two ends of its
 * machine's observation is uniform.
 */
function trendOf(histories: readonly RepairHistory[]): Recurrence['trend'] {
  const events = histories
    .flatMap(({ entry, end, events: ages }) => ages.map((age) => (age - entry) / (end - entry)))
    .sort((a, b) => a - b);
  if (events.length < FEWEST_REPAIRS) return 'too_few';
  const test = laplaceTest({ events, end: 1, truncation: 'time' });
  if (test.kind === 'notEstimable' || test.pValue >= SIGNIFICANT) return 'no_trend';
  return test.statistic > 0 ? 'rising' : 'falling';
}

function meanOf(of: ModelRecurrence | undefined) {
  if (!of?.mtbf) return undefined;
  const { failures, exposureDays: exposure } = of.mtbf;
  const mean = meanTimeBetweenFailures({ failures, exposure, truncation: 'time' });
  return mean.kind === 'estimate' ? mean : undefined;
}
