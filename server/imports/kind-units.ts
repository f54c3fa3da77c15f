import type pg from 'pg';
import { foldText } from '../db/fold';
import type { Counts, MakeKindWork } from './kind-work';
import { updateNoted } from './note-changes';
import { faultCells, recordReader } from './read-records';
import { STAGED_FAULTS } from './repair-fields';
import { resolveModels } from './resolve-names';
import { resolveUnits } from './resolve-units';
import { IMPORT, SHOP } from './shop-transaction';
import type { Field } from './staging';

const FIELDS = [
  ['unit_serial', 'text'],
  ['unit_ref', 'text'],
  ['maker', 'text'],
  ['model', 'text'],
  ['product_type', 'text'],
  ['in_service_on', 'date'],
  ['use_class', 'text'],
  ['meter_hours', 'numeric(10,2)'],
  ['meter_read_on', 'date'],
  ['known_from_on', 'date'],
] as const satisfies readonly Field[];
const KEYS: readonly Field[] = [
  ['machine_serial', 'text'],
  ['machine_ref', 'text'],
  ['maker_key', 'text'],
  ['model_key', 'text'],
];
const NAMES = FIELDS.map(([name]) => name);

/** The register: the machines that were sold or are looked after here. */
export const unitsWork: MakeKindWork = (layout, rules) => {
  const read = recordReader('units', layout, rules);
  const fold = (text: string | null | undefined) => (text ? foldText(text) : null);
  return {
    tables: { staged_units: [['ordinal', 'integer'], ...FIELDS, ...KEYS], staged_faults: STAGED_FAULTS },
    open: (staging) => ({
      add: (row, number) => {
        const { values, faults } = read(row);
        if (!values['unit_serial'] && !values['unit_ref'] && faults.length === 0) {
          faults.push({
            column: 'unit_serial',
            value: null,
            message: 'is missing, and so is unit_ref',
            mend: 'Give the machine’s serial or your own tag.',
          });
        }
        for (const fault of faults) staging.add('staged_faults', faultCells(number, fault));
        staging.add('staged_units', [
          number,
          ...NAMES.map((name) => values[name] ?? null),
          fold(values['unit_serial']),
          fold(values['unit_ref']),
          fold(values['maker']) ?? '',
          fold(values['model']),
        ]);
      },
      end: () => undefined,
    }),
    settle,
    rejectedRecords: `
      SELECT s.ordinal, s.ordinal AS first_row, s.ordinal AS last_row, coalesce(s.unit_serial, s.unit_ref) AS name
      FROM staged_units s JOIN rejected r ON r.ordinal = s.ordinal`,
    apply,
    remark: () => Promise.resolve([]),
  };
};

async function settle(client: pg.PoolClient): Promise<number> {
  await client.query(`
    INSERT INTO staged_faults
    SELECT ordinal, ordinal, 'unit_serial', coalesce(unit_serial, unit_ref), 'stands in the file before, and says something else there',
      'Keep one row for each machine.'
    FROM (
      SELECT *, first_value(said) OVER (PARTITION BY identity ORDER BY ordinal) AS first_said FROM (
        SELECT ordinal, unit_serial, unit_ref, coalesce(machine_serial || chr(31) || maker_key, machine_ref) AS identity,
          md5(ROW(${NAMES.join(', ')})::text) AS said FROM staged_units
      ) u WHERE identity IS NOT NULL
    ) u WHERE said <> first_said`);
  await client.query(`
    INSERT INTO staged_faults
    SELECT s.ordinal, s.ordinal, 'unit_serial', s.unit_serial, 'is borne by machines of more than one maker', 'Give the maker of the machine too.'
    FROM staged_units s WHERE s.maker_key = '' AND 1 < (
      SELECT count(*) FROM (
        SELECT maker_key FROM staged_units o WHERE o.machine_serial = s.machine_serial AND o.maker_key <> ''
        UNION SELECT maker_key FROM units u WHERE u.shop_id = ${SHOP} AND u.serial_key = s.machine_serial AND u.maker_key <> ''
      ) makers)`);
  await client.query(`
    INSERT INTO staged_faults
    SELECT s.ordinal, s.ordinal, 'unit_ref', s.unit_ref, 'is the tag of more than one machine', 'Give the machine’s serial too.'
    FROM staged_units s WHERE s.machine_serial IS NULL AND 1 < (
      SELECT count(*) FROM units u WHERE u.shop_id = ${SHOP} AND u.unit_ref_key = s.machine_ref)`);
  const { rowCount } = await client.query(
    'CREATE TEMP TABLE rejected ON COMMIT DROP AS SELECT DISTINCT ordinal FROM staged_faults',
  );
  await client.query(`
    CREATE TEMP TABLE accepted ON COMMIT DROP AS
    SELECT DISTINCT ON (coalesce(machine_serial || chr(31) || maker_key, machine_ref)) * FROM staged_units s
    WHERE NOT EXISTS (SELECT FROM rejected r WHERE r.ordinal = s.ordinal)
    ORDER BY coalesce(machine_serial || chr(31) || maker_key, machine_ref), ordinal`);
  return rowCount ?? 0;
}

