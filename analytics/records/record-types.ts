import type { LineReason } from '../types';

/*
 * Closed records as flat rows. Ids are opaque strings; days are days since 1970-01-01 (`dayNumber`); hours are
 * hours of the meter. `null` is "the record does not say".
 */

/** A machine. */
export type RecordUnit = {
  id: string;
  modelId: string | null;
  /** In the shop's register of what it sold or looks after; else the unit is known from its first repair. */
  inRegister: boolean;
  inServiceDay: number | null;
  /** Register: from which day the shop would have seen its repairs; `null` means from in-service. */
  knownFromDay: number | null;
  /** Register: still in use as far as the shop knows; it is then observed up to the day of the analysis. */
  isActive?: boolean;
  /** Readings that belong to no repair: of the register, or taken at the bench before the repair is closed. */
  readings?: readonly { day: number; hours: number | null; isAtBench?: boolean }[];
};

export type TicketType = 'repair' | 'setup' | 'counter_sale' | 'internal';

/** A closed repair record. */
export type RecordRepair = {
  id: string;
  unitId: string | null;
  modelId: string | null;
  ticketType: TicketType;
  openedDay: number | null;
  readyDay: number | null;
  closedDay: number;
  meterHours: number | null;
  /** Last reading of the old meter, where this visit replaced it and somebody wrote it down. */
  oldMeterHours?: number | null;
  engineSerial?: string | null;
  complaint?: string | null;
  cause?: string | null;
  correction?: string | null;
  notes?: string | null;
  technicianIds?: readonly string[];
};

export type WorkDone = 'adjusted' | 'cleaned' | 'repaired' | 'tightened' | 'tested_good' | 'nothing_found';

/** A line of a repair. A kit is one line of its causal component. */
export type RecordLine = {
  repairId: string;
  kind: 'part' | 'labor' | 'work' | 'fee' | 'note';
  componentId: string | null;
  partId: string | null;
  partMaker?: string | null;
  reason: LineReason | null;
  workDone: WorkDone | null;
  /** `null` is one; negative lines are returns and cores, and fit nothing. */
  quantity: number | null;
};

export type RecordComponent = {
  id: string;
  name: string;
  /** `null` is *unassigned*, which is no system. */
  systemId: string | null;
  /** It is the engine, or a complete replacement of it: fitting it starts the engine's components anew. */
  isEngine?: boolean;
  /** It belongs to the engine and leaves the machine with it. */
  isOfEngine?: boolean;
};

/** The day that the work was done: ready, else closed. */
export function workDay(repair: Pick<RecordRepair, 'readyDay' | 'closedDay'>): number {
  return repair.readyDay ?? repair.closedDay;
}

/** The day that the machine came in: opened, else (where the record does not say) the day of the work. */
export function openingDay(repair: Pick<RecordRepair, 'openedDay' | 'readyDay' | 'closedDay'>): number {
  return repair.openedDay ?? workDay(repair);
}

/** Order of a unit's visits: as they came in, then as they were done, then by id so that no two orders exist. */
export function byVisit(a: RecordRepair, b: RecordRepair): number {
  return openingDay(a) - openingDay(b) || workDay(a) - workDay(b) || (a.id < b.id ? -1 : Number(a.id > b.id));
}

/** Whether a line put a new part into the machine. */
export function fitsPart(line: RecordLine): boolean {
  return line.kind === 'part' && (line.quantity ?? 1) > 0;
}

/** Rows by a key, in the order in which they came. */
export function groupRows<Row>(rows: readonly Row[], keyOf: (row: Row) => string | null): Map<string, Row[]> {
  const groups = new Map<string, Row[]>();
  for (const row of rows) {
    const key = keyOf(row);
    if (key === null) continue;
    const group = groups.get(key);
    if (group) group.push(row);
    else groups.set(key, [row]);
  }
  return groups;
}
