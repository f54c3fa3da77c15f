import { sql } from 'drizzle-orm';
import { check, foreignKey, integer, pgTable, primaryKey, text, unique, uuid } from 'drizzle-orm/pg-core';
import { createdAt, meterHours, tenantKey } from './columns';

/** A shop and its settings. A row is visible to the service only while it is the shop of the transaction. */
export const shops = pgTable(
  'shops',
  {
    id: uuid('id').primaryKey().defaultRandom(),
    name: text('name').notNull().unique(),
    timeZone: text('time_zone').notNull().default('America/New_York'),
    locale: text('locale').notNull().default('en-US'),
    currency: text('currency').notNull().default('USD'),
    lengthUnit: text('length_unit').notNull().default('in'),
    temperatureUnit: text('temperature_unit').notNull().default('degF'),
    windowDays: integer('window_days').notNull().default(90),
    windowHours: meterHours('window_hours'),
    doorRateCents: integer('door_rate_cents').notNull().default(9500),
    createdAt: createdAt(),
  },
  (t) => [
    check('shops_window_days', sql`${t.windowDays} BETWEEN 1 AND 730`),
    check('shops_window_hours', sql`${t.windowHours} > 0`),
    check('shops_door_rate', sql`${t.doorRateCents} >= 0`),
    check('shops_length_unit', sql`${t.lengthUnit} IN ('in', 'mm')`),
    check('shops_temperature_unit', sql`${t.temperatureUnit} IN ('degF', 'Cel')`),
  ],
);

export const locations = pgTable(
  'locations',
  { ...tenantKey(), name: text('name').notNull(), nameKey: text('name_key').notNull() },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('locations_name').on(t.shopId, t.nameKey),
    foreignKey({ columns: [t.shopId], foreignColumns: [shops.id] }).onDelete('cascade'),
  ],
);
