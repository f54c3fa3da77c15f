import { and, asc, eq, isNotNull } from 'drizzle-orm';
import { dayNumber } from '../../../analytics/records/day-number';
import type {
  RecordComponent,
  RecordLine,
  RecordRepair,
  RecordUnit,
} from '../../../analytics/records/record-types';
import type { LineReason } from '../../../analytics/types';
import type { Transaction } from '../../db/client';
import {
  components,
  families,
  familyModels,
  parts,
  repairLines,
  repairs,
  repairTechnicians,
  units,
} from '../../db/schema/index';
import { groupRows } from '../../../analytics/records/record-types';

/** A shop's records as the computations want them, in one consistent reading. */
export type ShopRecords = {
  units: RecordUnit[];
  repairs: RecordRepair[];
  lines: RecordLine[];
  components: RecordComponent[];
  families: { id: string; name: string; models: string[] }[];
  /** The last day that the records tell of; nothing can be known to have come back after it. */
  lastDay: number | null;
};

const ENGINE_NAMES = /^(complete |replacement )?(engine|short ?block|long ?block)( assembly)?$/i;
const ENGINE_SYSTEMS = new Set(['engine', 'ignition']);

export async function loadRecords(tx: Transaction): Promise<ShopRecords> {
  const shopRepairs = await loadRepairs(tx);
  const lastDay = shopRepairs.reduce<number | null>(
    (last, { closedDay }) => Math.max(last ?? closedDay, closedDay),
    null,
  );
  return {
    units: await loadUnits(tx),
    repairs: shopRepairs,
    lines: await loadLines(tx),
    components: await loadComponents(tx),
    families: await loadFamilies(tx),
    lastDay,
  };
}

const dayOrNull = (day: string | null) => (day === null ? null : dayNumber(day));

async function loadUnits(tx: Transaction): Promise<RecordUnit[]> {
  const rows = await tx
    .select({
      id: units.id,
      modelId: units.modelId,
      inRegister: units.isRegistered,
      inServiceOn: units.inServiceOn,
      knownFromOn: units.knownFromOn,
      meterHours: units.registerMeterHours,
      readOn: units.registerReadOn,
    })
    .from(units)
    .orderBy(asc(units.id));
  return rows.map(({ inServiceOn, knownFromOn, meterHours, readOn, ...unit }) => ({
    ...unit,
    inServiceDay: dayOrNull(inServiceOn),
    knownFromDay: dayOrNull(knownFromOn),
    isActive: unit.inRegister,
    readings: readOn === null ? [] : [{ day: dayNumber(readOn), hours: meterHours }],
  }));
}

async function loadRepairs(tx: Transaction): Promise<RecordRepair[]> {
  const rows = await tx
    .select({
      id: repairs.id,
      unitId: repairs.unitId,
      modelId: repairs.modelId,
      ticketType: repairs.ticketType,
      openedOn: repairs.openedOn,
      readyOn: repairs.readyOn,
      closedOn: repairs.closedOn,
      meterHours: repairs.meterHours,
      engineSerial: repairs.engineSerial,
      complaint: repairs.complaint,
      cause: repairs.cause,
      correction: repairs.correction,
      notes: repairs.notes,
    })
    .from(repairs)
    .orderBy(asc(repairs.id));
  const technicians = groupRows(
    await tx
      .select({ repairId: repairTechnicians.repairId, technicianId: repairTechnicians.technicianId })
      .from(repairTechnicians),
    ({ repairId }) => repairId,
  );
  return rows.map(({ openedOn, readyOn, closedOn, ticketType, ...repair }) => ({
    ...repair,
    ticketType: ticketType as RecordRepair['ticketType'],
    openedDay: dayOrNull(openedOn),
    readyDay: dayOrNull(readyOn),
    closedDay: dayNumber(closedOn),
    technicianIds: technicians.get(repair.id)?.map(({ technicianId }) => technicianId) ?? [],
  }));
}

async function loadLines(tx: Transaction): Promise<RecordLine[]> {
  const rows = await tx
    .select({
      repairId: repairLines.repairId,
      kind: repairLines.kind,
      componentId: repairLines.componentId,
      partId: repairLines.partId,
      partMaker: parts.maker,
      reason: repairLines.reason,
      workDone: repairLines.workDone,
      quantity: repairLines.quantity,
    })
    .from(repairLines)
    .leftJoin(parts, and(eq(parts.shopId, repairLines.shopId), eq(parts.id, repairLines.partId)))
    .where(isNotNull(repairLines.componentId))
    .orderBy(asc(repairLines.repairId), asc(repairLines.position), asc(repairLines.id));
  return rows.map(({ kind, reason, workDone, ...line }) => ({
    ...line,
    kind: kind as RecordLine['kind'],
    reason: reason === 'unknown' ? null : (reason as LineReason),
    workDone: workDone as RecordLine['workDone'],
  }));
}

async function loadComponents(tx: Transaction): Promise<RecordComponent[]> {
  const rows = await tx
    .select({ id: components.id, name: components.name, system: components.system })
    .from(components)
    .orderBy(asc(components.nameKey));
  return rows.map(({ id, name, system }) => {
    const systemId = system.trim().toLowerCase();
    return {
      id,
      name,
      systemId: systemId === 'unassigned' || systemId === '' ? null : systemId,
      isEngine: ENGINE_NAMES.test(name.trim()),
      isOfEngine: ENGINE_SYSTEMS.has(systemId),
    };
  });
}

async function loadFamilies(tx: Transaction): Promise<ShopRecords['families']> {
  const rows = await tx
    .select({ id: families.id, name: families.name, modelId: familyModels.modelId })
    .from(families)
    .innerJoin(
      familyModels,
      and(eq(familyModels.shopId, families.shopId), eq(familyModels.familyId, families.id)),
    )
    .orderBy(asc(families.nameKey), asc(familyModels.modelId));
  const byFamily = groupRows(rows, ({ id }) => id);
  // Strength is borrowed within one family: where a model is in several, within the first by name.
  const taken = new Set<string>();
  return [...byFamily].map(([id, members]) => {
    const models = members.map(({ modelId }) => modelId).filter((modelId) => !taken.has(modelId));
    for (const modelId of models) taken.add(modelId);
    return { id, name: members[0]?.name ?? '', models };
  });
}
