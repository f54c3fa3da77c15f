import type pg from 'pg';
import type { Counts } from './kind-work';
import { folded } from './note-changes';
import { brings, type RepairField } from './repair-fields';
import { compareLines, insertNewLines, replaceLines } from './apply-lines';
import { IMPORT, SHOP } from './shop-transaction';

const OWN_COLUMNS: readonly [column: string, field: RepairField][] = [
  ['opened_on', 'opened_on'],
  ['ready_on', 'ready_on'],
  ['picked_up_on', 'picked_up_on'],
  ['engine_maker', 'engine_maker'],
  ['engine_model', 'engine_model'],
  ['engine_serial', 'engine_serial'],
  ['meter_hours', 'meter_hours'],
  ['complaint', 'complaint'],
  ['cause', 'cause'],
  ['correction', 'correction'],
  ['notes', 'notes'],
  ['technician_text', 'technician'],
  ['pay_type', 'pay_type'],
  ['labor_op', 'labor_op'],
  ['labor_hours', 'labor_hours'],
  ['labor_amount_cents', 'labor_amount'],
];
const KEPT_SPELLINGS: readonly [column: string, field: RepairField, key: string][] = [
  ['serial_text', 'unit_serial', 'unit_serial'],
  ['unit_ref_text', 'unit_ref', 'unit_ref'],
];

const VALUES: readonly [column: string, fresh: string, merged: string][] = [
  [
    'ticket_type',
    `coalesce(s.ticket_type, 'repair')`,
    `CASE WHEN ${brings('ticket_type')} THEN coalesce(s.ticket_type, 'repair') ELSE e.ticket_type END`,
  ],
  ['closed_on', 's.closed_on', 's.closed_on'],
  ['unit_id', 's.unit_id', 's.unit_id'],
  ['model_id', 's.model_id', 's.model_id'],
  ['customer_id', 's.customer_id', 's.customer_id'],
  ...KEPT_SPELLINGS.map(([column, field]): [string, string, string] => [
    column,
    `s.${field}`,
    `CASE WHEN NOT (${brings(field)}) OR ${folded(`s.${field}`)} = ${folded(`e.${column}`)} THEN e.${column} ELSE s.${field} END`,
  ]),
  ...OWN_COLUMNS.map(([column, field]): [string, string, string] => [
    column,
    `s.${field}`,
    `CASE WHEN ${brings(field)} THEN s.${field} ELSE e.${column} END`,
  ]),
];
const NAMES = VALUES.map(([column]) => column);

/** Writes the targets: new repairs, and known ones where anything of their own or of their lines differs. */
export async function applyRepairs(
  client: pg.PoolClient,
  givenLineFields: readonly string[],
): Promise<Counts> {
  await client.query(`SELECT refresh_statistics('{units,models,components,parts,technicians}')`);
  // Small tables that foreign keys lead to would be read whole for every row.
  await client.query('SET LOCAL enable_seqscan = off');
  const created = await client.query(`
    INSERT INTO repairs (shop_id, id, location_id, number, number_key, ${NAMES.join(', ')}, changed_by_import_id)
    SELECT ${SHOP}, s.repair_id, s.location_id, btrim(s.repair_number), s.number_key, ${VALUES.map(([, fresh]) => fresh).join(', ')}, ${IMPORT}
    FROM targets s WHERE NOT s.is_known`);
  await client.query(`
    INSERT INTO import_changes (shop_id, import_id, table_name, row_id)
    SELECT ${SHOP}, ${IMPORT}, 'repairs', repair_id FROM targets WHERE NOT is_known`);
  await insertNewLines(client);
  await client.query('SET LOCAL enable_seqscan = on');
  const known = await client.query('SELECT FROM targets WHERE is_known');
  const updated = (known.rowCount ?? 0) === 0 ? 0 : await updateKnown(client, givenLineFields);
  return { created: created.rowCount ?? 0, updated, unchanged: (known.rowCount ?? 0) - updated };
}

async function updateKnown(client: pg.PoolClient, givenLineFields: readonly string[]): Promise<number> {
  await compareLines(client, givenLineFields);
  await client.query(`
    CREATE TEMP TABLE wanted ON COMMIT DROP AS
    SELECT s.repair_id, ${VALUES.map(([column, , merged]) => `${merged} AS ${column}`).join(', ')}
    FROM targets s JOIN repairs e ON e.shop_id = ${SHOP} AND e.id = s.repair_id WHERE s.is_known`);
  const list = (alias: string) => NAMES.map((name) => `${alias}.${name}`).join(', ');
  const { rowCount } = await client.query(`
    CREATE TEMP TABLE changed ON COMMIT DROP AS
    SELECT w.repair_id FROM wanted w JOIN repairs e ON e.shop_id = ${SHOP} AND e.id = w.repair_id
    WHERE (${list('w')}) IS DISTINCT FROM (${list('e')})
      OR w.repair_id IN (SELECT repair_id FROM line_differences)`);
  if (rowCount === 0) return 0;
  await client.query('ANALYZE changed');
  await keepEarlierStates(client);
  await client.query(`
    UPDATE repairs e SET ${NAMES.map((name) => `${name} = w.${name}`).join(', ')},
      meter_fault = CASE WHEN e.meter_hours IS DISTINCT FROM w.meter_hours THEN NULL ELSE e.meter_fault END,
      version = e.version + 1, updated_at = now(), changed_by_import_id = ${IMPORT}
    FROM wanted w JOIN changed c USING (repair_id) WHERE e.shop_id = ${SHOP} AND e.id = w.repair_id`);
  await replaceLines(client, givenLineFields);
  return rowCount ?? 0;
}

/** The state before, with its lines: as a version of the repair, and as what undoing brings back. */
async function keepEarlierStates(client: pg.PoolClient): Promise<void> {
  await client.query(`
    WITH earlier AS MATERIALIZED (
      SELECT e.id, e.version, to_jsonb(e) AS repair,
        coalesce((SELECT jsonb_agg(to_jsonb(l) ORDER BY l.position) FROM repair_lines l
          WHERE l.shop_id = ${SHOP} AND l.repair_id = e.id), '[]') AS lines,
        coalesce((SELECT jsonb_agg(k.technician_id) FROM repair_technicians k
          WHERE k.shop_id = ${SHOP} AND k.repair_id = e.id), '[]') AS technicians
      FROM repairs e JOIN changed c ON c.repair_id = e.id WHERE e.shop_id = ${SHOP}
    ), versions AS (
      INSERT INTO repair_versions (shop_id, repair_id, version, replaced_by_import_id, repair, lines)
      SELECT ${SHOP}, id, version, ${IMPORT}, repair, lines FROM earlier
    )
    INSERT INTO import_changes (shop_id, import_id, table_name, row_id, before)
    SELECT ${SHOP}, ${IMPORT}, 'repairs', id, repair || jsonb_build_object('lines', lines, 'technicians', technicians) FROM earlier`);
}
