import type { CascadeOptions, CascadeVisit } from '../../../analytics/cascades/types';
import { groupRows, openingDay } from '../../../analytics/records/record-types';
import { judgeUnitMeter } from '../../../analytics/records/unit-visits';
import type { ShopRecords } from './load-records';

export type JudgedMeter = { hours: number | null; fault: string | null };

/**
 * What each repair's meter reading is worth. Hours over an unrecorded restart cannot be compared with those before
 * it, so only readings of the first meter keep theirs here.
 */
export function judgeMeters(records: ShopRecords, asOfDay: number): Map<string, JudgedMeter> {
  const repairsOfUnit = groupRows(records.repairs, ({ unitId }) => unitId);
  const judged = new Map<string, JudgedMeter>();
  for (const unit of records.units) {
    for (const reading of judgeUnitMeter(unit, repairsOfUnit.get(unit.id) ?? [], asOfDay).readings) {
      if (reading.source === 'register') continue;
      const isFirstMeter = reading.track === 0;
      judged.set(reading.source, {
        hours: isFirstMeter ? reading.trustedHours : null,
        fault: reading.fault === 'missing' ? null : (reading.fault ?? (isFirstMeter ? null : 'restart')),
      });
    }
  }
  return judged;
}

/** Visits of identified machines, in the words that declared chains use: components by name, models by id. */
export function cascadeInput(
  records: ShopRecords,
  meters: ReadonlyMap<string, JudgedMeter>,
  asOfDay: number,
): { visits: CascadeVisit[]; options: CascadeOptions } {
  const nameOf = new Map(records.components.map(({ id, name }) => [id, name]));
  const linesOf = groupRows(records.lines, ({ repairId }) => repairId);
  const visits = records.repairs.flatMap((repair): CascadeVisit[] => {
    if (repair.unitId === null || repair.modelId === null || repair.ticketType !== 'repair') return [];
    const lines = (linesOf.get(repair.id) ?? []).flatMap(({ kind, componentId, quantity, reason }) => {
      const component = componentId === null ? undefined : nameOf.get(componentId);
      return kind === 'part' && component !== undefined && (quantity ?? 1) > 0 ? [{ component, reason }] : [];
    });
    return [
      {
        unitId: repair.unitId,
        model: repair.modelId,
        day: openingDay(repair),
        hours: meters.get(repair.id)?.hours ?? null,
        lines,
        visitId: repair.id,
      },
    ];
  });
  return { visits, options: { asOfDay, units: observedUnits(records, asOfDay), families: records.families } };
}

/** Machines of the register are seen from when they are known; the others are known by their repairs alone. */
function observedUnits(records: ShopRecords, asOfDay: number): CascadeOptions['units'] {
  return records.units.flatMap(({ id, modelId, inRegister, knownFromDay, inServiceDay }) => {
    const fromDay = knownFromDay ?? inServiceDay;
    return inRegister && modelId !== null && fromDay !== null && fromDay < asOfDay
      ? [{ unitId: id, model: modelId, fromDay, toDay: asOfDay }]
      : [];
  });
}
