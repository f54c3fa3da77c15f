import { sql, type SQL } from 'drizzle-orm';
import { z } from 'zod';
import type { Transaction } from './client';

/** Runs a hand-written query; every row is checked against its shape. */
export async function selectRows<Row extends z.ZodType>(
  tx: Transaction,
  row: Row,
  query: SQL,
): Promise<z.output<Row>[]> {
  const { rows } = await tx.execute(query);
  return z.array(row).parse(rows);
}

export const namedColumn = z.object({ id: z.string(), name: z.string() });

/** An IN list of ids that may be empty. */
export const idList = (ids: readonly string[]): SQL => sql`${sql.param([...ids])}::uuid[]`;

/** `WHERE` of all conditions that are there. */
export function allOf(conditions: readonly (SQL | undefined)[]): SQL {
  const present = conditions.filter((condition) => condition !== undefined);
  return present.length === 0 ? sql`true` : sql.join(present, sql` AND `);
}

/** A pattern that finds the text anywhere; what is special in a pattern stands for itself. */
export const anywhere = (text: string): string => `%${text.trim().replace(/[\\%_]/g, '\\$&')}%`;

/** A unit by its serial, else the shop's tag, else what it is; never by its owner. Needs aliases u and m. */
export const unitName = sql`coalesce(u.serial, u.unit_ref, m.maker || ' ' || m.model || ', no serial', 'Machine without serial')`;
export const modelName = sql`m.maker || ' ' || m.model`;
