import { sql } from 'drizzle-orm';
import {
  check,
  foreignKey,
  index,
  integer,
  pgTable,
  primaryKey,
  text,
  unique,
  uuid,
} from 'drizzle-orm/pg-core';
import { createdAt, instant, tenantKey } from './columns';
import { users } from './people';
import { shops } from './shops';

/** What a part is, whichever number it bears. `kind` is the shop's confirmed choice and decides unknown reasons. */
export const components = pgTable(
  'components',
  {
    ...tenantKey(),
    name: text('name').notNull(),
    nameKey: text('name_key').notNull(),
    system: text('system').notNull().default('unassigned'),
    kind: text('kind').notNull().default('unset'),
    changedByImportId: uuid('changed_by_import_id'),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('components_name').on(t.shopId, t.nameKey),
    foreignKey({ columns: [t.shopId], foreignColumns: [shops.id] }).onDelete('cascade'),
    check('components_kind', sql`${t.kind} IN ('unset', 'service_item', 'only_when_bad', 'depends')`),
  ],
);

export const parts = pgTable(
  'parts',
  {
    ...tenantKey(),
    maker: text('maker').notNull(),
    makerKey: text('maker_key').notNull(),
    number: text('number').notNull(),
    numberKey: text('number_key').notNull(),
    description: text('description'),
    supplier: text('supplier'),
    componentId: uuid('component_id'),
    supersededByPartId: uuid('superseded_by_part_id'),
    fitmentNote: text('fitment_note'),
    listPriceCents: integer('list_price_cents'),
    warrantyDays: integer('warranty_days'),
    changedByImportId: uuid('changed_by_import_id'),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('parts_number').on(t.shopId, t.makerKey, t.numberKey),
    index('parts_by_number').on(t.shopId, t.numberKey),
    index('parts_component').on(t.shopId, t.componentId),
    index('parts_superseded_by').on(t.shopId, t.supersededByPartId),
    foreignKey({ columns: [t.shopId], foreignColumns: [shops.id] }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.componentId],
      foreignColumns: [components.shopId, components.id],
      name: 'parts_component_fk',
    }).onDelete('no action'),
    foreignKey({
      columns: [t.shopId, t.supersededByPartId],
      foreignColumns: [t.shopId, t.id],
      name: 'parts_superseded_by_fk',
    }).onDelete('no action'),
    check('parts_superseded_by_other', sql`${t.supersededByPartId} <> ${t.id}`),
    check('parts_warranty_days', sql`${t.warrantyDays} >= 0`),
  ],
);

/** The shop's own table from part numbers, descriptions and phrases to components and reasons; each entry by a person. */
export const dictionaryEntries = pgTable(
  'dictionary_entries',
  {
    ...tenantKey(),
    matches: text('matches').notNull(),
    text: text('text').notNull(),
    textKey: text('text_key').notNull(),
    componentId: uuid('component_id'),
    reason: text('reason'),
    confirmedByUserId: uuid('confirmed_by_user_id').notNull(),
    confirmedAt: instant('confirmed_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('dictionary_entries_text').on(t.shopId, t.matches, t.textKey),
    index('dictionary_entries_component').on(t.shopId, t.componentId),
    index('dictionary_entries_confirmed_by').on(t.confirmedByUserId),
    foreignKey({ columns: [t.shopId], foreignColumns: [shops.id] }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.componentId],
      foreignColumns: [components.shopId, components.id],
      name: 'dictionary_entries_component_fk',
    }).onDelete('no action'),
    foreignKey({ columns: [t.confirmedByUserId], foreignColumns: [users.id] }).onDelete('no action'),
    check('dictionary_entries_matches', sql`${t.matches} IN ('part_number', 'description', 'phrase')`),
    check(
      'dictionary_entries_reason',
      sql`${t.reason} IN ('failed', 'maintenance', 'preventive', 'damage', 'upgrade')`,
    ),
  ],
);
