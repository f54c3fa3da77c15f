import { eq, sql, type SQL } from 'drizzle-orm';
import { z } from 'zod';
import { IMPORT_KINDS, importState, type ImportState } from '../../shared/imports';
import type { Database, Transaction } from '../db/client';
import { analysisRuns, imports, users } from '../db/schema/index';
import { withShop } from '../db/tenancy';
import { missing } from '../http/errors';

const remarks = z.array(z.object({ kind: z.string(), text: z.string(), count: z.number() }));
const states = importState.shape;

/** Imports with the state of the analysis that includes them. */
export function selectImports(tx: Transaction) {
  return tx
    .select({
      id: imports.id,
      kind: imports.kind,
      source: imports.source,
      fileName: imports.fileName,
      isDryRun: imports.isDryRun,
      status: imports.status,
      analysisState: analysisRuns.state,
      rowsRead: imports.rowsRead,
      rowsTotal: imports.rowsTotal,
      created: imports.createdCount,
      updated: imports.updatedCount,
      unchanged: imports.unchangedCount,
      rejected: imports.rejectedCount,
      error: imports.error,
      remarks: imports.remarks,
      startedBy: users.displayName,
      createdAt: imports.createdAt,
      // As exact as the database keeps it, for the order of pages.
      createdKey: sql<string>`${imports.createdAt}::text`,
      finishedAt: imports.finishedAt,
    })
    .from(imports)
    .leftJoin(analysisRuns, eq(analysisRuns.id, imports.analysisRunId))
    .leftJoin(users, eq(users.id, imports.startedByUserId))
    .$dynamic();
}

export type ImportRow = Awaited<ReturnType<typeof selectImports>>[number];

export function presentImport(row: ImportRow): ImportState {
  return {
    id: row.id,
    kind: z.enum(IMPORT_KINDS).parse(row.kind),
    source: states.source.parse(row.source),
    fileName: row.fileName,
    isDryRun: row.isDryRun,
    status: states.status.parse(row.status),
    analysis: analysisOf(row),
    rowsRead: row.rowsRead,
    rowsTotal: row.rowsTotal,
    created: row.created,
    updated: row.updated,
    unchanged: row.unchanged,
    rejected: row.rejected,
    error: row.error,
    remarks: remarks.parse(row.remarks ?? []),
    startedBy: row.startedBy,
    createdAt: row.createdAt.toISOString(),
    finishedAt: row.finishedAt?.toISOString() ?? null,
  };
}

/** Without a run there is nothing to wait for once the import is over: it changed nothing. */
function analysisOf({ analysisState, status }: ImportRow): ImportState['analysis'] {
  if (analysisState !== null) return states.analysis.parse(analysisState);
  if (status === 'failed') return 'failed';
  return status === 'queued' || status === 'running' ? 'pending' : 'ready';
}

/** @throws missing where the shop has no such import. */
export async function readImport(database: Database, shopId: string, importId: string): Promise<ImportState> {
  return withShop(database, shopId, (tx) => readImportIn(tx, eq(imports.id, importId)));
}

export async function readImportIn(tx: Transaction, condition: SQL): Promise<ImportState> {
  const [row] = await selectImports(tx).where(condition);
  if (!row) throw missing('import');
  return presentImport(row);
}
