import { normalLimit } from '../distributions';
import { requireConfidence, requireThat } from '../requirement';

/** One machine: from when to when it was watched, and when it was repaired. */
export type RepairHistory = { end: number; entry?: number; events: readonly number[] };

export type MeanCumulativeRow = {
  time: number;
  atRisk: number;
  events: number;
  mean: number;
  /** Robust: valid whatever the dependence of repairs within a machine. */
  standardError: number;
  lower: number | null;
  upper: number | null;
};

/**
 * How many repairs a machine has had on average by a given age; its slope is the repair rate at that
 * age, so a curve that bends up means machines that get worse.
 *
 * Assumes only that machines are independent and watched for reasons unrelated to their repairs. M(t) =
 * Σ d/n over repair ages up to t, a machine being at risk when entry < t ≤ end. Robust variance
 * Σ over machines of (Σ (dN_u − at risk·d/n)/n)²; limits on the log scale, two-sided at `confidence`
 * (0.95), null where the error is 0. Ages in one unit (hours, days); the mean counts repairs. No
 * repairs, no rows.
 *
 * Source: Nelson (2003), Recurrent Events Data Analysis, ch. 4; Lawless & Nadeau (1995), Technometrics 37.
 *
 * @throws {RequirementError} where an end is not finite or not after its entry, an entry is negative, an
 * event is outside of its history, or the confidence is not between 0 and 1
 * @example meanCumulativeFunction([{ end: 10, events: [3] }, { end: 10, events: [] }])
 * // [{ time: 3, atRisk: 2, events: 1, mean: 0.5, standardError: 0.354, lower: 0.125, upper: 2.0 }]
 */
export function meanCumulativeFunction(
  histories: readonly RepairHistory[],
  { confidence = 0.95 }: { confidence?: number } = {},
): MeanCumulativeRow[] {
  requireConfidence(confidence, 'meanCumulativeFunction');
  for (const history of histories) requireHistory(history);
  const z = normalLimit(confidence);
  const times = [...new Set(histories.flatMap(({ events }) => events))].sort((a, b) => a - b);
  const units = histories.map(({ end, entry = 0, events }) => ({
    end,
    entry,
    events: [...events].sort((a, b) => a - b),
    next: 0,
    influence: 0,
  }));
  let mean = 0;
  return times.map((time) => {
    let atRisk = 0;
    let events = 0;
    const counts = units.map((unit) => {
      if (unit.entry < time && time <= unit.end) atRisk++;
      const first = unit.next;
      while (unit.events[unit.next] === time) unit.next++;
      events += unit.next - first;
      return unit.next - first;
    });
    const rate = events / atRisk;
    mean += rate;
    let variance = 0;
    units.forEach((unit, i) => {
      const present = unit.entry < time && time <= unit.end ? 1 : 0;
      unit.influence += ((counts[i] ?? 0) - present * rate) / atRisk;
      variance += unit.influence * unit.influence;
    });
    const standardError = Math.sqrt(variance);
    const reach = Math.exp((z * standardError) / mean);
    const hasLimits = standardError > 0 && reach < Infinity;
    return {
      time,
      atRisk,
      events,
      mean,
      standardError,
      lower: hasLimits ? mean / reach : null,
      upper: hasLimits ? mean * reach : null,
    };
  });
}

function requireHistory({ end, entry = 0, events }: RepairHistory): void {
  requireThat(entry >= 0, 'meanCumulativeFunction', 'every entry to be 0 or later');
  requireThat(
    end > entry && end < Infinity,
    'meanCumulativeFunction',
    'every end to be finite and after its entry',
  );
  for (const event of events) {
    requireThat(
      event > entry && event <= end,
      'meanCumulativeFunction',
      'every event to be after the entry and not after the end of its history',
    );
  }
}
