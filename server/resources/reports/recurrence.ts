import type { z } from 'zod';
import type { Recurrence } from '../../../shared/machines';
import type { MeanTimeRow, meanQuery } from '../../../shared/reports';
import type { Named } from '../../../shared/basics';
import { lastAnalysis } from '../../db/last-analysis';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { describeRecurrence } from '../../machines/describe-recurrence';
import { loadHistories } from '../../machines/load-histories';
import { findModels } from './queries';

type Query = z.output<typeof meanQuery>;

/** The mean number of repairs of a machine by its age, for each model. */
export async function reportMeanCumulative(deps: Deps, actor: Actor, query: Query) {
  return { data: await recurrences(deps, actor, query), nextCursor: null };
}

/** Mean days between repairs, for each model where the records can say it. */
export async function reportMeanTimeBetween(deps: Deps, actor: Actor, query: Query) {
  const data = (await recurrences(deps, actor, query)).map((row): MeanTimeRow => {
    const { rows: _rows, kind: _kind, reason: _reason, ...rest } = row;
    return { ...rest, reason: whyNoMean(row) };
  });
  return { data, nextCursor: null };
}

function whyNoMean({ machines, amongThoseThatCameIn, trend }: Recurrence): MeanTimeRow['reason'] {
  if (machines === 0) return 'no_machines';
  if (amongThoseThatCameIn) return 'came_in';
  return trend === 'rising' || trend === 'falling' ? 'trend' : null;
}

function recurrences(deps: Deps, actor: Actor, query: Query): Promise<(Recurrence & { model: Named })[]> {
  return withShop(deps.database, actor.shopId, async (tx) => {
    const asOf = (await lastAnalysis(tx))?.asOf;
    const models = await findModels(tx, query);
    if (!asOf) return [];
    const found = await loadHistories(
      tx,
      models.map(({ id }) => id),
      asOf,
    );
    const byModel = new Map(found.map((row) => [row.modelId, row]));
    return models.map((model) => ({ ...describeRecurrence(byModel.get(model.id)), model }));
  });
}
