import { kaplanMeier } from '../life/kaplan-meier';
import type { LifeObservation } from '../types';
import type { RepairOutcome } from './comeback-outcomes';

/** A return on the very day of the work happens after that day began. */
const SAME_DAY = 0.5;

/**
 * The share of repairs that will have come back once all of them are as old as the window.
 *
 * projected = (returned + Σ over the rest of (F(W) − F(a)) / (1 − F(a))) / size, F being one minus the Kaplan–Meier
 * curve of days to return of earlier repairs, a the age of each. `null` where no earlier repair is as old as the
 * window yet, or there are no repairs.
 *
 * Source: Kalbfleisch & Lawless (1991), Statistica Sinica 1.
 *
 * @example one earlier repair in ten returns, all on day 30: 20 repairs of age 10, none back, project 0.1; of age 40, 0.
 */
export function projectReturns(
  repairs: readonly RepairOutcome[],
  earlier: readonly RepairOutcome[],
  windowDays: number,
): number | null {
  if (repairs.length === 0 || !earlier.some(({ ageDays }) => ageDays >= windowDays)) return null;
  const returnedBy = returnCurve(earlier, windowDays);
  const byWindow = returnedBy(windowDays);
  let expected = 0;
  for (const { isReturned, ageDays } of repairs) {
    const byNow = returnedBy(Math.min(ageDays, windowDays));
    if (isReturned) expected++;
    else if (byNow < 1) expected += (byWindow - byNow) / (1 - byNow);
  }
  return expected / repairs.length;
}

/** F: the share returned by an age, from repairs of which the young ones are censored at their age. */
function returnCurve(repairs: readonly RepairOutcome[], windowDays: number): (ageDays: number) => number {
  const observations = repairs.flatMap(({ returnedAfterDays, ageDays }): LifeObservation[] => {
    const isFailed = returnedAfterDays !== null && returnedAfterDays <= windowDays;
    const time = isFailed ? Math.max(SAME_DAY, returnedAfterDays) : Math.min(ageDays, windowDays);
    return time > 0 ? [{ time, failed: isFailed }] : [];
  });
  const curve = kaplanMeier(observations);
  return (ageDays) => 1 - (curve.findLast(({ time }) => time <= ageDays)?.survival ?? 1);
}
