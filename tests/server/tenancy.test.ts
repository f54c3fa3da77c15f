import { drizzle } from 'drizzle-orm/node-postgres';
import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { requireBoundRole } from '../../server/db/client';
import * as schema from '../../server/db/schema/index';
import { openHouse, type House, type TestShop } from './house';

let house: House;
let mine: TestShop;
let theirs: TestShop;
let tables: string[];

beforeAll(async () => {
  house = await openHouse();
  mine = await house.makeShop({ roles: [] });
  theirs = await house.makeShop({ roles: [] });
  const { rows } = await house.migrator.query<{ name: string }>(
    `SELECT table_name AS name FROM information_schema.columns
     WHERE table_schema = 'public' AND column_name = 'shop_id' AND table_name <> 'sessions' ORDER BY 1`,
  );
  tables = rows.map(({ name }) => name);
});
afterAll(() => house.close());

const VALUES: Record<string, string> = {
  uuid: 'gen_random_uuid()',
  text: `gen_random_uuid()::text`,
  integer: '1',
  smallint: '1',
  bigint: '1',
  numeric: '1',
  'double precision': '1',
  boolean: 'false',
  date: 'current_date',
  'timestamp with time zone': 'now()',
  jsonb: `'{}'`,
  ARRAY: `'{}'`,
};

/** One row of a shop in a table, of whatever the table demands; its constraints are taken off for this test. */
async function rowFor(table: string, shopId: string): Promise<string> {
  const { rows } = await house.migrator.query<{ name: string; type: string }>(
    `SELECT column_name AS name, data_type AS type FROM information_schema.columns
     WHERE table_schema = 'public' AND table_name = $1 AND is_nullable = 'NO' AND column_default IS NULL
       AND is_generated = 'NEVER' AND column_name <> 'shop_id'`,
    [table],
  );
  const values = rows.map(({ name, type }) => {
    const value = VALUES[type];
    if (!value) throw new Error(`give this test a value for ${table}.${name}: ${type}`);
    return value;
  });
  const names = ['shop_id', ...rows.map(({ name }) => name)].join(', ');
  return `INSERT INTO ${table} (${names}) VALUES (${[`'${shopId}'`, ...values].join(', ')})`;
}

/** Runs a statement as the service, in a shop or in none, and undoes it. */
async function asService(shopId: string | undefined, statement: string) {
  const client = await house.database.$client.connect();
  try {
    await client.query('BEGIN');
    if (shopId) await client.query(`SELECT set_config('app.shop_id', $1, true)`, [shopId]);
    const result = await client.query<Record<string, unknown>>(statement);
    return { rowCount: result.rowCount, rows: result.rows };
  } catch (error) {
    return { refused: error instanceof Error && 'code' in error ? error.code : error };
  } finally {
    await client.query('ROLLBACK');
    client.release();
  }
}

describe('the schema', () => {
  // A key is looked up by its hash before its shop is known.
  const GLOBAL_UNIQUE = ['api_keys_key_hash_unique'];

  it('forces row-level security on every tenant table', async () => {
    const { rows } = await house.migrator.query<{ name: string }>(
      `SELECT relname AS name FROM pg_class WHERE relnamespace = 'public'::regnamespace
       AND relkind = 'r' AND relrowsecurity AND relforcerowsecurity ORDER BY 1`,
    );
    expect(rows.map(({ name }) => name)).toEqual([...tables, 'shops'].sort());
  });

  it('has the shop first in every primary and unique key', async () => {
    const { rows } = await house.migrator.query<{ name: string; first: string }>(
      `SELECT c.relname AS name, a.attname AS first
       FROM pg_index i JOIN pg_class c ON c.oid = i.indexrelid JOIN pg_class t ON t.oid = i.indrelid
         JOIN pg_attribute a ON a.attrelid = t.oid AND a.attnum = i.indkey[0]
       WHERE i.indisunique AND t.relname = ANY($1)`,
      [tables],
    );
    expect(rows.length).toBeGreaterThanOrEqual(tables.length);
    expect(rows.filter(({ first }) => first !== 'shop_id').map(({ name }) => name)).toEqual(GLOBAL_UNIQUE);
  });

  it('has the shop first in every foreign key between tenant tables', async () => {
    const { rows } = await house.migrator.query<{ name: string; from_first: string; to_first: string }>(
      `SELECT k.conname AS name, f.attname AS from_first, r.attname AS to_first
       FROM pg_constraint k
         JOIN pg_attribute f ON f.attrelid = k.conrelid AND f.attnum = k.conkey[1]
         JOIN pg_attribute r ON r.attrelid = k.confrelid AND r.attnum = k.confkey[1]
       WHERE k.contype = 'f' AND k.conrelid::regclass::text = ANY($1) AND k.confrelid::regclass::text = ANY($1)`,
      [tables],
    );
    expect(rows.length).toBeGreaterThan(20);
    expect(rows.filter((row) => row.from_first !== 'shop_id' || row.to_first !== 'shop_id')).toEqual([]);
  });
});

