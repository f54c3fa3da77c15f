import type pg from 'pg';
import { LABOR_FIELDS, REPAIR_FIELDS, STAGED_REPAIRS, type RepairField } from './repair-fields';
import { folded } from './note-changes';
import { SHOP } from './shop-transaction';

const typeOf = (field: RepairField): string => STAGED_REPAIRS.find(([name]) => name === field)?.[1] ?? 'text';
const isText = (field: RepairField): boolean => typeOf(field) === 'text';
const KEYS = ['serial_key', 'ref_key', 'customer_key', 'model_key'] as const;

/** Joins rows of one repair that stand apart in the file, and refuses them where they disagree. */
export async function joinFragments(client: pg.PoolClient): Promise<void> {
  const { rowCount } = await client.query(`
    CREATE TEMP TABLE scattered ON COMMIT DROP AS
    SELECT location_key, number_key, min(ordinal) AS head FROM staged_repairs
    WHERE number_key IS NOT NULL GROUP BY 1, 2 HAVING count(*) > 1`);
  if (rowCount === 0) return;
  await client.query(`
    UPDATE staged_repairs s SET head = k.head FROM scattered k
    WHERE s.location_key = k.location_key AND s.number_key = k.number_key`);
  const agreed = REPAIR_FIELDS.filter((field) => !LABOR_FIELDS.includes(field));
  await client.query(`
    CREATE TEMP TABLE joined ON COMMIT DROP AS
    SELECT s.head, ${[...agreed, ...KEYS].map(firstOf).join(', ')},
      coalesce((array_agg(maker_key ORDER BY ordinal) FILTER (WHERE maker_key <> ''))[1], '') AS maker_key,
      string_agg(DISTINCT labor_op, '; ') AS labor_op, sum(labor_hours) AS labor_hours, sum(labor_amount) AS labor_amount,
      max(given) AS given, bool_or(has_lines) AS has_lines
    FROM staged_repairs s JOIN scattered k ON k.head = s.head GROUP BY s.head`);
  const disagreements = agreed.map((field) => {
    const compare = (alias: string) => (isText(field) ? folded(`${alias}.${field}`) : `${alias}.${field}`);
    return `SELECT s.ordinal, s.first_row, '${field}', left(s.${field}::text, 200),
        'differs from another row of this repair, which says “' || left(j.${field}::text, 60) || '”',
        'Give all rows of a repair the same value, or leave all but one empty.'
      FROM staged_repairs s JOIN joined j ON j.head = s.head WHERE ${compare('s')} <> ${compare('j')}`;
  });
  await client.query(`INSERT INTO staged_faults ${disagreements.join(' UNION ALL ')}`);
  await client.query(`INSERT INTO staged_faults
    SELECT j.head, s.first_row, 'closed_on', j.closed_on::text, 'The days of this repair are not in order.',
      'A machine is opened, ready, closed and picked up in this order: correct one of the days.'
    FROM joined j JOIN staged_repairs s ON s.ordinal = j.head
    WHERE j.opened_on > coalesce(j.ready_on, j.closed_on) OR j.ready_on > j.closed_on OR j.closed_on > j.picked_up_on
      OR abs(j.labor_amount) > 2000000000`);
  const taken = [...agreed, ...LABOR_FIELDS, ...KEYS, 'maker_key', 'given', 'has_lines'];
  await client.query(`
    UPDATE staged_repairs s SET ${taken.map((name) => `${name} = j.${name}`).join(', ')}
    FROM joined j WHERE s.ordinal = j.head`);
  await client.query(`
    UPDATE staged_lines l SET ordinal = s.head FROM staged_repairs s
    WHERE s.ordinal = l.ordinal AND s.head <> s.ordinal`);
}

const firstOf = (name: string): string =>
  `(array_agg(${name} ORDER BY ordinal) FILTER (WHERE ${name} IS NOT NULL))[1] AS ${name}`;

/** Refuses a serial without a maker where machines of several makers bear it. */
export async function refuseDoubtfulSerials(client: pg.PoolClient): Promise<void> {
  await client.query(`
    WITH bare AS (
      SELECT s.ordinal, s.first_row, s.serial_key, s.unit_serial FROM staged_repairs s
      WHERE s.serial_key IS NOT NULL AND s.maker_key = '' AND s.ordinal = s.head
        AND NOT EXISTS (
          SELECT FROM repairs e JOIN units u ON u.shop_id = e.shop_id AND u.id = e.unit_id
          WHERE e.shop_id = ${SHOP} AND e.number_key = s.number_key AND u.serial_key = s.serial_key)
    ), makers AS (
      SELECT serial_key, maker_key FROM staged_repairs
      WHERE maker_key <> '' AND serial_key IN (SELECT serial_key FROM bare)
      UNION
      SELECT serial_key, maker_key FROM units
      WHERE shop_id = ${SHOP} AND maker_key <> '' AND serial_key IN (SELECT serial_key FROM bare)
    ), doubtful AS (
      SELECT serial_key, string_agg(maker_key, ', ' ORDER BY maker_key) AS makers FROM makers GROUP BY 1 HAVING count(*) > 1
    )
    INSERT INTO staged_faults
    SELECT b.ordinal, b.first_row, 'unit_serial', b.unit_serial,
      'is borne by machines of more than one maker (' || left(d.makers, 200) || ')', 'Give the maker of the machine too.'
    FROM bare b JOIN doubtful d USING (serial_key)`);
}

/** Parts what goes in from what does not: tables `rejected` (heads) and `accepted`. */
export async function partRejected(client: pg.PoolClient): Promise<number> {
  const { rowCount } = await client.query(`
    CREATE TEMP TABLE rejected ON COMMIT DROP AS
    SELECT DISTINCT s.head FROM staged_faults f JOIN staged_repairs s USING (ordinal)`);
  await client.query(`
    CREATE TEMP TABLE accepted ON COMMIT DROP AS
    SELECT * FROM staged_repairs s WHERE s.ordinal = s.head AND NOT EXISTS (SELECT FROM rejected r WHERE r.head = s.head)`);
  await client.query(
    'ANALYZE accepted (ordinal, location_key, number_key, serial_key, maker_key, model_key, customer_key)',
  );
  return rowCount ?? 0;
}
