import type { z } from 'zod';
import { comebackRates, latestJudgeableMonth } from '../../../analytics/records/comeback-rates';
import { dayNumber, dayText, monthOf } from '../../../analytics/records/day-number';
import { byTheDoor, firstVisitCure } from '../../../analytics/records/first-visit-cure';
import type { MonthReview, monthQuery } from '../../../shared/reports';
import { businessDay } from '../../db/business-day';
import type { Transaction } from '../../db/client';
import { analysisState, lastAnalysis } from '../../db/last-analysis';
import { shops } from '../../db/schema/index';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { forbidden } from '../../http/errors';
import {
  countRateRepairs,
  loadRateRepairs,
  loadRateReturns,
  type RateReturn,
} from '../../returns/load-rates';
import { hidesShopAverage } from '../../returns/shop-average';
import { presentRate } from './comeback-rate';
import { driversOf, twelveMonthsTo } from './drivers';
import { findCosts, findCounts, findSystems } from './queries';
import { todosOf } from './todos';

/**
 * The review of a month of work: the latest that can be judged, or the one asked for.
 * @throws forbidden where the shop's rate would tell a technician another's
 */
export function reviewMonth(
  deps: Deps,
  actor: Actor,
  query: z.output<typeof monthQuery>,
): Promise<MonthReview> {
  return withShop(deps.database, actor.shopId, async (tx) => {
    if (await hidesShopAverage(tx, actor))
      throw forbidden('With so few technicians the shop’s rate would give away another’s: see your own.');
    const [shop] = await tx
      .select({ windowDays: shops.windowDays, doorRateCents: shops.doorRateCents })
      .from(shops);
    const { windowDays, doorRateCents } = shop ?? { windowDays: 90, doorRateCents: 0 };
    const { repairsInAll, unidentified, ...waiting } = await findCounts(tx);
    const asOf = (await lastAnalysis(tx))?.asOf ?? (await businessDay(tx, deps.now()));
    const asOfDay = dayNumber(asOf);
    const comebacks = await loadRateReturns(tx);
    const counted = await countRateRepairs(tx, { by: 'month', asOf, windowDays });
    const rows = comebackRates({ by: 'month', ...counted, comebacks, windowDays, asOfDay });
    const asked = query.month ?? latestJudgeableMonth(asOfDay, windowDays);
    const headline = rows.find(({ key }) => key === asked);
    const { firstDay, lastDay } = twelveMonthsTo(asked);
    const repairs = await loadRateRepairs(tx, { from: dayText(firstDay), to: dayText(lastDay) });
    const ofMonth = repairs.filter(({ workDay }) => monthOf(workDay) === asked);
    const { cured, of, interval } = firstVisitCure({ repairs: ofMonth, comebacks, windowDays, asOfDay });
    const back = countedIn(comebacks, asked, new Set(ofMonth.map(({ id }) => id)));
    const costs = await findCosts(
      tx,
      comebacks.flatMap(({ id, firstWorkDay }) =>
        firstWorkDay >= firstDay && firstWorkDay <= lastDay ? [id] : [],
      ),
      doorRateCents,
    );
    const isSignal = headline?.signal === 'high' || headline?.signal === 'low';
    return {
      windowDays,
      asOf,
      analysis: await analysisState(tx),
      month: headline?.key ?? null,
      repairsInAll,
      unidentified,
      rows: rows.map((row) => presentRate(row, row.key)),
      center: headline?.center ?? null,
      isSignal,
      signalSystem: headline?.signal === 'high' ? await systemOf(tx, back) : null,
      firstVisitCure: { cured, of, interval },
      byTheDoor: byTheDoor(comebacks, monthOf(asOfDay)),
      costCents: back.reduce((sum, { id }) => sum + (costs.get(id) ?? 0), 0),
      costOfComebacks: back.length,
      drivers: await driversOf(tx, { repairs, comebacks, costs }),
      todos: todosOf({ ...waiting, unidentified }),
    };
  });
}

function countedIn(comebacks: readonly RateReturn[], month: string, eligible: ReadonlySet<string>) {
  return comebacks.filter(
    ({ firstWorkDay, firstRepairId, isCounted }) =>
      isCounted && monthOf(firstWorkDay) === month && eligible.has(firstRepairId),
  );
}

/** The system that most of a month's comebacks are about. */
async function systemOf(
  tx: Transaction,
  comebacks: readonly RateReturn[],
): Promise<MonthReview['signalSystem']> {
  const systems = await findSystems(tx, [
    ...new Set(comebacks.flatMap(({ componentId }) => componentId ?? [])),
  ]);
  const counts = new Map<string, number>();
  for (const { componentId } of comebacks) {
    const system = componentId === null ? undefined : systems.get(componentId);
    if (system !== undefined) counts.set(system, (counts.get(system) ?? 0) + 1);
  }
  const [most] = [...counts].sort(([a, countA], [b, countB]) => countB - countA || (a < b ? -1 : 1));
  return most ? { system: most[0], count: most[1] } : null;
}
