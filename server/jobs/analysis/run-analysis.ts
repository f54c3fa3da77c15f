import { eq, sql } from 'drizzle-orm';
import type { ComebackDecision } from '../../../analytics/records/comeback-types';
import { dayNumber, dayText } from '../../../analytics/records/day-number';
import type { Transaction } from '../../db/client';
import { analysisRuns, comebackDecisions, shops } from '../../db/schema/index';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import { sqlStateOf } from '../../http/problem';
import { todayIn } from '../../resources/session/service';
import { derive, type Derived } from './compute';
import { loadRecords, type ShopRecords } from './load-records';
import { writeComebacks, writeRepairFacts } from './write-comebacks';
import { writeFindings } from './write-findings';
import { writeLives, writeMeterFaults } from './write-lives';

type AnalysisDeps = Pick<Deps, 'database' | 'logger' | 'now'>;
const FOREIGN_KEY = '23503';
const TRIES = 3;

/**
 * Derives everything of one shop anew and replaces it in one transaction: a reader sees the old figures or the new.
 * Records that were removed while it computed make it start over; any other failure is noted on the run.
 */
export async function runAnalysis(
  deps: AnalysisDeps,
  { shopId, runId }: { shopId: string; runId: string },
): Promise<void> {
  const isOurs = await withShop(deps.database, shopId, (tx) => claim(tx, runId, deps.now()));
  if (!isOurs) return;
  for (let attempt = 1; ; attempt++) {
    try {
      await deriveAndWrite(deps, shopId, runId);
      return;
    } catch (error) {
      const wereRemoved = error instanceof Error && sqlStateOf(error) === FOREIGN_KEY;
      if (wereRemoved && attempt < TRIES) continue;
      deps.logger.error({ err: error, shopId, runId }, 'analysis failed');
      await failAnalysis(deps, { shopId, runId });
      return;
    }
  }
}

/** From here on a new request makes a run of its own, since this one may have read the records already. */
async function claim(tx: Transaction, runId: string, now: Date): Promise<boolean> {
  const { rowCount } = await tx
    .update(analysisRuns)
    .set({ state: 'running', startedAt: now })
    .where(sql`${analysisRuns.id} = ${runId} AND ${analysisRuns.state} = 'pending'`);
  return rowCount === 1;
}

async function deriveAndWrite(deps: AnalysisDeps, shopId: string, runId: string): Promise<void> {
  const { records, decisions, shop } = await withShop(
    deps.database,
    shopId,
    async (tx) => ({
      records: await loadRecords(tx),
      decisions: await loadDecisions(tx),
      shop: await loadShop(tx),
    }),
    { isolationLevel: 'repeatable read', accessMode: 'read only' },
  );
  const today = dayNumber(todayIn(shop.timeZone, deps.now()));
  const asOfDay = Math.min(records.lastDay ?? today, today);
  const derived = derive(records, { ...shop, asOfDay, decisions });
  await withShop(deps.database, shopId, async (tx) => {
    await writeMeterFaults(tx, derived.meters);
    await writeRepairFacts(tx, derived.facts);
    await writeLives(tx, derived.lives);
    await writeFindings(tx, derived.cascades.findings, records);
    await writeComebacks(tx, derived.comebacks);
    await tx
      .update(analysisRuns)
      .set({
        state: 'ready',
        asOf: dayText(asOfDay),
        finishedAt: deps.now(),
        summary: summaryOf(derived, records),
      })
      .where(eq(analysisRuns.id, runId));
  });
}

/** Notes that a run came to nothing; the figures from before still stand. */
export async function failAnalysis(
  deps: Pick<Deps, 'database' | 'now'>,
  { shopId, runId }: { shopId: string; runId: string },
): Promise<void> {
  await withShop(deps.database, shopId, (tx) =>
    tx
      .update(analysisRuns)
      .set({
        state: 'failed',
        finishedAt: deps.now(),
        error: 'The figures could not be computed; those from before still stand.',
      })
      .where(eq(analysisRuns.id, runId)),
  );
}

async function loadDecisions(tx: Transaction): Promise<ComebackDecision[]> {
  const rows = await tx
    .select({
      returnRepairId: comebackDecisions.returnRepairId,
      status: comebackDecisions.status,
      reason: comebackDecisions.reason,
      isOurs: comebackDecisions.isOurs,
      attachedToRepairId: comebackDecisions.attachedToRepairId,
    })
    .from(comebackDecisions);
  return rows.map(({ status, reason, ...decision }) => ({
    ...decision,
    status: status as ComebackDecision['status'],
    reason: reason as ComebackDecision['reason'],
  }));
}

async function loadShop(tx: Transaction) {
  const [shop] = await tx
    .select({ timeZone: shops.timeZone, windowDays: shops.windowDays, windowHours: shops.windowHours })
    .from(shops);
  if (!shop) throw new Error('The shop of this analysis is gone.');
  return shop;
}

/** What the run looked at, for the pages that say so. */
function summaryOf({ cascades, lives, comebacks }: Derived, records: ShopRecords) {
  return {
    examined: cascades.examined,
    warnings: cascades.warnings,
    caseFiles: cascades.caseFiles,
    lives: lives.length,
    comebacks: comebacks.length,
    repairs: records.repairs.length,
  };
}
