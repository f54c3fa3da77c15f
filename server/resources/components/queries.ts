import { sql, type SQL } from 'drizzle-orm';
import { z } from 'zod';
import { COMPONENT_KINDS } from '../../../shared/basics';
import type { componentQuery } from '../../../shared/parts';
import type { Transaction } from '../../db/client';
import { effectiveComebacks } from '../../db/effective-comebacks';
import { allOf, anywhere, selectRows } from '../../db/rows';

const listedRow = z.object({
  id: z.string(),
  name: z.string(),
  system: z.string(),
  kind: z.enum(COMPONENT_KINDS),
  fitted: z.number(),
  failures: z.number(),
  unknown: z.number(),
  machines: z.number(),
  models: z.number(),
  comebackCount: z.number(),
  comebackSize: z.number(),
  spentCents: z.number(),
  sortKey: z.string(),
});
export type ComponentRow = z.output<typeof listedRow>;

/** Components with what was counted of each, on one model where it is named. */
export function findComponents(
  tx: Transaction,
  conditions: SQL,
  { rows, modelId }: { rows: number; modelId?: string | undefined },
): Promise<ComponentRow[]> {
  const onModel = modelId ? sql`AND r.model_id = ${modelId}` : sql.empty();
  return selectRows(
    tx,
    listedRow,
    sql`WITH page AS MATERIALIZED (
      SELECT c.* FROM components c WHERE ${conditions} ORDER BY c.name_key LIMIT ${rows}
    ), fitted AS (
      SELECT x.component_id, count(*)::int AS fitted,
        count(*) FILTER (WHERE x.reason = 'failed')::int AS failures,
        count(*) FILTER (WHERE x.reason = 'unknown')::int AS unknown,
        count(DISTINCT r.unit_id)::int AS machines, count(DISTINCT r.model_id)::int AS models,
        coalesce(sum(x.amount_cents), 0)::bigint::float8 AS spent
      FROM repair_lines x JOIN repairs r ON r.shop_id = x.shop_id AND r.id = x.repair_id ${onModel}
      WHERE x.component_id IN (SELECT id FROM page) AND x.kind = 'part' AND coalesce(x.quantity, 1) > 0 GROUP BY 1
    ), came_back AS MATERIALIZED (
      SELECT DISTINCT e.first_id FROM ${effectiveComebacks} e WHERE e.is_counted
    ), work AS (
      SELECT component_id, count(*)::int AS size, count(b.first_id)::int AS came_back
      FROM repair_facts f CROSS JOIN LATERAL unnest(f.trouble_component_ids) AS component_id
      ${modelId ? sql`JOIN repairs r ON r.shop_id = f.shop_id AND r.id = f.repair_id ${onModel}` : sql.empty()}
      LEFT JOIN came_back b ON b.first_id = f.repair_id
      WHERE f.left_out IS NULL GROUP BY 1
    )
    SELECT c.id, c.name, c.system, c.kind, coalesce(d.fitted, 0) AS fitted, coalesce(d.failures, 0) AS failures,
      coalesce(d.unknown, 0) AS unknown, coalesce(d.machines, 0) AS machines, coalesce(d.models, 0) AS models,
      coalesce(w.came_back, 0) AS "comebackCount", coalesce(w.size, 0) AS "comebackSize",
      coalesce(d.spent, 0) AS "spentCents", c.name_key AS "sortKey"
    FROM page c LEFT JOIN fitted d ON d.component_id = c.id LEFT JOIN work w ON w.component_id = c.id
    ORDER BY c.name_key`,
  );
}

export function componentConditions(
  { q, modelId }: Pick<z.output<typeof componentQuery>, 'q' | 'modelId'>,
  after: string | undefined,
): SQL {
  return allOf([
    q?.trim() ? sql`(c.name ILIKE ${anywhere(q)} OR c.system ILIKE ${anywhere(q)})` : undefined,
    modelId
      ? sql`c.id IN (SELECT x.component_id FROM repair_lines x JOIN repairs r
          ON r.shop_id = x.shop_id AND r.id = x.repair_id WHERE r.model_id = ${modelId})`
      : undefined,
    after === undefined ? undefined : sql`c.name_key > ${after}`,
  ]);
}
