import { IMPORT, SHOP } from './shop-transaction';

/** Tables that an import writes to and can be undone in, children before those they refer to. */
export const NOTED_TABLES = [
  'repairs',
  'unit_engines',
  'units',
  'parts',
  'components',
  'models',
  'customers',
  'technicians',
  'locations',
] as const;
export type NotedTable = (typeof NOTED_TABLES)[number];

/** SQL: inserts rows and notes them as made by this import. `insert` is an INSERT without RETURNING. */
export const insertNoted = (table: NotedTable, insert: string): string => `
  WITH made AS (${insert} RETURNING id)
  INSERT INTO import_changes (shop_id, import_id, table_name, row_id)
  SELECT ${SHOP}, ${IMPORT}, '${table}', id FROM made`;

/**
 * SQL: changes rows and keeps how they were before. `wanted` selects `id` and the new values, only of rows that differ;
 * the first before-image of an import stays.
 */
export const updateNoted = (table: NotedTable, wanted: string, set: readonly string[]): string => `
  WITH wanted AS MATERIALIZED (${wanted}),
  noted AS (
    INSERT INTO import_changes (shop_id, import_id, table_name, row_id, before)
    SELECT ${SHOP}, ${IMPORT}, '${table}', o.id, to_jsonb(o) FROM ${table} o JOIN wanted ON wanted.id = o.id WHERE o.shop_id = ${SHOP}
    ON CONFLICT DO NOTHING
  )
  UPDATE ${table} o SET ${set.map((name) => `${name} = wanted.${name}`).join(', ')}${
    HAS_MARK.has(table) ? `, changed_by_import_id = ${IMPORT}` : ''
  }
  FROM wanted WHERE o.shop_id = ${SHOP} AND o.id = wanted.id`;

/** Tables whose rows say which import changed them last; a person's change clears it. */
export const HAS_MARK: ReadonlySet<string> = new Set([
  'repairs',
  'units',
  'parts',
  'components',
  'models',
  'customers',
]);

/** SQL: the spelling that matching uses, as `foldText` makes it. */
export const folded = (expression: string): string =>
  `lower(regexp_replace(btrim(${expression}), '\\s+', ' ', 'g'))`;
