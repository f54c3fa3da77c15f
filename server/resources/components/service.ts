import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { wilsonInterval } from '../../../analytics';
import type { ComponentListed, componentQuery } from '../../../shared/parts';
import type { Transaction } from '../../db/client';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { decodeCursor, pageOf } from '../../http/cursor';
import { missing } from '../../http/errors';
import { hidesRates } from '../../returns/shop-average';
import { componentConditions, findComponents, type ComponentRow } from './queries';

const cursorKey = z.tuple([z.string()]);

export function listComponents(deps: Deps, actor: Actor, query: z.output<typeof componentQuery>) {
  const { limit, cursor, q, modelId } = query;
  const after = decodeCursor(cursor, cursorKey)?.[0];
  return withShop(deps.database, actor.shopId, async (tx) => {
    const rows = await findComponents(tx, componentConditions({ q, modelId }, after), {
      rows: limit + 1,
      modelId,
    });
    const { data, nextCursor } = pageOf(rows, limit, ({ sortKey }) => [sortKey]);
    const isHidden = await hidesRates(tx, actor);
    return { data: data.map((row) => presentListed(row, isHidden)), nextCursor };
  });
}

/** @throws missing */
export const readComponent = (deps: Deps, actor: Actor, id: string): Promise<ComponentListed> =>
  withShop(deps.database, actor.shopId, (tx) => presentOne(tx, actor, id));

/** @throws missing */
export async function presentOne(tx: Transaction, actor: Actor, id: string): Promise<ComponentListed> {
  const [row] = await findComponents(tx, sql`c.id = ${id}`, { rows: 1 });
  if (!row) throw missing('component');
  return presentListed(row, await hidesRates(tx, actor));
}

function presentListed({ sortKey: _, ...row }: ComponentRow, isHidden: boolean): ComponentListed {
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
