import { dayNumber } from '../../../analytics/records/day-number';
import type { JudgedReading } from '../../../analytics/records/meter-faults';
import type { RecordRepair } from '../../../analytics/records/record-types';
import { judgeUnitMeter } from '../../../analytics/records/unit-visits';
import type { UnitEvent, UnitWhole } from '../../../shared/machines';
import type { UnitRow, UnitVisitRow } from './queries';

/** A machine's life as its records tell it: each visit, the register's reading, and what is in it now. */
export function timelineOf(
  unit: UnitRow,
  visits: readonly UnitVisitRow[],
  asOf: string,
): Pick<UnitWhole, 'events' | 'fitted'> {
  const readings = judgedReadings(unit, visits, asOf);
  const events = visits.map((visit) => eventOf(visit, readings.get(visit.id)));
  const register = registerEvent(unit, readings.get('register'));
  if (register) events.push(register);
  // A stable sort: the register's reading stands after the repairs of its day.
  events.sort((a, b) => (a.on < b.on ? -1 : Number(a.on > b.on)));
  return { events, fitted: fittedNow(visits, readings) };
}

function judgedReadings(unit: UnitRow, visits: readonly UnitVisitRow[], asOf: string) {
  const { registerReadOn, registerMeterHours } = unit;
  const meter = judgeUnitMeter(
    {
      inServiceDay: unit.inServiceOn === null ? null : dayNumber(unit.inServiceOn),
      readings:
        registerReadOn === null ? [] : [{ day: dayNumber(registerReadOn), hours: registerMeterHours }],
    },
    visits.map((visit) => recordOf(visit)),
    dayNumber(asOf),
  );
  return new Map(meter.readings.map((reading) => [reading.source, reading]));
}

function recordOf(visit: UnitVisitRow): RecordRepair {
  const dayOf = (on: string | null) => (on === null ? null : dayNumber(on));
  return {
    id: visit.id,
    unitId: null,
    modelId: null,
    ticketType: 'repair',
    openedDay: dayOf(visit.openedOn),
    readyDay: dayOf(visit.readyOn),
    closedDay: dayNumber(visit.closedOn),
    meterHours: visit.meterHours,
  };
}

function eventOf(visit: UnitVisitRow, reading: JudgedReading | undefined): UnitEvent {
  return {
    kind: 'repair',
    on: visit.workOn,
    repair: { id: visit.id, number: visit.number, ticketType: visit.ticketType },
    meterHours: visit.meterHours,
    ...meterOf(reading),
    complaint: visit.complaint,
    correction: visit.correction,
    replaced: visit.lines.flatMap(({ kind, component, reason, quantity }) =>
      kind === 'part' && component && quantity > 0 ? [{ component, reason }] : [],
    ),
    workDone: visit.lines.flatMap(({ component, workDone }) => (workDone ? [{ component, workDone }] : [])),
    totalCents: visit.totalCents,
    isComebackOf: visit.isComebackOf,
  };
}

function registerEvent(unit: UnitRow, reading: JudgedReading | undefined): UnitEvent | undefined {
  if (unit.registerReadOn === null) return undefined;
  return {
    kind: 'register',
    on: unit.registerReadOn,
    repair: null,
    meterHours: unit.registerMeterHours,
    ...meterOf(reading),
    complaint: null,
    correction: null,
    replaced: [],
    workDone: [],
    totalCents: 0,
    isComebackOf: null,
  };
}

/** No reading is no fault of the meter. */
function meterOf(reading: JudgedReading | undefined) {
  const fault = reading?.fault ?? null;
  return {
    cumulativeHours: reading?.trustedHours ?? null,
    meterFault: fault === 'missing' ? null : fault,
  };
}

/** The last part that this shop fitted of each component, and the hours since where one meter saw both ends. */
function fittedNow(
  visits: readonly UnitVisitRow[],
  readings: ReadonlyMap<string, JudgedReading>,
): UnitWhole['fitted'] {
  const last = [...readings.values()].filter(({ trustedHours }) => trustedHours !== null).at(-1);
  const fitted = new Map<string, UnitWhole['fitted'][number]>();
  for (const visit of visits) {
    const then = readings.get(visit.id);
    const hoursSince =
      last && then && then.track === last.track && last.trustedHours !== null && then.trustedHours !== null
        ? last.trustedHours - then.trustedHours
        : null;
    for (const { kind, component, part, quantity } of visit.lines) {
      if (kind === 'part' && component && quantity > 0)
        fitted.set(component.id, { component, part, on: visit.workOn, hoursSince });
    }
  }
  return [...fitted.values()].sort((a, b) => a.component.name.localeCompare(b.component.name, 'en'));
}
