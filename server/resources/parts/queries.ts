import { sql } from 'drizzle-orm';
import { z } from 'zod';
import type { partQuery } from '../../../shared/parts';
import type { Transaction } from '../../db/client';
import { foldText } from '../../db/fold';
import { allOf, anywhere, namedColumn, selectRows } from '../../db/rows';

const partRow = z.object({
  id: z.string(),
  maker: z.string(),
  number: z.string(),
  description: z.string().nullable(),
  supplier: z.string().nullable(),
  component: namedColumn.nullable(),
  supersededBy: namedColumn.nullable(),
  fitmentNote: z.string().nullable(),
  listPriceCents: z.number().nullable(),
  warrantyDays: z.number().nullable(),
  fitted: z.number(),
  lastFittedOn: z.string().nullable(),
  sortKey: z.tuple([z.string(), z.string()]),
});
export type PartRow = z.output<typeof partRow>;

const columns = sql`p.id, p.maker, p.number, p.description, p.supplier, p.fitment_note AS "fitmentNote",
  p.list_price_cents AS "listPriceCents", p.warranty_days AS "warrantyDays",
  CASE WHEN c.id IS NULL THEN NULL ELSE json_build_object('id', c.id, 'name', c.name) END AS component,
  CASE WHEN s.id IS NULL THEN NULL ELSE json_build_object('id', s.id, 'name', s.number) END AS "supersededBy",
  seen.fitted, seen.last_on AS "lastFittedOn", json_build_array(p.maker_key, p.number_key) AS "sortKey"`;

/** Returns and cores (negative lines) fit nothing. */
const joins = sql`LEFT JOIN components c ON c.shop_id = p.shop_id AND c.id = p.component_id
  LEFT JOIN parts s ON s.shop_id = p.shop_id AND s.id = p.superseded_by_part_id
  CROSS JOIN LATERAL (SELECT count(*)::int AS fitted, max(r.work_on) AS last_on FROM repair_lines x
    JOIN repairs r ON r.shop_id = x.shop_id AND r.id = x.repair_id
    WHERE x.shop_id = p.shop_id AND x.part_id = p.id AND x.kind = 'part' AND coalesce(x.quantity, 1) > 0) seen`;

/** One page by maker and number. */
export function findParts(
  tx: Transaction,
  filter: Omit<z.output<typeof partQuery>, 'limit' | 'cursor'>,
  page: { after: readonly [string, string] | undefined; rows: number },
): Promise<PartRow[]> {
  const { q, number, maker, componentId } = filter;
  const pattern = q?.trim() ? anywhere(q) : undefined;
  const conditions = allOf([
    pattern
      ? sql`(p.number ILIKE ${pattern} OR p.maker ILIKE ${pattern} OR p.description ILIKE ${pattern}
          OR p.component_id IN (SELECT id FROM components WHERE name ILIKE ${pattern}))`
      : undefined,
    number ? sql`p.number_key = ${foldText(number)}` : undefined,
    maker ? sql`p.maker_key = ${foldText(maker)}` : undefined,
    componentId ? sql`p.component_id = ${componentId}` : undefined,
    page.after ? sql`(p.maker_key, p.number_key) > (${page.after[0]}, ${page.after[1]})` : undefined,
  ]);
  return selectRows(
    tx,
    partRow,
    sql`WITH page AS MATERIALIZED (
      SELECT p.* FROM parts p WHERE ${conditions} ORDER BY p.maker_key, p.number_key LIMIT ${page.rows}
    )
    SELECT ${columns} FROM page p ${joins} ORDER BY p.maker_key, p.number_key`,
  );
}

export async function findPart(tx: Transaction, id: string): Promise<PartRow | undefined> {
  const [row] = await selectRows(
    tx,
    partRow,
    sql`SELECT ${columns} FROM parts p ${joins} WHERE p.id = ${id}`,
  );
  return row;
}
