import { sql } from 'drizzle-orm';
import {
  boolean,
  check,
  date,
  foreignKey,
  index,
  pgTable,
  primaryKey,
  text,
  unique,
  uuid,
} from 'drizzle-orm/pg-core';
import { createdAt, meterHours, tenantKey } from './columns';
import { shops } from './shops';

/** Maker + model code; `*_key` columns hold the folded spelling that matching uses, the others the first one seen. */
export const models = pgTable(
  'models',
  {
    ...tenantKey(),
    maker: text('maker').notNull(),
    makerKey: text('maker_key').notNull(),
    model: text('model').notNull(),
    modelKey: text('model_key').notNull(),
    productType: text('product_type'),
    changedByImportId: uuid('changed_by_import_id'),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('models_name').on(t.shopId, t.makerKey, t.modelKey),
    foreignKey({ columns: [t.shopId], foreignColumns: [shops.id] }).onDelete('cascade'),
    check(
      'models_product_type',
      sql`${t.productType} IN ('lawn_tractor', 'zero_turn', 'walk_behind', 'handheld', 'snow', 'utility', 'other')`,
    ),
  ],
);

/** Models that the shop says share a deck, an engine or a clutch. */
export const families = pgTable(
  'families',
  {
    ...tenantKey(),
    name: text('name').notNull(),
    nameKey: text('name_key').notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('families_name').on(t.shopId, t.nameKey),
    foreignKey({ columns: [t.shopId], foreignColumns: [shops.id] }).onDelete('cascade'),
  ],
);

export const familyModels = pgTable(
  'family_models',
  {
    shopId: uuid('shop_id').notNull(),
    familyId: uuid('family_id').notNull(),
    modelId: uuid('model_id').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.familyId, t.modelId] }),
    index('family_models_model').on(t.shopId, t.modelId),
    foreignKey({
      columns: [t.shopId, t.familyId],
      foreignColumns: [families.shopId, families.id],
      name: 'family_models_family_fk',
    }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.modelId],
      foreignColumns: [models.shopId, models.id],
      name: 'family_models_model_fk',
    }).onDelete('cascade'),
  ],
);

export const customers = pgTable(
  'customers',
  {
    ...tenantKey(),
    ref: text('ref').notNull(),
    refKey: text('ref_key').notNull(),
    name: text('name'),
    phone: text('phone'),
    changedByImportId: uuid('changed_by_import_id'),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('customers_ref').on(t.shopId, t.refKey),
    foreignKey({ columns: [t.shopId], foreignColumns: [shops.id] }).onDelete('cascade'),
  ],
);

/**
 * One machine. `identity` says on which rung of the ladder it stands: its serial, the shop's own tag, or
 * a customer and model that a person confirmed to be one machine.
 */
export const units = pgTable(
  'units',
  {
    ...tenantKey(),
    identity: text('identity').notNull(),
    serial: text('serial'),
    serialKey: text('serial_key'),
    makerKey: text('maker_key').notNull().default(''),
    unitRef: text('unit_ref'),
    unitRefKey: text('unit_ref_key'),
    modelId: uuid('model_id'),
    customerId: uuid('customer_id'),
    inServiceOn: date('in_service_on', { mode: 'string' }),
    useClass: text('use_class'),
    /** From this day on the shop would have seen its repairs; absent where only repairs made it known. */
    knownFromOn: date('known_from_on', { mode: 'string' }),
    isRegistered: boolean('is_registered').notNull().default(false),
    registerMeterHours: meterHours('register_meter_hours'),
    registerReadOn: date('register_read_on', { mode: 'string' }),
    changedByImportId: uuid('changed_by_import_id'),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('units_serial').on(t.shopId, t.serialKey, t.makerKey),
    index('units_ref').on(t.shopId, t.unitRefKey),
    index('units_model').on(t.shopId, t.modelId),
    index('units_customer').on(t.shopId, t.customerId),
    foreignKey({ columns: [t.shopId], foreignColumns: [shops.id] }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.modelId],
      foreignColumns: [models.shopId, models.id],
      name: 'units_model_fk',
    }).onDelete('no action'),
    foreignKey({
      columns: [t.shopId, t.customerId],
      foreignColumns: [customers.shopId, customers.id],
      name: 'units_customer_fk',
    }).onDelete('no action'),
    check('units_identity', sql`${t.identity} IN ('serial', 'tag', 'customer_model')`),
    check('units_use_class', sql`${t.useClass} IN ('homeowner', 'commercial', 'rental', 'municipal')`),
    check(
      'units_named',
      sql`(${t.identity} <> 'serial' OR ${t.serialKey} IS NOT NULL) AND (${t.identity} <> 'tag' OR ${t.unitRefKey} IS NOT NULL)`,
    ),
  ],
);

/** Engines a machine has carried, each from the day it was first seen; a later one was swapped in. */
export const unitEngines = pgTable(
  'unit_engines',
  {
    ...tenantKey(),
    unitId: uuid('unit_id').notNull(),
    maker: text('maker'),
    model: text('model'),
    serial: text('serial'),
    engineKey: text('engine_key').notNull(),
    seenFromOn: date('seen_from_on', { mode: 'string' }),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('unit_engines_engine').on(t.shopId, t.unitId, t.engineKey),
    foreignKey({
      columns: [t.shopId, t.unitId],
      foreignColumns: [units.shopId, units.id],
      name: 'unit_engines_unit_fk',
    }).onDelete('cascade'),
  ],
);
