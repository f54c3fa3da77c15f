import { sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Transaction } from '../../db/client';
import { foldText } from '../../db/fold';
import { allOf, idList, modelName, namedColumn, selectRows } from '../../db/rows';

const UUID = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i;

/** A component by its id or its name. */
export async function findComponent(tx: Transaction, nameOrId: string) {
  const condition = UUID.test(nameOrId) ? sql`id = ${nameOrId}` : sql`name_key = ${foldText(nameOrId)}`;
  const [row] = await selectRows(
    tx,
    namedColumn.extend({ system: z.string() }),
    sql`SELECT id, name, system FROM components WHERE ${condition}`,
  );
  return row;
}

export function findModels(
  tx: Transaction,
  by: { maker?: string | undefined; model?: string | undefined; modelId?: string | undefined },
) {
  return selectRows(
    tx,
    namedColumn,
    sql`SELECT m.id, ${modelName} AS name FROM models m WHERE ${allOf([
      by.modelId ? sql`m.id = ${by.modelId}` : undefined,
      by.maker ? sql`m.maker_key = ${foldText(by.maker)}` : undefined,
      by.model ? sql`m.model_key = ${foldText(by.model)}` : undefined,
    ])} ORDER BY m.id`,
  );
}

/** A family and the ids of its models. */
export async function findFamily(tx: Transaction, id: string) {
  const [row] = await selectRows(
    tx,
    namedColumn.extend({ modelIds: z.array(z.string()) }),
    sql`SELECT f.id, f.name, ARRAY(SELECT fm.model_id::text FROM family_models fm
      WHERE fm.shop_id = f.shop_id AND fm.family_id = f.id) AS "modelIds"
    FROM families f WHERE f.id = ${id}`,
  );
  return row;
}

const numberRow = z.object({
  id: z.string(),
  number: z.string(),
  numberKey: z.string(),
  maker: z.string(),
  supersededBy: namedColumn.nullable(),
  fitmentNote: z.string().nullable(),
});
export type NumberRow = z.output<typeof numberRow>;

export function findNumbers(tx: Transaction, ids: readonly string[]): Promise<NumberRow[]> {
  return selectRows(
    tx,
    numberRow,
    sql`SELECT p.id, p.number, p.number_key AS "numberKey", p.maker, p.fitment_note AS "fitmentNote",
      CASE WHEN s.id IS NULL THEN NULL ELSE json_build_object('id', s.id, 'name', s.number) END AS "supersededBy"
    FROM parts p LEFT JOIN parts s ON s.shop_id = p.shop_id AND s.id = p.superseded_by_part_id
    WHERE p.id = ANY(${idList(ids)}) ORDER BY p.number_key, p.id`,
  );
}

/** What the component takes with it, on the models in question. */
export function findTakenAlong(tx: Transaction, componentId: string, modelIds: readonly string[] | null) {
  return selectRows(
    tx,
    z.object({
      findingId: z.string(),
      component: namedColumn,
      model: namedColumn.nullable(),
      both: z.number(),
      episodes: z.number(),
    }),
    sql`SELECT g.id AS "findingId", json_build_object('id', c.id, 'name', c.name) AS component,
      CASE WHEN m.id IS NULL THEN NULL ELSE json_build_object('id', m.id, 'name', ${modelName}) END AS model,
      (g.detail->>'withBoth')::int AS "both", (g.detail->>'episodes')::int AS episodes
    FROM findings g JOIN components c ON c.shop_id = g.shop_id AND c.id = g.resultant_component_id
    LEFT JOIN models m ON m.shop_id = g.shop_id AND m.id = g.model_id
    WHERE g.causal_component_id = ${componentId} AND g.kind = 'cascade'
      ${modelIds === null ? sql.empty() : sql`AND g.model_id = ANY(${idList(modelIds)})`}
    ORDER BY "both" DESC, g.id`,
  );
}
