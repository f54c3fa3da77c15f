import type { LifeObservation } from '../types';
import { riskRows, tabulateLives } from './tabulate-lives';

export type HazardRow = {
  time: number;
  atRisk: number;
  failures: number;
  cumulativeHazard: number;
  standardError: number;
};

/**
 * The accumulated risk of failure at each age at which a part failed: its slope is the failure rate at
 * that age, so a straight line means no pattern with age.
 *
 * Assumes independent lives, and censoring and late entry unrelated to failure. H(t) = Σ d/n over
 * failure ages up to t, at risk when entry < t ≤ exit. Standard error √Σ d/n² (Aalen's, not Klein's).
 * `time` is in the unit of the times given; the hazard has no unit. No failures, no rows.
 *
 * Source: Nelson (1972), Technometrics 14; Aalen (1978), Annals of Statistics 6.
 *
 * @throws {RequirementError} where a time is not finite or not after its entry, or a weight is negative
 * @example nelsonAalen([{ time: 5, failed: true }, { time: 8, failed: true }]).at(-1)
 * // { time: 8, atRisk: 1, failures: 1, cumulativeHazard: 1.5, standardError: 1.118 }
 */
export function nelsonAalen(observations: readonly LifeObservation[]): HazardRow[] {
  let cumulativeHazard = 0;
  let variance = 0;
  return riskRows(tabulateLives(observations, 'nelsonAalen')).map(({ time, atRisk, failures }) => {
    cumulativeHazard += failures / atRisk;
    variance += failures / (atRisk * atRisk);
    return { time, atRisk, failures, cumulativeHazard, standardError: Math.sqrt(variance) };
  });
}
