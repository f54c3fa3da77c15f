import { kaplanMeier } from '../life/kaplan-meier';
import type { RepairOutcome } from './comeback-outcomes';

/** A return on the very day of the work happens after that day began. */
const SAME_DAY = 0.5;

/** F: the share of repairs that have come back by an age, up to the window. */
export type ReturnCurve = (ageDays: number) => number;

/**
 * The share that came back by each age: one minus the Kaplan–Meier curve of days to return, young repairs censored
 * at their age. `null` where no repair is as old as the window yet, so that the curve does not reach it.
 */
export function returnCurve(repairs: readonly RepairOutcome[], windowDays: number): ReturnCurve | null {
  if (!repairs.some(({ ageDays }) => ageDays >= windowDays)) return null;
  const returned = new Map<number, number>();
  const running = new Map<number, number>();
  for (const { returnedAfterDays, ageDays, repairs: alike } of repairs) {
    const isFailed = returnedAfterDays !== null && returnedAfterDays <= windowDays;
    const time = isFailed ? Math.max(SAME_DAY, returnedAfterDays) : Math.min(ageDays, windowDays);
    const counts = isFailed ? returned : running;
    if (time > 0) counts.set(time, (counts.get(time) ?? 0) + alike);
  }
  const rows = (counts: Map<number, number>, failed: boolean) =>
    [...counts].map(([time, weight]) => ({ time, weight, failed }));
  const curve = kaplanMeier([...rows(returned, true), ...rows(running, false)]);
  return (ageDays) => 1 - (curve.findLast(({ time }) => time <= ageDays)?.survival ?? 1);
}

/**
 * The share of repairs that will have come back once all of them are as old as the window.
 *
 * projected = (returned + Σ over the rest of (F(W) − F(a)) / (1 − F(a))) / size, F the curve of earlier repairs, a the
 * age of each. `null` without a curve or without repairs.
 *
 * Source: Kalbfleisch & Lawless (1991), Statistica Sinica 1.
 *
 * @example one earlier repair in ten returns, all on day 30: repairs of age 10, none back, project 0.1; of age 40, 0.
 */
export function projectReturns(
  repairs: readonly RepairOutcome[],
  returnedBy: ReturnCurve | null,
  windowDays: number,
): number | null {
  if (repairs.length === 0 || returnedBy === null) return null;
  const byWindow = returnedBy(windowDays);
  let expected = 0;
  let size = 0;
  for (const { isReturned, ageDays, repairs: alike } of repairs) {
    size += alike;
    if (isReturned) expected += alike;
    else if (ageDays < windowDays) {
      const byNow = returnedBy(ageDays);
      if (byNow < 1) expected += (alike * (byWindow - byNow)) / (1 - byNow);
    }
  }
  return expected / size;
}
