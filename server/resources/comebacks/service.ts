import { sql, type SQL } from 'drizzle-orm';
import { z } from 'zod';
import { day } from '../../../shared/basics';
import type { Comeback, comebackQuery } from '../../../shared/comebacks';
import type { Transaction } from '../../db/client';
import { ownTechnicianId } from '../../db/own-technician';
import { shops } from '../../db/schema/index';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { decodeCursor, pageOf } from '../../http/cursor';
import { forbidden, missing } from '../../http/errors';
import { maySeePeople, permissionFor } from '../../http/permission';
import { presentComeback } from './present';
import { comebackConditions, findComebacks } from './queries';

const cursorKey = z.tuple([day, z.uuid()]);

export function listComebacks(deps: Deps, actor: Actor, query: z.output<typeof comebackQuery>) {
  const { limit, cursor, ...filter } = query;
  const after = decodeCursor(cursor, cursorKey);
  return withShop(deps.database, actor.shopId, async (tx) => {
    const own = await ownOnly(tx, actor);
    requireTechnicianAllowed(actor, filter.technicianId, own);
    const rows = await readRows(tx, comebackConditions(filter, own), { after, rows: limit + 1 });
    const { data, nextCursor } = pageOf(rows, limit, ({ firstWorkOn, id }) => [firstWorkOn, id]);
    return { data: data.map((row) => presentComeback(row, maySeePeople(actor))), nextCursor };
  });
}

/** @throws missing */
export async function readComeback(tx: Transaction, actor: Actor, id: string): Promise<Comeback> {
  const [row] = await readRows(tx, sql`e.return_id = ${id}`, { rows: 1 });
  if (!row) throw missing('comeback');
  return presentComeback(row, maySeePeople(actor));
}

async function readRows(
  tx: Transaction,
  conditions: SQL,
  page: { after?: readonly [string, string] | undefined; rows: number },
) {
  const [shop] = await tx.select({ doorRateCents: shops.doorRateCents }).from(shops);
  return findComebacks(tx, conditions, { ...page, doorRateCents: shop?.doorRateCents ?? 0 });
}

/** Whose comebacks alone may be seen: undefined for everybody's, null where the person is no technician here. */
async function ownOnly(tx: Transaction, actor: Actor): Promise<string | null | undefined> {
  if (permissionFor(actor, 'comebacks') !== 'own') return undefined;
  return (await ownTechnicianId(tx, actor)) ?? null;
}

/** One technician's comebacks are for those who may see rates by technician. */
function requireTechnicianAllowed(
  actor: Actor,
  technicianId: string | undefined,
  own: string | null | undefined,
): void {
  if (technicianId === undefined) return;
  const permission = permissionFor(actor, 'technicianRates');
  if (permission === '-' || (permission === 'own' && technicianId !== own)) throw forbidden();
}
