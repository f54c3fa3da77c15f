/** The columns of the native files, in the order in which they are written. */
export const REPAIR_COLUMNS = [
  'location',
  'repair_number',
  'ticket_type',
  'opened_on',
  'ready_on',
  'closed_on',
  'picked_up_on',
  'unit_serial',
  'unit_ref',
  'customer_ref',
  'customer_name',
  'customer_phone',
  'maker',
  'model',
  'product_type',
  'engine_maker',
  'engine_model',
  'engine_serial',
  'in_service_on',
  'use_class',
  'meter_hours',
  'complaint',
  'cause',
  'correction',
  'notes',
  'technician',
  'line_kind',
  'part_number',
  'part_maker',
  'part_description',
  'supplier',
  'component',
  'line_reason',
  'work_done',
  'quantity',
  'part_amount',
  'part_cost',
  'labor_op',
  'labor_hours',
  'labor_amount',
  'line_technician',
  'line_pay_type',
  'pay_type',
] as const;

export const UNIT_COLUMNS = [
  'unit_serial',
  'unit_ref',
  'maker',
  'model',
  'product_type',
  'in_service_on',
  'use_class',
  'meter_hours',
  'meter_read_on',
  'known_from_on',
] as const;

export const PART_COLUMNS = [
  'part_number',
  'maker',
  'supplier',
  'description',
  'component',
  'system',
  'superseded_by',
  'fitment_note',
  'list_price',
  'warranty_days',
] as const;

export type RepairRow = Record<(typeof REPAIR_COLUMNS)[number], string>;
export type UnitRow = Record<(typeof UNIT_COLUMNS)[number], string>;
export type PartRow = Record<(typeof PART_COLUMNS)[number], string>;

const blank = Object.fromEntries(REPAIR_COLUMNS.map((column) => [column, ''])) as RepairRow;

export const repairRow = (values: Partial<RepairRow>): RepairRow => ({ ...blank, ...values });
