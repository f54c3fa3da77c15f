import type pg from 'pg';
import { folded } from './note-changes';
import { brings } from './repair-fields';
import { SHOP } from './shop-transaction';

/**
 * Table `targets`: each accepted record with the repair it is (known, or to be made), and what it says of its machine
 * once fields that it does not bring are taken from the known repair.
 */
export async function resolveRepairs(client: pg.PoolClient): Promise<void> {
  const bringsModel = `(${brings('maker')} OR ${brings('model')})`;
  const bringsCustomer = `(${brings('customer_ref')} OR ${brings('customer_name')})`;
  await client.query(`
    CREATE TEMP TABLE targets ON COMMIT DROP AS
    SELECT s.*, l.id AS location_id, coalesce(e.id, gen_random_uuid()) AS repair_id, e.id IS NOT NULL AS is_known,
      CASE WHEN ${bringsModel} THEN m.id ELSE e.model_id END AS model_id,
      CASE WHEN ${bringsCustomer} THEN c.id ELSE e.customer_id END AS customer_id,
      CASE WHEN ${brings('unit_serial')} THEN s.serial_key ELSE eu.serial_key END AS machine_serial,
      CASE WHEN ${brings('unit_ref')} THEN s.ref_key ELSE eu.unit_ref_key END AS machine_ref,
      CASE WHEN ${brings('maker')} THEN s.maker_key ELSE coalesce(em.maker_key, eu.maker_key, '') END AS machine_maker,
      e.id IS NULL OR e.unit_id IS NULL
        OR (${brings('unit_serial')} AND s.serial_key IS DISTINCT FROM ${folded('e.serial_text')})
        OR (${brings('unit_ref')} AND s.ref_key IS DISTINCT FROM ${folded('e.unit_ref_text')})
        OR (${bringsModel} AND m.id IS DISTINCT FROM e.model_id)
        OR (${bringsCustomer} AND c.id IS DISTINCT FROM e.customer_id) AS seeks_unit,
      e.unit_id
    FROM accepted s
    LEFT JOIN locations l ON l.shop_id = ${SHOP} AND l.name_key = s.location_key
    LEFT JOIN models m ON m.shop_id = ${SHOP} AND m.maker_key = s.maker_key AND m.model_key = s.model_key
    LEFT JOIN customers c ON c.shop_id = ${SHOP} AND c.ref_key = s.customer_key
    LEFT JOIN repairs e ON e.shop_id = ${SHOP} AND e.number_key = s.number_key AND e.location_id IS NOT DISTINCT FROM l.id
    LEFT JOIN models em ON em.shop_id = ${SHOP} AND em.id = e.model_id
    LEFT JOIN units eu ON eu.shop_id = ${SHOP} AND eu.id = e.unit_id`);
  await client.query(
    'ANALYZE targets (ordinal, repair_id, is_known, unit_id, machine_serial, machine_maker)',
  );
}
