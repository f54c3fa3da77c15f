import { eq } from 'drizzle-orm';
import { createHash, randomUUID } from 'node:crypto';
import type pg from 'pg';
import type { BatchAnswer } from '../../../shared/imports';
import { imports, shops } from '../../db/schema/index';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { audit } from '../../http/audit';
import { AppError, invalid, type FieldError } from '../../http/errors';
import { applyStagedRepairs, REPAIR_TABLES, settleRepairs } from '../../imports/kind-repairs';
import { dayAfter } from '../../imports/parse-date';
import { readRemarks } from '../../imports/remarks';
import {
  changedAnything,
  waitForTurn,
  withImport,
  type ImportTransaction,
} from '../../imports/shop-transaction';
import { RepairStager } from '../../imports/stage-repairs';
import { Staging } from '../../imports/staging';
import { keepRejections } from '../../imports/write-rejections';
import { requestAnalysis } from '../../jobs/request-analysis';
import { todayIn } from '../session/service';
import { claimKey, keepAnswer, releaseKey } from './idempotency';
import { LINE_FIELDS_OF_BATCH, pointerTo, stageBatch } from './stage-batch';

const MOST_REPAIRS = 5000;
const LONGEST_WAIT_SECONDS = 20;
/** Far more than a repair has; what is refused is kept as it came, and writing it down must not run out of stack. */
const DEEPEST = 20;

type Rejected = BatchAnswer['rejected'];

/** Takes in repairs that a program sends, each judged on its own; the same key and content give the same answer. */
export async function takeBatch(
  deps: Deps,
  actor: Actor,
  repairs: readonly unknown[],
  key: string | undefined,
): Promise<BatchAnswer> {
  if (repairs.length > MOST_REPAIRS) {
    throw new AppError(
      'tooLarge',
      `A batch takes up to ${MOST_REPAIRS.toLocaleString('en-US')} repairs; this one has ${repairs.length.toLocaleString('en-US')}.`,
    );
  }
  if (isDeeperThan(DEEPEST, repairs)) throw invalid('The repairs are nested too deeply to be any.');
  if (key === undefined) return bringIn(deps, actor, repairs, undefined);
  const { shopId } = actor;
  const fingerprint = createHash('sha256').update(JSON.stringify(repairs)).digest('hex');
  const before = await withShop(deps.database, shopId, (tx) =>
    claimKey(tx, { shopId, key, fingerprint, now: deps.now() }),
  );
  if (before) return before;
  try {
    return await bringIn(deps, actor, repairs, key);
  } catch (error) {
    await withShop(deps.database, shopId, (tx) => releaseKey(tx, key, fingerprint));
    throw error;
  }
}

async function bringIn(
  deps: Deps,
  actor: Actor,
  repairs: readonly unknown[],
  key: string | undefined,
): Promise<BatchAnswer> {
  const { shopId } = actor;
  const importId = randomUUID();
  const answer = await withImport(deps.database, { shopId, importId }, async (transaction) => {
    const { tx, client } = transaction;
    const [shop] = await tx.select({ timeZone: shops.timeZone }).from(shops);
    await tx.insert(imports).values({
      shopId,
      id: importId,
      kind: 'repairs',
      source: 'batch',
      status: 'running',
      startedByUserId: actor.kind === 'user' ? actor.userId : null,
      createdAt: deps.now(),
      startedAt: deps.now(),
    });
    const staging = new Staging(client, REPAIR_TABLES);
    await staging.create();
    const lastDay = dayAfter(todayIn(shop?.timeZone ?? 'UTC', deps.now()));
    const misshapen = stageBatch(repairs, new RepairStager(staging), lastDay);
    await staging.finish();
    return settleBatch(deps, actor, { importId, repairs, misshapen, key }, transaction);
  });
  if (answer.analysis === 'pending') deps.jobs.wake('analysis');
  return answer;
}

type Batch = {
  importId: string;
  repairs: readonly unknown[];
  misshapen: ReadonlyMap<number, FieldError[]>;
  key: string | undefined;
};

async function settleBatch(
  deps: Deps,
  actor: Actor,
  batch: Batch,
  { tx, client }: ImportTransaction,
): Promise<BatchAnswer> {
  const { importId, repairs, key } = batch;
  await waitForTurn(client, LONGEST_WAIT_SECONDS);
  const found = await settleRepairs(client);
  const rejected = await listRejected(client, batch, found);
  const counts = await applyStagedRepairs(client, LINE_FIELDS_OF_BATCH);
  await keepRejections(
    tx,
    importId,
    rejected.map(({ index, repairNumber, errors }) => ({
      line: index + 1,
      repairNumber: repairNumber?.replaceAll('\0', '\u2400') ?? null,
      cells: [JSON.stringify(repairs[index] ?? null).replaceAll('\\u0000', '\\u2400')],
      errors: errors.map(({ path, message }) => ({
        column: path,
        value: null,
        message,
        mend: 'Correct it and send the repair again.',
      })),
    })),
  );
  const isChanged = await changedAnything(client);
  const analysisRunId = isChanged ? await requestAnalysis(tx, deps, actor.shopId) : null;
  const answer: BatchAnswer = { importId, ...counts, analysis: isChanged ? 'pending' : 'ready', rejected };
  await tx
    .update(imports)
    .set({
      status: 'done',
      rowsRead: repairs.length,
      rowsTotal: repairs.length,
      createdCount: counts.created,
      updatedCount: counts.updated,
      unchangedCount: counts.unchanged,
      rejectedCount: rejected.length,
      remarks: await readRemarks(client),
      analysisRunId,
      finishedAt: deps.now(),
    })
    .where(eq(imports.id, importId));
  await audit(tx, actor, {
    action: 'import',
    subject: 'import',
    subjectId: importId,
    detail: { kind: 'repairs', source: 'batch' },
  });
  if (key !== undefined) await keepAnswer(tx, key, answer);
  return answer;
}

/** By index: those of the wrong shape, and those that the rules refuse. */
async function listRejected(
  client: pg.PoolClient,
  { repairs, misshapen }: Batch,
  found: number,
): Promise<Rejected> {
  const byIndex = new Map<number, FieldError[]>(misshapen);
  if (found > 0) {
    const { rows } = await client.query<{
      row: number;
      column_name: string | null;
      message: string;
      mend: string;
    }>('SELECT row, column_name, message, mend FROM staged_faults ORDER BY row');
    for (const { row, column_name, message, mend } of rows) {
      const index = row - 1;
      const error = { path: pointerTo(index, column_name), message: `${message}. ${mend}` };
      byIndex.set(index, [...(byIndex.get(index) ?? []), error]);
    }
  }
  return [...byIndex]
    .sort(([a], [b]) => a - b)
    .map(([index, errors]) => ({ index, repairNumber: numberOf(repairs[index]), errors }));
}

function isDeeperThan(levels: number, value: unknown): boolean {
  if (typeof value !== 'object' || value === null) return false;
  return levels === 0 || Object.values(value).some((inner) => isDeeperThan(levels - 1, inner));
}

function numberOf(sent: unknown): string | null {
  if (typeof sent !== 'object' || sent === null || !('repairNumber' in sent)) return null;
  return typeof sent.repairNumber === 'string' ? sent.repairNumber.slice(0, 200) : null;
}
