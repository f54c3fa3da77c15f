import { comebackDrivers } from '../../../analytics/records/comeback-drivers';
import type { RateRepair } from '../../../analytics/records/comeback-outcomes';
import { monthBefore, monthBounds } from '../../../analytics/records/day-number';
import type { ComebackReason } from '../../../shared/comebacks';
import type { MonthReview } from '../../../shared/reports';
import type { Transaction } from '../../db/client';
import type { RateReturn } from '../../returns/load-rates';
import { findNames } from './queries';

const MONTHS = 12;
const MOST_ROWS = 12;

const WORDS: Record<ComebackReason, string | null> = {
  part_failed_again: 'part failed again',
  cause_missed: 'cause missed',
  workmanship: 'workmanship',
  wrong_part: 'wrong part',
  defective_part: 'defective part',
  work_not_completed: 'work not completed',
  not_duplicated: 'not duplicated',
  operator_or_fuel: 'operator or fuel',
  declined_work: 'declined work',
  unrelated: 'unrelated',
  undetermined: null,
};

/** The days of the twelve months up to one. */
export function twelveMonthsTo(lastMonth: string): { firstDay: number; lastDay: number } {
  let firstMonth = lastMonth;
  for (let back = 1; back < MONTHS; back++) firstMonth = monthBefore(firstMonth);
  return { firstDay: monthBounds(firstMonth).firstDay, lastDay: monthBounds(lastMonth).lastDay };
}

/** What the comebacks of these repairs are about, furthest beyond the shop's average first. */
export async function driversOf(
  tx: Transaction,
  input: {
    repairs: readonly RateRepair[];
    comebacks: readonly RateReturn[];
    costs: ReadonlyMap<string, number>;
  },
): Promise<MonthReview['drivers']> {
  const drivers = comebackDrivers(input)
    .filter(({ componentId }) => componentId !== null)
    .slice(0, MOST_ROWS);
  const components = await findNames(
    tx,
    'component',
    drivers.flatMap(({ componentId }) => componentId ?? []),
  );
  const models = await findNames(
    tx,
    'model',
    drivers.flatMap(({ modelId }) => modelId ?? []),
  );
  const reasonOf = new Map(input.comebacks.map(({ id, reason }) => [id, reason]));
  return drivers.flatMap((driver) => {
    const component = components.get(driver.componentId ?? '');
    const { size, count, rate, beyondAverage, comebackIds } = driver;
    if (!component || rate === null) return [];
    return [
      {
        component,
        model: models.get(driver.modelId ?? '') ?? null,
        size,
        count,
        rate,
        shrunken: driver.shrunken ?? rate,
        shrunkenInterval: driver.shrunkenInterval ?? { lower: null, upper: null },
        beyondAverage,
        costCents: comebackIds.reduce((sum, id) => sum + (input.costs.get(id) ?? 0), 0),
        oftenWhy: mostOften(comebackIds.flatMap((id) => WORDS[reasonOf.get(id) ?? 'undetermined'] ?? [])),
      },
    ];
  });
}

function mostOften(words: readonly string[]): string | null {
  const counts = new Map<string, number>();
  for (const word of words) counts.set(word, (counts.get(word) ?? 0) + 1);
  return [...counts].sort(([a, countA], [b, countB]) => countB - countA || (a < b ? -1 : 1))[0]?.[0] ?? null;
}
