import { desc, eq, sql } from 'drizzle-orm';
import type { Transaction } from '../../db/client';
import { importRejections, imports } from '../../db/schema/index';
import { selectImports } from '../../imports/import-state';

export type ImportsAfter = readonly [createdAt: string, id: string];

export function listImportRows(tx: Transaction, limit: number, after: ImportsAfter | undefined) {
  return selectImports(tx)
    .where(
      after && sql`(${imports.createdAt}, ${imports.id}) < (${after[0]}::timestamptz, ${after[1]}::uuid)`,
    )
    .orderBy(desc(imports.createdAt), desc(imports.id))
    .limit(limit + 1);
}

export function listRejectionRows(tx: Transaction, importId: string, limit: number, after: number) {
  return tx
    .select({
      ordinal: importRejections.ordinal,
      line: importRejections.line,
      repairNumber: importRejections.repairNumber,
      errors: importRejections.errors,
    })
    .from(importRejections)
    .where(sql`${importRejections.importId} = ${importId} AND ${importRejections.ordinal} > ${after}`)
    .orderBy(importRejections.ordinal)
    .limit(limit + 1);
}

export async function hasImport(tx: Transaction, importId: string): Promise<boolean> {
  const rows = await tx.select({ id: imports.id }).from(imports).where(eq(imports.id, importId));
  return rows.length === 1;
}
