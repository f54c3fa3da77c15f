import { sql } from 'drizzle-orm';
import { z } from 'zod';
import type { cascadeQuery } from '../../../shared/findings';
import type { Transaction } from '../../db/client';
import { foldText } from '../../db/fold';
import { allOf, idList, modelName, namedColumn, selectRows, unitName } from '../../db/rows';
import { storedFinding } from './stored-finding';

const findingRow = z.object({
  id: z.string(),
  kind: z.enum(['cascade', 'together']),
  qValue: z.number(),
  maker: z.string(),
  model: z.string(),
  modelId: z.string().nullable(),
  family: namedColumn.nullable(),
  causal: namedColumn,
  resultant: namedColumn,
  detail: storedFinding,
});
export type FindingRow = z.output<typeof findingRow>;

export function findFindings(
  tx: Transaction,
  filter: z.output<typeof cascadeQuery> & { id?: string },
): Promise<FindingRow[]> {
  return selectRows(
    tx,
    findingRow,
    sql`SELECT g.id, g.kind, g.q_value AS "qValue", coalesce(m.maker, '') AS maker, coalesce(m.model, '') AS model,
      g.model_id AS "modelId", g.detail,
      CASE WHEN f.id IS NULL THEN NULL ELSE json_build_object('id', f.id, 'name', f.name) END AS family,
      json_build_object('id', c.id, 'name', c.name) AS causal,
      json_build_object('id', d.id, 'name', d.name) AS resultant
    FROM findings g
    JOIN components c ON c.shop_id = g.shop_id AND c.id = g.causal_component_id
    JOIN components d ON d.shop_id = g.shop_id AND d.id = g.resultant_component_id
    LEFT JOIN models m ON m.shop_id = g.shop_id AND m.id = g.model_id
    LEFT JOIN families f ON f.shop_id = g.shop_id AND f.id = g.family_id
    WHERE ${allOf([
      filter.id ? sql`g.id = ${filter.id}` : undefined,
      filter.modelId ? sql`g.model_id = ${filter.modelId}` : undefined,
      filter.maker ? sql`m.maker_key = ${foldText(filter.maker)}` : undefined,
      filter.model ? sql`m.model_key = ${foldText(filter.model)}` : undefined,
    ])} ORDER BY g.kind, g.q_value, m.maker_key, m.model_key, c.name_key, d.name_key`,
  );
}

export const findModelNames = (tx: Transaction, ids: readonly string[]) =>
  selectRows(
    tx,
    namedColumn,
    sql`SELECT m.id, ${modelName} AS name FROM models m WHERE m.id = ANY(${idList(ids)}) ORDER BY name`,
  );

export const findUnitNames = (tx: Transaction, ids: readonly string[]) =>
  selectRows(
    tx,
    namedColumn,
    sql`SELECT u.id, ${unitName} AS name FROM units u
      LEFT JOIN models m ON m.shop_id = u.shop_id AND m.id = u.model_id WHERE u.id = ANY(${idList(ids)})`,
  );

export const findComponentsByName = (tx: Transaction, names: readonly string[]) =>
  selectRows(
    tx,
    namedColumn,
    sql`SELECT id, name FROM components WHERE name = ANY(${sql.param([...names])}::text[])`,
  );

const spentRow = z.object({
  id: z.string(),
  name: z.string(),
  totalCents: z.number(),
  partCents: z.unknown(),
});
const centsByComponent = z.record(z.string(), z.number());

/** What the repairs of episodes came to: in all, and for the parts of each component. */
export async function findSpent(tx: Transaction, repairIds: readonly string[]) {
  const rows = await selectRows(
    tx,
    spentRow,
    sql`SELECT r.id, r.number AS name,
      (coalesce(sum(t.amount), 0) + coalesce(r.labor_amount_cents, sum(t.labor), 0))::float8 AS "totalCents",
      coalesce(json_object_agg(t.component_id, t.amount) FILTER (WHERE t.component_id IS NOT NULL), '{}') AS "partCents"
    FROM repairs r LEFT JOIN (
      SELECT x.shop_id, x.repair_id, x.component_id, coalesce(sum(x.amount_cents), 0)::float8 AS amount,
        sum(x.labor_amount_cents)::float8 AS labor
      FROM repair_lines x WHERE x.repair_id = ANY(${idList(repairIds)}) GROUP BY 1, 2, 3
    ) t ON t.shop_id = r.shop_id AND t.repair_id = r.id
    WHERE r.id = ANY(${idList(repairIds)}) GROUP BY r.shop_id, r.id`,
  );
  return new Map(rows.map((row) => [row.id, { ...row, partCents: centsByComponent.parse(row.partCents) }]));
}
export type SpentByRepair = Awaited<ReturnType<typeof findSpent>>;
