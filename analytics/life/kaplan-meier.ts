import { normalLimit } from '../distributions';
import { requireConfidence } from '../requirement';
import type { LifeObservation } from '../types';
import { riskRows, tabulateLives } from './tabulate-lives';

export type SurvivalRow = {
  time: number;
  atRisk: number;
  failures: number;
  survival: number;
  /** Greenwood's; null where no survivor is left. */
  standardError: number | null;
  lower: number | null;
  upper: number | null;
};

/**
 * The share of parts still running at each age at which one failed, without assuming any distribution.
 *
 * Assumes independent lives, and censoring and late entry unrelated to failure. S(t) = Π (1 − d/n) over
 * failure ages up to t; a life is at risk at t when entry < t ≤ exit, so one censored at t counts and
 * one that enters at t does not. With late entries the first risk sets can be tiny, and S falls to 0
 * for good where one empties.
 *
 * `time` is in the unit of the times given; `survival` is a share. Standard error by Greenwood's
 * formula, limits on the log(−log) scale; both null where S = 0. No failures, no rows.
 *
 * Source: Kaplan & Meier (1958), JASA 53; Lawless (2003), Statistical Models and Methods for Lifetime
 * Data, 2nd ed., 3.2 and 3.5.
 *
 * @throws {RequirementError} where a time is not finite or not after its entry, a weight is negative, or
 * the confidence is not between 0 and 1
 * @example kaplanMeier([{ time: 5, failed: true }, { time: 8, failed: false }])
 * // [{ time: 5, atRisk: 2, failures: 1, survival: 0.5, standardError: 0.354, lower: 0.006, upper: 0.910 }]
 */
export function kaplanMeier(
  observations: readonly LifeObservation[],
  { confidence = 0.95 }: { confidence?: number } = {},
): SurvivalRow[] {
  requireConfidence(confidence, 'kaplanMeier');
  const z = normalLimit(confidence);
  let survival = 1;
  let greenwood = 0;
  return riskRows(tabulateLives(observations, 'kaplanMeier')).map(({ time, atRisk, failures }) => {
    survival *= (atRisk - failures) / atRisk;
    if (survival === 0) {
      return { time, atRisk, failures, survival, standardError: null, lower: null, upper: null };
    }
    greenwood += failures / (atRisk * (atRisk - failures));
    const logError = Math.sqrt(greenwood);
    const reach = Math.exp((z * logError) / Math.log(survival));
    return {
      time,
      atRisk,
      failures,
      survival,
      standardError: survival * logError,
      lower: survival ** (1 / reach),
      upper: survival ** reach,
    };
  });
}
