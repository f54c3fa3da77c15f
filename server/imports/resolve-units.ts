import type pg from 'pg';
import { insertNoted, updateNoted } from './note-changes';
import { IMPORT, SHOP } from './shop-transaction';

/**
 * The machine of each target, by the ladder: maker and serial (a serial alone where one maker bears it), else the shop's
 * tag, else customer and model where a person confirmed that they are one machine; else none.
 */
export async function resolveUnits(client: pg.PoolClient): Promise<void> {
  await bySerial(client);
  await byTag(client);
  await client.query(`
    UPDATE targets t SET unit_id = u.id FROM units u
    WHERE t.seeks_unit AND t.unit_id IS NULL AND t.machine_serial IS NULL AND t.machine_ref IS NULL
      AND u.shop_id = ${SHOP} AND u.identity = 'customer_model' AND u.customer_id = t.customer_id AND u.model_id = t.model_id`);
  await describeUnits(client);
}

async function bySerial(client: pg.PoolClient): Promise<void> {
  await client.query('UPDATE targets SET unit_id = NULL WHERE seeks_unit AND unit_id IS NOT NULL');
  // A serial alone is of the one maker that bears it; two would have been refused before.
  await client.query(`
    UPDATE targets t SET machine_maker = k.maker_key FROM (
      SELECT serial_key, min(maker_key) AS maker_key FROM (
        SELECT machine_serial AS serial_key, machine_maker AS maker_key FROM targets WHERE machine_maker <> '' AND machine_serial IS NOT NULL
        UNION
        SELECT serial_key, maker_key FROM units WHERE shop_id = ${SHOP} AND maker_key <> '' AND serial_key IS NOT NULL
      ) borne GROUP BY 1 HAVING count(*) = 1
    ) k WHERE t.seeks_unit AND t.machine_maker = '' AND t.machine_serial = k.serial_key`);
  await client.query(`
    CREATE TEMP TABLE claims ON COMMIT DROP AS
    SELECT DISTINCT ON (machine_serial, machine_maker) machine_serial AS serial_key, machine_maker AS maker_key,
      btrim(unit_serial) AS serial, btrim(unit_ref) AS unit_ref, machine_ref AS unit_ref_key, model_id
    FROM targets WHERE seeks_unit AND machine_serial IS NOT NULL AND unit_serial IS NOT NULL
    ORDER BY machine_serial, machine_maker, ordinal`);
  await client.query('ANALYZE claims');
  await client.query(
    updateNoted(
      'units',
      `SELECT u.id, c.maker_key FROM units u JOIN claims c ON c.serial_key = u.serial_key
       WHERE u.shop_id = ${SHOP} AND u.maker_key = '' AND c.maker_key <> ''
         AND NOT EXISTS (SELECT FROM claims o WHERE o.serial_key = c.serial_key AND o.maker_key NOT IN ('', c.maker_key))
         AND NOT EXISTS (SELECT FROM units o WHERE o.shop_id = ${SHOP} AND o.serial_key = c.serial_key AND o.maker_key <> '')`,
      ['maker_key'],
    ),
  );
  // A machine known by the shop's tag alone gets its serial once a record gives both.
  await client.query(
    updateNoted(
      'units',
      `SELECT DISTINCT ON (u.id) u.id, c.serial, c.serial_key, c.maker_key, 'serial' AS identity
       FROM units u JOIN claims c ON c.unit_ref_key = u.unit_ref_key
       WHERE u.shop_id = ${SHOP} AND u.identity = 'tag' AND u.serial_key IS NULL
         AND (u.model_id IS NULL OR c.model_id IS NULL OR u.model_id = c.model_id)
         AND NOT EXISTS (SELECT FROM units o WHERE o.shop_id = ${SHOP} AND o.serial_key = c.serial_key AND o.maker_key = c.maker_key)
         AND NOT EXISTS (SELECT FROM claims o WHERE o.unit_ref_key = c.unit_ref_key AND o.serial_key <> c.serial_key)
       ORDER BY u.id`,
      ['serial', 'serial_key', 'maker_key', 'identity'],
    ),
  );
  await client.query(
    insertNoted(
      'units',
      `INSERT INTO units (shop_id, identity, serial, serial_key, maker_key, unit_ref, unit_ref_key, model_id, changed_by_import_id)
       SELECT ${SHOP}, 'serial', serial, serial_key, maker_key, unit_ref, unit_ref_key, model_id, ${IMPORT}
       FROM claims ON CONFLICT DO NOTHING`,
    ),
  );
  await client.query(`
    UPDATE targets t SET unit_id = u.id FROM units u
    WHERE t.seeks_unit AND u.shop_id = ${SHOP} AND u.serial_key = t.machine_serial AND u.maker_key = t.machine_maker`);
}

