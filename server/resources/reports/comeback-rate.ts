import type { z } from 'zod';
import { comebackRates, type ComebackRateRow } from '../../../analytics/records/comeback-rates';
import { dayNumber } from '../../../analytics/records/day-number';
import type { RateRow, rateQuery } from '../../../shared/reports';
import { lastAnalysis } from '../../db/last-analysis';
import { ownTechnicianId } from '../../db/own-technician';
import { shops } from '../../db/schema/index';
import { withShop } from '../../db/tenancy';
import type { Transaction } from '../../db/client';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { forbidden } from '../../http/errors';
import { permissionFor } from '../../http/permission';
import { countRateRepairs, loadRateReturns } from '../../returns/load-rates';
import { hidesShopAverage } from '../../returns/shop-average';
import { findNames } from './queries';

type RateQuery = z.output<typeof rateQuery>;

/**
 * Comeback rates; whole months from that of `from` to that of `to`, other rows of the work between the two days.
 * A technician gets their own row alone, and no rates of the shop where these would give away another's.
 */
export function reportComebackRate(
  deps: Deps,
  actor: Actor,
  query: RateQuery,
): Promise<{ data: RateRow[]; nextCursor: null }> {
  const permission = permissionFor(actor, 'technicianRates');
  if (query.by === 'technician' && permission === '-') throw forbidden();
  return withShop(deps.database, actor.shopId, async (tx) => {
    const rows = await ratesBy(tx, query);
    if (!(await hidesShopAverage(tx, actor))) {
      const own = query.by === 'technician' && permission === 'own' ? await ownTechnicianId(tx, actor) : null;
      return answer(own === null ? rows : rows.filter(({ key }) => key === own));
    }
    const own = query.by === 'technician' ? await ownTechnicianId(tx, actor) : undefined;
    // What is drawn toward the common rate tells the common rate.
    const bare = { projected: null, shrunken: null, shrunkenInterval: null };
    return answer(rows.filter(({ key }) => key === own).map((row) => ({ ...row, ...bare })));
  });
}

const answer = (data: RateRow[]) => ({ data, nextCursor: null });

async function ratesBy(tx: Transaction, { by, from, to }: RateQuery): Promise<RateRow[]> {
  const asOf = (await lastAnalysis(tx))?.asOf;
  if (!asOf) return [];
  const [shop] = await tx.select({ windowDays: shops.windowDays }).from(shops);
  const windowDays = shop?.windowDays ?? 90;
  const range = by === 'month' ? {} : { from, to };
  const { repairs, others } = await countRateRepairs(tx, { by, asOf, windowDays, ...range });
  const comebacks = await loadRateReturns(tx);
  const rows = comebackRates({ by, repairs, others, comebacks, windowDays, asOfDay: dayNumber(asOf) });
  if (by === 'month') {
    return rows
      .filter(({ key }) => (!from || key >= from.slice(0, 7)) && (!to || key <= to.slice(0, 7)))
      .map((row) => presentRate(row, row.key));
  }
  const names = await findNames(
    tx,
    by,
    rows.map(({ key }) => key),
  );
  return rows
    .map((row) => presentRate(row, names.get(row.key)?.name ?? row.key))
    .sort((a, b) => b.count - a.count || b.size - a.size || (a.label < b.label ? -1 : 1));
}

export function presentRate(row: ComebackRateRow, label: string): RateRow {
  const { center: _center, signal: _signal, ...rest } = row;
  return { ...rest, label };
}
