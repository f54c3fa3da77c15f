import { dayOf } from '../../../server/demo/calendar';
import type { RepairRow } from '../../../server/demo/native-rows';

export interface Ticket {
  key: string;
  rows: RepairRow[];
  first: RepairRow;
  unit: string;
  openedDay: number;
  doneDay: number;
  isService: boolean;
}

export const ticketKey = (location: string, repairNumber: string): string => `${location}/${repairNumber}`;

function ticketOf(key: string, rows: RepairRow[]): Ticket {
  const [first] = rows;
  if (!first) throw new Error('a ticket has at least one row');
  const mark = first.unit_serial || first.unit_ref;
  return {
    key,
    rows,
    first,
    unit: mark && `${first.maker}/${mark}`,
    openedDay: dayOf(first.opened_on),
    doneDay: dayOf(first.ready_on),
    isService: rows.some((row) => row.labor_op === 'SVC-10'),
  };
}

function groupBy<Item>(items: readonly Item[], keyOf: (item: Item) => string): Map<string, Item[]> {
  const groups = new Map<string, Item[]>();
  for (const item of items) {
    const group = groups.get(keyOf(item));
    if (group) group.push(item);
    else groups.set(keyOf(item), [item]);
  }
  return groups;
}

export function ticketsOf(rows: readonly RepairRow[]): Ticket[] {
  const byKey = groupBy(rows, (row) => ticketKey(row.location, row.repair_number));
  return [...byKey].map(([key, group]) => ticketOf(key, group));
}

/** The repairs of each identified machine, in order of opening. */
export function byMachine(tickets: readonly Ticket[]): Ticket[][] {
  const known = tickets.filter((ticket) => ticket.unit !== '' && ticket.first.ticket_type === 'repair');
  const groups = [...groupBy(known, (ticket) => ticket.unit).values()];
  return groups.map((group) => group.sort((a, b) => a.openedDay - b.openedDay));
}

export const broke = (ticket: Ticket, component: string): boolean =>
  ticket.rows.some(
    (row) => row.component === component && (row.line_reason === 'failed' || row.line_reason === 'damage'),
  );