async function apply(client: pg.PoolClient): Promise<Counts> {
  await resolveModels(client, 'accepted');
  // A register speaks of today, so it is news whatever repairs there are.
  await client.query(`
    CREATE TEMP TABLE targets ON COMMIT DROP AS
    SELECT s.*, true AS seeks_unit, NULL::uuid AS unit_id, NULL::uuid AS customer_id, m.id AS model_id,
      s.maker_key AS machine_maker, 'infinity'::date AS closed_on
    FROM accepted s LEFT JOIN models m ON m.shop_id = ${SHOP} AND m.maker_key = s.maker_key AND m.model_key = s.model_key`);
  await client.query('ANALYZE targets');
  await resolveUnits(client);
  const values = `true AS is_registered,
    coalesce(t.known_from_on, u.known_from_on, t.in_service_on, u.in_service_on) AS known_from_on,
    coalesce(t.meter_hours, u.register_meter_hours) AS register_meter_hours,
    CASE WHEN t.meter_hours IS NULL THEN u.register_read_on ELSE coalesce(t.meter_read_on, u.register_read_on) END AS register_read_on`;
  await client.query(
    updateNoted(
      'units',
      `SELECT * FROM (
         SELECT DISTINCT ON (u.id) u.id, ${values} FROM units u JOIN targets t ON t.unit_id = u.id
         WHERE u.shop_id = ${SHOP} ORDER BY u.id, t.ordinal DESC
       ) w WHERE EXISTS (
         SELECT FROM units u WHERE u.shop_id = ${SHOP} AND u.id = w.id
           AND (w.is_registered, w.known_from_on, w.register_meter_hours, w.register_read_on)
             IS DISTINCT FROM (u.is_registered, u.known_from_on, u.register_meter_hours, u.register_read_on))`,
      ['is_registered', 'known_from_on', 'register_meter_hours', 'register_read_on'],
    ),
  );
  return countNoted(client, 'units', 'SELECT DISTINCT unit_id AS id FROM targets');
}

/** Created, updated and unchanged among records, by what the import noted. */
export async function countNoted(client: pg.PoolClient, table: string, records: string): Promise<Counts> {
  const { rows } = await client.query<{ created: string; updated: string; unchanged: string }>(`
    SELECT count(*) FILTER (WHERE c.row_id IS NOT NULL AND c.before IS NULL) AS created,
      count(*) FILTER (WHERE c.before IS NOT NULL) AS updated, count(*) FILTER (WHERE c.row_id IS NULL) AS unchanged
    FROM (${records}) r LEFT JOIN import_changes c
      ON c.shop_id = ${SHOP} AND c.import_id = ${IMPORT} AND c.table_name = '${table}' AND c.row_id = r.id`);
  const count = (name: 'created' | 'updated' | 'unchanged') => Number(rows[0]?.[name] ?? 0);
  return { created: count('created'), updated: count('updated'), unchanged: count('unchanged') };
}
