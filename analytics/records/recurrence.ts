import { groupRows } from './record-types';
import type { RecordUnit } from './record-types';
import type { RepairFacts } from './repair-facts';

/** What is needed of a repair. */
type VisitFacts = Pick<RepairFacts, 'unitId' | 'openingDay' | 'isEligible'>;

/** A unit's repairs against its age in days, observed from `entry` (exclusive) to `end`. */
export type RepairHistory = { unitId: string; entry: number; end: number; events: number[] };

export type ModelRecurrence = {
  modelId: string;
  /**
   * `observed`: every history ends with something that is not itself a repair. `came_in`: none does, the figure
   * holds "among machines that came in", and there is no MTBF.
   */
  basis: 'observed' | 'came_in';
  histories: RepairHistory[];
  /** For `meanTimeBetweenFailures` with truncation 'time'; `null` among machines that came in. */
  mtbf: { failures: number; exposureDays: number } | null;
  /** Units without an in-service day or time under observation, or (where others are observed) without such an end. */
  leftOutUnits: number;
};

/**
 * Repairs of machines of a model against their age, for the mean cumulative function and MTBF.
 *
 * On the calendar clock from in-service. A unit is observed from when it is known, up to a reading that belongs to
 * no repair, or to `asOfDay` where the register has it as active. Repairs after such an end are left out: they were
 * seen only because it broke. A unit without such an end is used only where a model has nothing else. Repairs are
 * those of a trouble (eligible rows of `repairFacts`), on the day the machine came in.
 */
export function recurrence(records: {
  units: readonly RecordUnit[];
  facts: readonly VisitFacts[];
  asOfDay: number;
}): ModelRecurrence[] {
  const { units, facts, asOfDay } = records;
  const ordered = [...facts].sort((a, b) => a.openingDay - b.openingDay);
  const factsOfUnit = groupRows(ordered, ({ unitId, openingDay }) => (openingDay <= asOfDay ? unitId : null));
  const models = [...groupRows(units, ({ modelId }) => modelId)].sort(([a], [b]) => (a < b ? -1 : 1));
  return models.map(([modelId, ofModel]) => {
    const observed: RepairHistory[] = [];
    const cameIn: RepairHistory[] = [];
    for (const unit of ofModel) {
      const visits = factsOfUnit.get(unit.id) ?? [];
      const endDay = observedUntil(unit, asOfDay);
      const history = historyOf(unit, visits, endDay ?? visits.at(-1)?.openingDay ?? null);
      if (history) (endDay === null ? cameIn : observed).push(history);
    }
    const basis = observed.length > 0 ? 'observed' : 'came_in';
    const histories = basis === 'observed' ? observed : cameIn;
    return {
      modelId,
      basis,
      histories,
      mtbf: basis === 'observed' ? exposureOf(histories) : null,
      leftOutUnits: ofModel.length - histories.length,
    };
  });
}

/** The end of observation that no repair brought about; `null` where there is none. */
function observedUntil(unit: RecordUnit, asOfDay: number): number | null {
  if (unit.inRegister && unit.isActive) return asOfDay;
  let last: number | null = null;
  for (const { day, hours, isAtBench } of unit.readings ?? []) {
    if (hours !== null && !isAtBench && day <= asOfDay) last = Math.max(last ?? day, day);
  }
  return last;
}

function historyOf(
  unit: RecordUnit,
  visits: readonly VisitFacts[],
  endDay: number | null,
): RepairHistory | null {
  const { inServiceDay } = unit;
  if (inServiceDay === null || endDay === null) return null;
  const knownFromDay = unit.inRegister ? (unit.knownFromDay ?? inServiceDay) : visits[0]?.openingDay;
  if (knownFromDay === undefined) return null;
  const entry = Math.max(0, knownFromDay - inServiceDay);
  const end = endDay - inServiceDay;
  if (end <= entry) return null;
  const events = visits
    .filter(({ isEligible }) => isEligible)
    .map(({ openingDay }) => openingDay - inServiceDay)
    .filter((age) => age > entry && age <= end);
  return { unitId: unit.id, entry, end, events };
}

function exposureOf(histories: readonly RepairHistory[]): { failures: number; exposureDays: number } {
  let failures = 0;
  let exposureDays = 0;
  for (const { entry, end, events } of histories) {
    failures += events.length;
    exposureDays += end - entry;
  }
  return { failures, exposureDays };
}
