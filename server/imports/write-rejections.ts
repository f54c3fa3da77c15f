import { sql } from 'drizzle-orm';
import type pg from 'pg';
import { z } from 'zod';
import type { Database } from '../db/client';
import { importRejections } from '../db/schema/index';
import { withShop } from '../db/tenancy';
import { dataRows } from './open-table';
import type { Layout } from './layout';
import type { Fault } from './parse-cell';

type Rejection = { line: number; repairNumber: string | null; cells: string[]; errors: Fault[] };

const fault = z.object({
  row: z.number(),
  column: z.string().nullable(),
  value: z.string().nullable(),
  message: z.string(),
  mend: z.string(),
});
const record = z.object({
  first_row: z.number(),
  last_row: z.number(),
  name: z.string().nullable(),
  faults: z.array(fault).nullable(),
});
type RejectedRecord = z.infer<typeof record>;

const AT_ONCE = 500;

/**
 * Reads the file once more and keeps every row of the rejected records as it stands, with what is wrong. On a connection
 * of its own: a failed import keeps them too.
 */
export async function writeRejections(
  source: { client: pg.PoolClient; rejectedRecords: string; filePath: string; layout: Layout },
  target: { database: Database; shopId: string; importId: string },
): Promise<void> {
  const records = readRecords(source.client, source.rejectedRecords);
  let current = (await records.next()).value;
  let number = 0;
  let held: Rejection[] = [];
  for await (const rows of dataRows(source.filePath, source.layout, source.layout.decimal)) {
    for (const row of rows) {
      number += 1;
      while (current && number > current.last_row) current = (await records.next()).value;
      if (!current) break;
      if (number < current.first_row) continue;
      held.push({
        line: row.line,
        repairNumber: shown(current.name),
        cells: row.cells.map(withoutNul),
        errors: errorsOf(current, number),
      });
    }
    if (held.length >= AT_ONCE || !current) {
      await keep(target, held);
      held = [];
    }
    if (!current) break;
  }
  await keep(target, held);
}

// JSON in the database holds no NUL; the sign for it shows where it stood.
const withoutNul = (cell: string): string => cell.replaceAll('\0', '\u2400');
const shown = (name: string | null): string | null => name?.slice(0, 200) ?? null;

function errorsOf({ faults, name }: RejectedRecord, number: number): Fault[] {
  const own = (faults ?? []).filter(({ row }) => row === number).map(({ row: _row, ...rest }) => rest);
  if (own.length > 0) return own;
  return [
    {
      column: null,
      value: null,
      message: `Another row of ${name ?? 'this record'} has an error; a record goes in whole or not at all.`,
      mend: 'Correct that row and send all rows of the record again.',
    },
  ];
}

async function* readRecords(
  client: pg.PoolClient,
  rejectedRecords: string,
): AsyncGenerator<RejectedRecord, undefined, undefined> {
  await client.query('CREATE INDEX ON staged_faults (ordinal)');
  await client.query(`
    DECLARE rejected_records NO SCROLL CURSOR FOR
    SELECT r.first_row, r.last_row, r.name, (
      SELECT json_agg(json_build_object('row', f.row, 'column', f.column_name, 'value', f.value, 'message', f.message, 'mend', f.mend))
      FROM staged_faults f WHERE f.ordinal = r.ordinal
    ) AS faults FROM (${rejectedRecords}) r ORDER BY r.first_row`);
  for (;;) {
    const { rows } = await client.query(`FETCH ${AT_ONCE} FROM rejected_records`);
    yield* z.array(record).parse(rows);
    if (rows.length < AT_ONCE) return undefined;
  }
}

/** Also used for what a batch rejects. */
export async function keepRejections(
  tx: { execute: (query: ReturnType<typeof sql>) => Promise<unknown> },
  importId: string,
  rejections: readonly Rejection[],
): Promise<void> {
  if (rejections.length === 0) return;
  await tx.execute(sql`
    INSERT INTO ${importRejections} (shop_id, import_id, line, repair_number, cells, errors)
    SELECT current_shop_id(), ${importId}::uuid, r.line, r."repairNumber", r.cells, r.errors
    FROM jsonb_to_recordset(${JSON.stringify(rejections)}::jsonb) AS r(line integer, "repairNumber" text, cells jsonb, errors jsonb)`);
}

function keep(
  { database, shopId, importId }: { database: Database; shopId: string; importId: string },
  held: Rejection[],
) {
  return held.length === 0
    ? Promise.resolve()
    : withShop(database, shopId, (tx) => keepRejections(tx, importId, held));
}
