import { dateOf } from './calendar';
import { centsText, costCents, doorRateCents, priceThenCents } from './money';
import { repairRow } from './native-rows';
import type { RepairRow } from './native-rows';
import { spellingOf } from './people';
import type { Random } from './random';
import { writtenHours, writtenReason } from './recording';
import type { PlannedLine, Visit } from './visits';
import type { World } from './world';

export interface Numbered {
  visit: Visit;
  repairNumber: string;
}

const FIRST_NUMBER = { 'Mill Street': 20417, 'Route 9': 50112 } as const;

/** Repair numbers run by the day on which the machine came in, in one row per location. */
export function numberVisits(visits: readonly Visit[]): Numbered[] {
  const next: Record<Visit['location'], number> = { ...FIRST_NUMBER };
  return [...visits]
    .sort((a, b) => a.openedDay - b.openedDay || a.unit.index - b.unit.index)
    .map((visit) => {
      const repairNumber = String(next[visit.location]);
      next[visit.location] += 1;
      return { visit, repairNumber };
    });
}

function repairFields({ visit, repairNumber }: Numbered, world: World, random: Random): RepairRow {
  const { unit, words } = visit;
  const { model, customer } = unit;
  const spelling = spellingOf(visit.technician, random);
  return repairRow({
    location: visit.location,
    repair_number: repairNumber,
    ticket_type: visit.ticketType,
    opened_on: dateOf(visit.openedDay),
    ready_on: dateOf(visit.readyDay),
    closed_on: dateOf(visit.closedDay),
    picked_up_on: visit.pickedUpDay <= world.asOfDay ? dateOf(visit.pickedUpDay) : '',
    unit_serial: unit.serial,
    unit_ref: unit.ref,
    customer_ref: customer.ref,
    customer_name: customer.name,
    customer_phone: customer.phone,
    maker: model.maker,
    model: model.model,
    product_type: model.productType,
    engine_maker: model.engineMaker,
    engine_model: model.engineModel,
    engine_serial: unit.engineSerial,
    in_service_on: unit.inRegister ? dateOf(unit.inServiceDay) : '',
    use_class: unit.useClass,
    meter_hours: writtenHours(random, visit.meterHours),
    complaint: words.complaint,
    cause: words.cause,
    correction: words.correction,
    notes: words.notes,
    technician: spelling,
    pay_type: visit.payType,
  });
}

function lineFields(line: PlannedLine, yearsAgo: number, random: Random): Partial<RepairRow> {
  if (line.kind === 'note') return { line_kind: 'note', part_description: line.text };
  if (line.kind === 'work') return { line_kind: 'work', component: line.component, work_done: line.work };
  const { part, reason } = line;
  const amountCents = priceThenCents(part.listCents, yearsAgo) * part.component.quantity;
  return {
    line_kind: 'part',
    part_number: part.number,
    part_maker: part.maker,
    part_description: part.isKit ? part.description : random.pick(part.component.descriptions),
    supplier: part.supplier,
    component: part.component.name,
    line_reason: writtenReason(random, reason),
    quantity: String(part.component.quantity),
    part_amount: centsText(amountCents),
    part_cost: centsText(costCents(amountCents)),
  };
}

function laborFields(visit: Visit, yearsAgo: number): Partial<RepairRow> {
  const tenths = Math.max(
    3,
    Math.round(visit.lines.reduce((sum, { laborHours }) => sum + laborHours, 0) * 10),
  );
  return {
    line_kind: 'labor',
    labor_op: visit.laborOp,
    labor_hours: (tenths / 10).toFixed(1),
    labor_amount: centsText(Math.round((tenths * doorRateCents(yearsAgo)) / 10)),
  };
}

/** One row for each line of the repair, labor last. */
export function repairRows(numbered: Numbered, world: World, random: Random): RepairRow[] {
  const { visit } = numbered;
  const repair = repairFields(numbered, world, random);
  const yearsAgo = world.yearsAgo(visit.closedDay);
  const lines = visit.lines.map((line) => ({ ...repair, ...lineFields(line, yearsAgo, random) }));
  return [...lines, { ...repair, ...laborFields(visit, yearsAgo) }];
}
