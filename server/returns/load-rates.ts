import { sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Comeback } from '../../analytics/records/comeback-types';
import type { AlikeRepairs, RateRepair } from '../../analytics/records/comeback-outcomes';
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

const JUDGED = sql`repairs r JOIN repair_facts f ON f.shop_id = r.shop_id AND f.repair_id = r.id AND f.left_out IS NULL`;

const workedBetween = ({ from, to }: { from?: string | undefined; to?: string | undefined }) =>
  allOf([from ? sql`r.work_on >= ${from}` : undefined, to ? sql`r.work_on <= ${to}` : undefined]);

/**
 * The repairs that could come back, as the last analysis judged them: an identified machine, a repair, not
 * maintenance only. A repair that came in since waits for the next analysis, as its return does.
 */
export function loadRateRepairs(tx: Transaction, range: { from: string; to: string }): Promise<RateRepair[]> {
  return selectRows(
    tx,
    repairRow,
    sql`SELECT r.id, r.work_on - DATE '1970-01-01' AS "workDay", r.model_id AS "modelId",
      f.trouble_component_ids::text[] AS "componentIds", '{}'::text[] AS "technicianIds"
    FROM ${JUDGED} WHERE ${workedBetween(range)} ORDER BY r.work_on, r.id`,
  );
}

const countedRow = repairRow.extend({ id: z.string().nullable(), repairs: z.number() });

/**
 * The same for rates by one key, counted: only repairs that a return names are listed, the others are counted where
 * they are alike. Which day a repair is of matters to a month; to other keys no longer once it is as old as the window.
 */
export async function countRateRepairs(
  tx: Transaction,
  {
    by,
    asOf,
    windowDays,
    ...range
  }: {
    by: 'month' | 'model' | 'component' | 'technician';
    asOf: string;
    windowDays: number;
    from?: string | undefined;
    to?: string | undefined;
  },
): Promise<{ repairs: RateRepair[]; others: AlikeRepairs[] }> {
  const workOn =
    by === 'month'
      ? sql`r.work_on`
      : sql`CASE WHEN n.id IS NULL THEN greatest(r.work_on, ${asOf}::date - ${windowDays}::int) ELSE r.work_on END`;
  const technicians = sql`LEFT JOIN (SELECT rt.repair_id, array_agg(rt.technician_id::text) AS ids
    FROM repair_technicians rt GROUP BY 1) t ON t.repair_id = r.id`;
  const rows = await selectRows(
    tx,
    countedRow,
    sql`WITH named AS MATERIALIZED (SELECT DISTINCT e.first_id AS id FROM ${effectiveComebacks} e)
    SELECT n.id, ${workOn} - DATE '1970-01-01' AS "workDay",
      ${by === 'model' ? sql`r.model_id` : sql`NULL`} AS "modelId",
      ${by === 'component' ? sql`f.trouble_component_ids::text[]` : sql`'{}'::text[]`} AS "componentIds",
      ${by === 'technician' ? sql`coalesce(t.ids, '{}')` : sql`'{}'::text[]`} AS "technicianIds",
      count(*)::int AS repairs
    FROM ${JUDGED} LEFT JOIN named n ON n.id = r.id ${by === 'technician' ? technicians : sql.empty()}
    WHERE ${workedBetween(range)} GROUP BY 1, 2, 3, 4, 5`,
  );
  return {
    repairs: rows.flatMap(({ id, repairs: _, ...row }) => (id === null ? [] : [{ id, ...row }])),
    others: rows.flatMap(({ id, ...row }) => (id === null ? [row] : [])),
  };
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
