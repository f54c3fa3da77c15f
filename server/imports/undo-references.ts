import type pg from 'pg';
import type { FieldError } from '../http/errors';
import type { NotedTable } from './note-changes';
import { SHOP } from './shop-transaction';

const MOST_LISTED = 50;

/** How a row of each table is called where it is listed. */
const NAMES: Record<NotedTable, { what: string; name: string }> = {
  repairs: { what: 'Repair', name: 'r.number' },
  unit_engines: { what: 'An engine', name: `coalesce(r.serial, r.model, '')` },
  units: { what: 'Machine', name: `coalesce(r.serial, r.unit_ref, '')` },
  parts: { what: 'Part', name: 'r.number' },
  components: { what: 'Component', name: 'r.name' },
  models: { what: 'Model', name: `r.maker || ' ' || r.model` },
  customers: { what: 'Customer', name: 'r.ref' },
  technicians: { what: 'Technician', name: 'r.display_name' },
  locations: { what: 'Location', name: 'r.name' },
};

/** Rows of a table that meet a condition, with what they are called. */
export async function nameRows(client: pg.PoolClient, table: NotedTable, condition: string) {
  const { what, name } = NAMES[table];
  const { rows } = await client.query<{ id: string; name: string }>(
    `SELECT r.id, ${name} AS name FROM ${table} r WHERE r.shop_id = ${SHOP} AND ${condition} LIMIT ${MOST_LISTED}`,
  );
  return rows.map((row) => ({ id: row.id, name: `${what} ${row.name}` }));
}

/**
 * Columns that refer to rows of a table and would not go with them, as the database itself knows them; and the links from
 * repairs to technicians, which would go but must not.
 */
async function referringColumns(
  client: pg.PoolClient,
  table: NotedTable,
): Promise<{ from: string; column: string }[]> {
  const { rows } = await client.query<{ from: string; column: string }>(
    `SELECT c.conrelid::regclass::text AS from, a.attname AS column
     FROM pg_constraint c JOIN pg_attribute a ON a.attrelid = c.conrelid AND a.attnum = ANY (c.conkey) AND a.attname <> 'shop_id'
     WHERE c.contype = 'f' AND c.confrelid = $1::text::regclass
       AND (c.confdeltype IN ('a', 'r') OR c.conrelid = 'repair_technicians'::regclass AND $1::text = 'technicians')`,
    [table],
  );
  return rows;
}

/** What refers to rows that are to go, other than rows that go with them. */
export async function findReferences(
  client: pg.PoolClient,
  table: NotedTable,
  made: string,
): Promise<FieldError[]> {
  const errors: FieldError[] = [];
  for (const { from, column } of await referringColumns(client, table)) {
    const isSelf = from === table ? `AND x.id NOT IN (${made})` : '';
    const rows = await nameRows(
      client,
      table,
      `r.id IN (${made}) AND EXISTS (SELECT FROM ${from} x WHERE x.shop_id = ${SHOP} AND x.${column} = r.id ${isSelf})`,
    );
    const by = from.replaceAll('_', ' ');
    errors.push(
      ...rows.map(({ id, name }) => ({
        path: `/${table}/${id}`,
        message: `${name} is used by ${by} that came later.`,
      })),
    );
  }
  return errors;
}
