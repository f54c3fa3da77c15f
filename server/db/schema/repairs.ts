import { sql } from 'drizzle-orm';
import {
  check,
  date,
  foreignKey,
  index,
  integer,
  jsonb,
  numeric,
  pgTable,
  primaryKey,
  text,
  unique,
  uuid,
} from 'drizzle-orm/pg-core';
import { createdAt, instant, meterHours, tenantKey } from './columns';
import { customers, models, units } from './machines';
import { components, parts } from './parts';
import { technicians, users } from './people';
import { locations, shops } from './shops';

/**
 * One closed repair record. Texts are kept as they came. `unit_id` is null where the machine is not identified:
 * such a repair counts as work done and stays out of rates of return.
 */
export const repairs = pgTable(
  'repairs',
  {
    ...tenantKey(),
    locationId: uuid('location_id'),
    number: text('number').notNull(),
    numberKey: text('number_key').notNull(),
    ticketType: text('ticket_type').notNull().default('repair'),
    openedOn: date('opened_on', { mode: 'string' }),
    readyOn: date('ready_on', { mode: 'string' }),
    closedOn: date('closed_on', { mode: 'string' }).notNull(),
    pickedUpOn: date('picked_up_on', { mode: 'string' }),
    /** The day the work was done: ready, else closed. */
    workOn: date('work_on', { mode: 'string' })
      .notNull()
      .generatedAlwaysAs(sql`COALESCE(ready_on, closed_on)`),
    unitId: uuid('unit_id'),
    modelId: uuid('model_id'),
    customerId: uuid('customer_id'),
    serialText: text('serial_text'),
    unitRefText: text('unit_ref_text'),
    engineMaker: text('engine_maker'),
    engineModel: text('engine_model'),
    engineSerial: text('engine_serial'),
    meterHours: meterHours('meter_hours'),
    /** Set by the analysis where the reading is not used: back, impossible_rate, placeholder, set_aside. */
    meterFault: text('meter_fault'),
    complaint: text('complaint'),
    cause: text('cause'),
    correction: text('correction'),
    notes: text('notes'),
    technicianText: text('technician_text'),
    payType: text('pay_type'),
    laborOp: text('labor_op'),
    laborHours: numeric('labor_hours', { precision: 8, scale: 2, mode: 'number' }),
    laborAmountCents: integer('labor_amount_cents'),
    version: integer('version').notNull().default(1),
    changedByImportId: uuid('changed_by_import_id'),
    createdAt: createdAt(),
    updatedAt: instant('updated_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('repairs_number').on(t.shopId, t.locationId, t.numberKey).nullsNotDistinct(),
    index('repairs_work_on').on(t.shopId, t.workOn, t.id),
    index('repairs_unit').on(t.shopId, t.unitId, t.workOn),
    index('repairs_model').on(t.shopId, t.modelId, t.workOn, t.id, t.unitId),
    index('repairs_customer').on(t.shopId, t.customerId),
    foreignKey({ columns: [t.shopId], foreignColumns: [shops.id] }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.locationId],
      foreignColumns: [locations.shopId, locations.id],
      name: 'repairs_location_fk',
    }).onDelete('no action'),
    foreignKey({
      columns: [t.shopId, t.unitId],
      foreignColumns: [units.shopId, units.id],
      name: 'repairs_unit_fk',
    }).onDelete('no action'),
    foreignKey({
      columns: [t.shopId, t.modelId],
      foreignColumns: [models.shopId, models.id],
      name: 'repairs_model_fk',
    }).onDelete('no action'),
    foreignKey({
      columns: [t.shopId, t.customerId],
      foreignColumns: [customers.shopId, customers.id],
      name: 'repairs_customer_fk',
    }).onDelete('no action'),
    check('repairs_ticket_type', sql`${t.ticketType} IN ('repair', 'setup', 'counter_sale', 'internal')`),
    check('repairs_pay_type', sql`${t.payType} IN ('customer', 'warranty', 'shop')`),
    check('repairs_meter_hours', sql`${t.meterHours} >= 0`),
  ],
);

/** An earlier state of a repair with its lines, kept when an import changed it. */
export const repairVersions = pgTable(
  'repair_versions',
  {
    shopId: uuid('shop_id').notNull(),
    repairId: uuid('repair_id').notNull(),
    version: integer('version').notNull(),
    replacedByImportId: uuid('replaced_by_import_id'),
    replacedAt: instant('replaced_at').notNull().defaultNow(),
    repair: jsonb('repair').notNull(),
    lines: jsonb('lines').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.repairId, t.version] }),
    foreignKey({
      columns: [t.shopId, t.repairId],
      foreignColumns: [repairs.shopId, repairs.id],
      name: 'repair_versions_repair_fk',
    }).onDelete('cascade'),
  ],
);

