import { sql, type SQL } from 'drizzle-orm';
import { z } from 'zod';
import { PRODUCT_TYPES } from '../../../shared/basics';
import type { modelQuery } from '../../../shared/machines';
import type { Transaction } from '../../db/client';
import { effectiveComebacks } from '../../db/effective-comebacks';
import { foldText } from '../../db/fold';
import { allOf, anywhere, modelName, namedColumn, selectRows } from '../../db/rows';

const listedRow = z.object({
  id: z.string(),
  maker: z.string(),
  model: z.string(),
  productType: z.enum(PRODUCT_TYPES).nullable(),
  families: z.array(namedColumn),
  units: z.number(),
  repairs: z.number(),
  failures: z.number(),
  topComponent: namedColumn.nullable(),
  comebackCount: z.number(),
  comebackSize: z.number(),
  findings: z.number(),
  sortKey: z.tuple([z.string(), z.string()]),
});
export type ModelRow = z.output<typeof listedRow>;

/** Models with what was counted on each; every count is one pass over the page's models. */
export function findModels(tx: Transaction, conditions: SQL, rows: number): Promise<ModelRow[]> {
  return selectRows(
    tx,
    listedRow,
    sql`WITH page AS MATERIALIZED (
      SELECT m.* FROM models m WHERE ${conditions} ORDER BY m.maker_key, m.model_key LIMIT ${rows}
    ), machines AS (
      SELECT u.model_id, count(*)::int AS units FROM units u WHERE u.model_id IN (SELECT id FROM page) GROUP BY 1
    ), came_back AS MATERIALIZED (
      SELECT DISTINCT e.first_id FROM ${effectiveComebacks} e WHERE e.is_counted
    ), work AS (
      SELECT r.model_id, count(*)::int AS repairs,
        count(*) FILTER (WHERE f.repair_id IS NOT NULL)::int AS size,
        count(b.first_id) FILTER (WHERE f.repair_id IS NOT NULL)::int AS came_back
      FROM repairs r
      LEFT JOIN repair_facts f ON f.shop_id = r.shop_id AND f.repair_id = r.id AND f.left_out IS NULL
      LEFT JOIN came_back b ON b.first_id = r.id
      WHERE r.model_id IN (SELECT id FROM page) GROUP BY 1
    ), failed AS (
      SELECT r.model_id, x.component_id, count(*)::int AS failures FROM repair_lines x
      JOIN repairs r ON r.shop_id = x.shop_id AND r.id = x.repair_id
      WHERE r.model_id IN (SELECT id FROM page) AND x.kind = 'part' AND x.reason = 'failed' GROUP BY 1, 2
    ), failures AS (SELECT model_id, sum(failures)::int AS failures FROM failed GROUP BY 1),
    top AS (
      SELECT DISTINCT ON (d.model_id) d.model_id, c.id, c.name FROM failed d
      JOIN components c ON c.shop_id = current_shop_id() AND c.id = d.component_id
      ORDER BY d.model_id, d.failures DESC, c.name_key
    )
    SELECT m.id, m.maker, m.model, m.product_type AS "productType",
      (SELECT coalesce(json_agg(json_build_object('id', f.id, 'name', f.name) ORDER BY f.name_key), '[]')
        FROM family_models fm JOIN families f ON f.shop_id = fm.shop_id AND f.id = fm.family_id
        WHERE fm.shop_id = m.shop_id AND fm.model_id = m.id) AS families,
      coalesce(machines.units, 0) AS units, coalesce(work.repairs, 0) AS repairs,
      coalesce(failures.failures, 0) AS failures,
      CASE WHEN top.id IS NULL THEN NULL ELSE json_build_object('id', top.id, 'name', top.name) END AS "topComponent",
      coalesce(work.came_back, 0) AS "comebackCount", coalesce(work.size, 0) AS "comebackSize",
      (SELECT count(*)::int FROM findings g WHERE g.shop_id = m.shop_id AND g.model_id = m.id) AS findings,
      json_build_array(m.maker_key, m.model_key) AS "sortKey"
    FROM page m LEFT JOIN machines ON machines.model_id = m.id LEFT JOIN work ON work.model_id = m.id
    LEFT JOIN failures ON failures.model_id = m.id LEFT JOIN top ON top.model_id = m.id
    ORDER BY m.maker_key, m.model_key`,
  );
}

export function modelConditions(
  filter: Omit<z.output<typeof modelQuery>, 'limit' | 'cursor'>,
  after: readonly [string, string] | undefined,
): SQL {
  const { q, maker, model } = filter;
  return allOf([
    q?.trim() ? sql`${modelName} ILIKE ${anywhere(q)}` : undefined,
    maker ? sql`m.maker_key = ${foldText(maker)}` : undefined,
    model ? sql`m.model_key = ${foldText(model)}` : undefined,
    after ? sql`(m.maker_key, m.model_key) > (${after[0]}, ${after[1]})` : undefined,
  ]);
}

const componentRow = z.object({
  component: namedColumn,
  system: z.string(),
  failures: z.number(),
  damage: z.number(),
  unknown: z.number(),
  maintenance: z.number(),
  machines: z.number(),
  medianHours: z.number().nullable(),
});
export type ModelComponentRow = z.output<typeof componentRow>;

/** What was replaced on a model, the most failed first; median of the trusted meter readings at failure. */
export function findModelComponents(tx: Transaction, modelId: string): Promise<ModelComponentRow[]> {
  const isFailed = sql`x.reason = 'failed'`;
  return selectRows(
    tx,
    componentRow,
    sql`SELECT json_build_object('id', c.id, 'name', c.name) AS component, c.system,
      count(*) FILTER (WHERE ${isFailed})::int AS failures,
      count(*) FILTER (WHERE x.reason = 'damage')::int AS damage,
      count(*) FILTER (WHERE x.reason = 'unknown')::int AS unknown,
      count(*) FILTER (WHERE x.reason IN ('maintenance', 'preventive', 'upgrade'))::int AS maintenance,
      count(DISTINCT r.unit_id)::int AS machines,
      percentile_cont(0.5) WITHIN GROUP (ORDER BY r.meter_hours::float8)
        FILTER (WHERE ${isFailed} AND r.meter_fault IS NULL) AS "medianHours"
    FROM repairs r JOIN repair_lines x ON x.shop_id = r.shop_id AND x.repair_id = r.id
    JOIN components c ON c.shop_id = x.shop_id AND c.id = x.component_id
    WHERE r.model_id = ${modelId} AND x.kind = 'part' AND coalesce(x.quantity, 1) > 0
    GROUP BY c.shop_id, c.id ORDER BY failures DESC, c.name_key`,
  );
}

export const findModelFindings = (tx: Transaction, modelId: string) =>
  selectRows(
    tx,
    z.object({
      id: z.string(),
      kind: z.enum(['cascade', 'together']),
      causal: namedColumn,
      resultant: namedColumn,
      episodes: z.number(),
    }),
    sql`SELECT g.id, g.kind, json_build_object('id', c.id, 'name', c.name) AS causal,
      json_build_object('id', d.id, 'name', d.name) AS resultant, (g.detail->>'episodes')::int AS episodes
    FROM findings g JOIN components c ON c.shop_id = g.shop_id AND c.id = g.causal_component_id
    JOIN components d ON d.shop_id = g.shop_id AND d.id = g.resultant_component_id
    WHERE g.model_id = ${modelId} ORDER BY g.kind, g.q_value, c.name_key, d.name_key`,
  );