const REFUSED = { refused: '42501' };

// Last in this file: it takes the constraints off its own copy of the database.
describe('one shop’s rows', () => {
  it('are all that the service sees and changes, in every table', async () => {
    expect(tables.length).toBeGreaterThan(30);
    const { rows: constraints } = await house.migrator.query<{ statement: string }>(
      `SELECT format('ALTER TABLE %s DROP CONSTRAINT %I', conrelid::regclass, conname) AS statement
       FROM pg_constraint WHERE connamespace = 'public'::regnamespace AND contype IN ('c', 'f')`,
    );
    for (const { statement } of constraints) await house.migrator.query(statement);
    for (const table of tables) {
      await house.migrator.query(await rowFor(table, mine.id));
      await house.migrator.query(await rowFor(table, theirs.id));
    }
    for (const table of tables) {
      const seen = await asService(mine.id, `SELECT shop_id FROM ${table}`);
      expect(seen.rows, table).toEqual([{ shop_id: mine.id }]);
      expect((await asService(undefined, `SELECT shop_id FROM ${table}`)).rows, table).toEqual([]);
      expect(await asService(mine.id, await rowFor(table, theirs.id)), table).toEqual(REFUSED);
      expect(await asService(undefined, await rowFor(table, mine.id)), table).toEqual(REFUSED);

      // What was logged can be changed in no shop at all.
      const none = table === 'audit_log' ? REFUSED : { rowCount: 0, rows: [] };
      const update = `UPDATE ${table} SET shop_id = shop_id WHERE shop_id = '${theirs.id}'`;
      expect(await asService(mine.id, update), table).toEqual(none);
      expect(await asService(mine.id, `DELETE FROM ${table} WHERE shop_id = '${theirs.id}'`), table).toEqual(
        none,
      );
      expect(await asService(mine.id, `UPDATE ${table} SET shop_id = '${theirs.id}'`), table).toEqual(
        REFUSED,
      );
    }
  });

  it('include the shop itself, which the service can neither make nor remove', async () => {
    expect((await asService(mine.id, 'SELECT id FROM shops')).rows).toEqual([{ id: mine.id }]);
    const rename = `UPDATE shops SET name = 'x' WHERE id = '${theirs.id}'`;
    expect(await asService(mine.id, rename)).toMatchObject({ rowCount: 0 });
    expect(await asService(mine.id, `INSERT INTO shops (name) VALUES ('x')`)).toEqual(REFUSED);
    expect(await asService(mine.id, 'DELETE FROM shops')).toEqual(REFUSED);
  });

  it('need a service that row-level security binds', async () => {
    await expect(requireBoundRole(house.database)).resolves.toBeUndefined();
    const pool = new pg.Pool({ connectionString: house.migratorUrl, max: 1 });
    await expect(requireBoundRole(drizzle(pool, { schema }))).rejects.toThrow(/bound by row-level security/);
    await pool.end();
  });
});
