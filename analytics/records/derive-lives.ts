import { readingBetween, spansOf } from './life-spans';
import type { LifeEnd, LifeStart } from './life-spans';
import type { PartLife } from './part-life';
import { fitsPart, groupRows } from './record-types';
import type { RecordComponent, RecordLine, RecordRepair, RecordUnit } from './record-types';
import { unitVisits } from './unit-visits';
import type { Replacement, TrustedReading, UnitVisit } from './unit-visits';

/**
 * Part lives of a whole shop: every unit by itself, so that rebuilding the units whose records changed (and, where
 * a model gains a component, the units of that model) gives the same rows as rebuilding all.
 *
 * @see deriveLivesOfUnit for the rules
 */
export function deriveLives(records: {
  units: readonly RecordUnit[];
  repairs: readonly RecordRepair[];
  lines: readonly RecordLine[];
  components: readonly RecordComponent[];
  asOfDay: number;
}): PartLife[] {
  const { units, repairs, lines, components, asOfDay } = records;
  const repairsOfUnit = groupRows(repairs, ({ unitId }) => unitId);
  const linesOfRepair = groupRows(lines, ({ repairId }) => repairId);
  const componentOf = new Map(components.map((component) => [component.id, component]));
  const componentsOfModel = modelComponents(records);
  return units.flatMap((unit) =>
    deriveLivesOfUnit({
      unit,
      repairs: repairsOfUnit.get(unit.id) ?? [],
      linesOfRepair: (repairId) => linesOfRepair.get(repairId) ?? [],
      components: componentOf,
      modelComponentIds: (unit.modelId === null ? undefined : componentsOfModel.get(unit.modelId)) ?? [],
      asOfDay,
    }),
  );
}

/** The components that each model is known to have: those that this shop ever fitted to one, sorted. */
export function modelComponents(records: {
  units: readonly RecordUnit[];
  repairs: readonly RecordRepair[];
  lines: readonly RecordLine[];
}): Map<string, string[]> {
  const modelOfUnit = new Map(records.units.map(({ id, modelId }) => [id, modelId]));
  const modelOf = new Map(
    records.repairs.map(({ id, unitId, modelId }) => [id, (unitId && modelOfUnit.get(unitId)) ?? modelId]),
  );
  const sets = new Map<string, Set<string>>();
  for (const line of records.lines) {
    const modelId = modelOf.get(line.repairId);
    if (!modelId || line.componentId === null || !fitsPart(line)) continue;
    const set = sets.get(modelId);
    if (set) set.add(line.componentId);
    else sets.set(modelId, new Set([line.componentId]));
  }
  return new Map([...sets].map(([modelId, set]) => [modelId, [...set].sort()]));
}

/**
 * Part lives of one unit: one installation of one component each.
 *
 * - Several of a component replaced at one visit are one event; the gravest reason rules.
 * - A life starts where this shop fitted the part, or at in-service where the unit is known from that day. Else its
 *   start is *assumed original*, under observation only from when the unit is known (delayed entry); a part
 *   replaced at that very visit adds nothing.
 * - It ends in `failed`, `damage` (a competing cause) or `unknown`; maintenance, preventive and upgrade censor it,
 *   and so does the end of the records: the last known reading, of a repair or a register, never extrapolated.
 *   Work without a part ends nothing.
 * - A failing part is as old as its machine was on the day it came in; a fitted part starts on the day of the work.
 * - A swapped engine ends (censored) the lives of its components and starts them anew where this shop fitted it.
 *   Swapped elsewhere, they are not followed until this shop fits one.
 * - A visit without a reading takes its hours from the line between the machine's own readings before and after it;
 *   a life that rests on one is marked. No rate of other machines is ever used.
 * - Hours over a meter restart whose old reading is not recorded are set aside: censored at the last trusted reading.
 *
 * @param records `modelComponentIds` are the components whose original lives are followed (`modelComponents`)
 */
