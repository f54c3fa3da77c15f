import type pg from 'pg';
import { folded, insertNoted, updateNoted } from './note-changes';
import { SHOP } from './shop-transaction';

/**
 * The engines that the records name on a machine, each from the first day it was seen. An engine named by maker and
 * model alone is the numbered one of that kind where there is one: only a different number is a swap.
 */
export async function resolveEngines(client: pg.PoolClient): Promise<void> {
  const kind = (alias: string) =>
    `coalesce(${folded(`${alias}.engine_maker`)}, '') || '|' || coalesce(${folded(`${alias}.engine_model`)}, '')`;
  const { rowCount } = await client.query(`
    CREATE TEMP TABLE engines ON COMMIT DROP AS
    SELECT DISTINCT ON (unit_id, kind_key, serial_key) * FROM (
      SELECT t.unit_id, btrim(t.engine_maker) AS maker, btrim(t.engine_model) AS model, btrim(t.engine_serial) AS serial,
        ${kind('t')} AS kind_key, ${folded('t.engine_serial')} AS serial_key,
        min(coalesce(t.ready_on, t.closed_on)) OVER (PARTITION BY t.unit_id, ${kind('t')}, ${folded('t.engine_serial')}) AS seen_from_on,
        t.ordinal
      FROM targets t
      WHERE t.unit_id IS NOT NULL AND coalesce(t.engine_maker, t.engine_model, t.engine_serial) IS NOT NULL
    ) named ORDER BY unit_id, kind_key, serial_key, ordinal`);
  if (rowCount === 0) return;
  await client.query('ANALYZE engines');
  const knownKind = `coalesce(${folded('e.maker')}, '') || '|' || coalesce(${folded('e.model')}, '')`;
  // One that stood without a number gets it.
  await client.query(
    updateNoted(
      'unit_engines',
      `SELECT DISTINCT ON (e.id) e.id, n.serial, 'serial:' || n.serial_key AS engine_key
       FROM unit_engines e JOIN engines n ON n.unit_id = e.unit_id AND n.serial_key IS NOT NULL AND n.kind_key = ${knownKind}
       WHERE e.shop_id = ${SHOP} AND e.serial IS NULL AND NOT EXISTS (
         SELECT FROM unit_engines o WHERE o.shop_id = ${SHOP} AND o.unit_id = e.unit_id AND o.serial IS NOT NULL
       ) ORDER BY e.id, n.seen_from_on`,
      ['serial', 'engine_key'],
    ),
  );
  await client.query(
    insertNoted(
      'unit_engines',
      `INSERT INTO unit_engines (shop_id, unit_id, maker, model, serial, engine_key, seen_from_on)
       SELECT DISTINCT ON (unit_id, serial_key) ${SHOP}, unit_id, maker, model, serial, 'serial:' || serial_key, seen_from_on
       FROM engines WHERE serial_key IS NOT NULL ORDER BY unit_id, serial_key, seen_from_on ON CONFLICT DO NOTHING`,
    ),
  );
  await client.query(
    insertNoted(
      'unit_engines',
      `INSERT INTO unit_engines (shop_id, unit_id, maker, model, engine_key, seen_from_on)
       SELECT ${SHOP}, n.unit_id, n.maker, n.model, 'kind:' || n.kind_key, n.seen_from_on
       FROM engines n WHERE n.serial_key IS NULL AND NOT EXISTS (
         SELECT FROM unit_engines e WHERE e.shop_id = ${SHOP} AND e.unit_id = n.unit_id AND ${knownKind} = n.kind_key
       ) ON CONFLICT DO NOTHING`,
    ),
  );
  await client.query(
    updateNoted(
      'unit_engines',
      `SELECT e.id, min(n.seen_from_on) AS seen_from_on FROM unit_engines e JOIN engines n ON n.unit_id = e.unit_id
         AND (e.engine_key = 'serial:' || n.serial_key OR (n.serial_key IS NULL AND ${knownKind} = n.kind_key))
       WHERE e.shop_id = ${SHOP} GROUP BY e.id, e.seen_from_on HAVING min(n.seen_from_on) < e.seen_from_on`,
      ['seen_from_on'],
    ),
  );
}
