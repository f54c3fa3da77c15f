import { desc, eq } from 'drizzle-orm';
import type { Transaction } from '../db/client';
import { analysisRuns } from '../db/schema/index';
import type { Deps } from '../deps';

/**
 * Asks for a new analysis of a shop in the use case's transaction, or joins one that waits: changes close together share
 * it. Answers the run's id; call `deps.jobs.wake('analysis')` once the transaction is committed.
 */
export async function requestAnalysis(
  tx: Transaction,
  deps: Pick<Deps, 'jobs'>,
  shopId: string,
): Promise<string> {
  // The lock holds the waiting run back until this transaction is committed, so that it sees what was changed here.
  const [waiting] = await tx
    .select({ id: analysisRuns.id })
    .from(analysisRuns)
    .where(eq(analysisRuns.state, 'pending'))
    .orderBy(desc(analysisRuns.requestedAt))
    .limit(1)
    .for('update');
  if (waiting) return waiting.id;
  const [run] = await tx.insert(analysisRuns).values({ shopId }).returning({ id: analysisRuns.id });
  if (!run) throw new Error('no analysis row');
  await deps.jobs.send(tx, 'analysis', { shopId, runId: run.id });
  return run.id;
}
