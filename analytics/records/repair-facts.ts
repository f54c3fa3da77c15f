import { fitsPart, groupRows, openingDay, workDay } from './record-types';
import type { RecordComponent, RecordLine, RecordRepair, RecordUnit } from './record-types';
import { readsAsService, readsAsTrouble, systemReader } from './trouble-words';
import type { ComplaintPhrase } from './trouble-words';
import { judgeUnitMeter } from './unit-visits';

/** What a repair says about trouble and its return. */
export type RepairFacts = {
  id: string;
  unitId: string | null;
  modelId: string | null;
  openingDay: number;
  workDay: number;
  /** Trusted reading, comparable with another of the unit on the same track. */
  hours: number | null;
  meterTrack: number;
  technicianIds: readonly string[];
  /** Everything that was replaced or worked on. */
  componentIds: string[];
  /** Of these, what was in trouble: not changed as maintenance, prevention or upgrade. */
  troubleComponentIds: string[];
  /** Parts fitted. */
  fittedComponentIds: string[];
  /** Systems of the trouble, from complaint, work and lines; *unassigned* is none. */
  systemIds: string[];
  /** Looked at and nothing was found, and nothing was done. */
  isNothingFound: boolean;
  isMaintenanceOnly: boolean;
  /** Can come back, and can be a return: an identified machine, a repair, not maintenance only. */
  isEligible: boolean;
  /** Why it stays out of rates. */
  leftOut: 'not_a_repair' | 'unidentified' | 'maintenance_only' | null;
};

const ROUTINE = new Set(['maintenance', 'preventive', 'upgrade']);
const FINDINGS = new Set(['tested_good', 'nothing_found']);
const SERVICE_WORK = new Set(['adjusted', 'cleaned', 'tightened', 'tested_good', 'nothing_found']);

/**
 * What each repair says about trouble. A visit is maintenance only where its parts are all routine and no work
 * names a trouble, or where it has no lines and its complaint orders a service; never where its complaint is of a
 * trouble.
 *
 * @param records repairs up to the day of the analysis; units only for their readings
 */
export function repairFacts(records: {
  repairs: readonly RecordRepair[];
  lines: readonly RecordLine[];
  components: readonly RecordComponent[];
  units?: readonly RecordUnit[];
  complaintPhrases?: readonly ComplaintPhrase[];
}): RepairFacts[] {
  const { repairs, components, units = [] } = records;
  const linesOf = groupRows(records.lines, ({ repairId }) => repairId);
  const componentOf = new Map(components.map((component) => [component.id, component]));
  const systemsIn = systemReader(records.complaintPhrases ?? []);
  const readings = trustedReadings(repairs, units);
  return repairs.map((repair) => {
    const lines = linesOf.get(repair.id) ?? [];
    const isMaintenanceOnly = isRoutine(repair, lines);
    const work = lines.filter(
      ({ kind, workDone }) => kind === 'work' && workDone !== null && !FINDINGS.has(workDone),
    );
    const parts = lines.filter(fitsPart);
    const done = [...parts, ...work];
    const trouble = isMaintenanceOnly
      ? []
      : done.filter(({ reason }) => reason === null || !ROUTINE.has(reason));
    const troubleComponentIds = componentsOf(trouble);
    const found = isMaintenanceOnly ? [] : [...troubleComponentIds, ...componentsOf(lines.filter(isFinding))];
    const systems = found.flatMap((id) => componentOf.get(id)?.systemId ?? []);
    const leftOut =
      repair.ticketType !== 'repair'
        ? 'not_a_repair'
        : repair.unitId === null
          ? 'unidentified'
          : isMaintenanceOnly
            ? 'maintenance_only'
            : null;
    const reading = readings.get(repair.id);
    return {
      id: repair.id,
      unitId: repair.unitId,
      modelId: repair.modelId,
      openingDay: openingDay(repair),
      workDay: workDay(repair),
      hours: reading?.hours ?? null,
      meterTrack: reading?.track ?? 0,
      technicianIds: repair.technicianIds ?? [],
      componentIds: componentsOf(done),
      troubleComponentIds,
      fittedComponentIds: componentsOf(parts),
      systemIds: [...new Set([...systems, ...systemsIn(troubleText(repair))])],
      isNothingFound: trouble.length === 0 && lines.some(({ workDone }) => workDone === 'nothing_found'),
      isMaintenanceOnly,
      isEligible: leftOut === null,
      leftOut,
    };
  });
}

/**
 * Many programs write a whole visit into one field: where no complaint stands by itself, the notes are read in its place,
 * unless they tell of a service, which names every system that was looked at.
 */
function troubleText({ complaint, notes }: RecordRepair): string | null | undefined {
  return complaint || (readsAsService(notes) ? null : notes);
}

function isRoutine(repair: RecordRepair, lines: readonly RecordLine[]): boolean {
  if (readsAsTrouble(repair.complaint)) return false;
  const parts = lines.filter(fitsPart);
  const work = lines.filter(({ kind, workDone }) => kind === 'work' && workDone !== null);
  if (parts.length + work.length === 0) return readsAsService(repair.complaint);
  const isService = readsAsService(repair.complaint);
  const areParts = parts.every(({ reason }) => reason !== null && ROUTINE.has(reason));
  const isWork = work.every(
    ({ reason, workDone }) =>
      (reason !== null && ROUTINE.has(reason)) ||
      (isService && workDone !== null && SERVICE_WORK.has(workDone)),
  );
  return areParts && isWork;
}

function isFinding(line: RecordLine): boolean {
  return line.kind === 'work' && line.workDone !== null && FINDINGS.has(line.workDone);
}

function componentsOf(lines: readonly RecordLine[]): string[] {
  return [...new Set(lines.flatMap(({ componentId }) => componentId ?? []))];
}

function trustedReadings(
  repairs: readonly RecordRepair[],
  units: readonly RecordUnit[],
): Map<string, { hours: number; track: number }> {
  const unitOf = new Map(units.map((unit) => [unit.id, unit]));
  const readings = new Map<string, { hours: number; track: number }>();
  for (const [unitId, visits] of groupRows(repairs, ({ unitId }) => unitId)) {
    const unit = unitOf.get(unitId) ?? { inServiceDay: null };
    for (const { source, trustedHours, track } of judgeUnitMeter(unit, visits, Infinity).readings) {
      if (source !== 'register' && trustedHours !== null)
        readings.set(source, { hours: trustedHours, track });
    }
  }
  return readings;
}
