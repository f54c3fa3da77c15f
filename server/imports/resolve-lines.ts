import type pg from 'pg';
import { folded, insertNoted } from './note-changes';
import { LINE_FIELDS, STAGED_LINES, type LineField } from './repair-fields';
import { IMPORT, SHOP } from './shop-transaction';

/** The column of `repair_lines` that keeps what a field of a line said. */
export const LINE_COLUMNS: Record<LineField, string> = {
  line_kind: 'kind',
  part_number: 'part_number_text',
  part_maker: 'part_maker_text',
  part_description: 'description',
  supplier: 'supplier',
  component: 'component_text',
  line_reason: 'stated_reason',
  work_done: 'work_done',
  quantity: 'quantity',
  part_amount: 'amount_cents',
  part_cost: 'cost_cents',
  labor_op: 'labor_op',
  labor_hours: 'labor_hours',
  labor_amount: 'labor_amount_cents',
  line_technician: 'technician_text',
  line_pay_type: 'pay_type',
};

/**
 * Table `target_lines`: each line with its part, component and reason and where they come from. The record's own word
 * comes first, then the part's component in the catalogue, then the shop's dictionary, then the component's kind; what
 * none of them says is unknown.
 */
export async function resolveLines(client: pg.PoolClient): Promise<void> {
  await client.query(
    insertNoted(
      'components',
      `INSERT INTO components (shop_id, name, name_key, changed_by_import_id)
       SELECT DISTINCT ON (component_key) ${SHOP}, btrim(l.component), component_key, ${IMPORT}
       FROM staged_lines l JOIN targets t USING (ordinal) WHERE component_key IS NOT NULL
       ORDER BY component_key, row ON CONFLICT DO NOTHING`,
    ),
  );
  await client.query(
    insertNoted(
      'parts',
      `INSERT INTO parts (shop_id, maker, maker_key, number, number_key, description, supplier, changed_by_import_id)
       SELECT DISTINCT ON (${PART_MAKER_KEY}, part_key) ${SHOP},
         coalesce(btrim(l.part_maker), btrim(t.maker), m.maker, u.maker_key, ''), ${PART_MAKER_KEY},
         btrim(l.part_number), part_key, btrim(l.part_description), btrim(l.supplier), ${IMPORT}
       FROM staged_lines l JOIN targets t USING (ordinal) ${MACHINE_OF_TARGET}
       WHERE part_key IS NOT NULL ORDER BY ${PART_MAKER_KEY}, part_key, row ON CONFLICT DO NOTHING`,
    ),
  );
  const dictionary = await openDictionary(client);
  const columns = LINE_FIELDS.map((field) => `l.${field}::${typeOf(field)} AS ${LINE_COLUMNS[field]}`);
  await client.query(`
    CREATE TEMP TABLE target_lines ON COMMIT DROP AS
    SELECT x.*, c.kind AS component_kind FROM (
      SELECT t.repair_id, t.is_known, row_number() OVER (PARTITION BY t.repair_id ORDER BY l.row)::integer AS position,
        ${columns.join(', ')}, p.id AS part_id,
        coalesce(named.id, p.component_id, ${dictionary.component}) AS component_id,
        CASE WHEN named.id IS NOT NULL THEN 'file' WHEN p.component_id IS NOT NULL THEN 'catalogue'
          WHEN ${dictionary.component} IS NOT NULL THEN 'dictionary' ELSE 'unknown' END AS component_origin,
        ${dictionary.reason} AS dictionary_reason
      FROM staged_lines l JOIN targets t USING (ordinal) ${MACHINE_OF_TARGET}
      LEFT JOIN components named ON named.shop_id = ${SHOP} AND named.name_key = l.component_key
      LEFT JOIN parts p ON p.shop_id = ${SHOP} AND p.number_key = l.part_key AND p.maker_key = ${PART_MAKER_KEY}
      ${dictionary.join}
    ) x LEFT JOIN components c ON c.shop_id = ${SHOP} AND c.id = x.component_id`);
  await client.query('ANALYZE target_lines (repair_id, is_known)');
}

const PART_MAKER_KEY = `coalesce(l.part_maker_key, nullif(t.machine_maker, ''), u.maker_key, '')`;
const MACHINE_OF_TARGET = `
  LEFT JOIN units u ON u.shop_id = ${SHOP} AND u.id = t.unit_id
  LEFT JOIN models m ON m.shop_id = ${SHOP} AND m.id = t.model_id`;

const typeOf = (field: LineField): string => STAGED_LINES.find(([name]) => name === field)?.[1] ?? 'text';

/** SQL: a reason and where it comes from, of a row of `target_lines`; a kind decides only for a part that was fitted. */
const FITTED = `kind = 'part' AND coalesce(quantity, 1) > 0 AND coalesce(amount_cents, 0) >= 0`;
export const REASON = `coalesce(stated_reason, dictionary_reason,
  CASE WHEN ${FITTED} THEN CASE component_kind WHEN 'service_item' THEN 'maintenance' WHEN 'only_when_bad' THEN 'failed' END END, 'unknown')`;
export const REASON_ORIGIN = `CASE WHEN stated_reason IS NOT NULL THEN 'file' WHEN dictionary_reason IS NOT NULL THEN 'dictionary'
  WHEN ${FITTED} AND component_kind IN ('service_item', 'only_when_bad') THEN 'rule' ELSE 'unknown' END`;

/** The shop's dictionary as joins, where it has any: a part number, a whole description, or the longest phrase in one. */
async function openDictionary(
  client: pg.PoolClient,
): Promise<{ join: string; component: string; reason: string }> {
  const { rows } = await client.query<{ matches: string }>('SELECT DISTINCT matches FROM dictionary_entries');
  const has = new Set(rows.map(({ matches }) => matches));
  const description = folded('l.part_description');
  const joins: [alias: string, sql: string][] = [];
  const exact = (alias: string, matches: string, key: string) =>
    `LEFT JOIN dictionary_entries ${alias} ON ${alias}.shop_id = ${SHOP} AND ${alias}.matches = '${matches}' AND ${alias}.text_key = ${key}`;
  if (has.has('part_number')) joins.push(['dn', exact('dn', 'part_number', 'l.part_key')]);
  if (has.has('description')) joins.push(['dd', exact('dd', 'description', description)]);
  if (has.has('phrase')) {
    joins.push([
      'dp',
      `LEFT JOIN LATERAL (
         SELECT component_id, reason FROM dictionary_entries d
         WHERE d.shop_id = ${SHOP} AND d.matches = 'phrase' AND position(d.text_key IN ${description}) > 0
         ORDER BY length(d.text_key) DESC, d.text_key LIMIT 1
       ) dp ON l.part_description IS NOT NULL`,
    ]);
  }
  const first = (column: string, type: string) =>
    joins.length === 0
      ? `NULL::${type}`
      : `coalesce(${joins.map(([alias]) => `${alias}.${column}`).join(', ')})`;
  return {
    join: joins.map(([, sql]) => sql).join('\n'),
    component: first('component_id', 'uuid'),
    reason: first('reason', 'text'),
  };
}
