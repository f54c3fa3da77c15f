import type pg from 'pg';
import { insertNoted, updateNoted } from './note-changes';
import { IMPORT, SHOP } from './shop-transaction';

/** Locations, models and customers that the accepted records name; the first spelling is kept. */
export async function resolveNames(client: pg.PoolClient): Promise<void> {
  await client.query(
    insertNoted(
      'locations',
      `INSERT INTO locations (shop_id, name, name_key)
       SELECT DISTINCT ON (location_key) ${SHOP}, btrim(location), location_key FROM accepted
       WHERE location_key <> '' ORDER BY location_key, ordinal ON CONFLICT DO NOTHING`,
    ),
  );
  await resolveModels(client, 'accepted');
  await resolveCustomers(client);
}

/** Models of a table with maker, model, their keys, product_type and ordinal; the last product type said counts. */
export async function resolveModels(client: pg.PoolClient, source: string): Promise<void> {
  await client.query(
    insertNoted(
      'models',
      `INSERT INTO models (shop_id, maker, maker_key, model, model_key, changed_by_import_id)
       SELECT DISTINCT ON (maker_key, model_key) ${SHOP}, coalesce(btrim(maker), ''), maker_key, btrim(model), model_key, ${IMPORT}
       FROM ${source} WHERE model_key IS NOT NULL ORDER BY maker_key, model_key, ordinal ON CONFLICT DO NOTHING`,
    ),
  );
  await client.query(
    updateNoted(
      'models',
      `SELECT m.id, s.product_type FROM models m JOIN (
         SELECT DISTINCT ON (maker_key, model_key) maker_key, model_key, product_type FROM ${source}
         WHERE model_key IS NOT NULL AND product_type IS NOT NULL ORDER BY maker_key, model_key, ordinal DESC
       ) s USING (maker_key, model_key)
       WHERE m.shop_id = ${SHOP} AND m.product_type IS DISTINCT FROM s.product_type`,
      ['product_type'],
    ),
  );
}

async function resolveCustomers(client: pg.PoolClient): Promise<void> {
  await client.query(
    insertNoted(
      'customers',
      `INSERT INTO customers (shop_id, ref, ref_key, changed_by_import_id)
       SELECT DISTINCT ON (customer_key) ${SHOP}, btrim(coalesce(customer_ref, customer_name)), customer_key, ${IMPORT}
       FROM accepted WHERE customer_key IS NOT NULL ORDER BY customer_key, ordinal ON CONFLICT DO NOTHING`,
    ),
  );
  const last = (name: string) =>
    `(array_agg(btrim(${name}) ORDER BY closed_on DESC, ordinal DESC) FILTER (WHERE ${name} IS NOT NULL))[1]`;
  await client.query(
    updateNoted(
      'customers',
      `SELECT c.id, coalesce(s.name, c.name) AS name, coalesce(s.phone, c.phone) AS phone FROM customers c JOIN (
         SELECT customer_key, ${last('customer_name')} AS name, ${last('customer_phone')} AS phone
         FROM accepted WHERE customer_key IS NOT NULL GROUP BY 1
       ) s ON s.customer_key = c.ref_key
       WHERE c.shop_id = ${SHOP} AND (coalesce(s.name, c.name), coalesce(s.phone, c.phone)) IS DISTINCT FROM (c.name, c.phone)`,
      ['name', 'phone'],
    ),
  );
}
