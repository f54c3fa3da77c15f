import { eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { importRejections, imports } from '../db/schema/index';
import type { Database } from '../db/client';
import { withShop } from '../db/tenancy';
import { missing } from '../http/errors';
import { REPORT_HEADERS } from './columns';
import { layout as layoutSchema } from './layout';
import { guardCell } from './rejected-cells';

const AT_ONCE = 1000;
const errorList = z.array(
  z.object({
    column: z.string().nullable(),
    value: z.string().nullable(),
    message: z.string(),
    mend: z.string(),
  }),
);

/**
 * The rejected rows as they stood, under their own headers and with their own delimiter, so that the corrected file can be
 * sent as it is; what is wrong stands in columns of its own behind them.
 * @throws missing where the shop has no such import.
 */
export async function* rejectedCsv(
  database: Database,
  shopId: string,
  importId: string,
): AsyncGenerator<string, void, undefined> {
  const [found] = await withShop(database, shopId, (tx) =>
    tx.select({ layout: imports.layout }).from(imports).where(eq(imports.id, importId)),
  );
  if (!found) throw missing('import');
  const headers = found.layout === null ? ['repair'] : layoutSchema.parse(found.layout).headers;
  const delimiter = (found.layout === null ? null : layoutSchema.parse(found.layout).delimiter) ?? ',';
  const own = headers.filter((header) => !isReport(header));
  const places = headers.flatMap((header, at) => (isReport(header) ? [] : [at]));
  yield lineOf([...own, ...REPORT_HEADERS], delimiter);
  let after = 0;
  for (;;) {
    const rows = await withShop(database, shopId, (tx) =>
      tx
        .select({
          ordinal: importRejections.ordinal,
          line: importRejections.line,
          cells: importRejections.cells,
          errors: importRejections.errors,
        })
        .from(importRejections)
        .where(sql`${importRejections.importId} = ${importId} AND ${importRejections.ordinal} > ${after}`)
        .orderBy(importRejections.ordinal)
        .limit(AT_ONCE),
    );
    yield rows
      .map((row) => {
        const cells = z.array(z.string()).parse(row.cells);
        const errors = errorList.parse(row.errors);
        const told = errors.map(({ column, value, message }) =>
          [column, value === null ? null : `“${value}”`, message].filter((part) => part !== null).join(' '),
        );
        const report = [
          String(row.line),
          told.join(' | '),
          [...new Set(errors.map(({ mend }) => mend))].join(' | '),
        ];
        return lineOf([...places.map((at) => cells[at] ?? ''), ...report], delimiter);
      })
      .join('');
    if (rows.length < AT_ONCE) return;
    after = rows.at(-1)?.ordinal ?? after;
  }
}

const isReport = (header: string): boolean => (REPORT_HEADERS as readonly string[]).includes(header);

function lineOf(cells: readonly string[], delimiter: string): string {
  return `${cells
    .map((cell) => guardCell(cell))
    .map((cell) =>
      /["\r\n]/.test(cell) || cell.includes(delimiter) || cell !== cell.trim()
        ? `"${cell.replaceAll('"', '""')}"`
        : cell,
    )
    .join(delimiter)}\r\n`;
}
