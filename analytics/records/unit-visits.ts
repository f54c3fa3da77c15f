import type { LineReason } from '../types';
import { findMeterFaults } from './meter-faults';
import type { JudgedReading, MeterHistory, MeterReading } from './meter-faults';
import { byVisit, fitsPart, openingDay, workDay } from './record-types';
import type { RecordComponent, RecordLine, RecordRepair, RecordUnit } from './record-types';

/** A reading that is trusted, on its track. */
export type TrustedReading = {
  day: number;
  track: number;
  hours: number;
  /** Not read on that day: taken from the line between the machine's own readings before and after it. */
  isBetween?: boolean;
};

/** A component replaced at a visit, however many of it and whatever positions: one event. */
export type Replacement = {
  componentId: string;
  reason: LineReason | null;
  partId: string | null;
  partMaker: string | null;
};

/** One visit of a unit, with what was fitted at it. */
export type UnitVisit = {
  repairId: string;
  openingDay: number;
  workDay: number;
  reading: TrustedReading | null;
  replacements: Replacement[];
  /** At or just before this visit the engine became another; `here` where this shop fitted it. */
  engineSwap: 'here' | 'elsewhere' | null;
};

/** Failure outweighs what was changed along with it, and a known event outweighs an unknown one. */
const WEIGHT: Record<LineReason, number> = {
  failed: 6,
  damage: 5,
  preventive: 3,
  maintenance: 2,
  upgrade: 1,
};
const UNKNOWN_WEIGHT = 4;

/** Visits of one unit in order, up to `asOfDay`, with trusted readings; counter sales fit nothing. */
export function unitVisits(
  unit: RecordUnit,
  repairs: readonly RecordRepair[],
  linesOfRepair: (repairId: string) => readonly RecordLine[],
  components: ReadonlyMap<string, RecordComponent>,
  asOfDay: number,
): { visits: UnitVisit[]; meter: MeterHistory; registerReadings: TrustedReading[] } {
  const seen = repairs
    .filter((r) => r.ticketType !== 'counter_sale' && openingDay(r) <= asOfDay && workDay(r) <= asOfDay)
    .sort(byVisit);
  const meter = judgeUnitMeter(unit, seen, asOfDay);
  const readingOf = new Map(meter.readings.map((reading) => [reading.source, reading]));
  const swaps = engineSwaps(seen);
  const visits = seen.map((repair, index): UnitVisit => {
    const replacements = replacementsOf(linesOfRepair(repair.id));
    const isEngineFitted = replacements.some(({ componentId }) => components.get(componentId)?.isEngine);
    return {
      repairId: repair.id,
      openingDay: openingDay(repair),
      workDay: Math.max(openingDay(repair), workDay(repair)),
      reading: trusted(readingOf.get(repair.id)),
      replacements,
      engineSwap: isEngineFitted ? 'here' : swaps.has(index) ? 'elsewhere' : null,
    };
  });
  const registerReadings = meter.readings.flatMap((r) => {
    const reading = r.source === 'register' ? trusted(r) : null;
    return reading ? [reading] : [];
  });
  return { visits, meter, registerReadings };
}

/** The readings of a unit from its register row and its repairs, judged together. */
export function judgeUnitMeter(
  unit: Pick<RecordUnit, 'inServiceDay' | 'readings'>,
  repairs: readonly RecordRepair[],
  asOfDay: number,
): MeterHistory {
  const readings: MeterReading[] = repairs.map((repair) => ({
    source: repair.id,
    day: openingDay(repair),
    hours: repair.meterHours,
    oldMeterHours: repair.oldMeterHours ?? null,
  }));
  for (const { day, hours } of unit.readings ?? []) {
    if (day <= asOfDay) readings.push({ source: 'register', day, hours });
  }
  return findMeterFaults(readings, { inServiceDay: unit.inServiceDay });
}

function trusted(reading: JudgedReading | undefined): TrustedReading | null {
  if (!reading || reading.trustedHours === null) return null;
  return { day: reading.day, track: reading.track, hours: reading.trustedHours };
}

function replacementsOf(lines: readonly RecordLine[]): Replacement[] {
  const byComponent = new Map<string, Replacement>();
  for (const line of lines) {
    if (!fitsPart(line) || line.componentId === null) continue;
    const { componentId, reason, partId, partMaker = null } = line;
    const held = byComponent.get(componentId);
    if (!held || weightOf(reason) > weightOf(held.reason)) {
      byComponent.set(componentId, { componentId, reason, partId, partMaker });
    }
  }
  return [...byComponent.values()];
}

function weightOf(reason: LineReason | null): number {
  return reason === null ? UNKNOWN_WEIGHT : WEIGHT[reason];
}

/** Visits at which another engine serial stands; one that gives way to the old serial again was a slip. */
function engineSwaps(visits: readonly RecordRepair[]): Set<number> {
  const serials = visits.map(
    ({ engineSerial }) => engineSerial?.replace(/[^0-9a-z]/gi, '').toUpperCase() || null,
  );
  const lastSeen = new Map(serials.map((serial, index) => [serial, index]));
  const swaps = new Set<number>();
  let current: string | null = null;
  serials.forEach((serial, index) => {
    if (serial === null || serial === current) return;
    if (current !== null) {
      if ((lastSeen.get(current) ?? -1) > index) return;
      swaps.add(index);
    }
    current = serial;
  });
  return swaps;
}
