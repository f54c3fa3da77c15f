import { wilsonInterval } from '../rates/wilson-interval';
import type { Interval } from '../types';
import type { Comeback } from './comeback-types';
import { repairOutcomes } from './comeback-outcomes';
import type { RateRepair } from './comeback-outcomes';
import { monthBounds, monthOf } from './day-number';
import { windowClock } from './window-clock';

type Returned = Pick<Comeback, 'returnRepairId' | 'firstRepairId' | 'returnDay' | 'isCounted' | 'isOurs'>;

/**
 * Episodes whose first visit ended them, among those whose first visit is as old as the window (Wilson, 95 %). An
 * episode begins with a repair that is not itself a return; one that never came back is an episode of one visit.
 */
export function firstVisitCure(input: {
  repairs: readonly RateRepair[];
  comebacks: readonly Returned[];
  asOfDay: number;
  windowDays: number;
  pausedMonths?: readonly number[];
}): { cured: number; of: number; rate: number | null; interval: Interval } {
  const { repairs, comebacks, asOfDay, windowDays } = input;
  const returns = new Set(
    comebacks.flatMap((c) => (c.isCounted && c.returnRepairId !== null ? [c.returnRepairId] : [])),
  );
  const heads = repairs.filter(({ id }) => !returns.has(id));
  const judged = repairOutcomes(heads, comebacks, asOfDay, windowClock(input.pausedMonths)).filter(
    ({ ageDays }) => ageDays >= windowDays,
  );
  const cured = judged.filter(({ isReturned }) => !isReturned).length;
  const { estimate, lower, upper } = wilsonInterval(cured, judged.length);
  return { cured, of: judged.length, rate: estimate, interval: { lower, upper } };
}

/** Returns that came in by the door in a month, and the months of work that they came from. */
export function byTheDoor(
  comebacks: readonly Pick<Comeback, 'returnDay' | 'firstWorkDay' | 'isCounted'>[],
  month: string,
): { count: number; fromMonth: string | null; toMonth: string | null } {
  const { firstDay, lastDay } = monthBounds(month);
  const months = comebacks
    .filter(({ returnDay, isCounted }) => isCounted && returnDay >= firstDay && returnDay <= lastDay)
    .map(({ firstWorkDay }) => monthOf(firstWorkDay))
    .sort();
  return { count: months.length, fromMonth: months[0] ?? null, toMonth: months.at(-1) ?? null };
}
