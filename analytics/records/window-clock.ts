import { monthOf } from './day-number';
import { requireThat } from '../requirement';

/** Days of the comeback window between two days; negative where the second comes first. */
export type WindowClock = (fromDay: number, toDay: number) => number;

/**
 * The clock of the comeback window: calendar days, or days outside the paused months (1–12), so that a repair of
 * September is judged when the machine is next used.
 *
 * @throws {RequirementError} where all twelve months are paused
 */
export function windowClock(pausedMonths: readonly number[] = []): WindowClock {
  const paused = new Set(pausedMonths);
  if (paused.size === 0) return (fromDay, toDay) => toDay - fromDay;
  requireThat(
    [...paused].every((month) => Number.isInteger(month) && month >= 1 && month <= 12) && paused.size < 12,
    'windowClock',
    'months from 1 to 12, not all of them',
  );
  const runningBefore = new Map<number, number>();
  let firstDay = 0;
  let lastDay = -1;
  const count = (day: number): number => {
    if (lastDay < firstDay) {
      firstDay = day;
      lastDay = day;
      runningBefore.set(day, 0);
    }
    for (; lastDay < day; lastDay++)
      runningBefore.set(lastDay + 1, (runningBefore.get(lastDay) ?? 0) + runs(lastDay));
    for (; firstDay > day; firstDay--) {
      runningBefore.set(firstDay - 1, (runningBefore.get(firstDay) ?? 0) - runs(firstDay - 1));
    }
    return runningBefore.get(day) ?? 0;
  };
  const runs = (day: number): number => (paused.has(Number(monthOf(day).slice(5))) ? 0 : 1);
  return (fromDay, toDay) => count(toDay) - count(fromDay);
}
