import type { Field } from './staging';

/** What a repair states of itself and its machine, each with its database type and whether matching folds it. */
const REPAIR = [
  ['location', 'text'],
  ['repair_number', 'text'],
  ['ticket_type', 'text'],
  ['opened_on', 'date'],
  ['ready_on', 'date'],
  ['closed_on', 'date'],
  ['picked_up_on', 'date'],
  ['unit_serial', 'text'],
  ['unit_ref', 'text'],
  ['customer_ref', 'text'],
  ['customer_name', 'text'],
  ['customer_phone', 'text'],
  ['maker', 'text'],
  ['model', 'text'],
  ['product_type', 'text'],
  ['engine_maker', 'text'],
  ['engine_model', 'text'],
  ['engine_serial', 'text'],
  ['in_service_on', 'date'],
  ['use_class', 'text'],
  ['meter_hours', 'numeric(10,2)'],
  ['complaint', 'text'],
  ['cause', 'text'],
  ['correction', 'text'],
  ['notes', 'text'],
  ['technician', 'text'],
  ['pay_type', 'text'],
  ['labor_op', 'text'],
  ['labor_hours', 'numeric(12,2)'],
  ['labor_amount', 'bigint'],
] as const satisfies readonly Field[];

const LINE = [
  ['line_kind', 'text'],
  ['part_number', 'text'],
  ['part_maker', 'text'],
  ['part_description', 'text'],
  ['supplier', 'text'],
  ['component', 'text'],
  ['line_reason', 'text'],
  ['work_done', 'text'],
  ['quantity', 'numeric(12,3)'],
  ['part_amount', 'integer'],
  ['part_cost', 'integer'],
  ['labor_op', 'text'],
  ['labor_hours', 'numeric(8,2)'],
  ['labor_amount', 'integer'],
  ['line_technician', 'text'],
  ['line_pay_type', 'text'],
] as const satisfies readonly Field[];

export type RepairField = (typeof REPAIR)[number][0];
export type LineField = (typeof LINE)[number][0];
export const REPAIR_FIELDS: readonly RepairField[] = REPAIR.map(([name]) => name);
export const LINE_FIELDS: readonly LineField[] = LINE.map(([name]) => name);
export const LABOR_FIELDS: readonly RepairField[] = ['labor_op', 'labor_hours', 'labor_amount'];
/** A row is a line where one of these says something; labor alone belongs to the repair. */
export const LINE_MAKING: readonly LineField[] = [
  'line_kind',
  'part_number',
  'part_description',
  'component',
  'line_reason',
  'work_done',
  'quantity',
  'part_amount',
  'part_cost',
];

export type RepairValues = Partial<Record<RepairField, string | null>>;
export type LineValues = Partial<Record<LineField, string | null>>;

/** Which fields the record brings, as bits: those that it does not bring stay as they are. */
export const bitOf = (field: RepairField): number => 1 << REPAIR_FIELDS.indexOf(field);
export const bitsOf = (fields: Iterable<RepairField>): number =>
  [...fields].reduce((bits, field) => bits | bitOf(field), 0);
/** SQL: whether the staged repair `s` brings a field. */
export const brings = (field: RepairField): string => `(s.given & ${bitOf(field)}) <> 0`;

export const STAGED_REPAIRS: readonly Field[] = [
  ['ordinal', 'integer'],
  ['head', 'integer'],
  ['first_row', 'integer'],
  ['last_row', 'integer'],
  ['given', 'integer'],
  ['has_lines', 'boolean'],
  ...REPAIR,
  ['location_key', 'text'],
  ['number_key', 'text'],
  ['serial_key', 'text'],
  ['ref_key', 'text'],
  ['customer_key', 'text'],
  ['maker_key', 'text'],
  ['model_key', 'text'],
];

export const STAGED_LINES: readonly Field[] = [
  ['ordinal', 'integer'],
  ['row', 'integer'],
  ...LINE,
  ['part_key', 'text'],
  ['part_maker_key', 'text'],
  ['component_key', 'text'],
];

/** `row` counts data rows from 1; a fault without one is of the whole record. */
export const STAGED_FAULTS: readonly Field[] = [
  ['ordinal', 'integer'],
  ['row', 'integer'],
  ['column_name', 'text'],
  ['value', 'text'],
  ['message', 'text'],
  ['mend', 'text'],
];
