import { sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Comeback } from '../../analytics/records/comeback-types';
import type { RateRepair } from '../../analytics/records/comeback-outcomes';
import { COMEBACK_REASONS } from '../../shared/comebacks';
import type { Transaction } from '../db/client';
import { effectiveComebacks, returnedOn } from '../db/effective-comebacks';
import { allOf, selectRows } from '../db/rows';

const repairRow = z.object({
  id: z.string(),
  workDay: z.number(),
  modelId: z.string().nullable(),
  componentIds: z.array(z.string()),
  technicianIds: z.array(z.string()),
});

/**
 * The repairs that could come back, as the last analysis judged them: an identified machine, a repair, not
 * maintenance only. A repair that came in since waits for the next analysis, as its return does.
 */
export function loadRateRepairs(
  tx: Transaction,
  { from, to, withTechnicians = false }: { from?: string; to?: string; withTechnicians?: boolean } = {},
): Promise<RateRepair[]> {
  const technicians = withTechnicians
    ? sql`ARRAY(SELECT rt.technician_id::text FROM repair_technicians rt
        WHERE rt.shop_id = r.shop_id AND rt.repair_id = r.id)`
    : sql`'{}'::text[]`;
  return selectRows(
    tx,
    repairRow,
    sql`SELECT r.id, r.work_on - DATE '1970-01-01' AS "workDay", r.model_id AS "modelId",
      f.trouble_component_ids::text[] AS "componentIds", ${technicians} AS "technicianIds"
    FROM repairs r JOIN repair_facts f ON f.shop_id = r.shop_id AND f.repair_id = r.id
    WHERE ${allOf([
      sql`f.left_out IS NULL`,
      from ? sql`r.work_on >= ${from}` : undefined,
      to ? sql`r.work_on <= ${to}` : undefined,
    ])} ORDER BY r.work_on, r.id`,
  );
}

const comebackRow = z.object({
  id: z.string(),
  firstRepairId: z.string(),
  firstWorkDay: z.number(),
  returnDay: z.number(),
  modelId: z.string().nullable(),
  componentId: z.string().nullable(),
  reason: z.enum(COMEBACK_REASONS),
  isCounted: z.boolean(),
  isOurs: z.boolean(),
});

export type RateReturn = z.output<typeof comebackRow> & Pick<Comeback, 'returnRepairId'>;

/** Every return as it counts now, people's decisions included; `reason` is theirs, else the suggested one. */
export async function loadRateReturns(tx: Transaction): Promise<RateReturn[]> {
  const rows = await selectRows(
    tx,
    comebackRow,
    sql`SELECT e.return_id AS id, f.id AS "firstRepairId", f.work_on - DATE '1970-01-01' AS "firstWorkDay",
      ${returnedOn} - DATE '1970-01-01' AS "returnDay", f.model_id AS "modelId", e.component_id AS "componentId",
      coalesce(e.reason, e.suggested_reason) AS reason, e.is_counted AS "isCounted", e.is_ours AS "isOurs"
    FROM ${effectiveComebacks} e
    JOIN repairs f ON f.id = e.first_id AND f.shop_id = current_shop_id()
    JOIN repairs s ON s.id = e.return_id AND s.shop_id = current_shop_id()
    ORDER BY s.work_on, s.id`,
  );
  return rows.map((row) => ({ ...row, returnRepairId: row.id }));
}
