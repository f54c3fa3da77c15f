import type pg from 'pg';
import { LINE_FIELDS, type LineField } from './repair-fields';
import { LINE_COLUMNS, REASON, REASON_ORIGIN } from './resolve-lines';
import { SHOP } from './shop-transaction';

const COLUMNS = LINE_FIELDS.map((field) => LINE_COLUMNS[field]);
const DERIVED = ['part_id', 'component_id', 'component_origin'];

const INSERT = `
  INSERT INTO repair_lines (shop_id, repair_id, position, ${COLUMNS.join(', ')}, ${DERIVED.join(', ')}, reason, reason_origin)
  SELECT ${SHOP}, repair_id, position, ${COLUMNS.join(', ')}, ${DERIVED.join(', ')}, ${REASON}, ${REASON_ORIGIN} FROM target_lines`;

export async function insertNewLines(client: pg.PoolClient): Promise<void> {
  await client.query(`${INSERT} WHERE NOT is_known`);
}

/** SQL: a fingerprint of what a line says in some of its fields. */
const fingerprint = (fields: readonly string[]): string =>
  `md5(concat_ws(chr(31), ${fields.map((field) => `coalesce(${field}::text, '')`).join(', ')}))`;

const isGiven = (given: readonly string[]) => (field: LineField) =>
  field === 'line_kind' || given.includes(field);

/**
 * Tables `old_lines` and `new_lines` of the known repairs whose lines came, paired by what the lines say, the n-th of a
 * kind with the n-th; `line_differences` names the repairs where some line found no match. Fields that the file does not
 * have are not compared.
 */
export async function compareLines(client: pg.PoolClient, given: readonly string[]): Promise<void> {
  const print = fingerprint(LINE_FIELDS.filter(isGiven(given)).map((field) => LINE_COLUMNS[field]));
  const numbered = (select: string) => `
    SELECT *, row_number() OVER (PARTITION BY repair_id, print ORDER BY position) AS nth FROM (${select}) printed`;
  await client.query(`
    CREATE TEMP TABLE old_lines ON COMMIT DROP AS ${numbered(`
      SELECT l.id, l.repair_id, l.position, ${COLUMNS.map((column) => `l.${column}`).join(', ')}, ${print} AS print
      FROM repair_lines l
      WHERE l.shop_id = ${SHOP} AND l.repair_id IN (SELECT repair_id FROM targets WHERE is_known AND has_lines)`)}`);
  await client.query(`
    CREATE TEMP TABLE new_lines ON COMMIT DROP AS ${numbered(`
      SELECT n.*, ${print} AS print FROM target_lines n WHERE n.is_known`)}`);
  await client.query('ANALYZE old_lines (id, repair_id, print)');
  await client.query('ANALYZE new_lines (repair_id, position, print)');
  await client.query(`
    CREATE TEMP TABLE line_pairs ON COMMIT DROP AS
    SELECT o.id, n.repair_id, n.position FROM old_lines o JOIN new_lines n USING (repair_id, print, nth)`);
  await client.query('ANALYZE line_pairs');
  await client.query(`
    CREATE TEMP TABLE line_differences ON COMMIT DROP AS
    SELECT repair_id FROM old_lines o WHERE NOT EXISTS (SELECT FROM line_pairs p WHERE p.id = o.id)
    UNION
    SELECT repair_id FROM new_lines n
    WHERE NOT EXISTS (SELECT FROM line_pairs p WHERE p.repair_id = n.repair_id AND p.position = n.position)`);
}

/**
 * Puts the new set of lines in place of the old one. A line that says the same keeps its row; one whose price, hours or
 * the like changed keeps its row too, and with it what a person said of its component and reason.
 */
export async function replaceLines(client: pg.PoolClient, given: readonly string[]): Promise<void> {
  const same = fingerprint([
    'kind',
    'lower(part_number_text)',
    'lower(description)',
    'lower(component_text)',
    'work_done',
  ]);
  const left = (table: string, unpaired: string) => `
    SELECT *, row_number() OVER (PARTITION BY repair_id, ${same} ORDER BY position) AS turn, ${same} AS sameness
    FROM ${table} x WHERE x.repair_id IN (SELECT repair_id FROM line_differences) AND NOT EXISTS (SELECT FROM line_pairs p WHERE ${unpaired})`;
  await client.query(`
    CREATE TEMP TABLE edited_lines ON COMMIT DROP AS
    SELECT o.id, n.repair_id, n.position FROM (${left('old_lines', 'p.id = x.id')}) o
    JOIN (${left('new_lines', 'p.repair_id = x.repair_id AND p.position = x.position')}) n USING (repair_id, sameness, turn)`);
  const set = LINE_FIELDS.filter(isGiven(given)).map((field) => LINE_COLUMNS[field]);
  const unlessPerson = (column: string, origin: string, value: string) =>
    `${column} = CASE WHEN l.${origin} = 'person' THEN l.${column} ELSE n.${value} END`;
  await client.query(`
    UPDATE repair_lines l SET ${set.map((column) => `${column} = n.${column}`).join(', ')}, part_id = n.part_id,
      ${unlessPerson('component_id', 'component_origin', 'component_id')}, ${unlessPerson('component_origin', 'component_origin', 'component_origin')},
      ${unlessPerson('reason', 'reason_origin', 'reason')}, ${unlessPerson('reason_origin', 'reason_origin', 'reason_origin')}
    FROM edited_lines d JOIN (
      SELECT *, ${REASON} AS reason, ${REASON_ORIGIN} AS reason_origin FROM new_lines
    ) n USING (repair_id, position) WHERE l.shop_id = ${SHOP} AND l.id = d.id`);
  await client.query(`
    DELETE FROM repair_lines l USING old_lines o
    WHERE l.shop_id = ${SHOP} AND l.id = o.id AND o.repair_id IN (SELECT repair_id FROM line_differences)
      AND NOT EXISTS (SELECT FROM line_pairs p WHERE p.id = o.id) AND NOT EXISTS (SELECT FROM edited_lines d WHERE d.id = o.id)`);
  await client.query(`
    ${INSERT} n WHERE n.is_known AND n.repair_id IN (SELECT repair_id FROM line_differences)
      AND NOT EXISTS (SELECT FROM line_pairs p WHERE p.repair_id = n.repair_id AND p.position = n.position)
      AND NOT EXISTS (SELECT FROM edited_lines d WHERE d.repair_id = n.repair_id AND d.position = n.position)`);
  await client.query(`
    UPDATE repair_lines l SET position = p.position FROM (SELECT * FROM line_pairs UNION ALL SELECT * FROM edited_lines) p
    WHERE l.shop_id = ${SHOP} AND l.id = p.id AND l.position <> p.position
      AND p.repair_id IN (SELECT repair_id FROM line_differences)`);
}