/** A line as recorded; component and reason carry where they came from, and "unknown" is a stored value. */
export const repairLines = pgTable(
  'repair_lines',
  {
    ...tenantKey(),
    repairId: uuid('repair_id').notNull(),
    position: integer('position').notNull(),
    kind: text('kind').notNull(),
    partId: uuid('part_id'),
    partNumberText: text('part_number_text'),
    partMakerText: text('part_maker_text'),
    description: text('description'),
    supplier: text('supplier'),
    /** What the record itself says, whatever was made of it since; lines are matched by it. */
    componentText: text('component_text'),
    statedReason: text('stated_reason'),
    componentId: uuid('component_id'),
    componentOrigin: text('component_origin').notNull().default('unknown'),
    reason: text('reason').notNull().default('unknown'),
    reasonOrigin: text('reason_origin').notNull().default('unknown'),
    workDone: text('work_done'),
    quantity: numeric('quantity', { precision: 12, scale: 3, mode: 'number' }),
    amountCents: integer('amount_cents'),
    costCents: integer('cost_cents'),
    laborOp: text('labor_op'),
    laborHours: numeric('labor_hours', { precision: 8, scale: 2, mode: 'number' }),
    laborAmountCents: integer('labor_amount_cents'),
    technicianText: text('technician_text'),
    payType: text('pay_type'),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    index('repair_lines_repair').on(t.shopId, t.repairId, t.position),
    index('repair_lines_component').on(t.shopId, t.componentId),
    index('repair_lines_failed')
      .on(t.shopId, t.repairId, t.componentId)
      .where(sql`${t.kind} = 'part' AND ${t.reason} = 'failed'`),
    index('repair_lines_unknown')
      .on(t.shopId, t.componentId)
      .where(sql`${t.kind} = 'part' AND ${t.reason} = 'unknown'`),
    index('repair_lines_part').on(t.shopId, t.partId),
    foreignKey({
      columns: [t.shopId, t.repairId],
      foreignColumns: [repairs.shopId, repairs.id],
      name: 'repair_lines_repair_fk',
    }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.partId],
      foreignColumns: [parts.shopId, parts.id],
      name: 'repair_lines_part_fk',
    }).onDelete('no action'),
    foreignKey({
      columns: [t.shopId, t.componentId],
      foreignColumns: [components.shopId, components.id],
      name: 'repair_lines_component_fk',
    }).onDelete('no action'),
    check('repair_lines_kind', sql`${t.kind} IN ('part', 'labor', 'work', 'fee', 'note')`),
    check(
      'repair_lines_component_origin',
      sql`${t.componentOrigin} IN ('file', 'catalogue', 'dictionary', 'rule', 'person', 'unknown')`,
    ),
    check(
      'repair_lines_reason_origin',
      sql`${t.reasonOrigin} IN ('file', 'dictionary', 'rule', 'person', 'unknown')`,
    ),
    check(
      'repair_lines_reason',
      sql`${t.reason} IN ('failed', 'maintenance', 'preventive', 'damage', 'upgrade', 'unknown')`,
    ),
    check(
      'repair_lines_work_done',
      sql`${t.workDone} IN ('adjusted', 'cleaned', 'repaired', 'tightened', 'tested_good', 'nothing_found')`,
    ),
    check('repair_lines_pay_type', sql`${t.payType} IN ('customer', 'warranty', 'shop')`),
  ],
);

/** Who worked on a repair, from the names in the record through `technician_names`. */
export const repairTechnicians = pgTable(
  'repair_technicians',
  {
    shopId: uuid('shop_id').notNull(),
    repairId: uuid('repair_id').notNull(),
    technicianId: uuid('technician_id').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.repairId, t.technicianId] }),
    index('repair_technicians_technician').on(t.shopId, t.technicianId),
    foreignKey({
      columns: [t.shopId, t.repairId],
      foreignColumns: [repairs.shopId, repairs.id],
      name: 'repair_technicians_repair_fk',
    }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.technicianId],
      foreignColumns: [technicians.shopId, technicians.id],
      name: 'repair_technicians_technician_fk',
    }).onDelete('cascade'),
  ],
);

/** A measurement at the bench, with the limits and the instrument that were used; the value as entered and its UCUM unit. */
export const readings = pgTable(
  'readings',
  {
    ...tenantKey(),
    unitId: uuid('unit_id').notNull(),
    repairId: uuid('repair_id'),
    componentId: uuid('component_id'),
    quantity: text('quantity').notNull(),
    value: numeric('value', { precision: 12, scale: 4, mode: 'number' }).notNull(),
    unitCode: text('unit_code').notNull(),
    lowerLimit: numeric('lower_limit', { precision: 12, scale: 4, mode: 'number' }),
    upperLimit: numeric('upper_limit', { precision: 12, scale: 4, mode: 'number' }),
    limitSource: text('limit_source'),
    temperatureState: text('temperature_state'),
    instrument: text('instrument'),
    takenAt: instant('taken_at').notNull(),
    takenByUserId: uuid('taken_by_user_id').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    index('readings_unit').on(t.shopId, t.unitId),
    index('readings_repair').on(t.shopId, t.repairId),
    index('readings_component').on(t.shopId, t.componentId),
    index('readings_taken_by').on(t.takenByUserId),
    foreignKey({
      columns: [t.shopId, t.unitId],
      foreignColumns: [units.shopId, units.id],
      name: 'readings_unit_fk',
    }).onDelete('no action'),
    foreignKey({
      columns: [t.shopId, t.repairId],
      foreignColumns: [repairs.shopId, repairs.id],
      name: 'readings_repair_fk',
    }).onDelete('no action'),
    foreignKey({
      columns: [t.shopId, t.componentId],
      foreignColumns: [components.shopId, components.id],
      name: 'readings_component_fk',
    }).onDelete('no action'),
    foreignKey({ columns: [t.takenByUserId], foreignColumns: [users.id] }).onDelete('no action'),
    check(
      'readings_quantity',
      sql`${t.quantity} IN ('air_gap', 'coil_resistance', 'voltage_in', 'voltage_out', 'voltage_at_part', 'current')`,
    ),
    check('readings_temperature_state', sql`${t.temperatureState} IN ('cold', 'hot')`),
  ],
);
