import { riskAt, tabulateLives } from './tabulate-lives';

/** A life that ended by one of several causes, or was last known running (`cause` null). */
export type CauseObservation = { time: number; cause: string | null; entry?: number; weight?: number };

export type IncidenceRow = {
  time: number;
  atRisk: number;
  /** Ends by the asked cause at this age. */
  events: number;
  /** Share ended by the asked cause up to this age. */
  incidence: number;
  standardError: number;
  /** Share not yet ended by any cause. */
  eventFree: number;
};

/**
 * The share of parts that failed by one cause when another cause (damage, an accident) can take them
 * first; 1 − Kaplan–Meier with the others censored overstates it.
 *
 * Assumes independent lives, and censoring and late entry unrelated to any cause. Aalen–Johansen: F(t) =
 * Σ S(t−)·d_cause/n over the ages at which a part ended by any cause, at risk when entry < t ≤ exit.
 * Standard error: infinitesimal jackknife, which equals the delta method of Marubini & Valsecchi (not
 * Aalen's). Times in the unit given; shares out. No ends by any cause, no rows.
 *
 * Source: Aalen & Johansen (1978), Scandinavian Journal of Statistics 5; Marubini & Valsecchi (1995), ch. 10.
 *
 * @throws {RequirementError} where a time is not finite or not after its entry, or a weight is negative
 * @example cumulativeIncidence([{ time: 2, cause: 'failed' }, { time: 3, cause: 'damage' }], 'failed')
 * // [{ time: 2, atRisk: 2, events: 1, incidence: 0.5, standardError: 0.354, eventFree: 0.5 }, …]
 */
export function cumulativeIncidence(
  observations: readonly CauseObservation[],
  cause: string,
): IncidenceRow[] {
  const ended = (byCause: (cause: string | null) => boolean) =>
    tabulateLives(
      observations.map((life) => ({ ...life, failed: byCause(life.cause) })),
      'cumulativeIncidence',
    );
  const all = ended((ending) => ending !== null);
  const times = all.ages.filter((_, i) => (all.failed[i] ?? 0) > 0);
  const { atRisk, failures } = riskAt(all, times);
  const { failures: ofCause } = riskAt(
    ended((ending) => ending === cause),
    times,
  );
  let [free, incidence] = [1, 0];
  // Variances and covariance of (free, incidence), carried through each step of both.
  let [varFree, covariance, variance] = [0, 0, 0];
  return Array.from(times, (time, i) => {
    const n = atRisk[i] ?? 0;
    const any = (failures[i] ?? 0) / n;
    const own = (ofCause[i] ?? 0) / n;
    const noise = (free * free) / n;
    variance += 2 * own * covariance + own * own * varFree + noise * own * (1 - own);
    covariance = (1 - any) * (covariance + own * varFree) - noise * own * (1 - any);
    varFree = (1 - any) ** 2 * varFree + noise * any * (1 - any);
    incidence += free * own;
    free *= 1 - any;
    return {
      time,
      atRisk: n,
      events: ofCause[i] ?? 0,
      incidence,
      standardError: Math.sqrt(Math.max(variance, 0)),
      eventFree: free,
    };
  });
}
