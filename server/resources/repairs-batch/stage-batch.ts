import { batchRepair, type BatchRepair } from '../../../shared/imports';
import { foldText } from '../../db/fold';
import type { FieldError } from '../../http/errors';
import { fieldErrors } from '../../http/problem';
import { checkDay, LONGEST, parseText, type Fault } from '../../imports/parse-cell';
import {
  bitOf,
  type LineField,
  type LineValues,
  type RepairField,
  type RepairValues,
} from '../../imports/repair-fields';
import type { RepairStager } from '../../imports/stage-repairs';

type Pointed<Field extends string> = readonly [pointer: string, field: Field];
type Line = NonNullable<BatchRepair['lines']>[number];
type Value = string | number | null | undefined;

/** Where each field of a repair stands in the JSON, and its column. */
const REPAIR_POINTERS: readonly Pointed<RepairField>[] = [
  ['location', 'location'],
  ['repairNumber', 'repair_number'],
  ['ticketType', 'ticket_type'],
  ['openedOn', 'opened_on'],
  ['readyOn', 'ready_on'],
  ['closedOn', 'closed_on'],
  ['pickedUpOn', 'picked_up_on'],
  ['unit/serial', 'unit_serial'],
  ['unit/ref', 'unit_ref'],
  ['unit/maker', 'maker'],
  ['unit/model', 'model'],
  ['unit/productType', 'product_type'],
  ['unit/engineMaker', 'engine_maker'],
  ['unit/engineModel', 'engine_model'],
  ['unit/engineSerial', 'engine_serial'],
  ['unit/inServiceOn', 'in_service_on'],
  ['unit/useClass', 'use_class'],
  ['customerRef', 'customer_ref'],
  ['customerName', 'customer_name'],
  ['customerPhone', 'customer_phone'],
  ['meterHours', 'meter_hours'],
  ['complaint', 'complaint'],
  ['cause', 'cause'],
  ['correction', 'correction'],
  ['notes', 'notes'],
  ['technician', 'technician'],
  ['payType', 'pay_type'],
  ['laborOp', 'labor_op'],
  ['laborHours', 'labor_hours'],
  ['laborAmountCents', 'labor_amount'],
];
const LINE_POINTERS: readonly (readonly [keyof Line, LineField])[] = [
  ['kind', 'line_kind'],
  ['partNumber', 'part_number'],
  ['partMaker', 'part_maker'],
  ['partDescription', 'part_description'],
  ['supplier', 'supplier'],
  ['component', 'component'],
  ['reason', 'line_reason'],
  ['workDone', 'work_done'],
  ['quantity', 'quantity'],
  ['amountCents', 'part_amount'],
  ['costCents', 'part_cost'],
  ['laborOp', 'labor_op'],
  ['laborHours', 'labor_hours'],
  ['laborAmountCents', 'labor_amount'],
  ['technician', 'line_technician'],
  ['payType', 'line_pay_type'],
];
export const LINE_FIELDS_OF_BATCH = LINE_POINTERS.map(([, field]) => field);
const DAYS: ReadonlySet<string> = new Set([
  'opened_on',
  'ready_on',
  'closed_on',
  'picked_up_on',
  'in_service_on',
]);

/** The JSON Pointer of a column's value in the batch. */
export function pointerTo(index: number, column: string | null): string {
  const pointer = REPAIR_POINTERS.find(([, field]) => field === column)?.[0];
  return pointer ? `/repairs/${index}/${pointer}` : `/repairs/${index}`;
}

/** Stages the repairs of a batch, each judged on its own; answers the errors of those that are not of the right shape. */
export function stageBatch(
  repairs: readonly unknown[],
  stager: RepairStager,
  lastDay: string,
): Map<number, FieldError[]> {
  const misshapen = new Map<number, FieldError[]>();
  const seen = new Set<string>();
  repairs.forEach((sent, index) => {
    const parsed = batchRepair.safeParse(sent);
    if (parsed.success) stageOne(parsed.data, index, { stager, lastDay, seen });
    else {
      misshapen.set(
        index,
        fieldErrors(parsed.error).map(({ path, message }) => ({ path: `/repairs/${index}${path}`, message })),
      );
    }
  });
  return misshapen;
}

type Context = { stager: RepairStager; lastDay: string; seen: Set<string> };

function stageOne(repair: BatchRepair, index: number, { stager, lastDay, seen }: Context): void {
  const row = index + 1;
  const values: RepairValues = {};
  const faults: Fault[] = [];
  let given = 0;
  for (const [pointer, field] of REPAIR_POINTERS) {
    const value = valueAt(repair, pointer);
    if (value === undefined) continue;
    given |= bitOf(field);
    values[field] = clean(value, field, lastDay, faults);
  }
  const brought = { given, hasLines: repair.lines !== undefined };
  stager.add({ row, repair: values, line: undefined, faults }, brought);
  for (const line of repair.lines ?? []) stageLine(line, { values, row, stager, brought });
  const key = `${foldText(repair.location ?? '')}\u001f${foldText(repair.repairNumber)}`;
  if (seen.has(key)) stager.refuseRepeated(row);
  seen.add(key);
  stager.close();
}

function stageLine(
  line: Line,
  {
    values,
    row,
    stager,
    brought,
  }: {
    values: RepairValues;
    row: number;
    stager: RepairStager;
    brought: { given: number; hasLines: boolean };
  },
): void {
  const faults: Fault[] = [];
  const fields: LineValues = {};
  for (const [name, field] of LINE_POINTERS) fields[field] = clean(line[name], field, '', faults);
  const { labor_op = null, labor_hours = null, labor_amount = null } = fields;
  const { location = null, repair_number = null } = values;
  stager.add(
    { row, repair: { location, repair_number, labor_op, labor_hours, labor_amount }, line: fields, faults },
    brought,
  );
}

function valueAt(repair: BatchRepair, pointer: string): Value {
  const [first = '', second] = pointer.split('/');
  const holder: Record<string, unknown> = second === undefined ? repair : (repair.unit ?? {});
  return holder[second ?? first] as Value;
}

function clean(
  value: Value,
  field: RepairField | LineField,
  lastDay: string,
  faults: Fault[],
): string | null {
  if (value === null || value === undefined) return null;
  if (typeof value === 'number') return String(value);
  const parsed = DAYS.has(field) ? checkDay(value, lastDay) : parseText(value, LONGEST.longText ?? Infinity);
  if (!('fault' in parsed)) return parsed.value;
  faults.push({ column: field, value, ...parsed.fault });
  return null;
}
