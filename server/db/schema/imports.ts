import { sql } from 'drizzle-orm';
import {
  bigserial,
  boolean,
  check,
  foreignKey,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  unique,
  uuid,
} from 'drizzle-orm/pg-core';
import { createdAt, instant, tenantKey } from './columns';
import { analysisRuns } from './derived';
import { users } from './people';
import { shops } from './shops';

/** A file or batch that came in, how far it got, and what it did. */
export const imports = pgTable(
  'imports',
  {
    ...tenantKey(),
    kind: text('kind').notNull(),
    source: text('source').notNull(),
    fileName: text('file_name'),
    spoolPath: text('spool_path'),
    mapping: jsonb('mapping'),
    /** How the file was read: its headers, delimiter, decimal mark, encoding and date format. */
    layout: jsonb('layout'),
    isDryRun: boolean('is_dry_run').notNull().default(false),
    status: text('status').notNull().default('queued'),
    analysisRunId: uuid('analysis_run_id'),
    rowsRead: integer('rows_read').notNull().default(0),
    rowsTotal: integer('rows_total'),
    createdCount: integer('created_count').notNull().default(0),
    updatedCount: integer('updated_count').notNull().default(0),
    unchangedCount: integer('unchanged_count').notNull().default(0),
    rejectedCount: integer('rejected_count').notNull().default(0),
    /** What the import noticed besides counts: headers not used, meter faults, machines not identified. */
    remarks: jsonb('remarks'),
    error: text('error'),
    startedByUserId: uuid('started_by_user_id'),
    createdAt: createdAt(),
    startedAt: instant('started_at'),
    finishedAt: instant('finished_at'),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    index('imports_created').on(t.shopId, t.createdAt, t.id),
    index('imports_analysis_run').on(t.shopId, t.analysisRunId),
    index('imports_started_by').on(t.startedByUserId),
    foreignKey({ columns: [t.shopId], foreignColumns: [shops.id] }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.analysisRunId],
      foreignColumns: [analysisRuns.shopId, analysisRuns.id],
      name: 'imports_analysis_run_fk',
    }).onDelete('no action'),
    foreignKey({ columns: [t.startedByUserId], foreignColumns: [users.id] }).onDelete('no action'),
    check('imports_kind', sql`${t.kind} IN ('repairs', 'units', 'parts')`),
    check('imports_source', sql`${t.source} IN ('file', 'batch', 'shell')`),
    check('imports_status', sql`${t.status} IN ('queued', 'running', 'done', 'failed', 'undone')`),
  ],
);

/** A row of the file that did not go in, as it stood, with what is wrong and how to mend it. */
export const importRejections = pgTable(
  'import_rejections',
  {
    shopId: uuid('shop_id').notNull(),
    importId: uuid('import_id').notNull(),
    ordinal: bigserial('ordinal', { mode: 'number' }).notNull(),
    line: integer('line').notNull(),
    repairNumber: text('repair_number'),
    cells: jsonb('cells').notNull(),
    errors: jsonb('errors').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.importId, t.ordinal] }),
    foreignKey({
      columns: [t.shopId, t.importId],
      foreignColumns: [imports.shopId, imports.id],
      name: 'import_rejections_import_fk',
    }).onDelete('cascade'),
  ],
);

/** The before-image of every row that an import created (null) or changed, so that it can be undone. */
export const importChanges = pgTable(
  'import_changes',
  {
    shopId: uuid('shop_id').notNull(),
    importId: uuid('import_id').notNull(),
    tableName: text('table_name').notNull(),
    rowId: uuid('row_id').notNull(),
    before: jsonb('before'),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.importId, t.tableName, t.rowId] }),
    foreignKey({
      columns: [t.shopId, t.importId],
      foreignColumns: [imports.shopId, imports.id],
      name: 'import_changes_import_fk',
    }).onDelete('cascade'),
  ],
);

/** What a person confirmed that the columns of such a file mean, found again by its header row. */
export const columnMappings = pgTable(
  'column_mappings',
  {
    ...tenantKey(),
    kind: text('kind').notNull(),
    headerKey: text('header_key').notNull(),
    mapping: jsonb('mapping').notNull(),
    confirmedByUserId: uuid('confirmed_by_user_id').notNull(),
    confirmedAt: instant('confirmed_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('column_mappings_header').on(t.shopId, t.kind, t.headerKey),
    index('column_mappings_confirmed_by').on(t.confirmedByUserId),
    foreignKey({ columns: [t.shopId], foreignColumns: [shops.id] }).onDelete('cascade'),
    foreignKey({ columns: [t.confirmedByUserId], foreignColumns: [users.id] }).onDelete('no action'),
  ],
);

/** A program's Idempotency-Key: the fingerprint of what it sent, and the answer to give again. */
export const idempotencyKeys = pgTable(
  'idempotency_keys',
  {
    shopId: uuid('shop_id').notNull(),
    key: text('key').notNull(),
    fingerprint: text('fingerprint').notNull(),
    answer: jsonb('answer'),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.key] }),
    foreignKey({ columns: [t.shopId], foreignColumns: [shops.id] }).onDelete('cascade'),
  ],
);
