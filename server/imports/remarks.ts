import type pg from 'pg';
import type { Remark } from './kind-work';
import { IMPORT, SHOP } from './shop-transaction';

const COUNTS: readonly { kind: string; text: string; count: string }[] = [
  {
    kind: 'machine_not_identified',
    text: 'repairs whose machine is not identified: they count as work done, not in rates of return',
    count: `SELECT count(*) FROM targets WHERE unit_id IS NULL AND coalesce(ticket_type, 'repair') = 'repair'`,
  },
  {
    kind: 'serial_not_given',
    text: 'repairs with a word such as “N/A” in place of a serial',
    count: 'SELECT count(*) FROM targets WHERE unit_serial IS NOT NULL AND serial_key IS NULL',
  },
  {
    kind: 'meter_went_back',
    text: 'readings below an earlier one of the same machine; the analysis decides which are used',
    count: `
      SELECT count(*) FROM targets t WHERE t.unit_id IS NOT NULL AND t.meter_hours IS NOT NULL AND EXISTS (
        SELECT FROM repairs r WHERE r.shop_id = ${SHOP} AND r.unit_id = t.unit_id AND r.meter_hours > t.meter_hours
          AND r.work_on < coalesce(t.ready_on, t.closed_on))`,
  },
  {
    kind: 'meter_placeholder',
    text: 'readings of 0, 1 or 9999 hours, which often stand for “not read”',
    count: 'SELECT count(*) FROM targets WHERE meter_hours IN (0, 1, 9999)',
  },
  {
    kind: 'reason_unknown',
    text: 'part lines that do not say why the part was changed',
    count: `
      SELECT count(*) FROM repair_lines l JOIN targets t ON t.repair_id = l.repair_id
      WHERE l.shop_id = ${SHOP} AND l.kind = 'part' AND l.reason = 'unknown'`,
  },
  {
    kind: 'component_unknown',
    text: 'part lines of which it is not known what the part is',
    count: `
      SELECT count(*) FROM repair_lines l JOIN targets t ON t.repair_id = l.repair_id
      WHERE l.shop_id = ${SHOP} AND l.kind = 'part' AND l.component_id IS NULL`,
  },
  {
    kind: 'new_technicians',
    text: 'new spellings of technicians; say in settings whom they mean',
    count: `
      SELECT count(*) FROM import_changes
      WHERE shop_id = ${SHOP} AND import_id = ${IMPORT} AND table_name = 'technicians' AND before IS NULL`,
  },
];

/** What is worth saying of the repairs that went in. */
export async function readRemarks(client: pg.PoolClient): Promise<Remark[]> {
  const { rows } = await client.query<Record<string, string>>(
    `SELECT ${COUNTS.map(({ kind, count }) => `(${count}) AS ${kind}`).join(', ')}`,
  );
  return COUNTS.map(({ kind, text }) => ({ kind, text, count: Number(rows[0]?.[kind] ?? 0) })).filter(
    ({ count }) => count > 0,
  );
}
