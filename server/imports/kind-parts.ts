import type pg from 'pg';
import { foldText } from '../db/fold';
import { countNoted } from './kind-units';
import type { Counts, MakeKindWork } from './kind-work';
import { insertNoted, updateNoted } from './note-changes';
import { faultCells, recordReader } from './read-records';
import { followCatalogue } from './follow-catalogue';
import { STAGED_FAULTS } from './repair-fields';
import { IMPORT, SHOP } from './shop-transaction';
import type { Field } from './staging';

const FIELDS = [
  ['part_number', 'text'],
  ['maker', 'text'],
  ['supplier', 'text'],
  ['description', 'text'],
  ['component', 'text'],
  ['system', 'text'],
  ['superseded_by', 'text'],
  ['fitment_note', 'text'],
  ['list_price', 'integer'],
  ['warranty_days', 'integer'],
] as const satisfies readonly Field[];
const KEYS: readonly Field[] = [
  ['maker_key', 'text'],
  ['number_key', 'text'],
  ['component_key', 'text'],
  ['superseded_key', 'text'],
];
const NAMES = FIELDS.map(([name]) => name);

/** The catalogue of parts: what each number is, and which number follows it. */
export const partsWork: MakeKindWork = (layout, rules) => {
  const read = recordReader('parts', layout, rules);
  const fold = (text: string | null | undefined) => (text ? foldText(text) : null);
  return {
    tables: { staged_parts: [['ordinal', 'integer'], ...FIELDS, ...KEYS], staged_faults: STAGED_FAULTS },
    open: (staging) => ({
      add: (row, number) => {
        const { values, faults } = read(row);
        const part = fold(values['part_number']);
        const next = fold(values['superseded_by']);
        if (!part && faults.length === 0) {
          faults.push({
            column: 'part_number',
            value: null,
            message: 'is missing',
            mend: 'Give the maker’s number of the part.',
          });
        }
        if (part && part === next) {
          faults.push({
            column: 'superseded_by',
            value: values['superseded_by'] ?? null,
            message: 'is the part’s own number',
            mend: 'Give the number that follows it, or leave it empty.',
          });
        }
        for (const fault of faults) staging.add('staged_faults', faultCells(number, fault));
        staging.add('staged_parts', [
          number,
          ...NAMES.map((name) => values[name] ?? null),
          fold(values['maker']) ?? '',
          part,
          fold(values['component']),
          next,
        ]);
      },
      end: () => undefined,
    }),
    settle,
    rejectedRecords: `
      SELECT s.ordinal, s.ordinal AS first_row, s.ordinal AS last_row, s.part_number AS name
      FROM staged_parts s JOIN rejected r ON r.ordinal = s.ordinal`,
    apply,
    remark: () => Promise.resolve([]),
  };
};

async function settle(client: pg.PoolClient): Promise<number> {
  await client.query(`
    INSERT INTO staged_faults
    SELECT ordinal, ordinal, 'part_number', part_number, 'stands in the file before, and says something else there', 'Keep one row for each part.'
    FROM (
      SELECT ordinal, part_number, said, first_value(said) OVER (PARTITION BY maker_key, number_key ORDER BY ordinal) AS first_said
      FROM (SELECT *, md5(ROW(${NAMES.join(', ')})::text) AS said FROM staged_parts WHERE number_key IS NOT NULL) p
    ) p WHERE said <> first_said`);
  const { rowCount } = await client.query(
    'CREATE TEMP TABLE rejected ON COMMIT DROP AS SELECT DISTINCT ordinal FROM staged_faults',
  );
  await client.query(`
    CREATE TEMP TABLE accepted ON COMMIT DROP AS
    SELECT DISTINCT ON (maker_key, number_key) * FROM staged_parts s
    WHERE NOT EXISTS (SELECT FROM rejected r WHERE r.ordinal = s.ordinal) ORDER BY maker_key, number_key, ordinal`);
  await client.query('ANALYZE accepted (maker_key, number_key, component_key)');
  return rowCount ?? 0;
}

async function apply(client: pg.PoolClient): Promise<Counts> {
  await client.query(
    insertNoted(
      'components',
      `INSERT INTO components (shop_id, name, name_key, changed_by_import_id)
       SELECT DISTINCT ON (component_key) ${SHOP}, btrim(component), component_key, ${IMPORT} FROM accepted
       WHERE component_key IS NOT NULL ORDER BY component_key, ordinal ON CONFLICT DO NOTHING`,
    ),
  );
  await client.query(
    updateNoted(
      'components',
      `SELECT c.id, s.system FROM components c JOIN (
         SELECT DISTINCT ON (component_key) component_key, btrim(system) AS system FROM accepted
         WHERE component_key IS NOT NULL AND system IS NOT NULL ORDER BY component_key, ordinal DESC
       ) s ON s.component_key = c.name_key WHERE c.shop_id = ${SHOP} AND lower(c.system) <> lower(s.system)`,
      ['system'],
    ),
  );
  const insert = (rows: string) =>
    client.query(
      insertNoted(
        'parts',
        `INSERT INTO parts (shop_id, maker, maker_key, number, number_key, changed_by_import_id) ${rows} ON CONFLICT DO NOTHING`,
      ),
    );
  await insert(
    `SELECT ${SHOP}, coalesce(btrim(maker), ''), maker_key, btrim(part_number), number_key, ${IMPORT} FROM accepted`,
  );
  await insert(`
    SELECT DISTINCT ON (maker_key, superseded_key) ${SHOP}, coalesce(btrim(maker), ''), maker_key, btrim(superseded_by), superseded_key, ${IMPORT}
    FROM accepted WHERE superseded_key IS NOT NULL ORDER BY maker_key, superseded_key, ordinal`);
  const said: readonly [column: string, value: string][] = [
    ['supplier', 'btrim(s.supplier)'],
    ['description', 'btrim(s.description)'],
    ['component_id', 'c.id'],
    ['superseded_by_part_id', 'n.id'],
    ['fitment_note', 's.fitment_note'],
    ['list_price_cents', 's.list_price'],
    ['warranty_days', 's.warranty_days'],
  ];
  const kept = ([column, value]: readonly [string, string]) => `coalesce(${value}, p.${column})`;
  const current = `FROM accepted s JOIN parts p ON p.shop_id = ${SHOP} AND p.maker_key = s.maker_key AND p.number_key = s.number_key`;
  await client.query(
    updateNoted(
      'parts',
      `SELECT p.id, ${said.map((pair) => `${kept(pair)} AS ${pair[0]}`).join(', ')} ${current}
       LEFT JOIN components c ON c.shop_id = ${SHOP} AND c.name_key = s.component_key
       LEFT JOIN parts n ON n.shop_id = ${SHOP} AND n.maker_key = s.maker_key AND n.number_key = s.superseded_key
       WHERE (${said.map(kept).join(', ')}) IS DISTINCT FROM (${said.map(([column]) => `p.${column}`).join(', ')})`,
      said.map(([column]) => column),
    ),
  );
  await followCatalogue(client);
  return countNoted(client, 'parts', `SELECT p.id ${current}`);
}
