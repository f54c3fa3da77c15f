import { randomUUID } from 'node:crypto';
import type pg from 'pg';
import { foldText } from '../db/fold';
import { namesIn } from '../db/technician-names';
import { SHOP, IMPORT } from './shop-transaction';

/** Links the written repairs to the technicians whom their records name; a new spelling is a technician of its own. */
export async function resolveTechnicians(client: pg.PoolClient, hasKnown: boolean): Promise<void> {
  const written = `SELECT repair_id FROM targets WHERE NOT is_known ${hasKnown ? 'UNION ALL SELECT repair_id FROM changed' : ''}`;
  const { rowCount } = await client.query(`
    CREATE TEMP TABLE naming ON COMMIT DROP AS
    SELECT r.id AS repair_id, r.technician_text AS text FROM repairs r JOIN (${written}) w ON w.repair_id = r.id
    WHERE r.shop_id = ${SHOP} AND r.technician_text IS NOT NULL
    UNION
    SELECT l.repair_id, l.technician_text FROM repair_lines l JOIN (${written}) w ON w.repair_id = l.repair_id
    WHERE l.shop_id = ${SHOP} AND l.technician_text IS NOT NULL`);
  if (hasKnown) {
    await client.query(
      `DELETE FROM repair_technicians k USING changed c WHERE k.shop_id = ${SHOP} AND k.repair_id = c.repair_id`,
    );
  }
  if (rowCount === 0) return;
  const { rows: texts } = await client.query<{ text: string }>(
    'SELECT DISTINCT text FROM naming ORDER BY text',
  );
  const pairs = texts.flatMap(({ text }) =>
    namesIn(text).map((name) => ({ text, name, key: foldText(name) })),
  );
  await client.query(
    'CREATE TEMP TABLE name_keys (text text, name text, name_key text, id uuid) ON COMMIT DROP',
  );
  const ids = new Map<string, string>();
  for (const { key } of pairs) if (!ids.has(key)) ids.set(key, randomUUID());
  await client.query(
    'INSERT INTO name_keys SELECT * FROM unnest($1::text[], $2::text[], $3::text[], $4::uuid[])',
    [
      pairs.map(({ text }) => text),
      pairs.map(({ name }) => name),
      pairs.map(({ key }) => key),
      pairs.map(({ key }) => ids.get(key)),
    ],
  );
  await client.query(`
    WITH fresh AS MATERIALIZED (
      SELECT DISTINCT ON (name_key) k.* FROM name_keys k
      WHERE NOT EXISTS (SELECT FROM technician_names n WHERE n.shop_id = ${SHOP} AND n.spelling_key = k.name_key)
      ORDER BY name_key, name
    ), made AS (
      INSERT INTO technicians (shop_id, id, display_name) SELECT ${SHOP}, id, name FROM fresh
    ), noted AS (
      INSERT INTO import_changes (shop_id, import_id, table_name, row_id) SELECT ${SHOP}, ${IMPORT}, 'technicians', id FROM fresh
    )
    INSERT INTO technician_names (shop_id, spelling, spelling_key, technician_id) SELECT ${SHOP}, name, name_key, id FROM fresh`);
  await client.query(`
    INSERT INTO repair_technicians (shop_id, repair_id, technician_id)
    SELECT DISTINCT ${SHOP}, n.repair_id, t.technician_id FROM naming n JOIN name_keys k USING (text)
    JOIN technician_names t ON t.shop_id = ${SHOP} AND t.spelling_key = k.name_key ON CONFLICT DO NOTHING`);
}
