import type pg from 'pg';
import { IMPORT, SHOP } from './shop-transaction';

/**
 * Lines whose component nobody stated follow the catalogue's word on their part, and their reason the component's kind;
 * also where undoing took that word back. Called while the import's changes of parts are noted.
 */
export async function followCatalogue(client: pg.PoolClient): Promise<void> {
  await client.query(`
    WITH touched AS (
      SELECT p.id, p.component_id, c.kind FROM parts p
      JOIN import_changes i ON i.shop_id = ${SHOP} AND i.import_id = ${IMPORT} AND i.table_name = 'parts' AND i.row_id = p.id
      LEFT JOIN components c ON c.shop_id = ${SHOP} AND c.id = p.component_id
      WHERE p.shop_id = ${SHOP}
    )
    UPDATE repair_lines l SET component_id = t.component_id,
      component_origin = CASE WHEN t.component_id IS NULL THEN 'unknown' ELSE 'catalogue' END,
      reason = CASE WHEN l.reason_origin IN ('unknown', 'rule') THEN coalesce(r.reason, 'unknown') ELSE l.reason END,
      reason_origin = CASE WHEN l.reason_origin NOT IN ('unknown', 'rule') THEN l.reason_origin
        WHEN r.reason IS NULL THEN 'unknown' ELSE 'rule' END
    FROM touched t CROSS JOIN LATERAL (
      SELECT CASE t.kind WHEN 'service_item' THEN 'maintenance' WHEN 'only_when_bad' THEN 'failed' END AS reason
    ) r
    WHERE l.shop_id = ${SHOP} AND l.part_id = t.id AND l.kind = 'part' AND l.component_origin IN ('unknown', 'catalogue')
      AND l.component_id IS DISTINCT FROM t.component_id`);
}
