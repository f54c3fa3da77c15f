import { and, eq } from 'drizzle-orm';
import type pg from 'pg';
import { randomUUID } from 'node:crypto';
import type { ImportKind } from '../../shared/imports';
import { importRejections, imports, shops } from '../db/schema/index';
import { withShop } from '../db/tenancy';
import type { Deps } from '../deps';
import { AppError } from '../http/errors';
import { requestAnalysis } from '../jobs/request-analysis';
import { todayIn } from '../resources/session/service';
import type { Counts, KindWork, MakeKindWork, Remark } from './kind-work';
import { partsWork } from './kind-parts';
import { repairsWork } from './kind-repairs';
import { unitsWork } from './kind-units';
import { layout as layoutSchema, unusedHeaders, type Layout } from './layout';
import { dataRows } from './open-table';
import { dayAfter } from './parse-date';
import { changedAnything, waitForTurn, withImport, type ImportTransaction } from './shop-transaction';
import { removeSpooled } from './spool';
import { Staging } from './staging';
import { writeRejections } from './write-rejections';

const WORK: Record<ImportKind, MakeKindWork> = { repairs: repairsWork, units: unitsWork, parts: partsWork };
const LONGEST_WAIT_SECONDS = 3600;
const PROGRESS_EVERY_MS = 700;

type Ids = { shopId: string; importId: string };
type Job = Ids & { work: KindWork; layout: Layout; filePath: string; isDryRun: boolean };
type Outcome = Counts & { rowsRead: number; rejected: number; remarks: Remark[] };

/** Leaves a transaction that did everything, so that nothing stays. */
class DryRunOver extends Error {
  constructor(readonly outcome: Outcome) {
    super('dry run');
  }
}

/** Works off one queued import: all of it goes in, or nothing; what happened is in its row either way. */
export async function runImport(deps: Deps, ids: Ids): Promise<void> {
  const started = await start(deps, ids);
  if (!started) return;
  const { filePath } = started;
  try {
    const job: Job = { ...ids, ...started };
    await (job.isDryRun ? rehearse(deps, job) : perform(deps, job));
    if (!job.isDryRun) deps.jobs.wake('analysis');
  } catch (error) {
    await fail(deps, ids, error);
  } finally {
    // A file that was only tried stays for the import itself, until the sweep.
    if (!started.isDryRun) await removeSpooled(filePath);
  }
}

async function start(deps: Deps, { shopId, importId }: Ids): Promise<Omit<Job, keyof Ids> | undefined> {
  const [row] = await withShop(deps.database, shopId, async (tx) => {
    const taken = await tx
      .update(imports)
      .set({ status: 'running', startedAt: deps.now() })
      .where(and(eq(imports.id, importId), eq(imports.status, 'queued')))
      .returning();
    const [shop] = await tx.select({ timeZone: shops.timeZone }).from(shops);
    await tx.delete(importRejections).where(eq(importRejections.importId, importId));
    return taken.map((one) => ({ ...one, timeZone: shop?.timeZone ?? 'UTC' }));
  });
  if (!row?.spoolPath) return undefined;
  const layout = layoutSchema.parse(row.layout);
  const lastDay = dayAfter(todayIn(row.timeZone, deps.now()));
  const make = WORK[row.kind as ImportKind];
  const rules = { decimal: layout.decimal, dateFormat: layout.dateFormat, lastDay };
  return { work: make(layout, rules), layout, filePath: row.spoolPath, isDryRun: row.isDryRun };
}

async function perform(deps: Deps, job: Job): Promise<void> {
  await withImport(deps.database, job, async (transaction) => {
    const outcome = await bringIn(deps, job, transaction);
    const analysisRunId = (await changedAnything(transaction.client))
      ? await requestAnalysis(transaction.tx, deps, job.shopId)
      : null;
    await transaction.tx
      .update(imports)
      .set({ ...settled(deps, outcome), analysisRunId })
      .where(eq(imports.id, job.importId));
  });
}

async function rehearse(deps: Deps, job: Job): Promise<void> {
  try {
    await withImport(deps.database, job, async (transaction) => {
      throw new DryRunOver(await bringIn(deps, job, transaction));
    });
  } catch (error) {
    if (!(error instanceof DryRunOver)) throw error;
    await withShop(deps.database, job.shopId, (tx) =>
      tx.update(imports).set(settled(deps, error.outcome)).where(eq(imports.id, job.importId)),
    );
  }
}

const settled = (deps: Deps, outcome: Outcome) => ({
  status: 'done',
  error: null,
  rowsRead: outcome.rowsRead,
  rowsTotal: outcome.rowsRead,
  createdCount: outcome.created,
  updatedCount: outcome.updated,
  unchangedCount: outcome.unchanged,
  rejectedCount: outcome.rejected,
  remarks: outcome.remarks,
  finishedAt: deps.now(),
});

/** Reads, stages, settles and applies within the transaction; ends just before the import is called done. */
async function bringIn(deps: Deps, job: Job, { client }: ImportTransaction): Promise<Outcome> {
  const { work, layout } = job;
  const rowsRead = await stage(deps, job, client);
  await waitForTurn(client, LONGEST_WAIT_SECONDS);
  const rejected = await work.settle(client);
  if (rejected > 0) {
    await writeRejections(
      { client, rejectedRecords: work.rejectedRecords, filePath: job.filePath, layout },
      { database: deps.database, shopId: job.shopId, importId: job.importId },
    );
  }
  const counts = await work.apply(client);
  const unused = unusedHeaders(layout);
  const remarks = await work.remark(client);
  if (unused.length > 0) {
    const named = unused
      .slice(0, 20)
      .map((header) => header.slice(0, 60))
      .join(', ');
    remarks.unshift({
      kind: 'headers_not_used',
      text: `columns that nothing is read from: ${named}`,
      count: unused.length,
    });
  }
  return { ...counts, rowsRead, rejected, remarks };
}

async function stage(deps: Deps, job: Job, client: pg.PoolClient): Promise<number> {
  const staging = new Staging(client, job.work.tables);
  await staging.create();
  const taker = job.work.open(staging);
  let number = 0;
  let toldAt = performance.now();
  for await (const rows of dataRows(job.filePath, job.layout, job.layout.decimal)) {
    for (const row of rows) taker.add(row, ++number);
    await staging.breathe();
    if (performance.now() - toldAt < PROGRESS_EVERY_MS) continue;
    toldAt = performance.now();
    await tell(deps, job, number);
  }
  taker.end();
  await staging.finish();
  return number;
}

/** On a connection of its own, since the import's transaction shows nothing before it ends. */
async function tell(deps: Deps, { shopId, importId, layout }: Job, rowsRead: number): Promise<void> {
  const rowsTotal = layout.rowsExpected === null ? null : Math.max(layout.rowsExpected, rowsRead);
  await withShop(deps.database, shopId, (tx) =>
    tx.update(imports).set({ rowsRead, rowsTotal }).where(eq(imports.id, importId)),
  );
}

async function fail(deps: Deps, { shopId, importId }: Ids, error: unknown): Promise<void> {
  const isKnown = error instanceof AppError;
  const errorId = randomUUID();
  if (!isKnown) deps.logger.error({ err: error, errorId, importId }, 'import failed');
  const text = isKnown
    ? [error.message, ...error.errors.map(({ message }) => message)].join(' ')
    : `Something went wrong here; nothing was taken in. Tell whoever runs this program the number ${errorId}.`;
  await withShop(deps.database, shopId, (tx) =>
    tx
      .update(imports)
      .set({ status: 'failed', error: text, finishedAt: deps.now() })
      .where(eq(imports.id, importId)),
  );
}