/** A tag that several machines bear names none of them. */
async function byTag(client: pg.PoolClient): Promise<void> {
  const seeking =
    't.seeks_unit AND t.unit_id IS NULL AND t.machine_serial IS NULL AND t.machine_ref IS NOT NULL';
  const { rowCount } = await client.query(`SELECT FROM targets t WHERE ${seeking} LIMIT 1`);
  if (rowCount === 0) return;
  await client.query(
    insertNoted(
      'units',
      `INSERT INTO units (shop_id, identity, maker_key, unit_ref, unit_ref_key, model_id, changed_by_import_id)
       SELECT DISTINCT ON (machine_ref) ${SHOP}, 'tag', machine_maker, btrim(unit_ref), machine_ref, model_id, ${IMPORT}
       FROM targets t WHERE ${seeking} AND unit_ref IS NOT NULL
         AND NOT EXISTS (SELECT FROM units o WHERE o.shop_id = ${SHOP} AND o.unit_ref_key = t.machine_ref)
       ORDER BY machine_ref, ordinal`,
    ),
  );
  await client.query(`
    UPDATE targets t SET unit_id = k.id FROM (
      SELECT unit_ref_key, (array_agg(id))[1] AS id FROM units WHERE shop_id = ${SHOP} AND unit_ref_key IS NOT NULL
      GROUP BY 1 HAVING count(*) = 1
    ) k WHERE ${seeking} AND k.unit_ref_key = t.machine_ref`);
}

/**
 * What the records say of a machine, the latest first; a record older than one that is there already says nothing new
 * of its model and owner, and an empty cell never clears anything.
 */
async function describeUnits(client: pg.PoolClient): Promise<void> {
  const latest = (name: string, condition: string) =>
    `(array_agg(${name} ORDER BY t.closed_on DESC, t.ordinal DESC) FILTER (WHERE ${condition}))[1] AS ${name}`;
  await client.query('ANALYZE targets (unit_id)');
  await client.query(`
    CREATE TEMP TABLE last_seen ON COMMIT DROP AS
    SELECT r.unit_id, max(r.closed_on) AS last_on FROM repairs r
    WHERE r.shop_id = ${SHOP} AND r.unit_id IN (SELECT DISTINCT unit_id FROM targets WHERE unit_id IS NOT NULL) GROUP BY 1`);
  await client.query('ANALYZE last_seen');
  const isNews = '(k.last_on IS NULL OR t.closed_on >= k.last_on)';
  await client.query(
    updateNoted(
      'units',
      `SELECT u.id, coalesce(w.model_id, u.model_id) AS model_id, coalesce(w.customer_id, u.customer_id) AS customer_id,
         coalesce(w.in_service_on, u.in_service_on) AS in_service_on, coalesce(w.use_class, u.use_class) AS use_class,
         coalesce(btrim(w.unit_ref), u.unit_ref) AS unit_ref, coalesce(w.machine_ref, u.unit_ref_key) AS unit_ref_key
       FROM units u JOIN (
         SELECT t.unit_id, ${latest('model_id', `t.model_id IS NOT NULL AND ${isNews}`)},
           ${latest('customer_id', `t.customer_id IS NOT NULL AND ${isNews}`)},
           ${latest('in_service_on', 't.in_service_on IS NOT NULL')}, ${latest('use_class', 't.use_class IS NOT NULL')},
           ${latest('unit_ref', `t.unit_ref IS NOT NULL AND ${isNews}`)}, ${latest('machine_ref', `t.unit_ref IS NOT NULL AND ${isNews}`)}
         FROM targets t LEFT JOIN last_seen k ON k.unit_id = t.unit_id
         WHERE t.unit_id IS NOT NULL GROUP BY 1
       ) w ON w.unit_id = u.id
       WHERE u.shop_id = ${SHOP} AND (
         coalesce(w.model_id, u.model_id), coalesce(w.customer_id, u.customer_id), coalesce(w.in_service_on, u.in_service_on),
         coalesce(w.use_class, u.use_class), coalesce(w.machine_ref, u.unit_ref_key)
       ) IS DISTINCT FROM (u.model_id, u.customer_id, u.in_service_on, u.use_class, u.unit_ref_key)`,
      ['model_id', 'customer_id', 'in_service_on', 'use_class', 'unit_ref', 'unit_ref_key'],
    ),
  );
}
