import { sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Named } from '../../../shared/basics';
import { costOfReturn } from '../../db/comeback-cost';
import type { Transaction } from '../../db/client';
import { effectiveComebacks } from '../../db/effective-comebacks';
import { foldText } from '../../db/fold';
import { allOf, idList, modelName, namedColumn, selectRows } from '../../db/rows';

/** Names of what the rows of a report are of. */
export async function findNames(
  tx: Transaction,
  of: 'model' | 'component' | 'technician',
  ids: readonly string[],
): Promise<Map<string, Named>> {
  const from = {
    model: sql`SELECT m.id, ${modelName} AS name FROM models m WHERE m.id`,
    component: sql`SELECT id, name FROM components WHERE id`,
    technician: sql`SELECT id, display_name AS name FROM technicians WHERE id`,
  }[of];
  const rows = await selectRows(tx, namedColumn, sql`${from} = ANY(${idList(ids)})`);
  return new Map(rows.map((row) => [row.id, row]));
}

/** Which system each component belongs to; *unassigned* is none. */
export async function findSystems(tx: Transaction, ids: readonly string[]): Promise<Map<string, string>> {
  const rows = await selectRows(
    tx,
    z.object({ id: z.string(), system: z.string() }),
    sql`SELECT id, system FROM components WHERE id = ANY(${idList(ids)}) AND system <> 'unassigned'`,
  );
  return new Map(rows.map(({ id, system }) => [id, system]));
}

/** What each of these returns cost; see `costOfReturn`. */
export async function findCosts(
  tx: Transaction,
  returnIds: readonly string[],
  doorRateCents: number,
): Promise<Map<string, number>> {
  const rows = await selectRows(
    tx,
    z.object({ id: z.string(), cents: z.number() }),
    sql`SELECT s.id, ${costOfReturn(doorRateCents)} AS cents FROM repairs s WHERE s.id = ANY(${idList(returnIds)})`,
  );
  return new Map(rows.map(({ id, cents }) => [id, cents]));
}

const countsRow = z.object({
  repairsInAll: z.number(),
  unidentified: z.number(),
  toReview: z.number(),
  unknownReasons: z.number(),
  undecidedComponents: z.number(),
});

/** What the records hold, and what waits for a person. */
export async function findCounts(tx: Transaction) {
  const [row] = await selectRows(
    tx,
    countsRow,
    sql`SELECT count(*)::int AS "repairsInAll",
      count(*) FILTER (WHERE unit_id IS NULL AND ticket_type = 'repair')::int AS unidentified,
      (SELECT count(*)::int FROM ${effectiveComebacks} e WHERE e.status = 'suggested') AS "toReview",
      (SELECT count(*)::int FROM repair_lines x WHERE x.kind = 'part' AND x.reason = 'unknown') AS "unknownReasons",
      (SELECT count(*)::int FROM components c WHERE c.kind = 'unset' AND EXISTS (SELECT FROM repair_lines x
        WHERE x.shop_id = c.shop_id AND x.component_id = c.id AND x.kind = 'part' AND x.reason = 'unknown')
      ) AS "undecidedComponents"
    FROM repairs`,
  );
  if (!row) throw new Error('no counts');
  return row;
}

export const findModels = (
  tx: Transaction,
  {
    modelId,
    maker,
    model,
  }: { modelId?: string | undefined; maker?: string | undefined; model?: string | undefined },
) =>
  selectRows(
    tx,
    namedColumn,
    sql`SELECT m.id, ${modelName} AS name FROM models m WHERE ${allOf([
      modelId ? sql`m.id = ${modelId}` : undefined,
      maker ? sql`m.maker_key = ${foldText(maker)}` : undefined,
      model ? sql`m.model_key = ${foldText(model)}` : undefined,
    ])} ORDER BY m.maker_key, m.model_key`,
  );