export function deriveLivesOfUnit(records: {
  unit: RecordUnit;
  repairs: readonly RecordRepair[];
  linesOfRepair: (repairId: string) => readonly RecordLine[];
  components: ReadonlyMap<string, RecordComponent>;
  modelComponentIds: readonly string[];
  asOfDay: number;
}): PartLife[] {
  const { unit, components, asOfDay } = records;
  const { visits: seen, registerReadings } = unitVisits(
    unit,
    records.repairs,
    records.linesOfRepair,
    components,
    asOfDay,
  );
  const readings = [...seen.flatMap(({ reading }) => reading ?? []), ...registerReadings].sort(
    (a, b) => a.day - b.day || a.track - b.track || a.hours - b.hours,
  );
  const visits = seen.map((visit) =>
    visit.reading ? visit : { ...visit, reading: readingBetween(readings, visit.openingDay) },
  );
  const original = originalStart(unit, visits, readings);
  const running = new Map<string, LifeStart>();
  const lives: PartLife[] = [];
  const counts = new Map<string, number>();
  let engine = 0;

  if (original) for (const componentId of records.modelComponentIds) running.set(componentId, original);

  const finish = (componentId: string, end: LifeEnd) => {
    const start = running.get(componentId);
    running.delete(componentId);
    if (!start || isUnseen(start, end)) return;
    const count = counts.get(componentId) ?? 0;
    counts.set(componentId, count + 1);
    lives.push(lifeOf(unit, componentId, engine, count, start, end, readings));
  };

  visits.forEach((visit, index) => {
    const replaced = new Set(visit.replacements.map(({ componentId }) => componentId));
    if (visit.engineSwap !== null) {
      const end = visit.engineSwap === 'here' ? swapEnd(visit) : lastSign(visits.slice(index - 1, index));
      for (const componentId of [...running.keys()]) {
        if (
          !components.get(componentId)?.isOfEngine ||
          (visit.engineSwap === 'here' && replaced.has(componentId))
        )
          continue;
        if (end) finish(componentId, { ...end, repairId: visit.repairId, reason: 'engine_swapped' });
        else running.delete(componentId);
      }
    }
    for (const replacement of visit.replacements)
      finish(replacement.componentId, replacementEnd(visit, replacement));
    if (visit.engineSwap !== null) engine++;
    if (visit.engineSwap === 'here') {
      for (const componentId of records.modelComponentIds) {
        if (components.get(componentId)?.isOfEngine) running.set(componentId, fittedStart(visit, null));
      }
    }
    for (const replacement of visit.replacements) {
      running.set(replacement.componentId, fittedStart(visit, replacement));
    }
  });

  const registerDays = (unit.readings ?? []).flatMap(({ day, hours }) =>
    hours === null || day > asOfDay ? [] : [day],
  );
  const end = lastSign(visits, registerDays);
  if (end) for (const componentId of [...running.keys()]) finish(componentId, end);
  return lives;
}

/** How parts that were there from the start begin; `null` where nothing was ever seen of the unit. */
function originalStart(
  unit: RecordUnit,
  visits: readonly UnitVisit[],
  readings: readonly TrustedReading[],
): LifeStart | null {
  const { inServiceDay } = unit;
  const knownFromDay = unit.inRegister ? (unit.knownFromDay ?? inServiceDay) : null;
  const firstSignDay = Math.min(visits[0]?.openingDay ?? Infinity, readings[0]?.day ?? Infinity);
  const entryDay = knownFromDay ?? (Number.isFinite(firstSignDay) ? firstSignDay : null);
  if (entryDay === null) return null;
  const base = { repairId: null, day: inServiceDay, part: null };
  if (inServiceDay !== null && knownFromDay !== null && knownFromDay <= inServiceDay) {
    const zero = { day: inServiceDay, track: 0, hours: 0 };
    return { ...base, origin: 'in_service', entryDay: inServiceDay, reading: zero, entryReading: zero };
  }
  return {
    ...base,
    origin: 'assumed_original',
    entryDay,
    reading: { day: inServiceDay ?? entryDay, track: 0, hours: 0 },
    entryReading: readings.find(({ day }) => day >= entryDay) ?? null,
  };
}

function fittedStart(visit: UnitVisit, part: Replacement | null): LifeStart {
  const { repairId, workDay, reading } = visit;
  return {
    origin: 'fitted',
    repairId,
    day: workDay,
    entryDay: workDay,
    reading,
    entryReading: reading,
    part,
  };
}

function replacementEnd(visit: UnitVisit, { reason }: Replacement): LifeEnd {
  const { repairId, openingDay: day, reading } = visit;
  const outcome =
    reason === null ? 'unknown' : reason === 'failed' || reason === 'damage' ? reason : 'censored';
  return { repairId, day, reading, outcome, reason };
}

function swapEnd(visit: UnitVisit): LifeEnd {
  const { repairId, openingDay: day, reading } = visit;
  return { repairId, day, reading, outcome: 'censored', reason: 'engine_swapped' };
}

/** The last day on which the unit is known to have run: its last visit, or a later reading of the register. */
function lastSign(visits: readonly UnitVisit[], registerDays: readonly number[] = []): LifeEnd | null {
  let day = -Infinity;
  for (const { openingDay } of visits) day = Math.max(day, openingDay);
  for (const each of registerDays) day = Math.max(day, each);
  if (!Number.isFinite(day)) return null;
  return { repairId: null, day, reading: null, outcome: 'censored', reason: 'running' };
}

/** A part replaced at the visit from which the unit is known was never under observation. */
function isUnseen(start: LifeStart, end: LifeEnd): boolean {
  return start.origin === 'assumed_original' && (start.entryDay ?? end.day) >= end.day;
}

function lifeOf(
  unit: RecordUnit,
  componentId: string,
  engine: number,
  count: number,
  start: LifeStart,
  end: LifeEnd,
  readings: readonly TrustedReading[],
): PartLife {
  const spans = spansOf(start, end, readings);
  return {
    id: `${unit.id}/${componentId}/${count}`,
    unitId: unit.id,
    modelId: unit.modelId,
    componentId,
    engine,
    partId: start.part?.partId ?? null,
    partMaker: start.part?.partMaker ?? null,
    origin: start.origin,
    startRepairId: start.repairId,
    startDay: start.day,
    endRepairId: end.repairId,
    endDay: end.day,
    outcome: end.outcome,
    endReason: end.reason,
    ...spans,
    isUnitInRegister: unit.inRegister,
  };
}
