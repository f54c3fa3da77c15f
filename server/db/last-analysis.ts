import { desc, eq } from 'drizzle-orm';
import type { Transaction } from './client';
import { analysisRuns } from './schema/index';

/** The last analysis that finished well: what everything derived is as of. */
export async function lastAnalysis(tx: Transaction) {
  const [run] = await tx
    .select({ asOf: analysisRuns.asOf, finishedAt: analysisRuns.finishedAt, summary: analysisRuns.summary })
    .from(analysisRuns)
    .where(eq(analysisRuns.state, 'ready'))
    .orderBy(desc(analysisRuns.finishedAt))
    .limit(1);
  return run;
}

/** How the newest analysis stands, finished or not. */
export async function analysisState(tx: Transaction) {
  const [run] = await tx
    .select({ state: analysisRuns.state })
    .from(analysisRuns)
    .orderBy(desc(analysisRuns.requestedAt))
    .limit(1);
  const state = run?.state;
  return state === 'pending' || state === 'running' || state === 'ready' || state === 'failed'
    ? state
    : 'none';
}
