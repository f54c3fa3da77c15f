import { requireThat } from '../requirement';
import type { LifeObservation } from '../types';
import { kaplanMeier } from './kaplan-meier';

/**
 * The age by which a given share of the parts has failed, read from the Kaplan–Meier curve.
 *
 * Assumptions as of `kaplanMeier`. The smallest t with S(t) ≤ 1 − share; where the curve lies exactly at
 * 1 − share for a while, the middle of that stretch (to the last age seen, if it does not fall again), as
 * R's quantile.survfit. Limits read the log-log limits in the same way. `share` is between 0 and 1; ages
 * in the unit of the times; null where the curve does not fall that far.
 *
 * Source: Brookmeyer & Crowley (1982), Biometrics 38.
 *
 * @throws {RequirementError} where the share is not between 0 and 1, or as `kaplanMeier`
 * @example lifeQuantile(fans, 0.1) // { estimate: 2080, lower: 1150, upper: 6100 } hours
 */
export function lifeQuantile(
  observations: readonly LifeObservation[],
  share: number,
  options: { confidence?: number } = {},
): { estimate: number | null; lower: number | null; upper: number | null } {
  requireThat(share > 0 && share < 1, 'lifeQuantile', 'a share between 0 and 1');
  const rows = kaplanMeier(observations, options);
  const last = observations.reduce(
    (largest, { time, weight }) => (weight === 0 ? largest : Math.max(largest, time)),
    0,
  );
  const read = (column: 'survival' | 'lower' | 'upper'): number | null => {
    const curve = rows.flatMap((row) =>
      row[column] === null ? [] : [{ time: row.time, height: row[column] }],
    );
    return crossing(curve, 1 - share, last);
  };
  return { estimate: read('survival'), lower: read('lower'), upper: read('upper') };
}

/** Heights within this of each other are one height: sums of shares carry rounding. */
const SAME_HEIGHT = 1e-8;

function crossing(
  curve: readonly { time: number; height: number }[],
  height: number,
  last: number,
): number | null {
  const at = curve.findIndex((point) => point.height <= height + SAME_HEIGHT);
  const point = curve[at];
  if (point === undefined) return null;
  if (point.height < height - SAME_HEIGHT) return point.time;
  const next = curve.slice(at + 1).find((later) => later.height < height - SAME_HEIGHT);
  return (point.time + (next?.time ?? last)) / 2;
}
