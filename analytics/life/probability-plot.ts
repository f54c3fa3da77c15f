import type { LifeObservation } from '../types';
import { kaplanMeier } from './kaplan-meier';

export type PlotPoint = {
  time: number;
  /** Share failed at the middle of the Kaplan–Meier step. */
  failedShare: number;
  /** log time: the abscissa on which a Weibull fit is straight. */
  x: number;
  /** log(−log(1 − failedShare)): the ordinate. */
  y: number;
};

/**
 * Where the failures lie on Weibull paper, to see whether a fitted line holds: two slopes tell of a
 * mixture of two troubles.
 *
 * Assumptions as of `kaplanMeier`. Each failure age is set at the middle of its step, (F(t−) + F(t))/2.
 * On these axes the fit is the line y = shape·(x − log scale). Times in the unit given; shares without.
 *
 * Source: Meeker, Escobar & Pascual (2022), Statistical Methods for Reliability Data, 2nd ed., 6.4.
 *
 * @throws {RequirementError} as `kaplanMeier`
 * @example probabilityPlot([{ time: 5, failed: true }, { time: 8, failed: false }])
 * // [{ time: 5, failedShare: 0.25, x: 1.609, y: -1.246 }]
 */
export function probabilityPlot(observations: readonly LifeObservation[]): PlotPoint[] {
  let before = 1;
  return kaplanMeier(observations).flatMap(({ time, survival }) => {
    const alive = (before + survival) / 2;
    before = survival;
    if (alive === 0) return [];
    return [{ time, failedShare: 1 - alive, x: Math.log(time), y: Math.log(-Math.log(alive)) }];
  });
}
