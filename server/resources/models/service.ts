import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { wilsonInterval } from '../../../analytics';
import { chooseClock, toObservations } from '../../../analytics/records/life-observations';
import type { PartLife } from '../../../analytics/records/part-life';
import { groupRows } from '../../../analytics/records/record-types';
import type { ModelListed, ModelWhole, modelQuery } from '../../../shared/machines';
import { lastAnalysis } from '../../db/last-analysis';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { decodeCursor, pageOf } from '../../http/cursor';
import { missing } from '../../http/errors';
import { loadLives } from '../../lives/load-lives';
import { weibullOf } from '../../lives/weibull-of-lives';
import { describeRecurrence } from '../../machines/describe-recurrence';
import { loadHistories } from '../../machines/load-histories';
import { hidesRates } from '../../returns/shop-average';
import {
  findModelComponents,
  findModelFindings,
  findModels,
  modelConditions,
  type ModelComponentRow,
  type ModelRow,
} from './queries';

const cursorKey = z.tuple([z.string(), z.string()]);

export function listModels(deps: Deps, actor: Actor, query: z.output<typeof modelQuery>) {
  const { limit, cursor, ...filter } = query;
  const after = decodeCursor(cursor, cursorKey);
  return withShop(deps.database, actor.shopId, async (tx) => {
    const rows = await findModels(tx, modelConditions(filter, after), limit + 1);
    const { data, nextCursor } = pageOf(rows, limit, ({ sortKey }) => sortKey);
    const isHidden = await hidesRates(tx, actor);
    return { data: data.map((row) => presentListed(row, isHidden)), nextCursor };
  });
}

/** @throws missing */
export function readModel(deps: Deps, actor: Actor, id: string): Promise<ModelWhole> {
  return withShop(deps.database, actor.shopId, async (tx) => {
    const [row] = await findModels(tx, sql`m.id = ${id}`, 1);
    if (!row) throw missing('model');
    const asOf = (await lastAnalysis(tx))?.asOf;
    const livesOf = groupRows(
      await loadLives(tx, { componentId: null, modelIds: [id] }),
      ({ componentId }) => componentId,
    );
    const histories = asOf ? await loadHistories(tx, [id], asOf) : [];
    return {
      ...presentListed(row, await hidesRates(tx, actor)),
      components: (await findModelComponents(tx, id)).map((component) =>
        presentComponent(component, livesOf.get(component.component.id) ?? []),
      ),
      recurrence: describeRecurrence(histories[0]),
      findingsHere: await findModelFindings(tx, id),
    };
  });
}

function presentComponent(
  row: ModelComponentRow,
  lives: readonly PartLife[],
): ModelWhole['components'][number] {
  const clock = chooseClock(lives);
  const { weibull, pattern } = weibullOf(toObservations(lives, { clock }).observations);
  const half = weibull.kind === 'estimate' ? weibull.bLives.find(({ percent }) => percent === 50) : undefined;
  return {
    ...row,
    clock,
    halfBy: half?.estimate ?? null,
    halfByInterval: { lower: half?.lower ?? null, upper: half?.upper ?? null },
    pattern,
  };
}

function presentListed({ sortKey: _, ...row }: ModelRow, isHidden: boolean): ModelListed {
  const [count, size] = isHidden ? [0, 0] : [row.comebackCount, row.comebackSize];
  const { estimate, lower, upper } = wilsonInterval(count, size);
  return {
    ...row,
    comebackCount: count,
    comebackSize: size,
    comebackRate: estimate,
    comebackInterval: { lower, upper },
  };
}
